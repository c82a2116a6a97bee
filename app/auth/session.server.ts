import { and, eq, gt, isNull, lte, ne } from "drizzle-orm";
import { createCookie } from "react-router";
import { inTransaction, type Database } from "~/db.server";
import { env } from "~/env.server";
import type { SessionId, UserId } from "#drizzle/schema/ids";
import { sessions, shops, users } from "#drizzle/schema/index";
import type { Anonymous, Scope } from "./scope.server";
import { hashSecret, newSecret } from "./secret.server";
import type { Viewer } from "./viewer";

// Long, because being signed out at the car with gloves on is worse than a device that stays signed in.
const LIFETIME_MS = 90 * 24 * 3_600_000;
const RENEW_SEEN_AFTER_MS = 10 * 60_000;

let cookie: ReturnType<typeof createCookie> | undefined;

function sessionCookie() {
  cookie ??= createCookie("__Host-castlenut", {
    secrets: [env().SESSION_SECRET],
    httpOnly: true,
    secure: true,
    sameSite: "lax",
    path: "/",
    maxAge: LIFETIME_MS / 1000,
  });
  return cookie;
}

async function readSecret(request: Request): Promise<string | undefined> {
  const value: unknown = await sessionCookie().parse(request.headers.get("Cookie"));
  return typeof value === "string" ? value : undefined;
}

/** Starts a session for a person on this device and returns the Set-Cookie header. A former one on it ends. */
export async function startSession(
  from: Anonymous,
  userId: UserId,
  request: Request,
  now: number,
): Promise<string> {
  const former = await readSecret(request);
  const secret = newSecret();
  const user = from.db.select({ shopId: users.shopId }).from(users).where(eq(users.id, userId)).get();
  if (!user) throw new Error("a session needs a user");
  inTransaction(from, ({ db }) => {
    if (former)
      db.delete(sessions)
        .where(eq(sessions.tokenHash, hashSecret(former)))
        .run();
    db.delete(sessions)
      .where(and(eq(sessions.userId, userId), lte(sessions.expiresAt, now)))
      .run();
    db.insert(sessions)
      .values({
        shopId: user.shopId,
        userId,
        tokenHash: hashSecret(secret),
        device: (request.headers.get("User-Agent") ?? "").slice(0, 200),
        createdAt: now,
        lastSeenAt: now,
        expiresAt: now + LIFETIME_MS,
      })
      .run();
    db.update(users).set({ lastSeenAt: now }).where(eq(users.id, userId)).run();
  });
  return sessionCookie().serialize(secret);
}

/** Ends this device's session and returns the header that removes the cookie. */
export async function endSession(from: Anonymous, request: Request): Promise<string> {
  const secret = await readSecret(request);
  if (secret)
    from.db
      .delete(sessions)
      .where(eq(sessions.tokenHash, hashSecret(secret)))
      .run();
  return sessionCookie().serialize("", { maxAge: 0 });
}

/** Ends sessions of a person; all, or all but one. */
export function endSessionsOf(from: Readonly<{ db: Database }>, userId: UserId, except?: SessionId): void {
  from.db
    .delete(sessions)
    .where(and(eq(sessions.userId, userId), except ? ne(sessions.id, except) : undefined))
    .run();
}

export type SignedIn = Readonly<{
  scope: Scope;
  viewer: Viewer;
  sessionId: SessionId;
  /** Set-Cookie for the answer when the session was prolonged, else the browser would drop the cookie before its time. */
  renewedCookie: string | undefined;
}>;

/** Who sends this request; undefined when nobody is signed in. */
export async function readSession(
  from: Anonymous,
  request: Request,
  now: number,
): Promise<SignedIn | undefined> {
  const secret = await readSecret(request);
  if (!secret) return undefined;
  const row = from.db
    .select({ session: sessions, user: users, shop: shops })
    .from(sessions)
    .innerJoin(users, eq(users.id, sessions.userId))
    .innerJoin(shops, eq(shops.id, users.shopId))
    .where(and(eq(sessions.tokenHash, hashSecret(secret)), gt(sessions.expiresAt, now), isNull(users.leftAt)))
    .get();
  if (!row) return undefined;
  const { session, user, shop } = row;
  const prolong = now - session.lastSeenAt > RENEW_SEEN_AFTER_MS;
  if (prolong)
    inTransaction(from, ({ db }) => {
      db.update(sessions)
        .set({ lastSeenAt: now, expiresAt: now + LIFETIME_MS })
        .where(eq(sessions.id, session.id))
        .run();
      db.update(users).set({ lastSeenAt: now }).where(eq(users.id, user.id)).run();
    });
  return {
    sessionId: session.id,
    renewedCookie: prolong ? await sessionCookie().serialize(secret) : undefined,
    scope: { db: from.db, shopId: user.shopId, userId: user.id, role: user.role },
    viewer: {
      userId: user.id,
      name: user.name,
      email: user.email,
      role: user.role,
      shopName: shop.name,
      country: shop.country,
      timeZone: shop.timeZone,
      units: user.preferredUnits ?? shop.preferredUnits,
    },
  };
}

import { and, eq, gt, isNull } from "drizzle-orm";
import { inTransaction } from "~/db.server";
import { passwordResetMessage } from "~/mail/password-reset-message";
import { queueMail } from "~/mail/queue-mail.server";
import type { UserId } from "#drizzle/schema/ids";
import { passwordResets, users } from "#drizzle/schema/index";
import { hashPassword, PASSWORD_COST } from "./password.server";
import type { Anonymous } from "./scope.server";
import { hashSecret, newSecret } from "./secret.server";
import { endSessionsOf } from "./session.server";
import { forgetTries } from "./sign-in.server";

const LIFETIME_MS = 2 * 3_600_000;
const MOST_PER_HOUR = 3;

/** Mails a link when the address has an account. Tells nobody whether it has one. */
export function askForReset(from: Anonymous, email: string, publicOrigin: string, now: number): void {
  inTransaction(from, (from) => {
    const user = from.db
      .select()
      .from(users)
      .where(and(eq(users.email, email), isNull(users.leftAt)))
      .get();
    if (!user) return;
    const recent = from.db
      .select({ id: passwordResets.id })
      .from(passwordResets)
      .where(and(eq(passwordResets.userId, user.id), gt(passwordResets.createdAt, now - 3_600_000)))
      .all();
    if (recent.length >= MOST_PER_HOUR) return;
    const secret = newSecret();
    from.db
      .insert(passwordResets)
      .values({
        shopId: user.shopId,
        userId: user.id,
        tokenHash: hashSecret(secret),
        createdAt: now,
        expiresAt: now + LIFETIME_MS,
      })
      .run();
    queueMail(
      { db: from.db, shopId: user.shopId },
      passwordResetMessage({
        to: user.email,
        name: user.name,
        link: `${publicOrigin}/reset-password/${secret}`,
      }),
      now,
    );
  });
}

/** Whom a reset link is for; undefined when it is used, too old or unknown. */
export function findReset(
  from: Anonymous,
  token: string,
  now: number,
): { userId: UserId; email: string } | undefined {
  return from.db
    .select({ userId: users.id, email: users.email })
    .from(passwordResets)
    .innerJoin(users, eq(users.id, passwordResets.userId))
    .where(
      and(
        eq(passwordResets.tokenHash, hashSecret(token)),
        isNull(passwordResets.usedAt),
        gt(passwordResets.expiresAt, now),
        isNull(users.leftAt),
      ),
    )
    .get();
}

/** Sets a new password by a link, once, and ends every session of the person. Undefined: the link is worth nothing. */
export async function resetPassword(
  from: Anonymous,
  token: string,
  password: string,
  now: number,
  cost = PASSWORD_COST,
): Promise<UserId | undefined> {
  // Looked at before the hash too: a made-up link costs nothing.
  if (!findReset(from, token, now)) return undefined;
  const passwordHash = await hashPassword(password, cost);
  const done = inTransaction(from, (from) => {
    const found = findReset(from, token, now);
    if (!found) return undefined;
    from.db.update(users).set({ passwordHash }).where(eq(users.id, found.userId)).run();
    // Every other link of this person ends with it.
    from.db.update(passwordResets).set({ usedAt: now }).where(eq(passwordResets.userId, found.userId)).run();
    endSessionsOf(from, found.userId);
    return found;
  });
  if (done) await forgetTries(done.email);
  return done?.userId;
}

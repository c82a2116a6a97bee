import { and, desc, eq, isNotNull, isNull } from "drizzle-orm";
import { inTransaction, type Database } from "~/db.server";
import { invitationMessage } from "~/mail/invitation-message";
import { queueMail } from "~/mail/queue-mail.server";
import type { InvitationId, UserId } from "#drizzle/schema/ids";
import { invitations, shops, users } from "#drizzle/schema/index";
import { hashPassword, PASSWORD_COST } from "./password.server";
import type { Role } from "./permissions";
import type { Anonymous, Scope } from "./scope.server";
import { hashSecret, newSecret } from "./secret.server";
import { writeAudit } from "./write-audit.server";

const LIFETIME_MS = 14 * 86_400_000;
const TAKEN = "That e-mail already has an account with Castlenut; it can't be invited twice.";

type Invited = { name: string; email: string; role: Role };

/** Whether anybody, in whatever shop, signs in with this address. Those who left do not. */
function hasAccount(db: Database, email: string): boolean {
  return (
    db
      .select({ id: users.id })
      .from(users)
      .where(and(eq(users.email, email), isNull(users.leftAt)))
      .get() !== undefined
  );
}

function mail(scope: Scope, to: Invited, secret: string, publicOrigin: string, now: number): void {
  const shop =
    scope.db.select({ name: shops.name }).from(shops).where(eq(shops.id, scope.shopId)).get()?.name ?? "";
  const by =
    scope.db.select({ name: users.name }).from(users).where(eq(users.id, scope.userId)).get()?.name ?? "";
  queueMail(
    scope,
    invitationMessage({
      to: to.email,
      name: to.name,
      by,
      shop,
      role: to.role,
      link: `${publicOrigin}/invitation/${secret}`,
    }),
    now,
  );
}

/** Invites somebody to the shop. An open invitation of the same address is replaced; one who left may be invited again. */
export function invite(
  scope: Scope,
  order: Invited,
  publicOrigin: string,
  now: number,
): { ok: true } | { ok: false; sentence: string } {
  return inTransaction(scope, (scope) => {
    if (hasAccount(scope.db, order.email)) return { ok: false as const, sentence: TAKEN };
    const secret = newSecret();
    scope.db
      .update(invitations)
      .set({ withdrawnAt: now })
      .where(
        and(
          eq(invitations.shopId, scope.shopId),
          eq(invitations.email, order.email),
          isNull(invitations.acceptedAt),
          isNull(invitations.withdrawnAt),
        ),
      )
      .run();
    scope.db
      .insert(invitations)
      .values({
        shopId: scope.shopId,
        ...order,
        tokenHash: hashSecret(secret),
        invitedBy: scope.userId,
        createdAt: now,
        sentAt: now,
        expiresAt: now + LIFETIME_MS,
      })
      .run();
    mail(scope, order, secret, publicOrigin, now);
    writeAudit(scope, { action: "invited", noun: "person", detail: `${order.name} as ${order.role}` }, now);
    return { ok: true as const };
  });
}

/** Invitations that wait for an answer, newest first. */
export function openInvitations(scope: Scope) {
  return scope.db
    .select({
      id: invitations.id,
      name: invitations.name,
      email: invitations.email,
      role: invitations.role,
      sentAt: invitations.sentAt,
      expiresAt: invitations.expiresAt,
    })
    .from(invitations)
    .where(
      and(
        eq(invitations.shopId, scope.shopId),
        isNull(invitations.acceptedAt),
        isNull(invitations.withdrawnAt),
      ),
    )
    .orderBy(desc(invitations.createdAt))
    .all();
}

const isOpen = (scope: Scope, id: InvitationId) =>
  and(
    eq(invitations.shopId, scope.shopId),
    eq(invitations.id, id),
    isNull(invitations.acceptedAt),
    isNull(invitations.withdrawnAt),
  );

/** Sends an open invitation once more, with a new link; the old one ends. */
export function resendInvitation(scope: Scope, id: InvitationId, publicOrigin: string, now: number): boolean {
  return inTransaction(scope, (scope) => {
    const secret = newSecret();
    const row = scope.db
      .update(invitations)
      .set({ tokenHash: hashSecret(secret), sentAt: now, expiresAt: now + LIFETIME_MS })
      .where(isOpen(scope, id))
      .returning()
      .get();
    if (!row) return false;
    mail(scope, row, secret, publicOrigin, now);
    writeAudit(scope, { action: "invited again", noun: "person", detail: row.name }, now);
    return true;
  });
}

export function withdrawInvitation(scope: Scope, id: InvitationId, now: number): boolean {
  return inTransaction(scope, (scope) => {
    const row = scope.db
      .update(invitations)
      .set({ withdrawnAt: now })
      .where(isOpen(scope, id))
      .returning()
      .get();
    if (!row) return false;
    writeAudit(scope, { action: "withdrew the invitation of", noun: "person", detail: row.name }, now);
    return true;
  });
}

/** The invitation behind a link: open, or why it is worth nothing. `unknown` also when a newer mail has replaced the link. */
export function findInvitation(from: Anonymous, token: string, now: number) {
  const row = from.db
    .select({
      id: invitations.id,
      shopId: invitations.shopId,
      shop: shops.name,
      name: invitations.name,
      email: invitations.email,
      role: invitations.role,
      acceptedAt: invitations.acceptedAt,
      withdrawnAt: invitations.withdrawnAt,
      expiresAt: invitations.expiresAt,
    })
    .from(invitations)
    .innerJoin(shops, eq(shops.id, invitations.shopId))
    .where(eq(invitations.tokenHash, hashSecret(token)))
    .get();
  if (!row) return { state: "unknown" as const };
  const { acceptedAt, withdrawnAt, expiresAt, ...invited } = row;
  if (acceptedAt !== null) return { state: "accepted" as const };
  if (withdrawnAt !== null) return { state: "withdrawn" as const };
  if (expiresAt <= now) return { state: "expired" as const };
  return { state: "open" as const, ...invited };
}

/** Accepts an invitation, once; undefined when it is not open. Somebody who left and was invited again gets their former row, and with it their records. */
export async function acceptInvitation(
  from: Anonymous,
  token: string,
  given: { name: string; password: string },
  now: number,
  cost = PASSWORD_COST,
): Promise<{ ok: true; userId: UserId } | { ok: false; sentence: string } | undefined> {
  // Looked at before the hash too: a made-up link costs nothing.
  if (findInvitation(from, token, now).state !== "open") return undefined;
  const passwordHash = await hashPassword(given.password, cost);
  return inTransaction(from, (from) => {
    const found = findInvitation(from, token, now);
    if (found.state !== "open") return undefined;
    if (hasAccount(from.db, found.email)) return { ok: false as const, sentence: TAKEN };
    const former = from.db
      .select({ id: users.id })
      .from(users)
      .where(and(eq(users.shopId, found.shopId), eq(users.email, found.email), isNotNull(users.leftAt)))
      .get();
    const entry = { name: given.name, role: found.role, passwordHash };
    const userId = former
      ? former.id
      : from.db
          .insert(users)
          .values({ shopId: found.shopId, email: found.email, ...entry, createdAt: now })
          .returning({ id: users.id })
          .get().id;
    if (former)
      from.db
        .update(users)
        .set({ ...entry, leftAt: null })
        .where(eq(users.id, former.id))
        .run();
    from.db.update(invitations).set({ acceptedAt: now }).where(eq(invitations.id, found.id)).run();
    writeAudit(
      { db: from.db, shopId: found.shopId, userId, role: found.role },
      { action: "joined", noun: "shop", detail: given.name },
      now,
    );
    return { ok: true as const, userId };
  });
}

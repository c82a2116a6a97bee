import { and, asc, count, eq, isNull } from "drizzle-orm";
import { inTransaction } from "~/db.server";
import type { UserId } from "#drizzle/schema/ids";
import { users } from "#drizzle/schema/index";
import type { Role } from "./permissions";
import type { Scope } from "./scope.server";
import { endSessionsOf } from "./session.server";
import { writeAudit } from "./write-audit.server";

/** The people of the shop, those who left apart. */
export function listTeam(scope: Scope) {
  const rows = scope.db
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      createdAt: users.createdAt,
      leftAt: users.leftAt,
      lastSeenAt: users.lastSeenAt,
    })
    .from(users)
    .where(eq(users.shopId, scope.shopId))
    .orderBy(asc(users.name))
    .all();
  return {
    people: rows.filter(({ leftAt }) => leftAt === null),
    left: rows.filter(({ leftAt }) => leftAt !== null),
  };
}

export type TeamEdit =
  { ok: true } | { ok: false; reason: "missing" } | { ok: false; reason: "last-owner"; sentence: string };

const LAST_OWNER = "This is the shop's only owner. Make somebody else an owner first.";

function onlyOwner(scope: Scope, userId: UserId): boolean {
  const owners = scope.db
    .select({ id: users.id })
    .from(users)
    .where(and(eq(users.shopId, scope.shopId), eq(users.role, "owner"), isNull(users.leftAt)))
    .all();
  return owners.length === 1 && owners[0]?.id === userId;
}

function findMember(scope: Scope, userId: UserId) {
  return scope.db
    .select()
    .from(users)
    .where(and(eq(users.shopId, scope.shopId), eq(users.id, userId), isNull(users.leftAt)))
    .get();
}

/** Changes what a person may do. The last owner stays one. */
export function changeRole(scope: Scope, userId: UserId, role: Role, now: number): TeamEdit {
  return inTransaction(scope, (scope): TeamEdit => {
    const person = findMember(scope, userId);
    if (!person) return { ok: false, reason: "missing" };
    if (role !== "owner" && onlyOwner(scope, userId))
      return { ok: false, reason: "last-owner", sentence: LAST_OWNER };
    if (person.role === role) return { ok: true };
    scope.db.update(users).set({ role }).where(eq(users.id, userId)).run();
    writeAudit(
      scope,
      { action: "changed the role of", noun: "person", nounId: userId, detail: `${person.name}: ${role}` },
      now,
    );
    return { ok: true };
  });
}

/** A person leaves: signed out everywhere, kept in the records. The address is free again; invited by this shop again, they get this very row back. */
export function removePerson(scope: Scope, userId: UserId, now: number): TeamEdit {
  return inTransaction(scope, (scope): TeamEdit => {
    const person = findMember(scope, userId);
    if (!person) return { ok: false, reason: "missing" };
    if (onlyOwner(scope, userId)) return { ok: false, reason: "last-owner", sentence: LAST_OWNER };
    scope.db.update(users).set({ leftAt: now }).where(eq(users.id, userId)).run();
    endSessionsOf(scope, userId);
    writeAudit(scope, { action: "removed", noun: "person", nounId: userId, detail: person.name }, now);
    return { ok: true };
  });
}

/** How many people the shop has: an empty shop shows first steps. */
export function teamSize(scope: Scope): number {
  return (
    scope.db
      .select({ people: count() })
      .from(users)
      .where(and(eq(users.shopId, scope.shopId), isNull(users.leftAt)))
      .get()?.people ?? 0
  );
}

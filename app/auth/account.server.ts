import { and, desc, eq, gt } from "drizzle-orm";
import type { SessionId } from "#drizzle/schema/ids";
import { sessions, users } from "#drizzle/schema/index";
import { hashPassword, PASSWORD_COST, passwordFits } from "./password.server";
import type { Scope } from "./scope.server";
import { endSessionsOf } from "./session.server";

const own = (scope: Scope) => and(eq(users.shopId, scope.shopId), eq(users.id, scope.userId));

/** One's own account with the devices that are signed in. */
export function loadAccount(scope: Scope, current: SessionId, now: number) {
  const user = scope.db.select().from(users).where(own(scope)).get();
  if (!user) throw new Error("a scope needs its user");
  return {
    name: user.name,
    email: user.email,
    role: user.role,
    preferredUnits: user.preferredUnits,
    mailAssignments: user.mailAssignments,
    mailQuestions: user.mailQuestions,
    devices: scope.db
      .select({
        id: sessions.id,
        device: sessions.device,
        createdAt: sessions.createdAt,
        lastSeenAt: sessions.lastSeenAt,
      })
      .from(sessions)
      .where(and(eq(sessions.userId, scope.userId), gt(sessions.expiresAt, now)))
      .orderBy(desc(sessions.lastSeenAt))
      .all()
      .map((row) => ({ ...row, current: row.id === current })),
  };
}

export type Profile = {
  name: string;
  preferredUnits: "metric" | "inch" | null;
  mailAssignments: boolean;
  mailQuestions: boolean;
};

export function saveProfile(scope: Scope, profile: Profile): void {
  scope.db.update(users).set(profile).where(own(scope)).run();
}

/** Sets a new password when the old one fits; every other device is signed out. */
export async function changePassword(
  scope: Scope,
  current: SessionId,
  given: { old: string; password: string },
  cost = PASSWORD_COST,
): Promise<{ ok: true } | { ok: false; sentence: string }> {
  const user = scope.db.select({ passwordHash: users.passwordHash }).from(users).where(own(scope)).get();
  if (!(await passwordFits(given.old, user?.passwordHash)))
    return { ok: false, sentence: "This is not your present password." };
  const passwordHash = await hashPassword(given.password, cost);
  scope.db.update(users).set({ passwordHash }).where(own(scope)).run();
  endSessionsOf(scope, scope.userId, current);
  return { ok: true };
}

/** Signs one of one's own devices out; false when there is none of that id. */
export function endDevice(scope: Scope, sessionId: SessionId): boolean {
  const { changes } = scope.db
    .delete(sessions)
    .where(
      and(eq(sessions.shopId, scope.shopId), eq(sessions.userId, scope.userId), eq(sessions.id, sessionId)),
    )
    .run();
  return changes === 1;
}

import { eq } from "drizzle-orm";
import { auditLog, users } from "#drizzle/schema/index";
import type { Scope, ShopScope } from "./scope.server";

/** Adds a row to the audit log, in the caller's transaction. */
export function writeAudit(
  scope: Scope | ShopScope,
  entry: { action: string; noun: string; nounId?: string; detail?: string },
  now: number,
): void {
  const actor =
    "userId" in scope
      ? (scope.db.select({ name: users.name }).from(users).where(eq(users.id, scope.userId)).get()?.name ??
        "?")
      : scope.by;
  scope.db
    .insert(auditLog)
    .values({
      shopId: scope.shopId,
      userId: "userId" in scope ? scope.userId : null,
      actor,
      action: entry.action,
      noun: entry.noun,
      nounId: entry.nounId ?? "",
      detail: entry.detail ?? "",
      at: now,
    })
    .run();
}

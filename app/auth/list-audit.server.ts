import { desc, eq } from "drizzle-orm";
import { auditLog } from "#drizzle/schema/index";
import type { Scope } from "./scope.server";

const PAGE = 50;

/** One page of who did what, newest first; `more` when another follows. */
export function listAudit(scope: Scope, page: number) {
  const rows = scope.db
    .select({
      id: auditLog.id,
      actor: auditLog.actor,
      action: auditLog.action,
      noun: auditLog.noun,
      detail: auditLog.detail,
      at: auditLog.at,
    })
    .from(auditLog)
    .where(eq(auditLog.shopId, scope.shopId))
    .orderBy(desc(auditLog.at), desc(auditLog.id))
    .limit(PAGE + 1)
    .offset((page - 1) * PAGE)
    .all();
  return { rows: rows.slice(0, PAGE), more: rows.length > PAGE };
}

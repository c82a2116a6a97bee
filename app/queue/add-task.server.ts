import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";
import { tasks } from "#drizzle/schema/index";

export type TaskKind =
  | "send-mail"
  | "check-recording"
  | "prepare-recording"
  | "convert-recording"
  | "abandon-upload"
  | "delete-recording";

/** Asks for background work. Call it in the transaction that causes the work; the same dedupe key is one row. */
export function addTask(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  task: { kind: TaskKind; payload: unknown; dedupeKey?: string; runAt?: number },
  now: number,
): void {
  scope.db
    .insert(tasks)
    .values({
      shopId: scope.shopId,
      kind: task.kind,
      payload: task.payload,
      dedupeKey: task.dedupeKey ?? null,
      runAt: task.runAt ?? now,
      createdAt: now,
    })
    .onConflictDoNothing({ target: tasks.dedupeKey })
    .run();
}

import { and, desc, eq, isNotNull, isNull, lte, or } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { ShopId, TaskId } from "#drizzle/schema/ids";
import { tasks } from "#drizzle/schema/index";
import type { TaskKind } from "./add-task.server";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

/** Background work that failed: given up, or waiting for its next try. */
export function failedTasks(scope: InShop) {
  return scope.db
    .select({
      id: tasks.id,
      kind: tasks.kind,
      attempts: tasks.attempts,
      lastError: tasks.lastError,
      createdAt: tasks.createdAt,
      runAt: tasks.runAt,
      failedAt: tasks.failedAt,
    })
    .from(tasks)
    .where(and(eq(tasks.shopId, scope.shopId), isNull(tasks.doneAt), isNotNull(tasks.lastError)))
    .orderBy(desc(tasks.createdAt))
    .limit(200)
    .all()
    .map((row) => ({ ...row, kind: row.kind as TaskKind }));
}

// Not while it runs: taking its lease away would start it a second time.
const failed = (scope: InShop, id: TaskId, now: number) =>
  and(
    eq(tasks.shopId, scope.shopId),
    eq(tasks.id, id),
    isNull(tasks.doneAt),
    isNotNull(tasks.lastError),
    or(isNull(tasks.leaseUntil), lte(tasks.leaseUntil, now)),
  );

/** Tries again at once, with all tries ahead; false when no such task has failed, or it runs right now. */
export function retryTask(scope: InShop, id: TaskId, now: number): boolean {
  return (
    scope.db
      .update(tasks)
      .set({ failedAt: null, attempts: 0, runAt: now, leaseUntil: null })
      .where(failed(scope, id, now))
      .run().changes === 1
  );
}

/** Lets a task go; it stands as done with its last error. */
export function giveUpTask(scope: InShop, id: TaskId, now: number): boolean {
  return (
    scope.db
      .update(tasks)
      .set({ doneAt: now })
      .where(failed(scope, id, now))
      .run().changes === 1
  );
}

import { and, asc, eq, inArray, isNull, lte, notInArray, or, sql } from "drizzle-orm";
import { inTransaction, type Database } from "~/db.server";
import { tasks } from "#drizzle/schema/index";
import type { ShopScope } from "~/auth/scope.server";
import type { TaskKind } from "./add-task.server";

export type TaskHandler = (scope: ShopScope, payload: unknown, now: number) => Promise<void>;
export type TaskHandlers = Readonly<Record<TaskKind, TaskHandler>>;

const LEASE_MS = 15 * 60_000;
const TRIES = 5;

/** Kinds that keep a processor busy for minutes: one at a time, and never in the way of a mail. */
const HEAVY: TaskKind[] = ["prepare-recording", "convert-recording"];

export type Lane = "light" | "heavy";

/** Takes the next due task of a lane under a lease; a worker that dies gives it back when the lease ends. */
function takeTask(db: Database, lane: Lane, now: number) {
  return inTransaction({ db }, (scope) => {
    const due = scope.db
      .select({ id: tasks.id })
      .from(tasks)
      .where(
        and(
          lane === "heavy" ? inArray(tasks.kind, HEAVY) : notInArray(tasks.kind, HEAVY),
          isNull(tasks.doneAt),
          isNull(tasks.failedAt),
          lte(tasks.runAt, now),
          or(isNull(tasks.leaseUntil), lte(tasks.leaseUntil, now)),
        ),
      )
      .orderBy(asc(tasks.runAt))
      .limit(1)
      .get();
    if (!due) return undefined;
    return scope.db
      .update(tasks)
      .set({ leaseUntil: now + LEASE_MS, attempts: sql`${tasks.attempts} + 1` })
      .where(eq(tasks.id, due.id))
      .returning()
      .get();
  });
}

/** Does one due task of a lane; false when there was none. A failure is kept with its sentence and tried again later. */
export async function runNextTask(
  db: Database,
  handlers: TaskHandlers,
  clock: () => number,
  lane: Lane = "light",
): Promise<boolean> {
  const task = takeTask(db, lane, clock());
  if (!task) return false;
  try {
    const scope: ShopScope = { db, shopId: task.shopId, by: `task ${task.kind}` };
    await handlers[task.kind as TaskKind](scope, task.payload, clock());
    db.update(tasks)
      .set({ doneAt: clock(), leaseUntil: null, lastError: null })
      .where(eq(tasks.id, task.id))
      .run();
  } catch (error) {
    const now = clock();
    const sentence = error instanceof Error ? error.message : String(error);
    const givenUp = task.attempts >= TRIES;
    db.update(tasks)
      .set({
        lastError: sentence.slice(0, 2000),
        leaseUntil: null,
        runAt: now + 5_000 * 4 ** (task.attempts - 1),
        failedAt: givenUp ? now : null,
      })
      .where(eq(tasks.id, task.id))
      .run();
    console.error(`task ${task.kind} ${task.id} failed (try ${task.attempts}): ${sentence}`);
  }
  return true;
}

/** Works through one lane's due tasks, one at a time, until stopped. */
function startLane(
  db: Database,
  handlers: TaskHandlers,
  lane: Lane,
  everyMs: number,
): { stop: () => Promise<void> } {
  let stopped = false;
  let wake: (() => void) | undefined;
  const running = (async () => {
    while (!stopped) {
      const worked = await runNextTask(db, handlers, Date.now, lane).catch((error: unknown) => {
        console.error("queue:", error);
        return false;
      });
      if (!worked && !stopped) {
        await new Promise<void>((resolve) => {
          wake = resolve;
          setTimeout(resolve, everyMs);
        });
      }
    }
  })();
  return {
    stop: async () => {
      stopped = true;
      wake?.();
      await running;
    },
  };
}

/** Works through due tasks until stopped: light ones and heavy ones side by side. */
export function startQueue(
  db: Database,
  handlers: TaskHandlers,
  everyMs = 500,
): { stop: () => Promise<void> } {
  const lanes = [startLane(db, handlers, "light", everyMs), startLane(db, handlers, "heavy", everyMs)];
  return {
    stop: async () => {
      await Promise.all(lanes.map((lane) => lane.stop()));
    },
  };
}

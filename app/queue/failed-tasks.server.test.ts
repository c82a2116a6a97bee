import { beforeEach, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import type { TaskId } from "#drizzle/schema/ids";
import { tasks } from "#drizzle/schema/index";
import { aDatabase, aScope, aShop, NOON } from "../../tests/support/factories";
import { addTask } from "./add-task.server";
import { failedTasks, giveUpTask, retryTask } from "./failed-tasks.server";
import { runNextTask, type TaskHandlers } from "./run-tasks.server";

const HOUR = 3_600_000;
let owner: Scope;
let stranger: Scope;

beforeEach(() => {
  const db = aDatabase();
  owner = aScope(db, aShop(db), "owner");
  stranger = aScope(db, aShop(db), "owner");
});

/** Runs the next due task with a mail server that refuses, or takes, every mail. */
function run(now: number, takes: boolean) {
  const sending = async () => {
    if (!takes) throw new Error("The mail server refused the mail.");
  };
  return runNextTask(owner.db, { "send-mail": sending } as unknown as TaskHandlers, () => now);
}

const onlyId = () => owner.db.select({ id: tasks.id }).from(tasks).get()?.id as TaskId;

test("a task that has not failed is not in the list and cannot be tried again or let go", () => {
  addTask(owner, { kind: "send-mail", payload: {} }, NOON);
  expect(failedTasks(owner)).toEqual([]);
  expect(retryTask(owner, onlyId(), NOON)).toBe(false);
  expect(giveUpTask(owner, onlyId(), NOON)).toBe(false);
});

test("a failed task shows its reason to its own shop alone, and works when tried again", async () => {
  addTask(owner, { kind: "send-mail", payload: {} }, NOON);
  await run(NOON, false);
  expect(failedTasks(owner)).toMatchObject([{ attempts: 1, lastError: "The mail server refused the mail." }]);
  expect(failedTasks(stranger)).toEqual([]);
  expect(retryTask(stranger, onlyId(), NOON)).toBe(false);
  expect(retryTask(owner, onlyId(), NOON)).toBe(true);
  expect(await run(NOON, true)).toBe(true);
  expect(failedTasks(owner)).toEqual([]);
});

test("a task given up is not run any more", async () => {
  addTask(owner, { kind: "send-mail", payload: {} }, NOON);
  await run(NOON, false);
  expect(giveUpTask(owner, onlyId(), NOON)).toBe(true);
  expect(failedTasks(owner)).toEqual([]);
  expect(await run(NOON + HOUR, true)).toBe(false);
});

test("a task that runs right now is left alone", async () => {
  addTask(owner, { kind: "send-mail", payload: {} }, NOON);
  await run(NOON, false);
  owner.db
    .update(tasks)
    .set({ leaseUntil: NOON + HOUR })
    .run();
  expect(retryTask(owner, onlyId(), NOON)).toBe(false);
  expect(retryTask(owner, onlyId(), NOON + HOUR)).toBe(true);
});

import { eq } from "drizzle-orm";
import { expect, test } from "vitest";
import { openDatabase } from "~/db.server";
import { shops, tasks } from "#drizzle/schema/index";
import { addTask, type TaskKind } from "./add-task.server";
import { runNextTask, type TaskHandlers } from "./run-tasks.server";

const NOW = Date.UTC(2026, 10, 12, 9);

function aQueue() {
  const { db } = openDatabase(":memory:");
  const shop = db.insert(shops).values({ name: "Queue shop", createdAt: NOW }).returning().get();
  const done: string[] = [];
  const note =
    (kind: TaskKind): TaskHandlers[TaskKind] =>
    async (_scope, payload) => {
      done.push(`${kind}:${JSON.stringify(payload)}`);
    };
  const kinds: TaskKind[] = [
    "send-mail",
    "check-recording",
    "prepare-recording",
    "convert-recording",
    "abandon-upload",
  ];
  const handlers = Object.fromEntries(kinds.map((kind) => [kind, note(kind)])) as TaskHandlers;
  return { scope: { db, shopId: shop.id }, db, done, handlers };
}

test("a due task is done once, a later one waits", async () => {
  const { scope, db, done, handlers } = aQueue();
  addTask(scope, { kind: "send-mail", payload: 1 }, NOW);
  addTask(scope, { kind: "send-mail", payload: 2, runAt: NOW + 60_000 }, NOW);
  expect(await runNextTask(db, handlers, () => NOW)).toBe(true);
  expect(await runNextTask(db, handlers, () => NOW)).toBe(false);
  expect(done).toEqual(["send-mail:1"]);
  expect(await runNextTask(db, handlers, () => NOW + 60_000)).toBe(true);
});

test("the same work asked for twice is one task", async () => {
  const { scope, db, done, handlers } = aQueue();
  addTask(scope, { kind: "send-mail", payload: "a", dedupeKey: "mail:a" }, NOW);
  addTask(scope, { kind: "send-mail", payload: "a", dedupeKey: "mail:a" }, NOW);
  while (await runNextTask(db, handlers, () => NOW));
  expect(done).toHaveLength(1);
});

test("a heavy task waits in its own lane and does not hold up a mail", async () => {
  const { scope, db, done, handlers } = aQueue();
  addTask(scope, { kind: "prepare-recording", payload: "film" }, NOW);
  addTask(scope, { kind: "send-mail", payload: "mail" }, NOW + 1);
  await runNextTask(db, handlers, () => NOW + 1, "light");
  expect(done).toEqual(['send-mail:"mail"']);
  await runNextTask(db, handlers, () => NOW + 1, "heavy");
  expect(done).toHaveLength(2);
});

test("a failure is kept with its sentence, tried again later and given up after five tries", async () => {
  const { scope, db, handlers } = aQueue();
  addTask(scope, { kind: "send-mail", payload: 1 }, NOW);
  const failing: TaskHandlers = {
    ...handlers,
    "send-mail": async () => {
      throw new Error("The mail server does not answer.");
    },
  };
  let now = NOW;
  for (let tries = 1; tries <= 5; tries += 1) {
    expect(await runNextTask(db, failing, () => now)).toBe(true);
    expect(await runNextTask(db, failing, () => now)).toBe(false);
    now += 24 * 3_600_000;
  }
  const task = db.select().from(tasks).where(eq(tasks.kind, "send-mail")).get();
  expect(task?.lastError).toBe("The mail server does not answer.");
  expect(task?.failedAt).not.toBeNull();
  expect(await runNextTask(db, failing, () => now)).toBe(false);
});

test("a worker that died gives its task back when the lease ends", async () => {
  const { scope, db, done, handlers } = aQueue();
  addTask(scope, { kind: "send-mail", payload: 1 }, NOW);
  db.update(tasks)
    .set({ leaseUntil: NOW + 60_000 })
    .run();
  expect(await runNextTask(db, handlers, () => NOW)).toBe(false);
  expect(await runNextTask(db, handlers, () => NOW + 60_001)).toBe(true);
  expect(done).toHaveLength(1);
});

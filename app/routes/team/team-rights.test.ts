import { RouterContextProvider } from "react-router";
import { beforeAll, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { scopeContext, sessionContext, viewerContext } from "~/context";
import { addTask } from "~/queue/add-task.server";
import type { SessionId } from "#drizzle/schema/ids";
import { auditLog, invitations, outbox, shops, tasks, users } from "#drizzle/schema/index";
import { setTestEnvironment } from "../../../tests/support/environment";
import { aDatabase, aPerson, aScope, aShop, NOON } from "../../../tests/support/factories";
import * as account from "./account";
import * as audit from "./audit";
import * as settings from "./settings";
import * as tasksPage from "./tasks";
import * as team from "./team";

beforeAll(() => setTestEnvironment());

function aVisit(scope: Scope, form?: Record<string, string>, path = "/") {
  const context = new RouterContextProvider();
  context.set(scopeContext, scope);
  context.set(sessionContext, "none" as SessionId);
  context.set(viewerContext, {
    userId: scope.userId,
    name: "Somebody",
    email: "somebody@shop.example",
    role: scope.role,
    shopName: "Shop",
    country: "US",
    timeZone: "America/Chicago",
    units: "inch",
  });
  const url = new URL(path, "http://localhost:3000");
  const request = new Request(url, form ? { method: "POST", body: new URLSearchParams(form) } : {});
  return { request, context, url, params: {} } as never;
}

type Answer = Readonly<{
  status: number;
  to?: string | null;
  errors?: Record<string, string>;
  typed?: Record<string, string>;
}>;

/** What a loader or action answers or throws. */
async function answerOf(run: () => unknown): Promise<Answer> {
  const read = (answer: unknown): Answer => {
    if (answer instanceof Response) return { status: answer.status, to: answer.headers.get("Location") };
    const { init, data } = answer as { init?: { status?: number } | null; data?: unknown };
    return { status: init?.status ?? 200, ...(data && typeof data === "object" ? data : {}) };
  };
  try {
    return read(await run());
  } catch (thrown) {
    if (thrown instanceof Error) throw thrown;
    return read(thrown);
  }
}

function twoShops() {
  const db = aDatabase();
  const shop = aShop(db, { name: "Lane" });
  return {
    db,
    owner: aScope(db, shop, "owner"),
    instructor: aScope(db, shop, "instructor"),
    trainee: aScope(db, shop, "trainee"),
    stranger: aScope(db, aShop(db), "owner"),
  };
}

const INVITE = { intent: "invite", name: "Ida", email: "Ida@Lane.example", role: "trainee" };
const SETTINGS = {
  name: "Lane Motors",
  country: "GB",
  timeZone: "Europe/London",
  preferredUnits: "metric",
  passMark: "75",
  watchThreshold: "95",
  shownJobs: "3",
};

test("instructors see the team and change nothing; trainees see none of it", async () => {
  const { db, instructor, trainee } = twoShops();
  expect(await answerOf(() => team.loader(aVisit(instructor)))).toMatchObject({ status: 200 });
  const before = db.select().from(users).all();
  for (const form of [
    INVITE,
    { intent: "role", person: trainee.userId, role: "owner" },
    { intent: "remove", person: trainee.userId },
  ])
    expect(await answerOf(() => team.action(aVisit(instructor, form)))).toMatchObject({ status: 403 });
  expect(db.select().from(users).all()).toEqual(before);
  expect(db.select().from(outbox).all()).toEqual([]);
  expect(await answerOf(() => team.loader(aVisit(trainee)))).toMatchObject({ status: 403 });
});

test("settings, failed tasks and the audit log are the owner's alone", async () => {
  const { owner, instructor, trainee } = twoShops();
  for (const page of [settings, tasksPage, audit]) {
    expect(await answerOf(() => page.loader(aVisit(owner)))).toMatchObject({ status: 200 });
    for (const other of [instructor, trainee])
      expect(await answerOf(() => page.loader(aVisit(other)))).toMatchObject({ status: 403 });
  }
  for (const other of [instructor, trainee]) {
    expect(await answerOf(() => settings.action(aVisit(other, SETTINGS)))).toMatchObject({ status: 403 });
    expect(
      await answerOf(() => tasksPage.action(aVisit(other, { intent: "retry", task: "x" }))),
    ).toMatchObject({ status: 403 });
  }
});

test("another shop's people, invitations, tasks and devices are missing ones", async () => {
  const { db, owner, stranger, trainee } = twoShops();
  await answerOf(() => team.action(aVisit(owner, INVITE)));
  const invitation = db.select().from(invitations).get()?.id ?? "";
  addTask(owner, { kind: "send-mail", payload: {} }, NOON);
  const task = db.select().from(tasks).get()?.id ?? "";
  const rows = () => [users, invitations, tasks].map((table) => db.select().from(table).all());
  const before = rows();
  for (const form of [
    { intent: "role", person: trainee.userId, role: "instructor" },
    { intent: "remove", person: trainee.userId },
    { intent: "resend", invitation },
    { intent: "withdraw", invitation },
  ])
    expect(await answerOf(() => team.action(aVisit(stranger, form))), form.intent).toMatchObject({
      status: 404,
    });
  for (const intent of ["retry", "give-up"])
    expect(await answerOf(() => tasksPage.action(aVisit(stranger, { intent, task })))).toMatchObject({
      status: 404,
    });
  expect(
    await answerOf(() => account.action(aVisit(stranger, { intent: "end-device", device: "x" }))),
  ).toMatchObject({ status: 404 });
  expect(rows()).toEqual(before);
});

test("an invitation is mailed to the address, in the kept spelling; what is wrong stands beside its field", async () => {
  const { db, owner } = twoShops();
  expect(await answerOf(() => team.action(aVisit(owner, INVITE)))).toMatchObject({
    status: 302,
    to: "/team?done=invited",
  });
  expect(db.select().from(outbox).all()).toMatchObject([{ recipient: "ida@lane.example" }]);
  expect(
    await answerOf(() => team.action(aVisit(owner, { ...INVITE, email: "ida at lane", name: " " }))),
  ).toMatchObject({
    status: 400,
    errors: { email: expect.stringContaining("not an e-mail address"), name: "Type a name." },
    typed: { email: "ida at lane" },
  });
  aPerson(db, owner.shopId, "trainee", { email: "here@lane.example" });
  expect(
    await answerOf(() => team.action(aVisit(owner, { ...INVITE, email: "here@lane.example" }))),
  ).toMatchObject({ status: 409, errors: { email: expect.stringContaining("already has an account") } });
});

test("settings are kept with an audit row of what changed, and per cent are stored as parts of one", async () => {
  const { db, owner, stranger } = twoShops();
  expect(await answerOf(() => settings.action(aVisit(owner, SETTINGS)))).toMatchObject({ status: 302 });
  await answerOf(() => settings.action(aVisit(owner, SETTINGS)));
  const kept = db.select().from(shops).all();
  expect(kept.find(({ id }) => id === owner.shopId)).toMatchObject({
    name: "Lane Motors",
    passMark: 0.75,
    watchThreshold: 0.95,
    shownJobs: 3,
  });
  expect(kept.find(({ id }) => id === stranger.shopId)).toMatchObject({ passMark: 0.8 });
  const rows = db.select().from(auditLog).all();
  expect(rows).toHaveLength(1);
  expect(rows[0]?.detail).toContain("passMark: 0.8 → 0.75");
});

test("a refused setting has its sentence and changes nothing", async () => {
  const { db, owner } = twoShops();
  const before = db.select().from(shops).all();
  const bad: Record<string, string>[] = [
    { passMark: "0" },
    { passMark: "101" },
    { passMark: "80%" },
    { passMark: "" },
    { watchThreshold: "89.5" },
    { shownJobs: "0" },
    { shownJobs: "11" },
    { country: "XX" },
    { timeZone: "Mars/Olympus" },
    { name: "  " },
    { preferredUnits: "cubits" },
  ];
  for (const field of bad) {
    const answer = await answerOf(() => settings.action(aVisit(owner, { ...SETTINGS, ...field })));
    const [name = "", typed] = Object.entries(field)[0] ?? [];
    expect(answer.status, name).toBe(400);
    expect(answer.errors?.[name], `${name} ${typed}`).toMatch(/^[A-Z].*\.$/);
    expect(answer.typed?.[name]).toBe(typed);
  }
  expect(db.select().from(shops).all()).toEqual(before);
});

test("an unfinished password change never hands a password back", async () => {
  const { owner } = twoShops();
  const form = { intent: "password", oldPassword: "ten letters", newPassword: "short" };
  const answer = await answerOf(() => account.action(aVisit(owner, form)));
  expect(answer.errors?.newPassword).toContain("at least 10");
  expect(JSON.stringify(answer.typed)).not.toMatch(/ten letters|short/);
});

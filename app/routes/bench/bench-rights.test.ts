import { RouterContextProvider } from "react-router";
import { expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { scopeContext, viewerContext } from "~/context";
import { loadDraft } from "~/lessons/load-draft.server";
import { marks } from "#drizzle/schema/index";
import { aChapter, aDatabase, aLesson, aMark, aScope, aShop } from "../../../tests/support/factories";
import * as bench from "./bench";
import * as lesson from "./lesson";
import * as lessonNew from "./lesson-new";
import * as mark from "./mark";
import * as markNew from "./mark-new";

function aVisit(
  scope: Scope,
  params: Record<string, string>,
  body?: Record<string, string>,
  search = "?kind=torque",
) {
  const context = new RouterContextProvider();
  context.set(scopeContext, scope);
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
  const request = new Request(
    `http://bench.example/${search}`,
    body ? { method: "POST", body: new URLSearchParams(body) } : {},
  );
  return { request, context, params } as never;
}

/** The status of what a loader or action answers or throws. */
async function statusOf(run: () => unknown): Promise<number> {
  try {
    const answer = await run();
    if (answer instanceof Response) return answer.status;
    return (answer as { init?: { status?: number } | null }).init?.status ?? 200;
  } catch (thrown) {
    const { status, init } = thrown as { status?: number; init?: { status?: number } };
    return status ?? init?.status ?? 0;
  }
}

function aBench() {
  const db = aDatabase();
  const shop = aShop(db);
  const instructor = aScope(db, shop, "instructor");
  const of = aLesson(instructor);
  const chapterId = aChapter(instructor, of);
  const markId = aMark(instructor, { ...of, chapterId });
  const params = { lessonId: of.lessonId, markId };
  return { db, shop, instructor, params, chapterId };
}

const DOORS: readonly [string, (visit: never) => unknown][] = [
  ["bench", bench.loader],
  ["new lesson", lessonNew.loader],
  ["new lesson, post", lessonNew.action],
  ["lesson", lesson.loader],
  ["lesson, post", lesson.action],
  ["new mark", markNew.loader],
  ["new mark, post", markNew.action],
  ["mark", mark.loader],
  ["mark, post", mark.action],
];

for (const [name, door] of DOORS)
  test(`${name}: a trainee is refused with 403, whatever the address or the form`, async () => {
    const { db, shop, params } = aBench();
    const trainee = aScope(db, shop, "trainee");
    const body = name.includes("post") ? { intent: "erase", version: "1" } : undefined;
    expect(await statusOf(() => door(aVisit(trainee, params, body)))).toBe(403);
  });

for (const [name, door] of DOORS.slice(3))
  test(`${name}: a lesson of another shop is a 404, like one that never was`, async () => {
    const { db, params, instructor, chapterId } = aBench();
    const theirs = aScope(db, aShop(db), "owner");
    const version = String(loadDraft(instructor, params.lessonId)?.lesson.version);
    const form = {
      intent: "erase",
      version,
      markId: params.markId,
      kind: "torque",
      at: "1:00",
      chapterId,
      component: "drain plug",
      value: "65 ft-lb",
    };
    const body = name.includes("post") ? form : undefined;
    const before = db.select().from(marks).all();
    expect(await statusOf(() => door(aVisit(theirs, params, body)))).toBe(404);
    const never = { lessonId: "01ARZ3NDEKTSV4RRFFQ69G5FAV", markId: params.markId };
    expect(await statusOf(() => door(aVisit(instructor, never, body)))).toBe(404);
    expect(await statusOf(() => door(aVisit(instructor, { ...never, lessonId: "' or 1" }, body)))).toBe(404);
    expect(db.select().from(marks).all()).toEqual(before);
  });

test("an instructor gets the pages; a broken form is 400, a stale one 409, a good one goes on", async () => {
  const { instructor, params } = aBench();
  for (const [name, door] of DOORS.filter(([name]) => !name.includes("post")))
    expect(await statusOf(() => door(aVisit(instructor, params))), name).toBe(200);
  const post = (body: Record<string, string>) =>
    statusOf(() => lesson.action(aVisit(instructor, params, body)));
  expect(await post({ intent: "burn" })).toBe(400);
  expect(await post({ intent: "erase", version: "9", markId: params.markId })).toBe(409);
  expect(await post({ intent: "erase", version: "1", markId: params.markId })).toBe(302);
});

test("a chapter of another lesson in the address of a new mark, or an unknown kind, is a 404", async () => {
  const { instructor, params } = aBench();
  const elsewhere = aChapter(instructor, aLesson(instructor));
  const at = (search: string) =>
    statusOf(() => markNew.loader(aVisit(instructor, params, undefined, search)));
  expect(await at(`?kind=torque&chapter=${elsewhere}`)).toBe(404);
  expect(await at("?kind=spell")).toBe(404);
  expect(await at("?kind=torque&at=60")).toBe(200);
});

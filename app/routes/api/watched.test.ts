import { RouterContextProvider } from "react-router";
import { expect, test } from "vitest";
import { revisions, watchedStretches } from "#drizzle/schema/index";
import { scopeContext } from "~/context";
import { aDatabase, aScope, aShop } from "../../../tests/support/factories";
import { aPublishedLesson, SIXTY_FIVE } from "../../../tests/support/published-lesson";
import { action } from "./watched";

test("the door reads JSON, refuses what is none with a sentence", async () => {
  const db = aDatabase();
  const shopId = aShop(db);
  const [marta, dario] = [aScope(db, shopId, "instructor"), aScope(db, shopId, "instructor")];
  const tom = aScope(db, shopId, "trainee");
  const { lessonId, recordingId } = aPublishedLesson(marta, dario, [
    { mark: { component: "pulley bolt" }, values: [SIXTY_FIVE] },
  ]);
  const revisionId = db.select({ id: revisions.id }).from(revisions).get()?.id;
  const rows = () => db.select().from(watchedStretches).all();
  const post = async (body: string) => {
    const context = new RouterContextProvider();
    context.set(scopeContext, tom);
    const request = new Request("http://localhost/api/watched", { method: "POST", body });
    const answer = await action({ request, context, params: {} } as never);
    return { status: answer.status, body: (await answer.json()) as Record<string, unknown> };
  };
  const order = (stretch: object) => JSON.stringify({ lessonId, revisionId, stretches: [stretch] });
  expect(await post(order({ recordingId, fromMs: 1_000.4, toMs: 2_000.6 }))).toEqual({
    status: 200,
    body: { kept: 1 },
  });
  expect(rows()[0]).toMatchObject({ fromMs: 1_000, toMs: 2_001 });
  for (const bad of [
    "",
    "{",
    "null",
    JSON.stringify({ lessonId, revisionId, stretches: [] }),
    order({ recordingId, fromMs: -1, toMs: 5 }),
    order({ recordingId, fromMs: "0", toMs: 5 }),
    order({ recordingId: "x", fromMs: 0, toMs: 5 }),
    order({ recordingId, fromMs: 0, toMs: 1e12 }),
    `"${"x".repeat(70_000)}"`,
  ]) {
    const { status, body } = await post(bad);
    expect(status, bad.slice(0, 60)).toBe(400);
    expect(body.error).toMatch(/\.$/);
  }
  expect(rows()).toHaveLength(1);
});

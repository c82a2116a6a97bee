import { expect, test } from "vitest";
import type { RecordingId, RevisionId } from "#drizzle/schema/ids";
import { revisions, watchedStretches } from "#drizzle/schema/index";
import type { Scope } from "~/auth/scope.server";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { aDatabase, aScope, aShop, NOON } from "../../tests/support/factories";
import { aPublishedLesson, SIXTY_FIVE } from "../../tests/support/published-lesson";
import { loadSkills } from "./load-skills.server";
import { recordWatched, whereLeft } from "./record-watched.server";

/** A published lesson of ten minutes and a trainee. */
function aShopThatWatches() {
  const db = aDatabase();
  const shopId = aShop(db);
  const marta = aScope(db, shopId, "instructor");
  const dario = aScope(db, shopId, "instructor");
  const tom = aScope(db, shopId, "trainee");
  const { lessonId, recordingId } = aPublishedLesson(marta, dario, [
    { mark: { component: "pulley bolt" }, values: [SIXTY_FIVE] },
  ]);
  const revisionId = db.select({ id: revisions.id }).from(revisions).get()?.id as RevisionId;
  const watch = (fromMs: number, toMs: number, now = NOON, who: Scope = tom, recording = recordingId) =>
    recordWatched(who, { lessonId, revisionId, stretches: [{ recordingId: recording, fromMs, toMs }] }, now);
  const rows = () => db.select().from(watchedStretches).all();
  const clips = findLearnerLesson(tom, lessonId)?.snapshot.clips ?? [];
  const skill = () => loadSkills(tom, { userIds: [tom.userId] }).get(`${tom.userId}:${lessonId}`);
  return { db, shopId, tom, marta, lessonId, recordingId, revisionId, watch, rows, clips, skill };
}

test("what was played is kept as it came, and makes a lesson seen", () => {
  const { watch, rows, skill } = aShopThatWatches();
  expect(watch(0, 300_000)).toEqual({ ok: true, kept: 1 });
  expect(skill()).toMatchObject({ coverage: 0.5, seen: false });
  expect(watch(0, 300_000, NOON + 300_000)).toEqual({ ok: true, kept: 1 });
  expect(rows()).toHaveLength(2);
  expect(skill()).toMatchObject({ coverage: 0.5, seen: false });
  expect(watch(300_000, 540_000, NOON + 600_000)).toEqual({ ok: true, kept: 1 });
  expect(skill()).toMatchObject({ coverage: 0.9, seen: true, answered: false, shown: false });
});

test("a stretch outside the clips, backwards or of another recording refuses the batch", () => {
  const { watch, rows } = aShopThatWatches();
  for (const result of [
    watch(590_000, 605_000),
    watch(5_000, 5_000),
    watch(9_000, 5_000),
    watch(0, 1_000, NOON, undefined, "01J00000000000000000000000" as RecordingId),
  ])
    expect(result).toMatchObject({ ok: false, status: 422 });
  expect(rows()).toEqual([]);
});

test("the last frame may lie a little past the length that was probed", () => {
  const { watch, rows } = aShopThatWatches();
  expect(watch(580_000, 600_300)).toEqual({ ok: true, kept: 1 });
  expect(rows()[0]).toMatchObject({ fromMs: 580_000, toMs: 600_000 });
});

test("more than four times the clock since the last report is not watching", () => {
  const { watch, rows } = aShopThatWatches();
  expect(watch(0, 1_000)).toMatchObject({ ok: true });
  expect(watch(0, 600_000, NOON + 1_000)).toMatchObject({ ok: false, status: 409 });
  expect(rows()).toHaveLength(1);
  // Twice the speed on two devices for five minutes and a half.
  expect(watch(0, 600_000, NOON + 135_001)).toMatchObject({ ok: true });
});

test("another shop's lesson is missing, and its people never stand in the skills", () => {
  const { db, watch, rows, lessonId } = aShopThatWatches();
  const stranger = aScope(db, aShop(db), "owner");
  expect(watch(0, 1_000, NOON, stranger)).toMatchObject({ ok: false, status: 404 });
  expect(rows()).toEqual([]);
  expect(findLearnerLesson(stranger, lessonId)).toBeUndefined();
  expect(loadSkills(stranger).size).toBe(0);
  expect(whereLeft(stranger, lessonId, [])).toBeNull();
});

test("where a person left is offered, near the end and at the start it is not", () => {
  const { watch, tom, marta, lessonId, clips } = aShopThatWatches();
  expect(whereLeft(tom, lessonId, clips)).toBeNull();
  watch(0, 5_000);
  expect(whereLeft(tom, lessonId, clips)).toBeNull();
  watch(5_000, 250_000, NOON + 250_000);
  expect(whereLeft(tom, lessonId, clips)).toBe(250_000);
  expect(whereLeft(marta, lessonId, clips)).toBeNull();
  watch(590_000, 599_000, NOON + 300_000);
  expect(whereLeft(tom, lessonId, clips)).toBeNull();
});

test("rows of the past cannot be changed or taken away", () => {
  const { watch, db } = aShopThatWatches();
  watch(0, 5_000);
  expect(() => db.update(watchedStretches).set({ toMs: 600_000 }).run()).toThrow(/append-only/);
  expect(() => db.delete(watchedStretches).run()).toThrow(/append-only/);
});

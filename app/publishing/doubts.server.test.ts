import { beforeEach, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import type { ChapterId, LessonId, MarkId, RecordingId, RevisionId } from "#drizzle/schema/ids";
import {
  answers,
  attempts,
  auditLog,
  doubts,
  outbox,
  questionVersions,
  watchedStretches,
} from "#drizzle/schema/index";
import {
  aChapter,
  aCitation,
  aDatabase,
  aLesson,
  aMark,
  aScope,
  aShop,
  NOON,
} from "../../tests/support/factories";
import { clearDoubt, findDoubt, findValue, listDoubts, raiseDoubt, usersOfValue } from "./doubts.server";
import { publishLesson } from "./publish-lesson.server";

const ORIGIN = "https://training.example";
const DAY = 24 * 3_600_000;
let instructor: Scope;
let owner: Scope;
let trainee: Scope;
let of: { lessonId: LessonId; recordingId: RecordingId; chapterId: ChapterId };
let markId: MarkId;
let revisionId: RevisionId;

beforeEach(() => {
  const db = aDatabase();
  const shopId = aShop(db);
  instructor = aScope(db, shopId, "instructor", { name: "Marta", email: "marta@shop.example" });
  owner = aScope(db, shopId, "owner", { name: "Olive", email: "olive@shop.example" });
  trainee = aScope(db, shopId, "trainee", { name: "Teo" });
  const lesson = aLesson(instructor, { title: "Valve cover gasket" });
  of = { ...lesson, chapterId: aChapter(instructor, lesson) };
  markId = aMark(instructor, of, {
    component: "valve cover bolt",
    componentKey: "valve-cover+bolt",
    citationId: aCitation(instructor),
    atMs: 60_000,
  });
  const published = publishLesson(instructor, of.lessonId, { version: 1, note: "" }, NOON);
  if (!published.ok) throw new Error("not published");
  revisionId = published.revisionId;
});

const raise = (scope: Scope, reason = "manual says 80", at = NOON) =>
  raiseDoubt(scope, of.lessonId, markId, reason, ORIGIN, at);
const shown = () => findLearnerLesson(trainee, of.lessonId)?.marks[0];
const mails = () => instructor.db.select().from(outbox).all();
function doubtOf(scope: Scope) {
  const raised = raise(scope);
  if (!raised.ok) throw new Error("not raised");
  return raised.doubtId;
}

test("from a trainee it warns beside the value and mails who may stop it", () => {
  expect(raise(trainee)).toMatchObject({ ok: true, stops: false });
  expect(shown()).toMatchObject({
    showing: "unchecked",
    doubts: [{ by: "Teo", stops: false, reason: "manual says 80" }],
  });
  expect(shown()?.mark.values[0]?.text).toBe("88 Nm");
  expect(mails().map((mail) => [mail.recipient, mail.subject])).toEqual([
    ["marta@shop.example", "Looks wrong: valve cover bolt, Valve cover gasket"],
    ["olive@shop.example", "Looks wrong: valve cover bolt, Valve cover gasket"],
  ]);
});

test("from an instructor it stops at once: the figure does not leave the server", () => {
  expect(raise(instructor)).toMatchObject({ ok: true, stops: true });
  expect(shown()).toMatchObject({ showing: "in-doubt", mark: { values: [], said: "" } });
  expect(mails().map((mail) => [mail.recipient, mail.subject])).toEqual([
    ["olive@shop.example", "Stopped: valve cover bolt, Valve cover gasket"],
  ]);
  expect(
    instructor.db
      .select()
      .from(auditLog)
      .all()
      .map((row) => row.action),
  ).toContain("stopped");
});

test("a second press is one doubt; an instructor's stop comes beside a trainee's", () => {
  expect(raise(trainee, "again", NOON + 1)).toEqual(raise(trainee, "again", NOON + 2));
  expect(instructor.db.select().from(doubts).all()).toHaveLength(1);
  raise(owner);
  expect(instructor.db.select().from(doubts).all()).toHaveLength(2);
  expect(listDoubts(instructor).open.map((doubt) => [doubt.by, doubt.stops])).toEqual([
    ["Olive", true],
    ["Teo", false],
  ]);
});

test("cleared by a named person with a reason; then the value shows again", () => {
  const doubtId = doubtOf(instructor);
  expect(clearDoubt(owner, doubtId, "  ", NOON + 1)).toMatchObject({ ok: false, reason: "refused" });
  expect(shown()?.showing).toBe("in-doubt");
  expect(clearDoubt(owner, doubtId, "Read it again on page 31: 88 is right.", NOON + 1)).toEqual({
    ok: true,
  });
  expect(clearDoubt(instructor, doubtId, "other", NOON + 2)).toEqual({ ok: true });
  expect(shown()?.showing).toBe("unchecked");
  expect(listDoubts(instructor)).toMatchObject({
    open: [],
    cleared: [{ cleared: { by: "Olive", at: NOON + 1, reason: "Read it again on page 31: 88 is right." } }],
  });
});

test("everybody who used the value in the last 30 days is listed", () => {
  const { db, shopId } = instructor;
  const stretch = { shopId, lessonId: of.lessonId, revisionId, recordingId: of.recordingId };
  const watch = (scope: Scope, fromMs: number, toMs: number, at: number) =>
    db
      .insert(watchedStretches)
      .values({ ...stretch, userId: scope.userId, fromMs, toMs, at })
      .run();
  const late = aScope(db, shopId, "trainee", { name: "Lena" });
  const early = aScope(db, shopId, "trainee", { name: "Old" });
  watch(trainee, 50_000, 70_000, NOON - 2 * DAY);
  watch(late, 0, 10_000, NOON - 30 * DAY);
  watch(early, 50_000, 70_000, NOON - 31 * DAY);
  const version = db.select().from(questionVersions).get();
  if (!version) throw new Error("no question");
  const attempt = db
    .insert(attempts)
    .values({
      shopId,
      lessonId: of.lessonId,
      revisionId,
      userId: trainee.userId,
      startedAt: NOON - DAY,
      typed: {},
    })
    .returning({ id: attempts.id })
    .get();
  db.insert(answers)
    .values({
      shopId,
      attemptId: attempt.id,
      questionVersionId: version.id,
      text: "88 Nm",
      outcome: "right",
      right: true,
      feedback: "",
      at: NOON - DAY,
    })
    .run();
  expect(usersOfValue(instructor, of.lessonId, markId, NOON)).toEqual([
    {
      userId: trainee.userId,
      name: "Teo",
      how: ["watched the moment", "answered a question on it"],
      lastAt: NOON - DAY,
    },
    { userId: late.userId, name: "Lena", how: ["watched the lesson"], lastAt: NOON - 30 * DAY },
  ]);
  const doubtId = doubtOf(owner);
  expect(findDoubt(instructor, doubtId, NOON)?.usedBy.map((user) => user.name)).toEqual(["Teo", "Lena"]);
});

test("another shop sees and clears nothing; an unpublished value cannot be doubted", () => {
  const doubtId = doubtOf(trainee);
  const other = aScope(instructor.db, aShop(instructor.db), "owner");
  expect(findValue(other, of.lessonId, markId)).toBeUndefined();
  expect(raise(other)).toEqual({ ok: false, reason: "missing" });
  expect(findDoubt(other, doubtId, NOON)).toBeUndefined();
  expect(clearDoubt(other, doubtId, "mine", NOON)).toEqual({ ok: false, reason: "missing" });
  expect(listDoubts(other)).toEqual({ open: [], cleared: [] });
  expect(usersOfValue(other, of.lessonId, markId, NOON)).toEqual([]);
  const draftOnly = aMark(instructor, of, { atMs: 90_000 });
  expect(raiseDoubt(instructor, of.lessonId, draftOnly, "x", ORIGIN, NOON)).toEqual({
    ok: false,
    reason: "missing",
  });
});

import { eq } from "drizzle-orm";
import { beforeEach, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { loadMarks } from "~/lessons/load-marks.server";
import type { ChapterId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import { auditLog, checks, marks, outbox, users } from "#drizzle/schema/index";
import {
  aChapter,
  aCitation,
  aDatabase,
  aLesson,
  aMark,
  aScope,
  aShop,
  EIGHTY_EIGHT,
  NOON,
  setValues,
} from "../../tests/support/factories";
import { checkMark, marksForCheck, sendForCheck, type MayCheck } from "./check-mark.server";
import { beforePublishing } from "./load-gate.server";
import { publishLesson } from "./publish-lesson.server";

const ORIGIN = "https://training.example";
let author: Scope;
let checker: Scope;
let of: { lessonId: LessonId; recordingId: RecordingId; chapterId: ChapterId };
let markId: MarkId;

beforeEach(() => {
  const db = aDatabase();
  const shopId = aShop(db);
  author = aScope(db, shopId, "instructor", { name: "Marta", email: "marta@shop.example" });
  checker = aScope(db, shopId, "owner", { name: "Dario", email: "dario@shop.example" });
  const lesson = aLesson(author, { title: "Valve cover gasket" });
  of = { ...lesson, chapterId: aChapter(author, lesson) };
  markId = aMark(author, of, {
    component: "valve cover bolt",
    componentKey: "valve-cover+bolt",
    safetyCritical: true,
    citationId: aCitation(author),
  });
});

const rowOf = (scope: Scope, id = markId) =>
  marksForCheck(scope, of.lessonId)?.rows.find((row) => row.mark.id === id);
const mayOf = (scope: Scope, id = markId): MayCheck | undefined => rowOf(scope, id)?.may;
function say(scope: Scope, outcome: "confirmed" | "disputed", reason = "", id = markId, at = NOON) {
  const seal = rowOf(scope, id)?.seal ?? "";
  return checkMark(scope, of.lessonId, id, { outcome, reason, seal }, ORIGIN, at);
}
const stateOf = () =>
  author.db.select({ state: marks.state }).from(marks).where(eq(marks.id, markId)).get()?.state;
const checkRows = () => author.db.select().from(checks).all();
const mails = () => author.db.select().from(outbox).all();

test("a second person confirms; the mark is checked and the day is the shop's", () => {
  expect(mayOf(checker)).toBe("yes");
  expect(say(checker, "confirmed")).toEqual({ ok: true });
  expect(checkRows()).toMatchObject([
    { markId, outcome: "confirmed", checkerId: checker.userId, ownWork: false, on: "2026-11-12" },
  ]);
  expect(stateOf()).toBe("checked");
  expect(loadMarks(author, of.lessonId)[0]).toMatchObject({
    state: "checked",
    check: { by: "Dario", ownWork: false },
  });
  expect(
    author.db
      .select()
      .from(auditLog)
      .all()
      .map((row) => row.action),
  ).toContain("confirmed");
  expect(mails()).toEqual([]);
});

test("the same word posted twice is one row", () => {
  say(checker, "confirmed");
  expect(say(checker, "confirmed", "", markId, NOON + 1)).toEqual({ ok: true });
  expect(checkRows()).toHaveLength(1);
  say(checker, "disputed", "page says 80", markId, NOON + 2);
  say(checker, "disputed", "page says 80", markId, NOON + 3);
  expect(checkRows()).toHaveLength(2);
  expect(mails()).toHaveLength(1);
});

test("nobody checks their own while somebody else may", () => {
  expect(mayOf(author)).toBe("own");
  expect(say(author, "confirmed")).toMatchObject({ ok: false, reason: "refused" });
  expect(say(author, "disputed", "wrong")).toMatchObject({ ok: false, reason: "refused" });
  expect(checkRows()).toEqual([]);
});

test("the only person who may check checks own work, recorded and shown as self-checked", () => {
  author.db.update(users).set({ leftAt: NOON }).where(eq(users.id, checker.userId)).run();
  aScope(author.db, author.shopId, "trainee");
  expect(mayOf(author)).toBe("own-alone");
  expect(say(author, "confirmed")).toEqual({ ok: true });
  expect(checkRows()).toMatchObject([{ ownWork: true }]);
  publishLesson(author, of.lessonId, { version: 1, note: "" }, NOON);
  expect(findLearnerLesson(author, of.lessonId)?.marks[0]?.showing).toBe("self-checked");
});

test("a value without source cannot be confirmed, only disputed", () => {
  const bare = aMark(author, of, { component: "cam cap bolt", componentKey: "camshaft-cap" });
  expect(mayOf(checker, bare)).toBe("no-source");
  expect(say(checker, "confirmed", "", bare)).toMatchObject({
    ok: false,
    sentence: expect.stringMatching(/names no source/),
  });
  expect(say(checker, "disputed", "where from?", bare)).toEqual({ ok: true });
});

test("a tool size and what was measured need no document", () => {
  const tool = aMark(author, of, { kind: "tool", toolName: "socket", component: "" }, [
    { role: "size", text: "10 mm", dimension: "length", unit: "mm", value: 10, number: 0.01 },
  ]);
  const bar = aMark(author, of, { kind: "tool", toolName: "pry bar", component: "" }, []);
  const gap = aMark(author, of, { kind: "measure", component: "gap", componentKey: "gap" }, [
    { role: "measured", text: "0.2 mm", dimension: "length", unit: "mm", value: 0.2, number: 0.0002 },
  ]);
  expect(say(checker, "confirmed", "", tool)).toEqual({ ok: true });
  expect(say(checker, "confirmed", "", gap)).toEqual({ ok: true });
  expect(rowOf(checker, bar)).toBeUndefined();
});

test("a value that changed since the page was opened is not checked", () => {
  const seal = rowOf(checker)?.seal ?? "";
  setValues(author, markId, [{ ...EIGHTY_EIGHT, text: "80 Nm", value: 80, number: 80 }]);
  expect(
    checkMark(checker, of.lessonId, markId, { outcome: "confirmed", reason: "", seal }, ORIGIN, NOON),
  ).toMatchObject({
    ok: false,
    sentence: expect.stringMatching(/was changed after you opened/),
  });
  expect(checkRows()).toEqual([]);
});

test("a check ends with the value that it vouched for, and not with another spelling of it", () => {
  say(checker, "confirmed");
  setValues(author, markId, [{ ...EIGHTY_EIGHT, text: "88.0 N·m" }]);
  expect(rowOf(checker)?.mark.state).toBe("checked");
  setValues(author, markId, [{ ...EIGHTY_EIGHT, text: "80 Nm", value: 80, number: 80 }]);
  expect(rowOf(checker)?.mark.state).toBe("inked");
  setValues(author, markId, [EIGHTY_EIGHT]);
  author.db
    .update(marks)
    .set({ citationId: aCitation(author) })
    .where(eq(marks.id, markId))
    .run();
  expect(rowOf(checker)?.mark.state).toBe("inked");
});

test("a dispute needs a reason, goes to the author by mail, stops publishing and ends by a confirmation", () => {
  expect(say(checker, "disputed", "  ")).toMatchObject({ ok: false, reason: "refused", field: "reason" });
  expect(say(checker, "disputed", "page 31 says 80")).toEqual({ ok: true });
  expect(stateOf()).toBe("inked");
  expect(mails()).toMatchObject([
    { recipient: "marta@shop.example", subject: "Disputed: valve cover bolt, Valve cover gasket" },
  ]);
  expect(mails()[0]?.text).toContain("Reason: page 31 says 80");
  expect(mails()[0]?.text).toContain(`${ORIGIN}/bench/lessons/${of.lessonId}/check#${markId}`);
  expect(beforePublishing(author, of.lessonId)?.lines.filter((line) => line.stops)).toEqual([
    {
      stops: true,
      sentence: "“valve cover bolt” at 1:00 is disputed by Dario: “page 31 says 80”. Settle it first.",
      where: { kind: "check", id: markId },
    },
  ]);
  say(checker, "confirmed", "", markId, NOON + 1);
  expect(beforePublishing(author, of.lessonId)?.lines.filter((line) => line.stops)).toEqual([]);
});

test("a check after publishing shows at once: the withheld figure appears", () => {
  publishLesson(author, of.lessonId, { version: 1, note: "" }, NOON);
  const shown = () => findLearnerLesson(author, of.lessonId)?.marks[0];
  expect(shown()?.showing).toBe("withheld");
  expect(shown()?.mark.values).toEqual([]);
  say(checker, "confirmed");
  expect(shown()?.showing).toBe("checked");
  expect(shown()?.mark.values[0]?.text).toBe("88 Nm");
});

test("pencil marks, other lessons and other shops are missing", () => {
  const other = aScope(author.db, aShop(author.db), "owner");
  expect(marksForCheck(other, of.lessonId)).toBeUndefined();
  const seal = rowOf(checker)?.seal ?? "";
  const word = { outcome: "confirmed" as const, reason: "", seal };
  expect(checkMark(other, of.lessonId, markId, word, ORIGIN, NOON)).toEqual({ ok: false, reason: "missing" });
  const elsewhere = aLesson(author).lessonId;
  expect(checkMark(checker, elsewhere, markId, word, ORIGIN, NOON)).toEqual({ ok: false, reason: "missing" });
  author.db.update(marks).set({ state: "pencilled" }).where(eq(marks.id, markId)).run();
  expect(checkMark(checker, of.lessonId, markId, word, ORIGIN, NOON)).toEqual({
    ok: false,
    reason: "missing",
  });
});

test("send for check mails whoever else may check, once for one draft", () => {
  aScope(author.db, author.shopId, "trainee");
  expect(sendForCheck(author, of.lessonId, ORIGIN, NOON)).toEqual({ ok: true, names: ["Dario"] });
  expect(sendForCheck(author, of.lessonId, ORIGIN, NOON + 1)).toEqual({ ok: true, names: ["Dario"] });
  expect(mails()).toMatchObject([
    { recipient: "dario@shop.example", subject: "For check: Valve cover gasket" },
  ]);
  expect(mails()[0]?.text).toContain("1 value waits");
  say(checker, "confirmed");
  expect(sendForCheck(author, of.lessonId, ORIGIN, NOON)).toMatchObject({ ok: false, reason: "refused" });
  const other = aScope(author.db, aShop(author.db), "owner");
  expect(sendForCheck(other, of.lessonId, ORIGIN, NOON)).toEqual({ ok: false, reason: "missing" });
});

test("send for check says so when nobody else may check", () => {
  author.db.update(users).set({ leftAt: NOON }).where(eq(users.id, checker.userId)).run();
  expect(sendForCheck(author, of.lessonId, ORIGIN, NOON)).toMatchObject({
    ok: false,
    sentence: expect.stringMatching(/^Nobody else in your shop may check/),
  });
  expect(mails()).toEqual([]);
});

test("checks are only added", () => {
  say(checker, "confirmed");
  expect(() => author.db.update(checks).set({ outcome: "disputed" }).run()).toThrow(/append-only/);
  expect(() => author.db.delete(checks).run()).toThrow(/append-only/);
});

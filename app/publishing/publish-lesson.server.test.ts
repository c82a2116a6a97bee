import { eq, sql } from "drizzle-orm";
import { beforeEach, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { importCaptions } from "~/captions/import-captions.server";
import { countChange } from "~/lessons/lock-draft.server";
import { captionFile, chapterFile, findOriginal } from "~/lessons/caption-file.server";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { readSnapshot } from "~/lessons/snapshot";
import type { ChapterId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import {
  auditLog,
  captionTracks,
  clipCuts,
  clips,
  lessons,
  marks,
  questions,
  revisions,
} from "#drizzle/schema/index";
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
import { beforePublishing } from "./load-gate.server";
import { publishLesson } from "./publish-lesson.server";

let instructor: Scope;
let of: { lessonId: LessonId; recordingId: RecordingId; chapterId: ChapterId };
let markId: MarkId;

const VTT =
  "WEBVTT\n\n00:01.000 --> 00:03.000\n<v Marta>Cover <b>bolt</b> &amp; washer\n\n00:30.000 --> 00:32.000\nnever played\n";
const captions = (text: string) => {
  const imported = importCaptions(
    instructor,
    of.recordingId,
    { fileName: "job.vtt", language: "en", file: text },
    NOON,
  );
  if (!imported.ok) throw new Error("not imported");
  return imported.trackId;
};

beforeEach(() => {
  const db = aDatabase();
  instructor = aScope(db, aShop(db), "instructor");
  const lesson = aLesson(instructor, { title: "Valve cover gasket" });
  of = { ...lesson, chapterId: aChapter(instructor, lesson, { title: "Bolts" }) };
  const clip = db.select().from(clips).where(eq(clips.lessonId, of.lessonId)).get();
  if (clip)
    db.insert(clipCuts)
      .values({ shopId: instructor.shopId, clipId: clip.id, fromMs: 20_000, toMs: 60_000 })
      .run();
  markId = aMark(instructor, of, {
    component: "valve cover bolt",
    componentKey: "valve-cover+bolt",
    citationId: aCitation(instructor),
    atMs: 5_000,
  });
});

const versionOf = () =>
  instructor.db.select({ version: lessons.version }).from(lessons).where(eq(lessons.id, of.lessonId)).get()
    ?.version ?? 0;
const publish = (now = NOON, version = versionOf()) =>
  publishLesson(instructor, of.lessonId, { version, note: "first" }, now);
const found = (word: string) =>
  instructor.db.all<{ words: string; start_ms: number; shop_id: string }>(
    sql`select words, start_ms, shop_id from caption_words where caption_words match ${word}`,
  );
/** A change of the draft as the bench makes it. */
function change(number: number) {
  setValues(instructor, markId, [{ ...EIGHTY_EIGHT, text: `${number} Nm`, value: number, number }]);
  countChange(instructor, of.lessonId, NOON);
}

test("publishing makes revision 1 and all that follows from it", () => {
  const { db } = instructor;
  const trackId = captions(VTT);
  expect(publish()).toMatchObject({ ok: true, n: 1, already: false });
  const [revision] = db.select().from(revisions).all();
  expect(revision).toMatchObject({
    n: 1,
    format: 1,
    note: "first",
    publishedBy: instructor.userId,
    publishedAt: NOON,
  });
  const snapshot = readSnapshot(revision?.snapshot ?? "");
  expect(snapshot.marks.map((mark) => mark.id)).toEqual([markId]);
  expect(snapshot.captionTracks).toEqual([
    { id: trackId, recordingId: of.recordingId, language: "en", label: "English" },
  ]);
  expect(findLearnerLesson(instructor, of.lessonId)?.n).toBe(1);
  expect(db.select().from(captionTracks).get()?.publishedAt).toBe(NOON);
  expect(
    db
      .select()
      .from(questions)
      .all()
      .map((question) => question.markId),
  ).toContain(markId);
  expect(
    db
      .select()
      .from(auditLog)
      .all()
      .map((row) => row.action),
  ).toContain("published revision 1 of");
  // Plain words, and only what the lesson plays: 0:30 lies in a cut.
  expect(found("washer")).toEqual([
    { words: "Cover bolt & washer", start_ms: 1000, shop_id: instructor.shopId },
  ]);
  expect(found("played")).toEqual([]);
});

test("the same form posted twice publishes once", () => {
  const version = versionOf();
  const first = publish(NOON, version);
  const second = publish(NOON + 1, version);
  expect(first).toMatchObject({ ok: true, n: 1, already: false });
  expect(second).toMatchObject({ ok: true, n: 1, already: true });
  expect(instructor.db.select().from(revisions).all()).toHaveLength(1);
});

test("a form that was opened before the last change is refused and writes nothing", () => {
  const version = versionOf();
  change(80);
  expect(publish(NOON, version)).toMatchObject({ ok: false, reason: "stale" });
  expect(instructor.db.select().from(revisions).all()).toEqual([]);
});

test("while the gate stops nothing is written", () => {
  const { db } = instructor;
  captions(VTT);
  db.update(marks).set({ state: "pencilled" }).where(eq(marks.id, markId)).run();
  const stopped = publish();
  expect(stopped.ok || stopped.reason !== "stopped" ? [] : stopped.lines).toMatchObject([
    { stops: true, where: { kind: "mark", id: markId } },
  ]);
  expect(db.select().from(revisions).all()).toEqual([]);
  expect(db.select().from(captionTracks).get()?.publishedAt).toBeNull();
  expect(found("washer")).toEqual([]);
  expect(findLearnerLesson(instructor, of.lessonId)).toBeUndefined();
});

test("a change makes revision 2; the first one stays as it was, word for word", () => {
  const { db } = instructor;
  captions(VTT);
  publish();
  const before = db.select().from(revisions).get()?.snapshot;
  change(80);
  captions("WEBVTT\n\n00:01.000 --> 00:03.000\nnew sentence\n");
  expect(beforePublishing(instructor, of.lessonId)?.former).toMatchObject({
    n: 1,
    comparison: {
      marks: [{ what: "changed", title: "valve cover bolt", before: "88 Nm", after: "80 Nm" }],
      other: ["captions"],
    },
  });
  expect(publish(NOON + 5)).toMatchObject({ ok: true, n: 2, already: false });
  expect(db.select().from(revisions).where(eq(revisions.n, 1)).get()?.snapshot).toBe(before);
  expect(findLearnerLesson(instructor, of.lessonId)?.marks[0]?.mark.values[0]?.number).toBe(80);
  expect(found("washer")).toEqual([]);
  expect(found("sentence")).toHaveLength(1);
});

test("the database refuses to change or delete a revision", () => {
  const { db } = instructor;
  publish();
  expect(() => db.update(revisions).set({ note: "other" }).run()).toThrow(/append-only/);
  expect(() => db.delete(revisions).run()).toThrow(/append-only/);
});

test("another shop neither publishes nor reads the lesson, its captions or chapters", () => {
  const { db, shopId } = instructor;
  const trackId = captions(VTT);
  publish();
  const other = aScope(db, aShop(db), "owner");
  expect(publishLesson(other, of.lessonId, { version: 1, note: "" }, NOON)).toEqual({
    ok: false,
    reason: "missing",
  });
  expect(captionFile(other, of.lessonId, trackId)).toBeUndefined();
  expect(findOriginal(other, of.lessonId, trackId)).toBeUndefined();
  expect(chapterFile(other, of.lessonId)).toBeUndefined();
  const trainee = aScope(db, shopId, "trainee");
  expect(captionFile(trainee, of.lessonId, trackId)).toContain("Cover <b>bolt</b> &amp; washer");
  expect(chapterFile(trainee, of.lessonId, of.recordingId)).toContain("Bolts");
  expect(findOriginal(trainee, of.lessonId, trackId)).toBeUndefined();
  expect(findOriginal(instructor, of.lessonId, trackId)?.original).toBe(VTT);
});

test("learners get the captions of the newest revision only, instructors also those to come", () => {
  const trainee = aScope(instructor.db, instructor.shopId, "trainee");
  const first = captions(VTT);
  publish();
  const next = captions("WEBVTT\n\n00:01.000 --> 00:03.000\nnew sentence\n");
  expect(captionFile(trainee, of.lessonId, first)).toBeDefined();
  expect(captionFile(trainee, of.lessonId, next)).toBeUndefined();
  expect(captionFile(instructor, of.lessonId, next)).toBeDefined();
  publish();
  expect(captionFile(trainee, of.lessonId, first)).toBeUndefined();
  expect(captionFile(trainee, of.lessonId, next)).toBeDefined();
  // A track of another lesson's recording is not this lesson's.
  const elsewhere = aLesson(instructor);
  expect(captionFile(instructor, elsewhere.lessonId, next)).toBeUndefined();
});

test("a withdrawn lesson comes back when it is published", () => {
  const { db } = instructor;
  publish();
  db.update(lessons).set({ withdrawnAt: NOON }).run();
  expect(findLearnerLesson(instructor, of.lessonId)).toBeUndefined();
  expect(publish()).toMatchObject({ ok: true, n: 2 });
  expect(findLearnerLesson(instructor, of.lessonId)?.n).toBe(2);
});

test("when one part fails, no part is written", () => {
  const { db } = instructor;
  captions(VTT);
  db.run(
    sql`create trigger no_audit before insert on audit_log when new.noun = 'lesson' begin select raise(abort, 'the disk is full'); end`,
  );
  expect(() => publish()).toThrow(/the disk is full/);
  expect(db.select().from(revisions).all()).toEqual([]);
  expect(db.select().from(questions).all()).toEqual([]);
  expect(db.select().from(captionTracks).get()?.publishedAt).toBeNull();
  expect(found("washer")).toEqual([]);
});

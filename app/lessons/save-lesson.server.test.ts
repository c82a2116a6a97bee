import { ulid } from "ulid";
import { expect, test } from "vitest";
import type { ChapterId, LessonId, RecordingId, VehicleId } from "#drizzle/schema/ids";
import { auditLog, chapters, clips, lessons, marks, revisions, vehicles } from "#drizzle/schema/index";
import {
  aChapter,
  aDatabase,
  aLesson,
  aMark,
  aRecording,
  aScope,
  aShop,
  NOON,
} from "../../tests/support/factories";
import { parseForm } from "~/forms/parse-form";
import { createLesson } from "./create-lesson.server";
import { buildSnapshot } from "./draft";
import { draftDiffers } from "./draft-differs";
import { editLesson } from "./edit-lesson.server";
import { LessonForm, NewLessonForm } from "./lesson-form";
import { listBench, listErased, listReadyRecordings } from "./list-bench.server";
import { stateWords } from "./bench-state";
import { loadDraft } from "./load-draft.server";
import { saveChapters, type ChapterRequest } from "./save-chapters.server";

function aForm(fields: Record<string, string>): FormData {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  return form;
}

const TITLED = { title: "Front sway-bar links", system: "suspension", position: "front" };

function create(
  scope: Parameters<typeof createLesson>[0],
  fields: Record<string, string>,
  lessonId = ulid(),
) {
  const form = parseForm(NewLessonForm, aForm({ ...TITLED, lessonId, ...fields }));
  if (!form.ok) return form;
  return createLesson(scope, form.value, NOON);
}

function aBench() {
  const db = aDatabase();
  const scope = aScope(db, aShop(db), "instructor", { name: "Marta Oduya" });
  return { db, scope };
}

test("a lesson is made of its recordings in the order given, with a chapter over each", () => {
  const { scope } = aBench();
  const late = aRecording(scope, { title: "Wheel on", durationMs: 200_000 });
  const early = aRecording(scope, { title: "Wheel off", durationMs: 100_000 });
  const made = create(scope, {
    [`recording-${late}`]: "yes",
    [`place-${late}`]: "2",
    [`recording-${early}`]: "yes",
    [`place-${early}`]: "1",
    chapterTitle: "Lift and chock",
    vehicleMake: "Meridian",
    vehicleModel: "Strada",
    vehicleYearFrom: "2016",
  });
  if (!made.ok) throw new Error(JSON.stringify(made));
  const draft = loadDraft(scope, made.lessonId);
  expect(draft).toMatchObject({
    lesson: { ...TITLED, version: 1, newestRevision: null },
    vehicles: [{ make: "Meridian", model: "Strada", yearFrom: 2016, yearTo: null }],
    clips: [
      {
        recordingId: early,
        inMs: 0,
        outMs: 100_000,
        title: "Wheel off",
        durationMs: 100_000,
        state: "ready",
        cuts: [],
      },
      { recordingId: late, inMs: 0, outMs: 200_000, recordedBy: "Marta Oduya" },
    ],
    chapters: [
      { recordingId: early, startMs: 0, endMs: 100_000, title: "Lift and chock", phase: null },
      { recordingId: late, startMs: 0, endMs: 200_000, title: "Wheel on", phase: null },
    ],
    marks: [],
  });
});

test("the same new lesson posted twice is one lesson", () => {
  const { db, scope } = aBench();
  const recordingId = aRecording(scope);
  const fields = { [`recording-${recordingId}`]: "yes", vehicleMake: "Meridian", vehicleModel: "Strada" };
  const lessonId = ulid();
  expect(create(scope, fields, lessonId)).toEqual({ ok: true, lessonId });
  expect(create(scope, fields, lessonId)).toEqual({ ok: true, lessonId });
  for (const table of [lessons, clips, chapters, vehicles, auditLog])
    expect(db.select().from(table).all()).toHaveLength(1);
});

function yes(...ids: RecordingId[]): Record<string, string> {
  return Object.fromEntries(ids.map((id) => [`recording-${id}`, "yes"]));
}

test("a new lesson that cannot be made says why and leaves nothing behind", () => {
  const { db, scope } = aBench();
  const ready = aRecording(scope);
  const waiting = aRecording(scope, { title: "Wheel off", state: "preparing" });
  const deleted = aRecording(scope, { deletedAt: NOON });
  const theirs = aScope(db, aShop(db), "owner");
  const theirRecording = aRecording(theirs);
  const errors = (fields: Record<string, string>) => {
    const made = create(scope, fields);
    expect([lessons, clips, chapters, vehicles].flatMap((table) => db.select().from(table).all())).toEqual(
      [],
    );
    if (made.ok) throw new Error("was not refused");
    return "errors" in made ? made.errors : made;
  };
  expect(errors({})).toEqual({ recordings: "Choose at least one recording." });
  expect(errors({ ...yes(ready), title: " " })).toHaveProperty("title");
  expect(errors({ ...yes(ready), system: "" })).toEqual({ system: "Choose the system that the job is on." });
  expect(errors({ ...yes(ready), vehicleModel: "Strada" })).toHaveProperty("vehicleMake");
  expect(
    errors({ ...yes(ready), vehicleMake: "M", vehicleModel: "S", vehicleYearFrom: "16" }),
  ).toHaveProperty("vehicleYearFrom");
  expect(errors(yes(ready, waiting))).toEqual({
    recordings: "“Wheel off” is not ready yet. Wait until it has been looked through, then try again.",
  });
  for (const id of [deleted, theirRecording])
    expect(errors(yes(ready, id))).toEqual({ ok: false, reason: "missing", noun: "recording" });
  expect(errors({ ...yes(ready), [`vehicle-${ulid()}`]: "yes" })).toEqual({
    ok: false,
    reason: "missing",
    noun: "vehicle",
  });
});

test("a lesson's id of another shop makes no lesson", () => {
  const { db, scope } = aBench();
  const theirs = aLesson(aScope(db, aShop(db), "owner"));
  const recordingId = aRecording(scope);
  expect(create(scope, { [`recording-${recordingId}`]: "yes" }, theirs.lessonId)).toEqual({
    ok: false,
    reason: "missing",
    noun: "lesson",
  });
});

function edit(
  scope: Parameters<typeof editLesson>[0],
  lessonId: LessonId,
  version: number,
  fields: Record<string, string>,
) {
  const form = parseForm(
    LessonForm,
    aForm({ intent: "details", ...TITLED, version: String(version), ...fields }),
  );
  if (!form.ok) throw new Error(JSON.stringify(form.errors));
  return editLesson(scope, lessonId, form.value.version, form.value, NOON);
}

test("details change once per version; vehicles are set, and another shop's lesson is missing", () => {
  const { db, scope } = aBench();
  const { lessonId } = aLesson(scope);
  expect(edit(scope, lessonId, 1, { vehicleMake: "Meridian", vehicleModel: "Strada" })).toEqual({ ok: true });
  expect(edit(scope, lessonId, 1, { title: "Too late" })).toEqual({ ok: false, reason: "stale" });
  const draft = loadDraft(scope, lessonId);
  expect(draft).toMatchObject({ lesson: { ...TITLED, version: 2 }, vehicles: [{ make: "Meridian" }] });
  const vehicle = draft?.vehicles[0]?.id as VehicleId;
  expect(edit(scope, lessonId, 2, { [`vehicle-${vehicle}`]: "yes" })).toEqual({ ok: true });
  expect(loadDraft(scope, lessonId)?.vehicles).toHaveLength(1);
  expect(edit(scope, lessonId, 3, {})).toEqual({ ok: true });
  expect(loadDraft(scope, lessonId)?.vehicles).toEqual([]);
  const theirs = aScope(db, aShop(db), "owner");
  expect(edit(theirs, lessonId, 4, {})).toEqual({ ok: false, reason: "missing", noun: "lesson" });
  const theirLesson = aLesson(theirs);
  expect(edit(theirs, theirLesson.lessonId, 1, { [`vehicle-${vehicle}`]: "yes" })).toEqual({
    ok: false,
    reason: "missing",
    noun: "vehicle",
  });
  expect(loadDraft(theirs, theirLesson.lessonId)?.lesson.version).toBe(1);
});

test("moving a lesson to a safety-critical system marks its torques so, and moving it back changes nothing", () => {
  const { scope } = aBench();
  const of = aLesson(scope, { system: "engine" });
  aMark(scope, { ...of, chapterId: aChapter(scope, of) });
  const critical = () => loadDraft(scope, of.lessonId)?.marks[0]?.safetyCritical;
  expect(critical()).toBe(false);
  edit(scope, of.lessonId, 1, { system: "brakes" });
  expect(critical()).toBe(true);
  edit(scope, of.lessonId, 2, { system: "engine" });
  expect(critical()).toBe(true);
});

function chaptered() {
  const { db, scope } = aBench();
  const of = aLesson(scope);
  const first = aChapter(scope, of, { title: "Remove", startMs: 0, endMs: 300_000 });
  const second = aChapter(scope, of, { title: "Fit", startMs: 300_000, endMs: 600_000 });
  const save = (request: ChapterRequest, version = loadDraft(scope, of.lessonId)?.lesson.version ?? 0) =>
    saveChapters(scope, of.lessonId, version, request, NOON);
  const titles = () => loadDraft(scope, of.lessonId)?.chapters.map((chapter) => chapter.title);
  return { db, scope, ...of, first, second, save, titles };
}

const add = (atMs: number, id = ulid() as ChapterId): ChapterRequest => ({
  edit: "add",
  id,
  atMs,
  title: "New",
  phase: "inspect",
});

test("a new chapter takes the marks of its stretch along, and the same one posted twice is one", () => {
  const { scope, lessonId, recordingId, first, save, titles } = chaptered();
  const of = { lessonId, recordingId, chapterId: first };
  const early = aMark(scope, of, { atMs: 10_000 });
  const late = aMark(scope, of, { atMs: 200_000 });
  const request = add(150_000);
  expect(save(request, 1)).toEqual({ ok: true });
  expect(save(request, 1)).toEqual({ ok: true });
  expect(titles()).toEqual(["Remove", "New", "Fit"]);
  const markOf = (id: string) => loadDraft(scope, lessonId)?.marks.find((mark) => mark.id === id);
  expect(markOf(early)).toMatchObject({ chapterId: first, atMs: 10_000 });
  expect(markOf(late)).toMatchObject({ chapterId: "id" in request ? request.id : "", atMs: 200_000 });
});

test("marks of a removed chapter, erased ones too, go to the chapter that covers them now", () => {
  const { db, scope, lessonId, recordingId, first, second, save, titles } = chaptered();
  aMark(scope, { lessonId, recordingId, chapterId: second }, { atMs: 400_000 });
  aMark(scope, { lessonId, recordingId, chapterId: second }, { atMs: 500_000, erasedAt: NOON });
  expect(save({ edit: "remove", id: second })).toEqual({ ok: true });
  expect(titles()).toEqual(["Remove"]);
  expect(
    db
      .select()
      .from(marks)
      .all()
      .map((mark) => [mark.chapterId, mark.atMs]),
  ).toEqual([
    [first, 400_000],
    [first, 500_000],
  ]);
  expect(listErased(scope, lessonId)).toHaveLength(1);
});

test("a moved start, a new name and a phase are kept; the marks stay at their moments", () => {
  const { scope, lessonId, recordingId, first, second, save } = chaptered();
  aMark(scope, { lessonId, recordingId, chapterId: first }, { atMs: 290_000 });
  expect(save({ edit: "change", id: second, atMs: 250_000, title: "Fit links", phase: "install" })).toEqual({
    ok: true,
  });
  expect(loadDraft(scope, lessonId)).toMatchObject({
    chapters: [
      { id: first, endMs: 250_000 },
      { id: second, startMs: 250_000, endMs: 600_000, title: "Fit links", phase: "install" },
    ],
    marks: [{ chapterId: second, atMs: 290_000 }],
  });
});

test("impossible chapters are refused with a sentence and leave the draft as it was", () => {
  const { scope, lessonId, save, titles } = chaptered();
  const before = loadDraft(scope, lessonId);
  expect(save(add(600_000))).toEqual({
    ok: false,
    reason: "fields",
    errors: { start: "That is outside the recording, which plays for 10:00." },
  });
  expect(save(add(300_400))).toMatchObject({
    errors: { start: expect.stringContaining("already starts in that second") },
  });
  expect(save(add(150_000), 7)).toEqual({ ok: false, reason: "stale" });
  expect(loadDraft(scope, lessonId)).toEqual(before);
  expect(titles()).toEqual(["Remove", "Fit"]);
});

test("a chapter of another lesson or another shop is missing", () => {
  const { db, scope, save, first, lessonId } = chaptered();
  const other = aLesson(scope);
  const elsewhere = aChapter(scope, other);
  const gone = { ok: false, reason: "missing", noun: "chapter" };
  expect(save({ edit: "remove", id: elsewhere })).toEqual(gone);
  expect(save({ edit: "change", id: elsewhere, atMs: 0, title: "Mine", phase: null })).toEqual(gone);
  expect(save(add(100_000, elsewhere))).toEqual(gone);
  const theirs = aScope(db, aShop(db), "owner");
  expect(saveChapters(theirs, lessonId, 1, { edit: "remove", id: first }, NOON)).toEqual({
    ok: false,
    reason: "missing",
    noun: "lesson",
  });
});

test("times on the bench are lesson time: a chapter of the second recording starts after the first one's end", () => {
  const { scope } = aBench();
  const one = aRecording(scope, { title: "One", durationMs: 100_000 });
  const two = aRecording(scope, { title: "Two", durationMs: 200_000 });
  const made = create(scope, { [`recording-${one}`]: "yes", [`recording-${two}`]: "yes" });
  if (!made.ok || !("lessonId" in made)) throw new Error("not made");
  expect(saveChapters(scope, made.lessonId, 1, add(150_000), NOON)).toEqual({ ok: true });
  const draft = loadDraft(scope, made.lessonId);
  expect(draft?.chapters.map((chapter) => [chapter.recordingId, chapter.startMs, chapter.endMs])).toEqual([
    [one, 0, 100_000],
    [two, 0, 50_000],
    [two, 50_000, 200_000],
  ]);
  const last = draft?.chapters[2]?.id as ChapterId;
  expect(
    saveChapters(
      scope,
      made.lessonId,
      2,
      { edit: "change", id: last, atMs: 50_000, title: "x", phase: null },
      NOON,
    ),
  ).toMatchObject({ errors: { start: expect.stringContaining("another recording") } });
});

test("the list says how far each lesson is, in words", () => {
  const { db, scope } = aBench();
  const of = aLesson(scope, { title: "Links" });
  const chapterId = aChapter(scope, of);
  aMark(scope, { ...of, chapterId });
  aMark(scope, { ...of, chapterId }, { state: "pencilled" });
  aLesson(aScope(db, aShop(db), "owner"));
  const words = () => listBench(scope).map((lesson) => stateWords(lesson.state));
  expect(listBench(scope)).toMatchObject([{ title: "Links", inPencil: 1, withoutSource: 1, unchecked: 1 }]);
  expect(words()).toEqual(["Draft, never published"]);
  const draft = loadDraft(scope, of.lessonId);
  if (!draft) throw new Error("gone");
  const snapshot = buildSnapshot(draft, []);
  expect(snapshot.marks).toHaveLength(1);
  db.insert(revisions)
    .values({
      shopId: scope.shopId,
      lessonId: of.lessonId,
      n: 1,
      format: 1,
      snapshot: JSON.stringify(snapshot),
      publishedBy: scope.userId,
      publishedAt: NOON,
    })
    .run();
  db.update(lessons).set({ newestRevision: 1 }).run();
  expect(words()).toEqual(["Revision 1"]);
  aMark(scope, { ...of, chapterId }, { state: "pencilled", atMs: 90_000 });
  expect(words()).toEqual(["Revision 1"]);
  aMark(scope, { ...of, chapterId }, { atMs: 120_000 });
  expect(words()).toEqual(["Draft differs from revision 1"]);
  expect(draftDiffers(draft, snapshot)).toBe(false);
});

test("ready recordings are listed as filmed, and those in a lesson are told apart", () => {
  const { scope } = aBench();
  const second = aRecording(scope, { lastModified: 2 });
  const first = aRecording(scope, { lastModified: 1 });
  aRecording(scope, { state: "uploading" });
  aLesson(scope, {}, first);
  expect(listReadyRecordings(scope).map(({ id, used }) => [id, used])).toEqual([
    [first, true],
    [second, false],
  ]);
});

test("a snapshot of a draft without a phase or a clip is a fault of the caller", () => {
  const { scope } = aBench();
  const of = aLesson(scope);
  aChapter(scope, of, { phase: null });
  const draft = loadDraft(scope, of.lessonId);
  if (!draft) throw new Error("gone");
  expect(() => buildSnapshot(draft, [])).toThrow("phase");
  expect(() => buildSnapshot({ ...draft, clips: [] }, [])).toThrow("clip");
});

import { and, eq } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { ChapterId, LessonId, RecordingId } from "#drizzle/schema/ids";
import { chapters, marks } from "#drizzle/schema/index";
import { chapterAt, editChapters, type ChapterEdit } from "./chapter-edits";
import type { Draft, DraftChapter } from "./draft";
import { missing, refused, stale, type DraftRefusal } from "./draft-refusal";
import { fileTime, lessonDuration, nearestLessonTime } from "./lesson-time";
import { loadDraft } from "./load-draft.server";
import { countChange, lockDraft } from "./lock-draft.server";
import type { Phase } from "./mark";
import { allOrNothing } from "./save-mark.server";
import { formatExactTimecode } from "./timecode";

/** What a form asks of the chapters. Times in ms of lesson time. */
export type ChapterRequest =
  | Readonly<{ edit: "add"; id: ChapterId; atMs: number; title: string; phase: Phase | null }>
  | Readonly<{ edit: "change"; id: ChapterId; atMs: number; title: string; phase: Phase | null }>
  | Readonly<{ edit: "remove"; id: ChapterId }>;

function asEdit(
  draft: Draft,
  request: ChapterRequest,
): Readonly<{ ok: true; edit: ChapterEdit }> | DraftRefusal {
  if (request.edit === "remove") return { ok: true, edit: request };
  const { atMs, ...rest } = request;
  const plays = lessonDuration(draft.clips);
  const at = fileTime(draft.clips, atMs);
  if (!at || atMs >= plays)
    return refused({
      start: `That is outside the recording, which plays for ${formatExactTimecode(plays)}.`,
    });
  const recordingId = at.recordingId as RecordingId;
  if (rest.edit === "add")
    return { ok: true, edit: { ...rest, edit: "add", recordingId, startMs: at.fileMs } };
  const chapter = draft.chapters.find((chapter) => chapter.id === rest.id);
  if (chapter && chapter.recordingId !== recordingId)
    return refused({
      start: "That moment is in another recording of this lesson. A chapter stays in its own.",
    });
  return { ok: true, edit: { ...rest, edit: "change", startMs: at.fileMs } };
}

function store(scope: Scope, draft: Draft, next: readonly DraftChapter[]): void {
  const lessonId = draft.lesson.id;
  const before = new Map(draft.chapters.map((chapter) => [chapter.id, chapter]));
  for (const chapter of next) {
    const { id, startMs, endMs, title, phase, state } = chapter;
    if (before.has(id))
      scope.db
        .update(chapters)
        .set({ startMs, endMs, title, phase, state })
        .where(and(eq(chapters.shopId, scope.shopId), eq(chapters.id, id)))
        .run();
    else
      scope.db
        .insert(chapters)
        .values({ ...chapter, shopId: scope.shopId, lessonId })
        .run();
    before.delete(id);
  }
  // Marks keep their moment, erased ones too: each belongs to the chapter that now covers it.
  const rows = scope.db
    .select({ id: marks.id, chapterId: marks.chapterId, recordingId: marks.recordingId, atMs: marks.atMs })
    .from(marks)
    .where(and(eq(marks.shopId, scope.shopId), eq(marks.lessonId, lessonId)))
    .all();
  for (const mark of rows) {
    const kept = before.has(mark.chapterId) ? undefined : mark.chapterId;
    const chapterId = chapterAt(next, mark.recordingId, mark.atMs)?.id ?? kept ?? next[0]?.id;
    if (chapterId && chapterId !== mark.chapterId)
      scope.db
        .update(marks)
        .set({ chapterId })
        .where(and(eq(marks.shopId, scope.shopId), eq(marks.id, mark.id)))
        .run();
  }
  for (const id of before.keys())
    scope.db
      .delete(chapters)
      .where(and(eq(chapters.shopId, scope.shopId), eq(chapters.id, id)))
      .run();
}

/** Adds, changes or removes one chapter; marks keep their moments. The same new chapter posted twice is one. */
export function saveChapters(
  scope: Scope,
  lessonId: LessonId,
  version: number,
  request: ChapterRequest,
  now: number,
): Readonly<{ ok: true }> | DraftRefusal {
  return allOrNothing(scope, (scope) => {
    const locked = lockDraft(scope, lessonId, version);
    if (!locked.ok && locked.reason !== "stale") return locked;
    const draft = loadDraft(scope, lessonId);
    if (!draft) return missing("lesson");
    const known = draft.chapters.some((chapter) => chapter.id === request.id);
    if (request.edit === "add") {
      if (known) return { ok: true };
      const taken = scope.db
        .select({ id: chapters.id })
        .from(chapters)
        .where(eq(chapters.id, request.id))
        .get();
      if (taken) return missing("chapter");
    } else if (!known) return locked.ok ? missing("chapter") : stale();
    if (!locked.ok) return locked;
    const asked = asEdit(draft, request);
    if (!asked.ok) return asked;
    const edited = editChapters(draft.chapters, asked.edit, (recordingId, ms) =>
      formatExactTimecode(nearestLessonTime(draft.clips, recordingId, ms)),
    );
    if (!edited.ok) return refused({ [edited.field]: edited.error });
    store(scope, draft, edited.chapters);
    countChange(scope, lessonId, now);
    return { ok: true };
  });
}

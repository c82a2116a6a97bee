import { and, eq } from "drizzle-orm";
import { inTransaction } from "~/db.server";
import type { Scope } from "~/auth/scope.server";
import type { LessonId, MarkId } from "#drizzle/schema/ids";
import { marks, markValues } from "#drizzle/schema/index";
import { chapterAt } from "./chapter-edits";
import { componentKey } from "./component-key";
import type { Draft } from "./draft";
import { missing, refused, type DraftRefusal } from "./draft-refusal";
import { fileTime, lessonDuration } from "./lesson-time";
import { loadDraft } from "./load-draft.server";
import { countChange, lockDraft } from "./lock-draft.server";
import type { MarkEntry } from "./mark-form";
import { safetyReason } from "./safety-critical";
import { saveSource } from "./save-source.server";
import { formatExactTimecode } from "./timecode";

export type SavedMark = Readonly<{ ok: true; markId: MarkId }>;

/** Undoes the transaction around it and hands out why. */
class Undo extends Error {
  constructor(readonly refusal: DraftRefusal) {
    super("undo");
  }
}

/** Runs `work` in one transaction; a refusal leaves nothing written. */
export function allOrNothing<T extends { ok: true }>(
  scope: Scope,
  work: (scope: Scope) => T | DraftRefusal,
): T | DraftRefusal {
  try {
    return inTransaction(scope, (scope) => {
      const done = work(scope);
      if (!done.ok) throw new Undo(done);
      return done;
    });
  } catch (thrown) {
    if (thrown instanceof Undo) return thrown.refusal;
    throw thrown;
  }
}

type Place = Readonly<{
  ok: true;
  at: Pick<typeof marks.$inferInsert, "chapterId" | "recordingId" | "atMs">;
}>;

/** Where the moment of a form lies: in which recording, and whether in the chapter that it names. */
function findPlace(draft: Draft, entry: MarkEntry): Place | DraftRefusal {
  const chapter = draft.chapters.find((chapter) => chapter.id === entry.chapterId);
  if (!chapter) return missing("chapter");
  const plays = lessonDuration(draft.clips);
  const found = fileTime(draft.clips, entry.atMs);
  if (entry.atMs > plays || !found)
    return refused({ at: `That is outside the recording, which plays for ${formatExactTimecode(plays)}.` });
  const { recordingId, fileMs } = found as { recordingId: typeof chapter.recordingId; fileMs: number };
  const covering = chapterAt(draft.chapters, recordingId, fileMs);
  if (covering?.id !== chapter.id)
    return refused({
      at: covering
        ? `${formatExactTimecode(entry.atMs)} is in “${covering.title}”, not in “${chapter.title}”. Change the moment or the chapter.`
        : `${formatExactTimecode(entry.atMs)} is in no chapter of this lesson.`,
    });
  return { ok: true, at: { chapterId: chapter.id, recordingId, atMs: fileMs } };
}

/**
 * Writes a mark as a person filled its form, and inks it. `markId` comes from the form: the same new form posted twice
 * is one mark. Safety-critical is set by the lesson's system and by a person, and never taken back.
 */
export function saveMark(
  scope: Scope,
  lessonId: LessonId,
  target: Readonly<{ markId: MarkId; isNew: boolean }>,
  entry: MarkEntry,
  now: number,
): SavedMark | DraftRefusal {
  return allOrNothing(scope, (scope) => {
    const { markId, isNew } = target;
    const stored = scope.db.select().from(marks).where(eq(marks.id, markId)).get();
    if (stored && (stored.shopId !== scope.shopId || stored.lessonId !== lessonId)) return missing("value");
    if (!isNew && (!stored || stored.erasedAt !== null)) return missing("value");
    if (isNew && stored) return { ok: true, markId };
    const locked = lockDraft(scope, lessonId, entry.version);
    if (!locked.ok) return locked;
    const draft = loadDraft(scope, lessonId);
    if (!draft) return missing("lesson");
    const place = findPlace(draft, entry);
    if (!place.ok) return place;
    const { kind, values, applies, ...content } = entry.content;
    if (stored && stored.kind !== kind) return missing("value");
    const corrected = entry.corrects && draft.marks.find((mark) => mark.id === entry.corrects);
    if (entry.corrects && !corrected) return missing("value");
    const source = saveSource(scope, entry.source, stored?.citationId ?? null, now);
    if (!source.ok) return source;
    const about = corrected
      ? { component: corrected.component, side: corrected.side, position: corrected.position }
      : { component: content.component, side: content.side, position: content.position };
    const row = {
      ...content,
      ...about,
      ...place.at,
      kind,
      state: "inked" as const,
      componentKey: componentKey(about.component, about.position),
      appliesYearFrom: applies.yearFrom,
      appliesYearTo: applies.yearTo,
      appliesEngine: applies.engine,
      appliesDrive: applies.drive,
      appliesVariant: applies.variant,
      variantQuestion: applies.question,
      safetyCritical:
        content.safetyCritical ||
        stored?.safetyCritical === true ||
        safetyReason(locked.lesson.system, kind) !== null,
      citationId: source.citationId,
      inkedBy: scope.userId,
      inkedAt: now,
      changedAt: now,
    };
    if (stored)
      scope.db
        .update(marks)
        .set({ ...row, version: stored.version + 1 })
        .where(and(eq(marks.shopId, scope.shopId), eq(marks.id, markId)))
        .run();
    else
      scope.db
        .insert(marks)
        .values({
          ...row,
          id: markId,
          shopId: scope.shopId,
          lessonId,
          createdBy: scope.userId,
          createdAt: now,
        })
        .run();
    scope.db
      .delete(markValues)
      .where(and(eq(markValues.shopId, scope.shopId), eq(markValues.markId, markId)))
      .run();
    if (values.length > 0)
      scope.db
        .insert(markValues)
        .values(values.map((value, n) => ({ ...value, n, shopId: scope.shopId, markId })))
        .run();
    countChange(scope, lessonId, now);
    return { ok: true, markId };
  });
}

import { and, desc, eq, isNotNull, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, RecordingId, ShopId } from "#drizzle/schema/ids";
import { clips, lessons, marks, recordings, revisions } from "#drizzle/schema/index";
import type { BenchState } from "./bench-state";
import { draftDiffers } from "./draft-differs";
import { loadDraft } from "./load-draft.server";
import { needsSource, type MarkKind } from "./mark";
import { markTitle } from "./mark-words";
import { readSnapshot } from "./snapshot";
import { vehicleWords } from "./vehicle-words";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

export type BenchLesson = Readonly<{
  id: LessonId;
  title: string;
  vehicles: readonly string[];
  state: BenchState;
  inPencil: number;
  withoutSource: number;
  unchecked: number;
  changedAt: number;
}>;

/** Every lesson of the shop as it stands on the bench, the one changed last first. */
export function listBench(scope: InShop): BenchLesson[] {
  const rows = scope.db
    .select({ id: lessons.id, snapshot: revisions.snapshot, publishedAt: revisions.publishedAt })
    .from(lessons)
    .leftJoin(revisions, and(eq(revisions.lessonId, lessons.id), eq(revisions.n, lessons.newestRevision)))
    .where(eq(lessons.shopId, scope.shopId))
    .orderBy(desc(lessons.changedAt), desc(lessons.id))
    .all();
  return rows.flatMap((row) => {
    const draft = loadDraft(scope, row.id);
    if (!draft) return [];
    const { lesson } = draft;
    const inked = draft.marks.filter((mark) => mark.state !== "pencilled" && needsSource(mark.kind));
    return [
      {
        id: lesson.id,
        title: lesson.title,
        vehicles: draft.vehicles.map(vehicleWords),
        state: {
          published: lesson.newestRevision,
          changed: row.snapshot !== null && draftDiffers(draft, readSnapshot(row.snapshot)),
          withdrawn: lesson.withdrawnAt !== null,
        },
        inPencil: draft.marks.filter((mark) => mark.state === "pencilled").length,
        withoutSource: inked.filter((mark) => mark.source === null).length,
        unchecked: inked.filter((mark) => mark.state !== "checked").length,
        changedAt: lesson.changedAt,
      },
    ];
  });
}

export type ReadyRecording = Readonly<{ id: RecordingId; title: string; durationMs: number; used: boolean }>;

/** The recordings that a lesson can be made of, oldest first as they were filmed; `used`: already in a lesson. */
export function listReadyRecordings(scope: InShop): ReadyRecording[] {
  const used = new Set(
    scope.db
      .selectDistinct({ id: clips.recordingId })
      .from(clips)
      .where(eq(clips.shopId, scope.shopId))
      .all()
      .map((clip) => clip.id),
  );
  return scope.db
    .select({
      id: recordings.id,
      title: recordings.title,
      durationMs: recordings.durationMs,
      filmed: recordings.lastModified,
      createdAt: recordings.createdAt,
    })
    .from(recordings)
    .where(
      and(eq(recordings.shopId, scope.shopId), eq(recordings.state, "ready"), isNull(recordings.deletedAt)),
    )
    .all()
    .toSorted((a, b) => (a.filmed || a.createdAt) - (b.filmed || b.createdAt))
    .map(({ id, title, durationMs }) => ({ id, title, durationMs: durationMs ?? 0, used: used.has(id) }));
}

export type ErasedMark = Readonly<{
  id: string;
  kind: MarkKind;
  title: string;
  recordingId: RecordingId;
  atMs: number;
}>;

/** What was erased from a lesson and can be put back, the last one first. */
export function listErased(scope: InShop, lessonId: LessonId): ErasedMark[] {
  return scope.db
    .select()
    .from(marks)
    .where(and(eq(marks.shopId, scope.shopId), eq(marks.lessonId, lessonId), isNotNull(marks.erasedAt)))
    .orderBy(desc(marks.erasedAt))
    .all()
    .map((mark) => ({
      id: mark.id,
      kind: mark.kind,
      title: markTitle(mark),
      recordingId: mark.recordingId,
      atMs: mark.atMs,
    }));
}

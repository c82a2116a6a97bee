import { and, asc, eq, isNotNull, isNull, sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, RecordingId, ShopId } from "#drizzle/schema/ids";
import { lessons, recordings, revisions } from "#drizzle/schema/index";
import type { System } from "./draft";
import { lessonDuration } from "./lesson-time";
import type { SnapshotClip, SnapshotVehicle } from "./snapshot";

/** A published lesson as the library lists it. */
export type LibraryLesson = Readonly<{
  lessonId: LessonId;
  title: string;
  summary: string;
  system: System;
  position: string;
  vehicles: readonly SnapshotVehicle[];
  durationMs: number;
  n: number;
  publishedAt: number;
  /** The recording whose still stands for the lesson; null when it has none. */
  posterOf: RecordingId | null;
}>;

/** Every published lesson of the shop by title, from the head of its newest revision; marks are not read. */
export function listLibrary(scope: Readonly<{ db: Database; shopId: ShopId }>): LibraryLesson[] {
  const head = sql<string>`json_remove(${revisions.snapshot}, '$.marks', '$.chapters', '$.captionTracks')`;
  const withPoster = new Set(
    scope.db
      .select({ id: recordings.id })
      .from(recordings)
      .where(and(eq(recordings.shopId, scope.shopId), isNotNull(recordings.posterKey)))
      .all()
      .map(({ id }) => id),
  );
  return scope.db
    .select({ lessonId: lessons.id, n: revisions.n, publishedAt: revisions.publishedAt, head })
    .from(lessons)
    .innerJoin(revisions, and(eq(revisions.lessonId, lessons.id), eq(revisions.n, lessons.newestRevision)))
    .where(
      and(eq(lessons.shopId, scope.shopId), isNotNull(lessons.newestRevision), isNull(lessons.withdrawnAt)),
    )
    .orderBy(asc(lessons.title))
    .all()
    .map(({ lessonId, n, publishedAt, head }) => {
      const lesson = JSON.parse(head) as {
        title: string;
        summary: string;
        system: System;
        position: string;
        vehicles: SnapshotVehicle[];
        clips: SnapshotClip[];
      };
      const first = lesson.clips[0]?.recordingId ?? null;
      return {
        lessonId,
        title: lesson.title,
        summary: lesson.summary,
        system: lesson.system,
        position: lesson.position,
        vehicles: lesson.vehicles,
        durationMs: lessonDuration(lesson.clips),
        n,
        publishedAt,
        posterOf: first !== null && withPoster.has(first) ? first : null,
      };
    });
}

import { and, eq, inArray, isNull } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import type { LessonId } from "#drizzle/schema/ids";
import { chapters, clips, lessons, recordings } from "#drizzle/schema/index";
import { missing, refused, type DraftRefusal } from "./draft-refusal";
import type { NewLesson } from "./lesson-form";
import { allOrNothing } from "./save-mark.server";
import { setLessonVehicles } from "./vehicles.server";

/**
 * Makes a lesson out of ready recordings: one clip each over the whole file, in the order given, and one chapter over
 * each. The id comes from the form, so that the same form posted twice is one lesson.
 */
export function createLesson(
  scope: Scope,
  lesson: NewLesson,
  now: number,
): Readonly<{ ok: true; lessonId: LessonId }> | DraftRefusal {
  return allOrNothing(scope, (scope) => {
    const { lessonId } = lesson;
    const stored = scope.db
      .select({ shopId: lessons.shopId })
      .from(lessons)
      .where(eq(lessons.id, lessonId))
      .get();
    if (stored) return stored.shopId === scope.shopId ? { ok: true, lessonId } : missing("lesson");
    const ids = [...new Set(lesson.recordings)];
    const found = new Map(
      scope.db
        .select()
        .from(recordings)
        .where(
          and(eq(recordings.shopId, scope.shopId), inArray(recordings.id, ids), isNull(recordings.deletedAt)),
        )
        .all()
        .map((recording) => [recording.id, recording]),
    );
    scope.db
      .insert(lessons)
      .values({
        id: lessonId,
        shopId: scope.shopId,
        title: lesson.title,
        summary: lesson.summary,
        system: lesson.system,
        position: lesson.position,
        createdBy: scope.userId,
        createdAt: now,
        changedAt: now,
      })
      .run();
    for (const [n, id] of ids.entries()) {
      const recording = found.get(id);
      if (!recording) return missing("recording");
      if (recording.state !== "ready" || !recording.durationMs)
        return refused({
          recordings: `“${recording.title}” is not ready yet. ${recording.stateReason || "Wait until it has been looked through, then try again."}`,
        });
      const span = { shopId: scope.shopId, lessonId, recordingId: id };
      scope.db
        .insert(clips)
        .values({ ...span, n, inMs: 0, outMs: recording.durationMs })
        .run();
      scope.db
        .insert(chapters)
        .values({
          ...span,
          startMs: 0,
          endMs: recording.durationMs,
          title: n === 0 ? lesson.chapterTitle : recording.title,
        })
        .run();
    }
    const vehicles = setLessonVehicles(scope, lessonId, lesson.vehicles, lesson.newVehicle, now);
    if (!vehicles.ok) return vehicles;
    writeAudit(scope, { action: "began", noun: "lesson", nounId: lessonId, detail: lesson.title }, now);
    return { ok: true, lessonId };
  });
}

import { and, eq, sql } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { LessonId } from "#drizzle/schema/ids";
import { lessons } from "#drizzle/schema/index";
import type { DraftLesson } from "./draft";
import { missing, stale, type DraftRefusal } from "./draft-refusal";

export type Locked = Readonly<{ ok: true; lesson: Pick<DraftLesson, "id" | "system" | "version"> }>;

/**
 * Finds the lesson that a form changes and refuses the form when the draft has moved on since it was opened.
 * To be called inside a transaction, before anything is written.
 */
export function lockDraft(scope: Scope, lessonId: LessonId, version: number): Locked | DraftRefusal {
  const lesson = scope.db
    .select({ id: lessons.id, system: lessons.system, version: lessons.version })
    .from(lessons)
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
    .get();
  if (!lesson) return missing("lesson");
  return lesson.version === version ? { ok: true, lesson } : stale();
}

/** Counts one change of the draft; in the transaction that makes it. */
export function countChange(scope: Scope, lessonId: LessonId, now: number): void {
  scope.db
    .update(lessons)
    .set({ version: sql`${lessons.version} + 1`, changedAt: now })
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
    .run();
}

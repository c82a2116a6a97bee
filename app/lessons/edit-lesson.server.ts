import { and, eq, inArray } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { LessonId } from "#drizzle/schema/ids";
import { lessons, marks } from "#drizzle/schema/index";
import type { DraftRefusal } from "./draft-refusal";
import type { LessonDetails } from "./lesson-form";
import { countChange, lockDraft } from "./lock-draft.server";
import type { MarkKind } from "./mark";
import { safetyReason } from "./safety-critical";
import { allOrNothing } from "./save-mark.server";
import { setLessonVehicles } from "./vehicles.server";

const KINDS_WITH_FIGURES: readonly MarkKind[] = ["torque", "measure"];

/**
 * Changes title, system, position, summary and vehicles. A system that makes values safety-critical makes those that
 * are there so as well; no change of system takes it back.
 */
export function editLesson(
  scope: Scope,
  lessonId: LessonId,
  version: number,
  details: LessonDetails,
  now: number,
): Readonly<{ ok: true }> | DraftRefusal {
  return allOrNothing(scope, (scope) => {
    const locked = lockDraft(scope, lessonId, version);
    if (!locked.ok) return locked;
    const { title, system, position, summary } = details;
    scope.db
      .update(lessons)
      .set({ title, system, position, summary })
      .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
      .run();
    const vehicles = setLessonVehicles(scope, lessonId, details.vehicles, details.newVehicle, now);
    if (!vehicles.ok) return vehicles;
    const critical = KINDS_WITH_FIGURES.filter((kind) => safetyReason(system, kind) !== null);
    if (critical.length > 0)
      scope.db
        .update(marks)
        .set({ safetyCritical: true })
        .where(
          and(
            eq(marks.shopId, scope.shopId),
            eq(marks.lessonId, lessonId),
            inArray(marks.kind, [...critical]),
          ),
        )
        .run();
    countChange(scope, lessonId, now);
    return { ok: true };
  });
}

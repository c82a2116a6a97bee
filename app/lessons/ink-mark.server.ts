import { and, eq } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { LessonId, MarkId } from "#drizzle/schema/ids";
import { marks } from "#drizzle/schema/index";
import { missing, refused, type DraftRefusal } from "./draft-refusal";
import { inkProblems } from "./ink-problems";
import { loadMarks } from "./load-marks.server";
import { countChange, lockDraft } from "./lock-draft.server";
import { safetyReason } from "./safety-critical";
import { allOrNothing, type SavedMark } from "./save-mark.server";

type Row = typeof marks.$inferSelect;

function change(
  scope: Scope,
  lessonId: LessonId,
  markId: MarkId,
  version: number,
  now: number,
  work: (
    scope: Scope,
    row: Row,
    system: Parameters<typeof safetyReason>[0],
  ) => Partial<typeof marks.$inferInsert> | DraftRefusal | "done",
): SavedMark | DraftRefusal {
  return allOrNothing(scope, (scope) => {
    const row = scope.db
      .select()
      .from(marks)
      .where(and(eq(marks.shopId, scope.shopId), eq(marks.lessonId, lessonId), eq(marks.id, markId)))
      .get();
    if (!row) return missing("value");
    const locked = lockDraft(scope, lessonId, version);
    if (!locked.ok && locked.reason !== "stale") return locked;
    const changed = work(scope, row, locked.ok ? locked.lesson.system : "workshop");
    // Asked for twice: what was asked for is already so.
    if (changed === "done") return { ok: true, markId };
    if (!locked.ok) return locked;
    if ("reason" in changed && "ok" in changed) return changed as DraftRefusal;
    scope.db
      .update(marks)
      .set({ ...(changed as Partial<typeof marks.$inferInsert>), version: row.version + 1, changedAt: now })
      .where(and(eq(marks.shopId, scope.shopId), eq(marks.id, markId)))
      .run();
    countChange(scope, lessonId, now);
    return { ok: true, markId };
  });
}

/** A person confirms a pencilled mark as it stands; what it lacks is said in one sentence. */
export function inkMark(scope: Scope, lessonId: LessonId, markId: MarkId, version: number, now: number) {
  return change(scope, lessonId, markId, version, now, (scope, row, system) => {
    if (row.erasedAt !== null) return missing("value");
    if (row.state !== "pencilled") return "done";
    const mark = loadMarks(scope, lessonId).find((mark) => mark.id === markId);
    if (!mark) return missing("value");
    const problems = inkProblems(mark);
    if (problems.length > 0)
      return refused({
        "": `This mark cannot be inked as it is. ${problems.join(" ")} Open it and complete it.`,
      });
    return {
      state: "inked",
      inkedBy: scope.userId,
      inkedAt: now,
      safetyCritical: row.safetyCritical || safetyReason(system, row.kind) !== null,
    };
  });
}

/** Takes a mark out of the lesson; it can be put back. */
export function eraseMark(scope: Scope, lessonId: LessonId, markId: MarkId, version: number, now: number) {
  return change(scope, lessonId, markId, version, now, (_scope, row) =>
    row.erasedAt === null ? { erasedAt: now } : "done",
  );
}

/** Puts an erased mark back as it was. */
export function putBackMark(scope: Scope, lessonId: LessonId, markId: MarkId, version: number, now: number) {
  return change(scope, lessonId, markId, version, now, (_scope, row) =>
    row.erasedAt === null ? "done" : { erasedAt: null },
  );
}

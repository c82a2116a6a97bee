import { eq } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { fingerprintOf } from "~/lessons/fingerprint";
import { loadMarks } from "~/lessons/load-marks.server";
import { publishLesson } from "~/publishing/publish-lesson.server";
import type { LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import { checks, lessons, type marks, type markValues } from "#drizzle/schema/index";
import { aChapter, aCitation, aLesson, aMark, NOON } from "./factories";

type ValueRow = Partial<typeof markValues.$inferInsert>;
type MarkGiven = {
  mark: Partial<typeof marks.$inferInsert>;
  values?: readonly ValueRow[];
  unchecked?: boolean;
};

export const torque = (text: string, value: number, unit: string, number: number): ValueRow => ({
  role: "value",
  text,
  dimension: "torque",
  unit,
  value,
  number,
});

const LBF_FT = 1.3558179483314;

/** 65 lbf·ft as one row. */
export const SIXTY_FIVE = torque("65 lbf·ft", 65, "lbf·ft", 65 * LBF_FT);

/** Confirms a mark in the name of somebody, as it stands. */
export function confirm(checker: Scope, lessonId: LessonId, markId: MarkId, at = NOON): void {
  const mark = loadMarks(checker, lessonId).find(({ id }) => id === markId);
  if (!mark) throw new Error("no such mark");
  checker.db
    .insert(checks)
    .values({
      shopId: checker.shopId,
      markId,
      fingerprint: fingerprintOf(mark),
      checkerId: checker.userId,
      outcome: "confirmed",
      at,
      on: "2026-11-12",
    })
    .run();
}

/** Publishes the draft as it stands; the gate must let it go. */
export function publish(author: Scope, lessonId: LessonId, now = NOON): number {
  const { version } = author.db.select().from(lessons).where(eq(lessons.id, lessonId)).get() ?? {
    version: 0,
  };
  const result = publishLesson(author, lessonId, { version, note: "" }, now);
  if (!result.ok) throw new Error(JSON.stringify(result));
  return result.n;
}

/** A published lesson with these marks, each with a source and confirmed by the checker unless told otherwise. */
export function aPublishedLesson(
  author: Scope,
  checker: Scope,
  given: readonly MarkGiven[],
  lesson: Partial<typeof lessons.$inferInsert> = {},
): { lessonId: LessonId; recordingId: RecordingId; markIds: MarkId[] } {
  const of = aLesson(author, lesson);
  const chapterId = aChapter(author, of);
  const citationId = aCitation(author);
  const markIds = given.map(({ mark, values, unchecked }) => {
    const markId = aMark(author, { ...of, chapterId }, { citationId, ...mark }, values);
    if (!unchecked) confirm(checker, of.lessonId, markId);
    return markId;
  });
  publish(author, of.lessonId);
  return { ...of, markIds };
}

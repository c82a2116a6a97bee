import { and, asc, eq } from "drizzle-orm";
import { writeAudit } from "~/auth/write-audit.server";
import type { Scope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import type { LessonId, QuestionId } from "#drizzle/schema/ids";
import { lessons, questions, questionVersions, revisions } from "#drizzle/schema/index";
import { prepareAsked, type Asked } from "./asked";
import type { Choice } from "./question";

/** The questions of a lesson's newest revision as instructors see them: with the expected answer. */
export function listQuestions(scope: Scope, lessonId: LessonId) {
  const lesson = scope.db
    .select({ title: lessons.title, newestRevision: lessons.newestRevision })
    .from(lessons)
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
    .get();
  if (!lesson) return undefined;
  const rows = scope.db
    .select({ question: questions, version: questionVersions })
    .from(questions)
    .innerJoin(questionVersions, eq(questionVersions.questionId, questions.id))
    .innerJoin(
      revisions,
      and(eq(revisions.id, questionVersions.revisionId), eq(revisions.n, lesson.newestRevision ?? 0)),
    )
    .where(and(eq(questions.shopId, scope.shopId), eq(questions.lessonId, lessonId)))
    .orderBy(asc(questionVersions.n))
    .all();
  return {
    title: lesson.title,
    revision: lesson.newestRevision,
    questions: rows.map(({ question, version }) => {
      const prepared = prepareAsked(version.asked as Asked);
      return {
        id: question.id,
        kind: question.kind,
        prompt: version.prompt,
        expected: prepared.ok ? prepared.asked.shown : "",
        choices: version.choices as Choice[] | null,
        safetyCritical: version.safetyCritical,
        retired: question.retiredAt !== null,
      };
    }),
  };
}

/** Takes a question out of the quiz, or back into it. False when the lesson has no such question. */
export function retireQuestion(
  scope: Scope,
  lessonId: LessonId,
  questionId: QuestionId,
  retire: boolean,
  now: number,
): boolean {
  return inTransaction(scope, (scope) => {
    const { changes } = scope.db
      .update(questions)
      .set({ retiredAt: retire ? now : null })
      .where(
        and(
          eq(questions.shopId, scope.shopId),
          eq(questions.lessonId, lessonId),
          eq(questions.id, questionId),
        ),
      )
      .run();
    if (changes === 0) return false;
    writeAudit(
      scope,
      { action: retire ? "retired" : "brought back", noun: "question", nounId: questionId },
      now,
    );
    return true;
  });
}

import { and, asc, desc, eq, isNotNull, isNull } from "drizzle-orm";
import { can } from "~/auth/permissions";
import type { Scope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import { findLearnerLesson, type LearnerLesson } from "~/lessons/learner-lesson.server";
import { mayAnswer } from "~/lessons/showing";
import type { AttemptId, LessonId, QuestionVersionId, RevisionId } from "#drizzle/schema/ids";
import {
  answers,
  attempts,
  lessons,
  questions,
  questionVersions,
  revisions,
  shops,
  users,
} from "#drizzle/schema/index";
import { answerLine, type TypedAnswer } from "./answer-text";
import type { Asked } from "./asked";
import { asksAgain, countsAsRight, gradeAnswer, type Outcome } from "./grade-answer";
import type { Choice } from "./question";

/** One question as it is asked in an attempt. `choices` carry no reasons: those would give the answer away. */
export type AskedQuestion = Readonly<{
  versionId: QuestionVersionId;
  markId: string;
  kind: "numeric" | "choice";
  prompt: string;
  safetyCritical: boolean;
  recordingId: string;
  atMs: number;
  asked: Asked;
  choices: readonly Choice[] | null;
}>;

/** The questions of a revision that may be asked today: not retired, and of values that a learner may rely on. */
function questionsFor(scope: Scope, lesson: LearnerLesson): AskedQuestion[] {
  const reliable = new Set(
    lesson.marks.filter(({ showing }) => mayAnswer(showing)).map(({ mark }) => mark.id as string),
  );
  return scope.db
    .select({ version: questionVersions, markId: questions.markId, kind: questions.kind })
    .from(questionVersions)
    .innerJoin(questions, eq(questions.id, questionVersions.questionId))
    .where(
      and(
        eq(questionVersions.shopId, scope.shopId),
        eq(questionVersions.revisionId, lesson.revisionId),
        isNull(questions.retiredAt),
      ),
    )
    .orderBy(asc(questionVersions.n))
    .all()
    .filter(({ markId }) => reliable.has(markId))
    .map(({ version, markId, kind }) => ({
      versionId: version.id,
      markId,
      kind,
      prompt: version.prompt,
      safetyCritical: version.safetyCritical,
      recordingId: version.recordingId,
      atMs: version.atMs,
      asked: version.asked as Asked,
      choices: version.choices as Choice[] | null,
    }));
}

function shopRules(scope: Scope) {
  const shop = scope.db
    .select({ passMark: shops.passMark, country: shops.country, timeZone: shops.timeZone })
    .from(shops)
    .where(eq(shops.id, scope.shopId))
    .get();
  if (!shop) throw new Error("a scope needs its shop");
  return shop;
}

/** What the quiz of a lesson is, before it is begun: how many questions, the pass mark, one's own attempts. */
export function quizOf(scope: Scope, lessonId: LessonId) {
  const lesson = findLearnerLesson(scope, lessonId);
  if (!lesson) return undefined;
  const mine = scope.db
    .select()
    .from(attempts)
    .where(
      and(
        eq(attempts.shopId, scope.shopId),
        eq(attempts.userId, scope.userId),
        eq(attempts.lessonId, lessonId),
      ),
    )
    .orderBy(desc(attempts.startedAt))
    .all();
  const rules = shopRules(scope);
  return {
    title: lesson.snapshot.title,
    revision: lesson.n,
    questionCount: questionsFor(scope, lesson).length,
    waiting: lesson.marks.filter(({ showing }) => showing === "withheld").length,
    passMark: rules.passMark,
    timeZone: rules.timeZone,
    open: mine.find((row) => row.submittedAt === null && row.revisionId === lesson.revisionId)?.id ?? null,
    past: mine
      .filter((row) => row.submittedAt !== null)
      .map(({ id, submittedAt, rightCount, askedCount, passed }) => ({
        id,
        submittedAt,
        rightCount,
        askedCount,
        passed,
      })),
  };
}

/** Begins an attempt at the newest revision, or goes on with the open one. */
export function startAttempt(
  scope: Scope,
  lessonId: LessonId,
  now: number,
): { ok: true; attemptId: AttemptId } | { ok: false; sentence: string } | undefined {
  return inTransaction(scope, (scope) => {
    const lesson = findLearnerLesson(scope, lessonId);
    if (!lesson) return undefined;
    if (questionsFor(scope, lesson).length === 0)
      return {
        ok: false as const,
        sentence: "This lesson has no questions yet: its values wait for their check.",
      };
    const open = scope.db
      .select({ id: attempts.id })
      .from(attempts)
      .where(
        and(
          eq(attempts.shopId, scope.shopId),
          eq(attempts.userId, scope.userId),
          eq(attempts.lessonId, lessonId),
          eq(attempts.revisionId, lesson.revisionId),
          isNull(attempts.submittedAt),
        ),
      )
      .get();
    if (open) return { ok: true as const, attemptId: open.id };
    const begun = scope.db
      .insert(attempts)
      .values({
        shopId: scope.shopId,
        lessonId,
        revisionId: lesson.revisionId,
        userId: scope.userId,
        startedAt: now,
        typed: {},
      })
      .returning({ id: attempts.id })
      .get();
    return { ok: true as const, attemptId: begun.id };
  });
}

/** An open attempt of one's own with its questions; undefined when it is not one's own; submitted ones say so. */
export function openAttempt(scope: Scope, attemptId: AttemptId) {
  const row = scope.db
    .select({ attempt: attempts, title: lessons.title })
    .from(attempts)
    .innerJoin(lessons, eq(lessons.id, attempts.lessonId))
    .where(
      and(eq(attempts.shopId, scope.shopId), eq(attempts.id, attemptId), eq(attempts.userId, scope.userId)),
    )
    .get();
  if (!row) return undefined;
  const lesson = findLearnerLesson(scope, row.attempt.lessonId);
  const current = lesson !== undefined && lesson.revisionId === row.attempt.revisionId;
  return {
    id: row.attempt.id,
    lessonId: row.attempt.lessonId,
    revisionId: row.attempt.revisionId,
    title: row.title,
    submitted: row.attempt.submittedAt !== null,
    /** A newer revision is out: this attempt is left and a new one begun. */
    stale: !current,
    typed: row.attempt.typed,
    questions: current ? questionsFor(scope, lesson) : [],
  };
}

/** Keeps a typed answer, so that a closed tab loses nothing. False when the attempt takes no more answers. */
export function saveAnswer(
  scope: Scope,
  attemptId: AttemptId,
  versionId: QuestionVersionId,
  answer: TypedAnswer,
): boolean {
  return inTransaction(scope, (scope) => {
    const attempt = openAttempt(scope, attemptId);
    if (!attempt || attempt.submitted || attempt.stale) return false;
    if (!attempt.questions.some((question) => question.versionId === versionId)) return false;
    scope.db
      .update(attempts)
      .set({ typed: { ...attempt.typed, [versionId]: answer } })
      .where(eq(attempts.id, attempt.id))
      .run();
    return true;
  });
}

type Graded = { outcome: Outcome; right: boolean; factor: number | null; feedback: string };

function gradeChoice(question: AskedQuestion, chosen: string): Graded {
  const choice = question.choices?.find((found) => found.text === chosen);
  const right = question.choices?.find((found) => found.why === null)?.text ?? "";
  if (!choice)
    return { outcome: "unreadable", right: false, factor: null, feedback: "Choose one of the answers." };
  return choice.why === null
    ? { outcome: "right", right: true, factor: null, feedback: `Right: ${right}.` }
    : { outcome: "other", right: false, factor: null, feedback: `${choice.why} It is ${right}.` };
}

/** Grades one answer; `again` when it must be asked again and costs nothing. */
export function gradeQuestion(
  question: AskedQuestion,
  answer: TypedAnswer | undefined,
  country: string,
): Graded & { again: boolean } {
  if (!answer || answer.text.trim() === "")
    return { outcome: "unreadable", right: false, factor: null, feedback: "Not answered yet.", again: true };
  if (question.kind === "choice") {
    const graded = gradeChoice(question, answer.text);
    return { ...graded, again: graded.outcome === "unreadable" };
  }
  const grade = gradeAnswer(question.asked, answerLine(answer), { country });
  return {
    outcome: grade.outcome,
    right: countsAsRight(grade.outcome),
    factor: grade.factor ?? null,
    feedback: grade.text,
    again: asksAgain(grade.outcome),
  };
}

/** The questions of an open attempt with what was typed, and which must be answered again before submitting. */
export function reviewOf(scope: Scope, attemptId: AttemptId) {
  const attempt = openAttempt(scope, attemptId);
  if (!attempt) return undefined;
  const { country } = shopRules(scope);
  return {
    ...attempt,
    questions: attempt.questions.map((question) => {
      const answer = attempt.typed[question.versionId];
      const graded = gradeQuestion(question, answer, country);
      return {
        versionId: question.versionId,
        prompt: question.prompt,
        answer: answer ?? null,
        // Only what is asked again is told before submitting; right and wrong come afterwards.
        again: graded.again ? graded.feedback : null,
      };
    }),
  };
}

export type Submitted = { ok: true } | { ok: false; reason: "again" | "stale" } | undefined;

/** Grades and closes an attempt in one transaction. Submitting twice counts once. */
export function submitAttempt(scope: Scope, attemptId: AttemptId, now: number): Submitted {
  return inTransaction(scope, (scope): Submitted => {
    const attempt = openAttempt(scope, attemptId);
    if (!attempt) return undefined;
    if (attempt.submitted) return { ok: true };
    if (attempt.stale || attempt.questions.length === 0) return { ok: false, reason: "stale" };
    const rules = shopRules(scope);
    const graded = attempt.questions.map((question) => ({
      question,
      answer: attempt.typed[question.versionId],
      ...gradeQuestion(question, attempt.typed[question.versionId], rules.country),
    }));
    if (graded.some(({ again }) => again)) return { ok: false, reason: "again" };
    for (const { question, answer, outcome, right, factor, feedback } of graded)
      scope.db
        .insert(answers)
        .values({
          shopId: scope.shopId,
          attemptId: attempt.id,
          questionVersionId: question.versionId,
          text: answer?.text ?? "",
          unit: answer?.unit ?? "",
          outcome,
          right,
          factor,
          feedback,
          at: now,
        })
        .run();
    const rightCount = graded.filter(({ right }) => right).length;
    const score = rightCount / graded.length;
    const safetyRight = graded.every(({ question, right }) => right || !question.safetyCritical);
    scope.db
      .update(attempts)
      .set({
        submittedAt: now,
        rightCount,
        askedCount: graded.length,
        score,
        passMark: rules.passMark,
        // A tenth of a hundred thousandth: 4 of 5 is 0.8, whatever the binary says.
        passed: score + 1e-9 >= rules.passMark && safetyRight,
      })
      .where(eq(attempts.id, attempt.id))
      .run();
    return { ok: true };
  });
}

/** A submitted attempt with every answer: one's own, or anybody's of the shop for who may see all. */
export function resultOf(scope: Scope, attemptId: AttemptId) {
  const row = scope.db
    .select({ attempt: attempts, name: users.name, title: lessons.title, revision: revisions })
    .from(attempts)
    .innerJoin(users, eq(users.id, attempts.userId))
    .innerJoin(lessons, eq(lessons.id, attempts.lessonId))
    .innerJoin(revisions, eq(revisions.id, attempts.revisionId))
    .where(
      and(
        eq(attempts.shopId, scope.shopId),
        eq(attempts.id, attemptId),
        isNotNull(attempts.submittedAt),
        can(scope.role, "training:see-all") ? undefined : eq(attempts.userId, scope.userId),
      ),
    )
    .get();
  if (!row) return undefined;
  const given = scope.db
    .select({ answer: answers, version: questionVersions, kind: questions.kind })
    .from(answers)
    .innerJoin(questionVersions, eq(questionVersions.id, answers.questionVersionId))
    .innerJoin(questions, eq(questions.id, questionVersions.questionId))
    .where(and(eq(answers.shopId, scope.shopId), eq(answers.attemptId, attemptId)))
    .orderBy(asc(questionVersions.n))
    .all();
  const asked = scope.db
    .select({ id: questionVersions.id })
    .from(questionVersions)
    .innerJoin(questions, eq(questions.id, questionVersions.questionId))
    .where(
      and(
        eq(questionVersions.shopId, scope.shopId),
        eq(questionVersions.revisionId, row.attempt.revisionId),
        isNull(questions.retiredAt),
      ),
    )
    .all();
  const { attempt } = row;
  return {
    id: attempt.id,
    own: attempt.userId === scope.userId,
    name: row.name,
    lessonId: attempt.lessonId,
    revisionId: attempt.revisionId as RevisionId,
    snapshot: row.revision.snapshot,
    title: row.title,
    submittedAt: attempt.submittedAt ?? 0,
    rightCount: attempt.rightCount ?? 0,
    askedCount: attempt.askedCount ?? 0,
    passMark: attempt.passMark ?? 1,
    passed: attempt.passed === true,
    leftOut: Math.max(0, asked.length - given.length),
    answers: given.map(({ answer, version, kind }) => ({
      versionId: version.id,
      kind,
      prompt: version.prompt,
      safetyCritical: version.safetyCritical,
      recordingId: version.recordingId,
      atMs: version.atMs,
      asked: version.asked as Asked,
      text: answer.text,
      unit: answer.unit,
      outcome: answer.outcome,
      right: answer.right,
      feedback: answer.feedback,
    })),
  };
}

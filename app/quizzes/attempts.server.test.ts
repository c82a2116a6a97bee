import { eq } from "drizzle-orm";
import { expect, test } from "vitest";
import { aDatabase, aScope, aShop, NOON, setValues } from "../../tests/support/factories";
import { aPublishedLesson, confirm, publish, SIXTY_FIVE, torque } from "../../tests/support/published-lesson";
import { answers, attempts, doubts, lessons } from "#drizzle/schema/index";
import type { AttemptId } from "#drizzle/schema/ids";
import {
  openAttempt,
  quizOf,
  resultOf,
  reviewOf,
  saveAnswer,
  startAttempt,
  submitAttempt,
} from "./attempts.server";
import { listQuestions, retireQuestion } from "./list-questions.server";

function aQuiz() {
  const db = aDatabase();
  const shopId = aShop(db, { passMark: 0.5 });
  const author = aScope(db, shopId, "instructor");
  const checker = aScope(db, shopId, "instructor");
  const trainee = aScope(db, shopId, "trainee");
  const lesson = aPublishedLesson(author, checker, [
    { mark: { component: "lower link nut", componentKey: "lower-link-nut" }, values: [SIXTY_FIVE] },
    {
      mark: { component: "upper link nut", componentKey: "upper-link-nut", atMs: 90_000 },
      values: [torque("52 lbf·ft", 52, "lbf·ft", 52 * 1.3558179483314)],
    },
  ]);
  return { db, shopId, author, checker, trainee, ...lesson };
}

function begin(quiz: ReturnType<typeof aQuiz>): AttemptId {
  const started = startAttempt(quiz.trainee, quiz.lessonId, NOON);
  if (!started?.ok) throw new Error("the quiz does not start");
  return started.attemptId;
}

function type(quiz: ReturnType<typeof aQuiz>, attemptId: AttemptId, typed: readonly string[]): void {
  const attempt = openAttempt(quiz.trainee, attemptId);
  attempt?.questions.forEach((question, n) => {
    saveAnswer(quiz.trainee, attemptId, question.versionId, { text: typed[n] ?? "", unit: "" });
  });
}

test("65 lbf·ft answered in newton metres is right, in inch-pounds a wrong unit, with digits turned wrong", () => {
  for (const [typed, outcome, right] of [
    ["88 N·m", "right-other-unit", true],
    ["65 lbf·in", "wrong-unit", false],
    ["56 lbf·ft", "other", false],
    ["65 ft-lb", "right", true],
  ] as const) {
    const quiz = aQuiz();
    const attemptId = begin(quiz);
    type(quiz, attemptId, [typed, "52 lbf·ft"]);
    expect(submitAttempt(quiz.trainee, attemptId, NOON)).toEqual({ ok: true });
    const [first] = resultOf(quiz.trainee, attemptId)?.answers ?? [];
    expect({ typed, outcome: first?.outcome, right: first?.right }).toEqual({ typed, outcome, right });
  }
});

test("twelve times too loose is said in words and as a factor", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["65 lbf·in", "52 lbf·ft"]);
  submitAttempt(quiz.trainee, attemptId, NOON);
  const stored = quiz.db.select().from(answers).where(eq(answers.outcome, "wrong-unit")).get();
  expect(stored?.factor).toBeCloseTo(12, 9);
  expect(stored?.feedback).toContain("twelve times too loose");
});

test("a number without a unit is asked again and costs no try", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["65", "52 lbf·ft"]);
  expect(submitAttempt(quiz.trainee, attemptId, NOON)).toEqual({ ok: false, reason: "again" });
  expect(quiz.db.select().from(answers).all()).toEqual([]);
  expect(reviewOf(quiz.trainee, attemptId)?.questions[0]?.again).toContain("no unit");
  expect(reviewOf(quiz.trainee, attemptId)?.questions[1]?.again).toBeNull();
});

test("submitting twice counts once, and nothing changes afterwards", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["65 lbf·ft", "52 lbf·ft"]);
  expect(submitAttempt(quiz.trainee, attemptId, NOON)).toEqual({ ok: true });
  expect(submitAttempt(quiz.trainee, attemptId, NOON + 5)).toEqual({ ok: true });
  expect(quiz.db.select().from(answers).all()).toHaveLength(2);
  expect(resultOf(quiz.trainee, attemptId)).toMatchObject({ passed: true, rightCount: 2, submittedAt: NOON });
  expect(() => quiz.db.update(attempts).set({ passed: false }).run()).toThrow();
  expect(() => quiz.db.delete(answers).run()).toThrow();
});

test("what was typed waits when the tab is closed, and the same attempt goes on", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["65 lbf·ft"]);
  expect(begin(quiz)).toBe(attemptId);
  const attempt = openAttempt(quiz.trainee, attemptId);
  expect(attempt?.typed[attempt.questions[0]?.versionId ?? ""]).toEqual({ text: "65 lbf·ft", unit: "" });
});

test("an attempt of a former revision is left, a new one is begun", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["65 lbf·ft", "52 lbf·ft"]);
  const [lower] = quiz.markIds;
  if (!lower) throw new Error("no mark");
  setValues(quiz.author, lower, [torque("70 lbf·ft", 70, "lbf·ft", 70 * 1.3558179483314)]);
  confirm(quiz.checker, quiz.lessonId, lower, NOON + 1);
  quiz.db.update(lessons).set({ version: 9 }).where(eq(lessons.id, quiz.lessonId)).run();
  expect(publish(quiz.author, quiz.lessonId, NOON + 2)).toBe(2);
  expect(submitAttempt(quiz.trainee, attemptId, NOON + 3)).toEqual({ ok: false, reason: "stale" });
  const next = begin(quiz);
  expect(next).not.toBe(attemptId);
  type(quiz, next, ["65 lbf·ft", "52 lbf·ft"]);
  submitAttempt(quiz.trainee, next, NOON + 4);
  expect(resultOf(quiz.trainee, next)?.answers[0]?.outcome).toBe("superseded");
});

test("the value of the other nut is named as such", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["52 lbf·ft", "65 lbf·ft"]);
  submitAttempt(quiz.trainee, attemptId, NOON);
  expect(resultOf(quiz.trainee, attemptId)?.answers.map(({ outcome }) => outcome)).toEqual([
    "other-fastener",
    "other-fastener",
  ]);
});

test("a safety-critical value must be right, whatever the score", () => {
  const db = aDatabase();
  const shopId = aShop(db, { passMark: 0.5 });
  const [author, checker, trainee] = [
    aScope(db, shopId, "instructor"),
    aScope(db, shopId, "instructor"),
    aScope(db, shopId, "trainee"),
  ];
  const { lessonId } = aPublishedLesson(author, checker, [
    {
      mark: { component: "pulley bolt", componentKey: "pulley-bolt", safetyCritical: true },
      values: [SIXTY_FIVE],
    },
    {
      mark: { component: "cover screw", componentKey: "cover-screw", atMs: 90_000 },
      values: [torque("9 Nm", 9, "N·m", 9)],
    },
  ]);
  const started = startAttempt(trainee, lessonId, NOON);
  if (!started?.ok) throw new Error("the quiz does not start");
  const questions = openAttempt(trainee, started.attemptId)?.questions ?? [];
  saveAnswer(trainee, started.attemptId, questions[0]?.versionId as never, { text: "40 lbf·ft", unit: "" });
  saveAnswer(trainee, started.attemptId, questions[1]?.versionId as never, { text: "9", unit: "N·m" });
  submitAttempt(trainee, started.attemptId, NOON);
  expect(resultOf(trainee, started.attemptId)).toMatchObject({ rightCount: 1, askedCount: 2, passed: false });
});

test("a value that waits for its check or is in doubt is not asked", () => {
  const quiz = aQuiz();
  const [lower] = quiz.markIds;
  quiz.db
    .insert(doubts)
    .values({
      shopId: quiz.shopId,
      lessonId: quiz.lessonId,
      markId: lower as never,
      raisedBy: quiz.author.userId,
      stops: true,
      reason: "page 33 says 60",
      at: NOON,
    })
    .run();
  expect(quizOf(quiz.trainee, quiz.lessonId)?.questionCount).toBe(1);
  const db = aDatabase();
  const shopId = aShop(db);
  const author = aScope(db, shopId, "instructor");
  const { lessonId } = aPublishedLesson(author, author, [
    {
      mark: { component: "pulley bolt", componentKey: "pulley-bolt", safetyCritical: true },
      unchecked: true,
    },
  ]);
  expect(startAttempt(author, lessonId, NOON)).toMatchObject({ ok: false });
});

test("another person's attempt and another shop's quiz are not there", () => {
  const quiz = aQuiz();
  const attemptId = begin(quiz);
  type(quiz, attemptId, ["65 lbf·ft", "52 lbf·ft"]);
  const mate = aScope(quiz.db, quiz.shopId, "trainee");
  expect(openAttempt(mate, attemptId)).toBeUndefined();
  expect(submitAttempt(mate, attemptId, NOON)).toBeUndefined();
  submitAttempt(quiz.trainee, attemptId, NOON);
  expect(resultOf(mate, attemptId)).toBeUndefined();
  expect(resultOf(quiz.author, attemptId)?.name).toBeTruthy();
  const stranger = aScope(quiz.db, aShop(quiz.db), "owner");
  expect(resultOf(stranger, attemptId)).toBeUndefined();
  expect(quizOf(stranger, quiz.lessonId)).toBeUndefined();
  expect(startAttempt(stranger, quiz.lessonId, NOON)).toBeUndefined();
  expect(listQuestions(stranger, quiz.lessonId)).toBeUndefined();
});

test("a question that an instructor stops is asked no more, and comes back", () => {
  const quiz = aQuiz();
  const [question] = listQuestions(quiz.author, quiz.lessonId)?.questions ?? [];
  if (!question) throw new Error("no question");
  expect(question.expected).toBe("65\u2009lbf·ft");
  expect(retireQuestion(quiz.author, quiz.lessonId, question.id, true, NOON)).toBe(true);
  expect(quizOf(quiz.trainee, quiz.lessonId)?.questionCount).toBe(1);
  retireQuestion(quiz.author, quiz.lessonId, question.id, false, NOON);
  expect(quizOf(quiz.trainee, quiz.lessonId)?.questionCount).toBe(2);
  const stranger = aScope(quiz.db, aShop(quiz.db), "owner");
  expect(retireQuestion(stranger, quiz.lessonId, question.id, true, NOON)).toBe(false);
});

test("twenty people submit, and each counts once", () => {
  const quiz = aQuiz();
  const people = Array.from({ length: 20 }, () => aScope(quiz.db, quiz.shopId, "trainee"));
  for (const trainee of people) {
    const mine = { ...quiz, trainee };
    const attemptId = begin(mine);
    type(mine, attemptId, ["65 lbf·ft", "52 lbf·ft"]);
    submitAttempt(trainee, attemptId, NOON);
  }
  expect(
    quiz.db
      .select()
      .from(attempts)
      .all()
      .filter(({ passed }) => passed),
  ).toHaveLength(20);
  expect(quiz.db.select().from(answers).all()).toHaveLength(40);
});

// What the people of the demo shop have watched, answered and shown, through the application's own rooms.
import type { Scope } from "~/auth/scope.server";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { piecesOf } from "~/lessons/lesson-time";
import { raiseDoubt } from "~/publishing/doubts.server";
import { openAttempt, saveAnswer, startAttempt, submitAttempt } from "~/quizzes/attempts.server";
import { prepareAsked } from "~/quizzes/asked";
import { assignLesson } from "~/training/assign-lesson.server";
import { daysLater, type LocalDate } from "~/training/local-date";
import { giveSignOff, requestSignOff } from "~/training/sign-off.server";
import type { LessonId } from "#drizzle/schema/ids";
import { watchedStretches } from "#drizzle/schema/index";
import type { PersonKey } from "./shop";

const DAY = 86_400_000;
const ORIGIN = "http://localhost:3000";

type Demo = { scopeOf: (key: PersonKey) => Scope; lessonId: (job: string) => LessonId; today: LocalDate };

/** A person plays the first part of a lesson (1 = all of it). */
function watch(scope: Scope, lessonId: LessonId, part: number, at: number): void {
  const lesson = findLearnerLesson(scope, lessonId);
  if (!lesson) return;
  for (const piece of piecesOf(lesson.snapshot.clips))
    scope.db
      .insert(watchedStretches)
      .values({
        shopId: scope.shopId,
        userId: scope.userId,
        lessonId,
        revisionId: lesson.revisionId,
        recordingId: piece.recordingId as typeof watchedStretches.$inferInsert.recordingId,
        fromMs: piece.fromMs,
        toMs: Math.round(piece.fromMs + (piece.toMs - piece.fromMs) * part),
        at,
      })
      .run();
}

/** The expected answer as a careful person types it. */
function rightAnswer(question: NonNullable<ReturnType<typeof openAttempt>>["questions"][number]): string {
  const right = question.choices?.find(({ why }) => why === null);
  if (right) return right.text;
  const prepared = prepareAsked(question.asked);
  return prepared.ok ? prepared.asked.shown : "";
}

/** A person takes the quiz; `wrong` replaces the typed answers of the first questions. */
function answer(scope: Scope, lessonId: LessonId, wrong: readonly string[], at: number): void {
  const started = startAttempt(scope, lessonId, at);
  if (!started?.ok) return;
  const attempt = openAttempt(scope, started.attemptId);
  let slips = 0;
  for (const question of attempt?.questions ?? []) {
    const slip = question.choices ? undefined : wrong[slips];
    if (slip !== undefined) slips += 1;
    saveAnswer(scope, started.attemptId, question.versionId, {
      text: slip ?? rightAnswer(question),
      unit: "",
    });
  }
  submitAttempt(scope, started.attemptId, at + 600_000);
}

/** Fills the shop's records, so that no page of the demo is empty. */
export function loadTraining({ scopeOf, lessonId, today }: Demo, now: number): void {
  const hannah = scopeOf("Hannah");
  const assign = (job: string, people: PersonKey[], dueInDays: number, givenDaysAgo: number) =>
    assignLesson(
      hannah,
      {
        lessonId: lessonId(job),
        userIds: people.map((key) => scopeOf(key).userId),
        dueOn: daysLater(today, dueInDays),
        note: "",
      },
      ORIGIN,
      now - givenDaysAgo * DAY,
    );
  const shown = (key: PersonKey, by: PersonKey, job: string, daysAgo: number, valuesSet: string) =>
    giveSignOff(
      scopeOf(by),
      {
        lessonId: lessonId(job),
        userId: scopeOf(key).userId,
        level: "on-own",
        presence: "all-the-time",
        shownOn: daysLater(today, -daysAgo),
        valuesSet,
        note: "",
      },
      ORIGIN,
      now - daysAgo * DAY + 3_600_000,
    );

  assign("click-wrench", ["Tom", "Ines", "Kofi", "Ana"], -3, 17);
  assign("sway-bar-links", ["Tom", "Ines", "Ana"], 9, 12);
  assign("oil-drain-filter", ["Kofi", "Tom"], 5, 8);
  assign("wheel-nuts", ["Tom", "Kofi"], 2, 6);
  assign("foss-sway-bar-links", ["Tom"], 12, 2);

  watch(scopeOf("Tom"), lessonId("click-wrench"), 1, now - 10 * DAY);
  watch(scopeOf("Tom"), lessonId("sway-bar-links"), 1, now - 6 * DAY);
  answer(scopeOf("Tom"), lessonId("sway-bar-links"), ["12 mm"], now - 6 * DAY);
  watch(scopeOf("Tom"), lessonId("oil-drain-filter"), 0.4, now - 2 * DAY);

  for (const job of ["click-wrench", "sway-bar-links", "serpentine-belt", "oil-drain-filter"]) {
    watch(scopeOf("Ines"), lessonId(job), 1, now - 9 * DAY);
    answer(scopeOf("Ines"), lessonId(job), [], now - 9 * DAY);
  }
  shown(
    "Ines",
    "Marta",
    "oil-drain-filter",
    8,
    "Drain plug: 18 lbf·ft, wrench 3, one click. Filter: three quarters by hand, dot seen.\nSkid plate bolts: 80 lbf·in, wrench 1.",
  );
  shown(
    "Ines",
    "Dario",
    "oil-drain-filter",
    4,
    "Drain plug: 18 lbf·ft, wrench 3. Filter: three quarters.\nSkid plate bolts: 80 lbf·in, wrench 1.",
  );
  shown(
    "Ines",
    "Marta",
    "sway-bar-links",
    3,
    "Upper nuts 43 lbf·ft, lower nuts 47 lbf·ft, wrench 4, paint marks on all four. Wheel nuts 92 lbf·ft in two stages.",
  );

  watch(scopeOf("Kofi"), lessonId("click-wrench"), 0.55, now - 4 * DAY);
  watch(scopeOf("Kofi"), lessonId("wheel-nuts"), 1, now - 3 * DAY);

  for (const job of ["click-wrench", "wheel-nuts", "sway-bar-links", "thermostat"]) {
    watch(scopeOf("Ana"), lessonId(job), 1, now - 15 * DAY);
    answer(scopeOf("Ana"), lessonId(job), [], now - 15 * DAY);
  }
  shown(
    "Ana",
    "Marta",
    "sway-bar-links",
    13,
    "Upper nuts 43 lbf·ft, lower nuts 47 lbf·ft, wrench 4. Wheel nuts 45 then 92 lbf·ft.",
  );
  shown(
    "Ana",
    "Dario",
    "sway-bar-links",
    7,
    "Upper nuts 43 lbf·ft, lower nuts 47 lbf·ft, wrench 2. Wheel nuts 45 then 92 lbf·ft.",
  );
  requestSignOff(
    scopeOf("Ana"),
    {
      lessonId: lessonId("thermostat"),
      doneOn: daysLater(today, -1),
      note: "The Wren in bay 2. Marta watched me bleed it.",
    },
    ORIGIN,
    now - DAY,
  );
  // A trainee's doubt: it warns beside the value and waits for an instructor.
  const gap = findLearnerLesson(scopeOf("Kofi"), lessonId("thermostat"))?.marks.find(
    ({ mark }) => mark.component === "Expansion tank gap below the neck",
  );
  if (gap)
    raiseDoubt(
      scopeOf("Kofi"),
      lessonId("thermostat"),
      gap.mark.id,
      "The sticker on the tank of the Wren in bay 3 says 25 mm.",
      ORIGIN,
      now - DAY,
    );
}

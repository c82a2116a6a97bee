import { and, asc, desc, eq, gte, inArray, isNotNull, isNull } from "drizzle-orm";
import { can } from "~/auth/permissions";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction } from "~/db.server";
import type { DoubtId, LessonId, MarkId, UserId } from "#drizzle/schema/ids";
import {
  answers,
  attempts,
  doubts,
  lessons,
  marks,
  questions,
  questionVersions,
  users,
  watchedStretches,
} from "#drizzle/schema/index";
import { findLearnerLesson, type LearnerLesson, type LearnerMark } from "~/lessons/learner-lesson.server";
import { nearestLessonTime } from "~/lessons/lesson-time";
import { markTitle } from "~/lessons/mark-words";
import { doubtMessage } from "~/mail/doubt-message";
import { queueMail } from "~/mail/queue-mail.server";
import { teamMember, whoMay } from "./who-may.server";

/** For how long whoever used a value is told. */
const USED_WITHIN_MS = 30 * 24 * 3_600_000;

/** A published value as a learner sees it; undefined when it is not in the newest revision of the shop's lesson. */
export function findValue(
  scope: Scope,
  lessonId: LessonId,
  markId: MarkId,
): Readonly<{ lesson: LearnerLesson; value: LearnerMark }> | undefined {
  const lesson = findLearnerLesson(scope, lessonId);
  const value = lesson?.marks.find(({ mark }) => mark.id === markId);
  return lesson && value ? { lesson, value } : undefined;
}

/** What the page behind "This looks wrong" shows; undefined: the value is not in the newest revision. */
export function lookAtValue(scope: Scope, lessonId: LessonId, markId: MarkId) {
  const found = findValue(scope, lessonId, markId);
  if (!found) return undefined;
  const { snapshot } = found.lesson;
  return {
    title: snapshot.title,
    value: found.value,
    lessonMs: nearestLessonTime(snapshot.clips, found.value.mark.recordingId, found.value.mark.atMs),
    /** Already said by this person and still open. */
    said: openDoubtOf(scope, markId),
    /** Who is told. */
    told: whoMay(scope, "value:stop")
      .filter((person) => person.id !== scope.userId)
      .map((person) => person.name),
  };
}

/** The open doubt of this person on a value, in the strength that the role gives. */
function openDoubtOf(scope: Scope, markId: MarkId): DoubtId | null {
  const open = scope.db
    .select({ id: doubts.id })
    .from(doubts)
    .where(
      and(
        eq(doubts.shopId, scope.shopId),
        eq(doubts.markId, markId),
        eq(doubts.raisedBy, scope.userId),
        eq(doubts.stops, can(scope.role, "value:stop")),
        isNull(doubts.clearedAt),
      ),
    )
    .get();
  return open?.id ?? null;
}

export type Raised =
  Readonly<{ ok: true; doubtId: DoubtId; stops: boolean }> | Readonly<{ ok: false; reason: "missing" }>;

/**
 * "This looks wrong": from who may stop values it stops this one at once; from others it warns beside the value.
 * Everybody else who may stop values gets a mail. A second press of the same person changes nothing while it is open.
 */
export function raiseDoubt(
  scope: Scope,
  lessonId: LessonId,
  markId: MarkId,
  reason: string,
  publicOrigin: string,
  now: number,
): Raised {
  return inTransaction(scope, (scope): Raised => {
    const found = findValue(scope, lessonId, markId);
    if (!found) return { ok: false, reason: "missing" };
    const stops = can(scope.role, "value:stop");
    const open = openDoubtOf(scope, markId);
    if (open) return { ok: true, doubtId: open, stops };
    const { id: doubtId } = scope.db
      .insert(doubts)
      .values({ shopId: scope.shopId, lessonId, markId, raisedBy: scope.userId, stops, reason, at: now })
      .returning({ id: doubts.id })
      .get();
    const value = markTitle(found.value.mark);
    writeAudit(
      scope,
      {
        action: stops ? "stopped" : "doubted",
        noun: "value",
        nounId: markId,
        detail: `${value}, ${found.lesson.snapshot.title}: ${reason}`,
      },
      now,
    );
    const by = teamMember(scope, scope.userId)?.name ?? "";
    for (const person of whoMay(scope, "value:stop"))
      if (person.id !== scope.userId)
        queueMail(
          scope,
          doubtMessage({
            to: person.email,
            name: person.name,
            by,
            lesson: found.lesson.snapshot.title,
            value,
            reason,
            stops,
            link: `${publicOrigin}/bench/doubts/${doubtId}`,
          }),
          now,
        );
    return { ok: true, doubtId, stops };
  });
}

export type DoubtRow = Readonly<{
  id: DoubtId;
  lessonId: LessonId;
  markId: MarkId;
  lesson: string;
  value: string;
  by: string;
  stops: boolean;
  reason: string;
  at: number;
  cleared: Readonly<{ by: string; at: number; reason: string }> | null;
}>;

function doubtRows(scope: Scope, where: ReturnType<typeof and>, limit: number): DoubtRow[] {
  const rows = scope.db
    .select({ doubt: doubts, lesson: lessons.title, mark: marks, by: users.name })
    .from(doubts)
    .innerJoin(lessons, eq(lessons.id, doubts.lessonId))
    .innerJoin(marks, eq(marks.id, doubts.markId))
    .innerJoin(users, eq(users.id, doubts.raisedBy))
    .where(and(eq(doubts.shopId, scope.shopId), where))
    .orderBy(desc(doubts.stops), asc(doubts.at))
    .limit(limit)
    .all();
  const clearers = rows.flatMap(({ doubt }) => (doubt.clearedBy ? [doubt.clearedBy] : []));
  const names = new Map(
    clearers.length === 0
      ? []
      : scope.db
          .select({ id: users.id, name: users.name })
          .from(users)
          .where(and(eq(users.shopId, scope.shopId), inArray(users.id, clearers)))
          .all()
          .map((user) => [user.id, user.name] as const),
  );
  return rows.map(({ doubt, lesson, mark, by }) => ({
    id: doubt.id,
    lessonId: doubt.lessonId,
    markId: doubt.markId,
    lesson,
    value: markTitle(mark),
    by,
    stops: doubt.stops,
    reason: doubt.reason,
    at: doubt.at,
    cleared:
      doubt.clearedAt !== null && doubt.clearedBy !== null
        ? { by: names.get(doubt.clearedBy) ?? "", at: doubt.clearedAt, reason: doubt.clearedReason }
        : null,
  }));
}

/** The shop's open doubts (what stops first, then oldest first) and those cleared last. */
export function listDoubts(scope: Scope): Readonly<{ open: DoubtRow[]; cleared: DoubtRow[] }> {
  return {
    open: doubtRows(scope, and(isNull(doubts.clearedAt)), 500),
    cleared: doubtRows(scope, and(isNotNull(doubts.clearedAt)), 500)
      .toSorted((a, b) => (b.cleared?.at ?? 0) - (a.cleared?.at ?? 0))
      .slice(0, 20),
  };
}

/** Somebody who may have relied on the value: watched its moment or the lesson, or answered a question on it. */
export type ValueUser = Readonly<{ userId: UserId; name: string; how: readonly string[]; lastAt: number }>;

/** Who used a value in the 30 days before `now`, last first. */
export function usersOfValue(scope: Scope, lessonId: LessonId, markId: MarkId, now: number): ValueUser[] {
  const since = now - USED_WITHIN_MS;
  const mark = scope.db
    .select({ recordingId: marks.recordingId, atMs: marks.atMs })
    .from(marks)
    .where(and(eq(marks.shopId, scope.shopId), eq(marks.id, markId)))
    .get();
  const watched = scope.db
    .select({ userId: users.id, name: users.name, at: watchedStretches.at, stretch: watchedStretches })
    .from(watchedStretches)
    .innerJoin(users, eq(users.id, watchedStretches.userId))
    .where(
      and(
        eq(watchedStretches.shopId, scope.shopId),
        eq(watchedStretches.lessonId, lessonId),
        gte(watchedStretches.at, since),
      ),
    )
    .all();
  const answered = scope.db
    .select({ userId: users.id, name: users.name, at: answers.at })
    .from(answers)
    .innerJoin(attempts, eq(attempts.id, answers.attemptId))
    .innerJoin(users, eq(users.id, attempts.userId))
    .innerJoin(questionVersions, eq(questionVersions.id, answers.questionVersionId))
    .innerJoin(questions, eq(questions.id, questionVersions.questionId))
    .where(and(eq(answers.shopId, scope.shopId), eq(questions.markId, markId), gte(answers.at, since)))
    .all();
  const found = new Map<UserId, { name: string; how: Set<string>; lastAt: number }>();
  const add = (userId: UserId, name: string, how: string, at: number) => {
    const user = found.get(userId) ?? { name, how: new Set<string>(), lastAt: 0 };
    user.how.add(how);
    user.lastAt = Math.max(user.lastAt, at);
    found.set(userId, user);
  };
  for (const { userId, name, at, stretch } of watched) {
    const moment =
      mark?.recordingId === stretch.recordingId && stretch.fromMs <= mark.atMs && mark.atMs < stretch.toMs;
    add(userId, name, moment ? "watched the moment" : "watched the lesson", at);
  }
  for (const { userId, name, at } of answered) add(userId, name, "answered a question on it", at);
  return [...found]
    .map(([userId, user]) => ({ userId, name: user.name, how: [...user.how], lastAt: user.lastAt }))
    .toSorted((a, b) => b.lastAt - a.lastAt || a.name.localeCompare(b.name));
}

/** One doubt with everybody who used the value; undefined: not in this shop. */
export function findDoubt(
  scope: Scope,
  doubtId: DoubtId,
  now: number,
): Readonly<{ doubt: DoubtRow; usedBy: readonly ValueUser[] }> | undefined {
  const [doubt] = doubtRows(scope, and(eq(doubts.id, doubtId)), 1);
  return doubt && { doubt, usedBy: usersOfValue(scope, doubt.lessonId, doubt.markId, now) };
}

export type Cleared =
  | Readonly<{ ok: true }>
  | Readonly<{ ok: false; reason: "missing" }>
  | Readonly<{ ok: false; reason: "refused"; sentence: string }>;

/** Clears a doubt, by the person of the scope and with a reason. Cleared already stays as it was. */
export function clearDoubt(scope: Scope, doubtId: DoubtId, reason: string, now: number): Cleared {
  return inTransaction(scope, (scope): Cleared => {
    const row = scope.db
      .select()
      .from(doubts)
      .where(and(eq(doubts.shopId, scope.shopId), eq(doubts.id, doubtId)))
      .get();
    if (!row) return { ok: false, reason: "missing" };
    if (row.clearedAt !== null) return { ok: true };
    if (reason.trim() === "")
      return {
        ok: false,
        reason: "refused",
        sentence: "Say why the value may be used again: where you read it, or what was changed.",
      };
    scope.db
      .update(doubts)
      .set({ clearedBy: scope.userId, clearedAt: now, clearedReason: reason.trim() })
      .where(and(eq(doubts.shopId, scope.shopId), eq(doubts.id, doubtId)))
      .run();
    writeAudit(
      scope,
      { action: "cleared a doubt on", noun: "value", nounId: row.markId, detail: reason.trim() },
      now,
    );
    return { ok: true };
  });
}

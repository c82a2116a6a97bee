import { and, desc, eq, inArray, isNull } from "drizzle-orm";
import { can } from "~/auth/permissions";
import { writeAudit } from "~/auth/write-audit.server";
import type { Scope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import { findLearnerLesson } from "~/lessons/learner-lesson.server";
import { queueMail } from "~/mail/queue-mail.server";
import { signOffMessage, signOffRequestMessage } from "~/mail/sign-off-message";
import type { LessonId, SignOffId, SignOffRequestId, UserId } from "#drizzle/schema/ids";
import { lessons, signOffRequests, signOffRevocations, signOffs, users } from "#drizzle/schema/index";
import { shopToday } from "./assign-lesson.server";
import { formatLocalDate, type LocalDate } from "./local-date";
import { LEVEL_WORDS, type Level, type Presence } from "./sign-off";

/** A refusal beside a field of the form; "" is the form as a whole. */
type Refused = { ok: false; field: string; sentence: string };

function nameOf(scope: Scope, userId: UserId): string {
  return scope.db.select({ name: users.name }).from(users).where(eq(users.id, userId)).get()?.name ?? "";
}

/** A person of the shop who is still on the team. */
export function findPerson(scope: Scope, userId: UserId) {
  return scope.db
    .select({ id: users.id, name: users.name, role: users.role, email: users.email })
    .from(users)
    .where(and(eq(users.shopId, scope.shopId), eq(users.id, userId), isNull(users.leftAt)))
    .get();
}

/** A trainee asks for a sign-off; a second open request for the same lesson changes the first. */
export function requestSignOff(
  scope: Scope,
  order: { lessonId: LessonId; doneOn: LocalDate; note: string },
  publicOrigin: string,
  now: number,
): { ok: true } | Refused {
  if (order.doneOn > shopToday(scope, now))
    return {
      ok: false,
      field: "doneOn",
      sentence: "This day has not come yet. Name the day you did the job.",
    };
  return inTransaction(scope, (scope): { ok: true } | Refused => {
    const lesson = findLearnerLesson(scope, order.lessonId);
    if (!lesson)
      return { ok: false, field: "lesson", sentence: "That lesson is not published in your shop." };
    const open = scope.db
      .select({ id: signOffRequests.id })
      .from(signOffRequests)
      .where(
        and(
          eq(signOffRequests.shopId, scope.shopId),
          eq(signOffRequests.userId, scope.userId),
          eq(signOffRequests.lessonId, order.lessonId),
          isNull(signOffRequests.answeredAt),
          isNull(signOffRequests.withdrawnAt),
        ),
      )
      .get();
    if (open) {
      scope.db
        .update(signOffRequests)
        .set({ doneOn: order.doneOn, note: order.note })
        .where(eq(signOffRequests.id, open.id))
        .run();
      return { ok: true };
    }
    scope.db
      .insert(signOffRequests)
      .values({
        shopId: scope.shopId,
        lessonId: order.lessonId,
        userId: scope.userId,
        doneOn: order.doneOn,
        note: order.note,
        createdAt: now,
      })
      .run();
    const instructors = scope.db
      .select({ id: users.id, email: users.email, role: users.role, mailQuestions: users.mailQuestions })
      .from(users)
      .where(and(eq(users.shopId, scope.shopId), isNull(users.leftAt)))
      .all()
      .filter((user) => can(user.role, "sign-off:give") && user.id !== scope.userId && user.mailQuestions);
    for (const instructor of instructors)
      queueMail(
        scope,
        signOffRequestMessage({
          to: instructor.email,
          trainee: nameOf(scope, scope.userId),
          lesson: lesson.snapshot.title,
          doneOn: formatLocalDate(order.doneOn),
          note: order.note,
          link: `${publicOrigin}/training/sign-offs`,
        }),
        now,
      );
    return { ok: true };
  });
}

/** Takes back one's own open request; false when there is none. */
export function withdrawRequest(scope: Scope, requestId: SignOffRequestId, now: number): boolean {
  const { changes } = scope.db
    .update(signOffRequests)
    .set({ withdrawnAt: now })
    .where(
      and(
        eq(signOffRequests.shopId, scope.shopId),
        eq(signOffRequests.userId, scope.userId),
        eq(signOffRequests.id, requestId),
        isNull(signOffRequests.answeredAt),
        isNull(signOffRequests.withdrawnAt),
      ),
    )
    .run();
  return changes === 1;
}

/** Every open request of the shop, oldest first. */
export function openRequests(scope: Scope) {
  return scope.db
    .select({
      id: signOffRequests.id,
      doneOn: signOffRequests.doneOn,
      note: signOffRequests.note,
      createdAt: signOffRequests.createdAt,
      userId: users.id,
      name: users.name,
      lessonId: lessons.id,
      lesson: lessons.title,
    })
    .from(signOffRequests)
    .innerJoin(users, eq(users.id, signOffRequests.userId))
    .innerJoin(lessons, eq(lessons.id, signOffRequests.lessonId))
    .where(
      and(
        eq(signOffRequests.shopId, scope.shopId),
        isNull(signOffRequests.answeredAt),
        isNull(signOffRequests.withdrawnAt),
        isNull(users.leftAt),
      ),
    )
    .orderBy(signOffRequests.createdAt)
    .all();
}

export type SignOffOrder = {
  lessonId: LessonId;
  userId: UserId;
  level: Level;
  presence: Presence;
  shownOn: LocalDate;
  /** Each torque value of the lesson as it was set at the car: "Sway bar link lower nut: 64 N·m, wrench 7". */
  valuesSet: string;
  note: string;
};

/** An instructor records that a person did the job in front of them. Never oneself; the same sign-off posted twice counts once. */
export function giveSignOff(
  scope: Scope,
  order: SignOffOrder,
  publicOrigin: string,
  now: number,
): { ok: true } | Refused {
  if (order.userId === scope.userId)
    return { ok: false, field: "", sentence: "Nobody signs off their own work. Ask another instructor." };
  if (order.presence === "afterwards")
    return {
      ok: false,
      field: "presence",
      sentence:
        "Who saw the work only afterwards cannot sign it off. Watch the next one, at least at its critical steps.",
    };
  if (order.shownOn > shopToday(scope, now))
    return {
      ok: false,
      field: "shownOn",
      sentence: "This day has not come yet. Name the day the job was shown.",
    };
  const presence = order.presence;
  return inTransaction(scope, (scope): { ok: true } | Refused => {
    const lesson = findLearnerLesson(scope, order.lessonId);
    if (!lesson) return { ok: false, field: "", sentence: "That lesson is not published in your shop." };
    const person = findPerson(scope, order.userId);
    if (!person) return { ok: false, field: "", sentence: "That person is not on your team any more." };
    // The form names each torque, "Pulley bolt: "; a name with nothing behind it is not written down.
    const written = order.valuesSet.trim() !== "" && !/:[^\S\n]*$/m.test(order.valuesSet);
    if (!written && lesson.marks.some(({ mark }) => mark.kind === "torque"))
      return {
        ok: false,
        field: "valuesSet",
        sentence: "Write down what was set at the car for each torque value. A tick is not enough.",
      };
    const same = scope.db
      .select({ id: signOffs.id })
      .from(signOffs)
      .leftJoin(signOffRevocations, eq(signOffRevocations.signOffId, signOffs.id))
      .where(
        and(
          eq(signOffs.shopId, scope.shopId),
          eq(signOffs.userId, order.userId),
          eq(signOffs.lessonId, order.lessonId),
          eq(signOffs.shownOn, order.shownOn),
          eq(signOffs.signedBy, scope.userId),
          eq(signOffs.level, order.level),
          isNull(signOffRevocations.id),
        ),
      )
      .get();
    if (same) return { ok: true };
    const request = scope.db
      .select({ id: signOffRequests.id })
      .from(signOffRequests)
      .where(
        and(
          eq(signOffRequests.shopId, scope.shopId),
          eq(signOffRequests.userId, order.userId),
          eq(signOffRequests.lessonId, order.lessonId),
          isNull(signOffRequests.answeredAt),
          isNull(signOffRequests.withdrawnAt),
        ),
      )
      .get();
    scope.db
      .insert(signOffs)
      .values({
        shopId: scope.shopId,
        lessonId: order.lessonId,
        revisionId: lesson.revisionId,
        userId: order.userId,
        signedBy: scope.userId,
        requestId: request?.id ?? null,
        level: order.level,
        presence,
        shownOn: order.shownOn,
        valuesSet: order.valuesSet.trim(),
        note: order.note,
        at: now,
      })
      .run();
    if (request)
      scope.db
        .update(signOffRequests)
        .set({ answeredAt: now })
        .where(eq(signOffRequests.id, request.id))
        .run();
    writeAudit(
      scope,
      {
        action: "signed off",
        noun: "lesson",
        nounId: order.lessonId,
        detail: `${lesson.snapshot.title}: ${person.name}`,
      },
      now,
    );
    queueMail(
      scope,
      signOffMessage({
        to: person.email,
        name: person.name,
        lesson: lesson.snapshot.title,
        by: nameOf(scope, scope.userId),
        level: LEVEL_WORDS[order.level],
        shownOn: formatLocalDate(order.shownOn),
        takenBack: null,
        link: `${publicOrigin}/training`,
      }),
      now,
    );
    return { ok: true };
  });
}

/** Takes a sign-off back with a reason; it stays in the record as taken back. */
export function revokeSignOff(
  scope: Scope,
  signOffId: SignOffId,
  reason: string,
  publicOrigin: string,
  now: number,
): boolean {
  return inTransaction(scope, (scope) => {
    const row = scope.db
      .select({ signOff: signOffs, email: users.email, name: users.name, lesson: lessons.title })
      .from(signOffs)
      .innerJoin(users, eq(users.id, signOffs.userId))
      .innerJoin(lessons, eq(lessons.id, signOffs.lessonId))
      .leftJoin(signOffRevocations, eq(signOffRevocations.signOffId, signOffs.id))
      .where(
        and(eq(signOffs.shopId, scope.shopId), eq(signOffs.id, signOffId), isNull(signOffRevocations.id)),
      )
      .get();
    if (!row) return false;
    scope.db
      .insert(signOffRevocations)
      .values({ shopId: scope.shopId, signOffId, revokedBy: scope.userId, reason, at: now })
      .run();
    writeAudit(
      scope,
      {
        action: "took back a sign-off of",
        noun: "lesson",
        nounId: row.signOff.lessonId,
        detail: `${row.lesson}: ${row.name}. ${reason}`,
      },
      now,
    );
    queueMail(
      scope,
      signOffMessage({
        to: row.email,
        name: row.name,
        lesson: row.lesson,
        by: nameOf(scope, scope.userId),
        level: LEVEL_WORDS[row.signOff.level],
        shownOn: formatLocalDate(row.signOff.shownOn),
        takenBack: reason,
        link: `${publicOrigin}/training`,
      }),
      now,
    );
    return true;
  });
}

/** The sign-offs of people for lessons, newest first, with who took one back and why. */
export function signOffsOf(scope: Scope, userIds: readonly UserId[], lessonId?: LessonId) {
  if (userIds.length === 0) return [];
  const rows = scope.db
    .select({ signOff: signOffs, by: users.name, lesson: lessons.title, revocation: signOffRevocations })
    .from(signOffs)
    .innerJoin(users, eq(users.id, signOffs.signedBy))
    .innerJoin(lessons, eq(lessons.id, signOffs.lessonId))
    .leftJoin(signOffRevocations, eq(signOffRevocations.signOffId, signOffs.id))
    .where(
      and(
        eq(signOffs.shopId, scope.shopId),
        inArray(signOffs.userId, [...userIds]),
        lessonId ? eq(signOffs.lessonId, lessonId) : undefined,
      ),
    )
    .orderBy(desc(signOffs.at))
    .all();
  return rows.map(({ signOff, by, lesson, revocation }) => ({
    id: signOff.id,
    lessonId: signOff.lessonId,
    lesson,
    level: signOff.level,
    presence: signOff.presence,
    shownOn: signOff.shownOn,
    valuesSet: signOff.valuesSet,
    note: signOff.note,
    by,
    takenBack: revocation ? revocation.reason : null,
  }));
}

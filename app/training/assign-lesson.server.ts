import { and, asc, eq, inArray, isNotNull, isNull } from "drizzle-orm";
import { writeAudit } from "~/auth/write-audit.server";
import type { Scope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import { assignmentMessage } from "~/mail/assignment-message";
import { queueMail } from "~/mail/queue-mail.server";
import type { AssignmentId, LessonId, UserId } from "#drizzle/schema/ids";
import { assignments, lessons, shops, users } from "#drizzle/schema/index";
import { formatLocalDate, localDateAt, type LocalDate } from "./local-date";

/** Published lessons and the people they can be assigned to. */
export function assignable(scope: Scope) {
  return {
    lessons: scope.db
      .select({ id: lessons.id, title: lessons.title })
      .from(lessons)
      .where(
        and(eq(lessons.shopId, scope.shopId), isNotNull(lessons.newestRevision), isNull(lessons.withdrawnAt)),
      )
      .orderBy(asc(lessons.title))
      .all(),
    people: scope.db
      .select({ id: users.id, name: users.name, role: users.role })
      .from(users)
      .where(and(eq(users.shopId, scope.shopId), isNull(users.leftAt)))
      .orderBy(asc(users.name))
      .all(),
  };
}

/** Today on the shop's wall calendar. */
export function shopToday(scope: Pick<Scope, "db" | "shopId">, now: number): LocalDate {
  const shop = scope.db
    .select({ timeZone: shops.timeZone })
    .from(shops)
    .where(eq(shops.id, scope.shopId))
    .get();
  return localDateAt(now, shop?.timeZone ?? "UTC");
}

export type AssignResult =
  | { ok: true; assigned: number; moved: number; unchanged: number }
  | { ok: false; field: "lesson" | "people" | "dueOn"; sentence: string };

/**
 * Assigns a published lesson to people until a day. Whoever has it already gets the new day and a mail about it;
 * the same day again changes nothing and mails nobody, so a form posted twice counts once.
 */
export function assignLesson(
  scope: Scope,
  order: { lessonId: LessonId; userIds: readonly UserId[]; dueOn: LocalDate; note: string },
  publicOrigin: string,
  now: number,
): AssignResult {
  if (order.dueOn < shopToday(scope, now))
    return { ok: false, field: "dueOn", sentence: "This day is in the past. Choose today or later." };
  return inTransaction(scope, (scope): AssignResult => {
    const lesson = scope.db
      .select({ id: lessons.id, title: lessons.title })
      .from(lessons)
      .where(
        and(
          eq(lessons.shopId, scope.shopId),
          eq(lessons.id, order.lessonId),
          isNotNull(lessons.newestRevision),
          isNull(lessons.withdrawnAt),
        ),
      )
      .get();
    if (!lesson)
      return { ok: false, field: "lesson", sentence: "That lesson is not published in your shop." };
    const people = scope.db
      .select()
      .from(users)
      .where(and(eq(users.shopId, scope.shopId), inArray(users.id, [...order.userIds]), isNull(users.leftAt)))
      .all();
    if (people.length === 0 || people.length !== new Set(order.userIds).size)
      return {
        ok: false,
        field: "people",
        sentence: "Choose people of your shop who are still on the team.",
      };
    const by =
      scope.db.select({ name: users.name }).from(users).where(eq(users.id, scope.userId)).get()?.name ?? "";
    const counts = { assigned: 0, moved: 0, unchanged: 0 };
    for (const person of people) {
      const open = scope.db
        .select()
        .from(assignments)
        .where(
          and(
            eq(assignments.shopId, scope.shopId),
            eq(assignments.lessonId, lesson.id),
            eq(assignments.userId, person.id),
            isNull(assignments.withdrawnAt),
          ),
        )
        .get();
      if (open && open.dueOn === order.dueOn && open.note === order.note) {
        counts.unchanged += 1;
        continue;
      }
      if (open) {
        counts.moved += 1;
        scope.db
          .update(assignments)
          .set({ dueOn: order.dueOn, note: order.note, assignedBy: scope.userId })
          .where(eq(assignments.id, open.id))
          .run();
      } else {
        counts.assigned += 1;
        scope.db
          .insert(assignments)
          .values({
            shopId: scope.shopId,
            lessonId: lesson.id,
            userId: person.id,
            assignedBy: scope.userId,
            dueOn: order.dueOn,
            note: order.note,
            createdAt: now,
          })
          .run();
      }
      writeAudit(
        scope,
        {
          action: open ? "moved the due date" : "assigned",
          noun: "lesson",
          nounId: lesson.id,
          detail: `${lesson.title} to ${person.name}, due ${formatLocalDate(order.dueOn)}`,
        },
        now,
      );
      if (person.mailAssignments && person.id !== scope.userId)
        queueMail(
          scope,
          assignmentMessage({
            to: person.email,
            name: person.name,
            lesson: lesson.title,
            due: formatLocalDate(order.dueOn),
            by,
            note: order.note,
            moved: open !== undefined,
            link: `${publicOrigin}/lessons/${lesson.id}`,
          }),
          now,
        );
    }
    return { ok: true, ...counts };
  });
}

/** Takes an open assignment back; false when there is none of that id in the shop. */
export function withdrawAssignment(scope: Scope, assignmentId: AssignmentId, now: number): boolean {
  return inTransaction(scope, (scope) => {
    const row = scope.db
      .update(assignments)
      .set({ withdrawnAt: now })
      .where(
        and(
          eq(assignments.shopId, scope.shopId),
          eq(assignments.id, assignmentId),
          isNull(assignments.withdrawnAt),
        ),
      )
      .returning()
      .get();
    if (!row) return false;
    writeAudit(scope, { action: "withdrew", noun: "assignment", nounId: row.id }, now);
    return true;
  });
}

import { and, asc, desc, eq, isNotNull, isNull } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { LessonId, UserId } from "#drizzle/schema/ids";
import { assignments, attempts, lessons, shops, users } from "#drizzle/schema/index";
import { shopToday } from "./assign-lesson.server";
import { loadSkills } from "./load-skills.server";
import { openRequests, signOffsOf } from "./sign-off.server";

export type SkillsFilter = { system: string; person: string; lesson: string };

/** People × published lessons of the shop with how far each is, and the counts above the table. */
export function skillsTable(scope: Scope, filter: SkillsFilter, now: number) {
  const people = scope.db
    .select({ id: users.id, name: users.name, role: users.role })
    .from(users)
    .where(and(eq(users.shopId, scope.shopId), isNull(users.leftAt)))
    .orderBy(asc(users.name))
    .all();
  const published = scope.db
    .select({ id: lessons.id, title: lessons.title, system: lessons.system })
    .from(lessons)
    .where(
      and(eq(lessons.shopId, scope.shopId), isNotNull(lessons.newestRevision), isNull(lessons.withdrawnAt)),
    )
    .orderBy(asc(lessons.system), asc(lessons.title))
    .all();
  const shownPeople = people.filter(({ id }) => filter.person === "" || id === filter.person);
  const shownLessons = published.filter(
    ({ id, system }) =>
      (filter.system === "" || system === filter.system) && (filter.lesson === "" || id === filter.lesson),
  );
  const userIds = shownPeople.map(({ id }) => id);
  const lessonIds = shownLessons.map(({ id }) => id);
  const skills = loadSkills(scope, { userIds, lessonIds });
  const today = shopToday(scope, now);
  const open = scope.db
    .select({ userId: assignments.userId, lessonId: assignments.lessonId, dueOn: assignments.dueOn })
    .from(assignments)
    .where(and(eq(assignments.shopId, scope.shopId), isNull(assignments.withdrawnAt)))
    .all();
  const due = new Map(open.map((row) => [`${row.userId}:${row.lessonId}`, row.dueOn]));
  const waiting = new Set(openRequests(scope).map((row) => `${row.userId}:${row.lessonId}`));
  const cell = (userId: UserId, lessonId: LessonId) => {
    const key = `${userId}:${lessonId}`;
    const skill = skills.get(key);
    const dueOn = due.get(key) ?? null;
    const done = skill !== undefined && skill.seen && skill.answered && !skill.changedSince;
    return {
      lessonId,
      state: {
        seen: skill?.seen ?? false,
        answered: skill?.answered ?? false,
        shown: skill?.shown ?? false,
        changedSince: skill?.changedSince ?? false,
      },
      shownOnce: (skill?.shownCount ?? 0) > 0 && !skill?.shown,
      dueOn,
      overdue: dueOn !== null && !done && dueOn < today,
      waiting: waiting.has(key),
    };
  };
  const rows = shownPeople.map((person) => ({
    ...person,
    cells: shownLessons.map((lesson) => cell(person.id, lesson.id)),
  }));
  const cells = rows.flatMap((row) => row.cells);
  return {
    people,
    lessons: published,
    columns: shownLessons,
    rows,
    counts: {
      shown: cells.filter(({ state }) => state.shown).length,
      of: cells.length,
      waiting: cells.filter((found) => found.waiting).length,
      overdue: cells.filter((found) => found.overdue).length,
      changed: cells.filter(({ state }) => state.changedSince).length,
    },
  };
}

/** One person and one lesson: everything that the glyph stands for. */
export function skillDetail(scope: Scope, userId: UserId, lessonId: LessonId, now: number) {
  const person = scope.db
    .select({ id: users.id, name: users.name, role: users.role })
    .from(users)
    .where(and(eq(users.shopId, scope.shopId), eq(users.id, userId), isNull(users.leftAt)))
    .get();
  const lesson = scope.db
    .select({ id: lessons.id, title: lessons.title })
    .from(lessons)
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId), isNotNull(lessons.newestRevision)))
    .get();
  if (!person || !lesson) return undefined;
  const shop = scope.db
    .select({ shownJobs: shops.shownJobs, timeZone: shops.timeZone })
    .from(shops)
    .where(eq(shops.id, scope.shopId))
    .get();
  return {
    person,
    lesson,
    shownJobs: shop?.shownJobs ?? 1,
    timeZone: shop?.timeZone ?? "UTC",
    today: shopToday(scope, now),
    skill: loadSkills(scope, { userIds: [userId], lessonIds: [lessonId] }).get(`${userId}:${lessonId}`),
    attempts: scope.db
      .select({
        id: attempts.id,
        submittedAt: attempts.submittedAt,
        rightCount: attempts.rightCount,
        askedCount: attempts.askedCount,
        passed: attempts.passed,
      })
      .from(attempts)
      .where(
        and(
          eq(attempts.shopId, scope.shopId),
          eq(attempts.userId, userId),
          eq(attempts.lessonId, lessonId),
          isNotNull(attempts.submittedAt),
        ),
      )
      .orderBy(desc(attempts.submittedAt))
      .all(),
    signOffs: signOffsOf(scope, [userId], lessonId),
    assignment: scope.db
      .select({ id: assignments.id, dueOn: assignments.dueOn, note: assignments.note })
      .from(assignments)
      .where(
        and(
          eq(assignments.shopId, scope.shopId),
          eq(assignments.userId, userId),
          eq(assignments.lessonId, lessonId),
          isNull(assignments.withdrawnAt),
        ),
      )
      .get(),
    waiting: openRequests(scope).some((row) => row.userId === userId && row.lessonId === lessonId),
  };
}

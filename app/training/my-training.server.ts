import { and, asc, desc, eq, isNull } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { LessonId } from "#drizzle/schema/ids";
import { assignments, lessons, signOffRequests, watchedStretches } from "#drizzle/schema/index";
import { shopToday } from "./assign-lesson.server";
import { loadSkills } from "./load-skills.server";
import { signOffsOf } from "./sign-off.server";

/** What a person has to learn, has begun and has shown: their own records only. */
export function myTraining(scope: Scope, now: number) {
  const assigned = scope.db
    .select({
      id: assignments.id,
      dueOn: assignments.dueOn,
      note: assignments.note,
      lessonId: lessons.id,
      title: lessons.title,
    })
    .from(assignments)
    .innerJoin(lessons, eq(lessons.id, assignments.lessonId))
    .where(
      and(
        eq(assignments.shopId, scope.shopId),
        eq(assignments.userId, scope.userId),
        isNull(assignments.withdrawnAt),
        isNull(lessons.withdrawnAt),
      ),
    )
    .orderBy(asc(assignments.dueOn), asc(lessons.title))
    .all();
  const begun = scope.db
    .selectDistinct({ lessonId: lessons.id, title: lessons.title })
    .from(watchedStretches)
    .innerJoin(lessons, eq(lessons.id, watchedStretches.lessonId))
    .where(
      and(
        eq(watchedStretches.shopId, scope.shopId),
        eq(watchedStretches.userId, scope.userId),
        isNull(lessons.withdrawnAt),
      ),
    )
    .orderBy(asc(lessons.title))
    .all()
    .filter(({ lessonId }) => !assigned.some((row) => row.lessonId === lessonId));
  const requests = scope.db
    .select({
      id: signOffRequests.id,
      doneOn: signOffRequests.doneOn,
      lessonId: lessons.id,
      title: lessons.title,
    })
    .from(signOffRequests)
    .innerJoin(lessons, eq(lessons.id, signOffRequests.lessonId))
    .where(
      and(
        eq(signOffRequests.shopId, scope.shopId),
        eq(signOffRequests.userId, scope.userId),
        isNull(signOffRequests.answeredAt),
        isNull(signOffRequests.withdrawnAt),
      ),
    )
    .orderBy(desc(signOffRequests.createdAt))
    .all();
  const lessonIds = [...assigned, ...begun].map(({ lessonId }) => lessonId as LessonId);
  const skills = loadSkills(scope, { userIds: [scope.userId], lessonIds });
  const skillOf = (lessonId: string) => skills.get(`${scope.userId}:${lessonId}`);
  return {
    today: shopToday(scope, now),
    assigned: assigned.map((row) => ({ ...row, skill: skillOf(row.lessonId) })),
    begun: begun.map((row) => ({ ...row, skill: skillOf(row.lessonId) })),
    requests,
    signOffs: signOffsOf(scope, [scope.userId]),
  };
}

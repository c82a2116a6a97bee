import { and, desc, eq, inArray, isNotNull, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, RevisionId, ShopId } from "#drizzle/schema/ids";
import { lessons, revisions, users } from "#drizzle/schema/index";
import { newestChecks, withCheck } from "./load-marks.server";
import type { Mark } from "./mark";
import { openDoubts } from "./open-doubts.server";
import { forLearner, showingOf, type OpenDoubt, type Showing } from "./showing";
import { readSnapshot, type Snapshot } from "./snapshot";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

export type LearnerMark = Readonly<{ mark: Mark; showing: Showing; doubts: readonly OpenDoubt[] }>;

/** The newest revision of a lesson as a learner may see it today: newer checks and open doubts laid over the snapshot. */
export type LearnerLesson = Readonly<{
  revisionId: RevisionId;
  n: number;
  publishedAt: number;
  publishedBy: string;
  snapshot: Omit<Snapshot, "marks">;
  marks: readonly LearnerMark[];
}>;

function asLearnerLesson(
  scope: InShop,
  row: { revision: typeof revisions.$inferSelect; by: string },
  doubts: readonly OpenDoubt[],
): LearnerLesson {
  const { marks, ...snapshot } = readSnapshot(row.revision.snapshot);
  const newest = newestChecks(
    scope,
    marks.map((mark) => mark.id),
  );
  return {
    revisionId: row.revision.id,
    n: row.revision.n,
    publishedAt: row.revision.publishedAt,
    publishedBy: row.by,
    snapshot,
    marks: marks.map((stored) => {
      const mark = withCheck(stored, newest.get(stored.id));
      const own = doubts.filter((doubt) => doubt.markId === mark.id);
      const showing = showingOf(mark, own);
      return { mark: forLearner(mark, showing), showing, doubts: own };
    }),
  };
}

/** The newest revision of one lesson; undefined when it is not published, withdrawn, or of another shop. */
export function findLearnerLesson(scope: InShop, lessonId: LessonId): LearnerLesson | undefined {
  const row = scope.db
    .select({ revision: revisions, by: users.name })
    .from(lessons)
    .innerJoin(revisions, and(eq(revisions.lessonId, lessons.id), eq(revisions.n, lessons.newestRevision)))
    .innerJoin(users, eq(users.id, revisions.publishedBy))
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId), isNull(lessons.withdrawnAt)))
    .get();
  return row && asLearnerLesson(scope, row, openDoubts(scope, [lessonId]));
}

/** The newest revisions of every published lesson of the shop, newest first. */
export function allLearnerLessons(scope: InShop, only?: readonly LessonId[]): LearnerLesson[] {
  const rows = scope.db
    .select({ revision: revisions, by: users.name })
    .from(lessons)
    .innerJoin(revisions, and(eq(revisions.lessonId, lessons.id), eq(revisions.n, lessons.newestRevision)))
    .innerJoin(users, eq(users.id, revisions.publishedBy))
    .where(
      and(
        eq(lessons.shopId, scope.shopId),
        isNotNull(lessons.newestRevision),
        isNull(lessons.withdrawnAt),
        only ? inArray(lessons.id, [...only]) : undefined,
      ),
    )
    .orderBy(desc(revisions.publishedAt))
    .all();
  const doubts = openDoubts(
    scope,
    rows.map((row) => row.revision.lessonId),
  );
  return rows.map((row) => asLearnerLesson(scope, row, doubts));
}

import { and, eq } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, ShopId } from "#drizzle/schema/ids";
import { lessons, revisions, users } from "#drizzle/schema/index";
import { compareSnapshots, type Comparison } from "~/lessons/compare-snapshots";
import { readSnapshot } from "~/lessons/snapshot";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

/** The revision n of a lesson as stored; undefined when there is none. */
export function findRevision(scope: InShop, lessonId: LessonId, n: number) {
  return scope.db
    .select()
    .from(revisions)
    .where(and(eq(revisions.shopId, scope.shopId), eq(revisions.lessonId, lessonId), eq(revisions.n, n)))
    .get();
}

export type RevisionStory = Readonly<{
  lessonId: LessonId;
  n: number;
  /** Learners see this one. */
  newest: boolean;
  title: string;
  note: string;
  publishedBy: string;
  publishedAt: number;
  /** Against the revision before; null for the first. */
  comparison: Comparison | null;
}>;

/** A revision with what it changed; undefined: no such revision in this shop. */
export function loadRevision(scope: InShop, lessonId: LessonId, n: number): RevisionStory | undefined {
  const row = findRevision(scope, lessonId, n);
  if (!row) return undefined;
  const lesson = scope.db
    .select({ newestRevision: lessons.newestRevision, withdrawnAt: lessons.withdrawnAt })
    .from(lessons)
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
    .get();
  const by = scope.db.select({ name: users.name }).from(users).where(eq(users.id, row.publishedBy)).get();
  const before = findRevision(scope, lessonId, n - 1);
  const snapshot = readSnapshot(row.snapshot);
  return {
    lessonId,
    n,
    newest: lesson?.newestRevision === n && lesson.withdrawnAt === null,
    title: snapshot.title,
    note: row.note,
    publishedBy: by?.name ?? "",
    publishedAt: row.publishedAt,
    comparison: before ? compareSnapshots(readSnapshot(before.snapshot), snapshot) : null,
  };
}

import { and, asc, eq, inArray, isNotNull, isNull, sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, RevisionId, ShopId, UserId } from "#drizzle/schema/ids";
import {
  attempts,
  lessons,
  revisions,
  shops,
  signOffRevocations,
  signOffs,
  users,
  watchedStretches,
} from "#drizzle/schema/index";
import { changedValues } from "~/lessons/changed-values";
import { readSnapshot, type SnapshotClip } from "~/lessons/snapshot";
import { coverage, type Stretch } from "./coverage";
import { skillState, type SkillState } from "./skill-state";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

// A revision never changes, so whether it changed a value is worked out once.
const CHANGED = new Map<RevisionId, boolean>();
const MOST_KEPT = 20_000;

function changesValues(scope: InShop, before: RevisionId, after: RevisionId): boolean {
  const known = CHANGED.get(after);
  if (known !== undefined) return known;
  const marksOf = (id: RevisionId) => {
    const row = scope.db
      .select({ snapshot: revisions.snapshot })
      .from(revisions)
      .where(and(eq(revisions.shopId, scope.shopId), eq(revisions.id, id)))
      .get();
    return row ? readSnapshot(row.snapshot).marks : [];
  };
  const changed = changedValues(marksOf(before), marksOf(after)).length > 0;
  if (CHANGED.size >= MOST_KEPT) CHANGED.clear();
  CHANGED.set(after, changed);
  return changed;
}

/** For each lesson the number of the newest revision that changed a value; its first one when none did. */
function changedAt(scope: InShop, lessonIds: readonly LessonId[]): Map<LessonId, number> {
  const rows = scope.db
    .select({ id: revisions.id, lessonId: revisions.lessonId, n: revisions.n })
    .from(revisions)
    .where(and(eq(revisions.shopId, scope.shopId), inArray(revisions.lessonId, [...lessonIds])))
    .orderBy(asc(revisions.lessonId), asc(revisions.n))
    .all();
  const found = new Map<LessonId, number>();
  rows.forEach((row, index) => {
    const before = rows[index - 1];
    if (!before || before.lessonId !== row.lessonId) found.set(row.lessonId, row.n);
    else if (changesValues(scope, before.id, row.id)) found.set(row.lessonId, row.n);
  });
  return found;
}

function byPair<Row extends { userId: UserId; lessonId: LessonId }>(
  rows: readonly Row[],
): Map<string, Row[]> {
  const found = new Map<string, Row[]>();
  for (const row of rows) {
    const key = `${row.userId}:${row.lessonId}`;
    const list = found.get(key);
    if (list) list.push(row);
    else found.set(key, [row]);
  }
  return found;
}

/**
 * How far people are with lessons, keyed "userId:lessonId". Without `userIds` everybody who has not left; without
 * `lessonIds` every published lesson. Every asked pair is in the map; people and lessons of other shops never are.
 * A handful of queries, however many pairs.
 */
export function loadSkills(
  scope: InShop,
  only: Readonly<{ userIds?: readonly UserId[]; lessonIds?: readonly LessonId[] }> = {},
): Map<string, SkillState> {
  const { db, shopId } = scope;
  const shop = db
    .select({ watchThreshold: shops.watchThreshold, shownJobs: shops.shownJobs })
    .from(shops)
    .where(eq(shops.id, shopId))
    .get();
  if (!shop) throw new Error("a scope needs its shop");
  const people = db
    .select({ id: users.id })
    .from(users)
    .where(
      and(
        eq(users.shopId, shopId),
        only.userIds ? inArray(users.id, [...only.userIds]) : isNull(users.leftAt),
      ),
    )
    .all();
  const published = db
    .select({ id: lessons.id, clips: sql<string>`json_extract(${revisions.snapshot}, '$.clips')` })
    .from(lessons)
    .innerJoin(revisions, and(eq(revisions.lessonId, lessons.id), eq(revisions.n, lessons.newestRevision)))
    .where(
      and(
        eq(lessons.shopId, shopId),
        isNotNull(lessons.newestRevision),
        isNull(lessons.withdrawnAt),
        only.lessonIds ? inArray(lessons.id, [...only.lessonIds]) : undefined,
      ),
    )
    .all();
  const skills = new Map<string, SkillState>();
  if (people.length === 0 || published.length === 0) return skills;
  const userIds = people.map(({ id }) => id);
  const lessonIds = published.map(({ id }) => id);

  const stretches = byPair(
    db
      .select({
        userId: watchedStretches.userId,
        lessonId: watchedStretches.lessonId,
        recordingId: watchedStretches.recordingId,
        fromMs: watchedStretches.fromMs,
        toMs: watchedStretches.toMs,
      })
      .from(watchedStretches)
      .where(
        and(
          eq(watchedStretches.shopId, shopId),
          inArray(watchedStretches.userId, userIds),
          inArray(watchedStretches.lessonId, lessonIds),
        ),
      )
      .all(),
  );
  const passed = byPair(
    db
      .select({ userId: attempts.userId, lessonId: attempts.lessonId, n: revisions.n })
      .from(attempts)
      .innerJoin(revisions, eq(revisions.id, attempts.revisionId))
      .where(
        and(
          eq(attempts.shopId, shopId),
          eq(attempts.passed, true),
          isNotNull(attempts.submittedAt),
          inArray(attempts.userId, userIds),
          inArray(attempts.lessonId, lessonIds),
        ),
      )
      .all(),
  );
  const signed = byPair(
    db
      .select({
        userId: signOffs.userId,
        lessonId: signOffs.lessonId,
        revision: revisions.n,
        level: signOffs.level,
        shownOn: signOffs.shownOn,
      })
      .from(signOffs)
      .innerJoin(revisions, eq(revisions.id, signOffs.revisionId))
      .leftJoin(signOffRevocations, eq(signOffRevocations.signOffId, signOffs.id))
      .where(
        and(
          eq(signOffs.shopId, shopId),
          isNull(signOffRevocations.id),
          inArray(signOffs.userId, userIds),
          inArray(signOffs.lessonId, lessonIds),
        ),
      )
      .all(),
  );
  const changes = changedAt(scope, lessonIds);

  for (const lesson of published) {
    const clips = JSON.parse(lesson.clips) as SnapshotClip[];
    for (const userId of userIds) {
      const key = `${userId}:${lesson.id}`;
      const played: readonly Stretch[] = stretches.get(key) ?? [];
      skills.set(
        key,
        skillState({
          coverage: played.length === 0 ? 0 : coverage(played, clips),
          watchThreshold: shop.watchThreshold,
          changedAt: changes.get(lesson.id) ?? 1,
          passedAt: (passed.get(key) ?? []).map(({ n }) => n),
          signOffs: signed.get(key) ?? [],
          shownJobs: shop.shownJobs,
        }),
      );
    }
  }
  return skills;
}

import { and, eq, inArray, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, ShopId } from "#drizzle/schema/ids";
import { doubts, users } from "#drizzle/schema/index";
import type { OpenDoubt } from "./showing";

/** Every open "This looks wrong" of these lessons. */
export function openDoubts(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  lessonIds: readonly LessonId[],
): OpenDoubt[] {
  if (lessonIds.length === 0) return [];
  return scope.db
    .select({
      doubtId: doubts.id,
      markId: doubts.markId,
      stops: doubts.stops,
      by: users.name,
      reason: doubts.reason,
      at: doubts.at,
    })
    .from(doubts)
    .innerJoin(users, eq(users.id, doubts.raisedBy))
    .where(
      and(
        eq(doubts.shopId, scope.shopId),
        inArray(doubts.lessonId, [...lessonIds]),
        isNull(doubts.clearedAt),
      ),
    )
    .all();
}

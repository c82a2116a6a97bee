import { and, eq, isNotNull, isNull, sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import { allLearnerLessons, type LearnerLesson } from "~/lessons/learner-lesson.server";
import type { LessonId, ShopId } from "#drizzle/schema/ids";
import { lessons } from "#drizzle/schema/index";
import { RecentlyUsed } from "./recently-used";
import { documentsOf, type SearchDocument } from "./search-document";
import { emptyIndex, replaceDocuments, type SearchIndex } from "./search-index";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

type Held = Readonly<{ signature: string; lesson: LearnerLesson; documents: readonly SearchDocument[] }>;
type ShopIndex = Readonly<{ index: SearchIndex; lessons: Map<string, Held> }>;

/** How many shops' indexes a process keeps. */
export const MOST_SHOPS = 50;

// Kept by database as well, so that two databases in one process never share a shop's index.
const kept = new WeakMap<object, RecentlyUsed<ShopId, ShopIndex>>();

function shelf(db: Database): RecentlyUsed<ShopId, ShopIndex> {
  // A transaction is another object over the same database; its session is what they share.
  const key = (db as unknown as { session: object }).session;
  let found = kept.get(key);
  if (!found) {
    found = new RecentlyUsed(MOST_SHOPS);
    kept.set(key, found);
  }
  return found;
}

/** Whether a shop's index is in memory. */
export function isKept({ db, shopId }: InShop): boolean {
  return shelf(db).has(shopId);
}

/** What each published lesson stands at: its revision, the checks and doubts laid over it. Cheap, read at every search. */
function signatures(scope: InShop): Map<LessonId, string> {
  const rows = scope.db
    .select({
      id: lessons.id,
      signature: sql<string>`
        ${lessons.newestRevision} || '/' ||
        (select count(*) from checks c join marks m on m.id = c.mark_id where m.lesson_id = lessons.id) || '/' ||
        (select count(*) || '-' || count(d.cleared_at) from doubts d where d.lesson_id = lessons.id)`,
    })
    .from(lessons)
    .where(
      and(eq(lessons.shopId, scope.shopId), isNotNull(lessons.newestRevision), isNull(lessons.withdrawnAt)),
    )
    .all();
  return new Map(rows.map(({ id, signature }) => [id, signature]));
}

/**
 * The shop's index, built at the first search and followed lesson by lesson: a publish, a check or a doubt is seen at
 * the next search, also after a crash between the two. Of many shops those searched least recently are dropped.
 */
export function shopIndex(scope: InShop): {
  index: SearchIndex;
  lessons: ReadonlyMap<string, LearnerLesson>;
} {
  const wanted = signatures(scope);
  const shop = shelf(scope.db).use(scope.shopId, () => ({ index: emptyIndex(), lessons: new Map() }));

  for (const [id, known] of shop.lessons)
    if (!wanted.has(id as LessonId)) {
      replaceDocuments(shop.index, known.documents, []);
      shop.lessons.delete(id);
    }
  const stale = [...wanted]
    .filter(([id, signature]) => shop.lessons.get(id)?.signature !== signature)
    .map(([id]) => id);
  for (const lesson of stale.length === 0
    ? []
    : allLearnerLessons(scope, stale.length === wanted.size ? undefined : stale)) {
    const id = lesson.snapshot.lessonId;
    const documents = documentsOf(lesson);
    replaceDocuments(shop.index, shop.lessons.get(id)?.documents ?? [], documents);
    shop.lessons.set(id, { signature: wanted.get(id) ?? "", lesson, documents });
  }
  return { index: shop.index, lessons: new Map([...shop.lessons].map(([id, { lesson }]) => [id, lesson])) };
}

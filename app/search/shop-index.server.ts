import { and, eq, isNotNull, isNull, sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import { allLearnerLessons, type LearnerLesson } from "~/lessons/learner-lesson.server";
import type { LessonId, ShopId } from "#drizzle/schema/ids";
import { lessons } from "#drizzle/schema/index";
import { documentsOf } from "./search-document";
import { buildSearchIndex, replaceDocuments, type SearchIndex } from "./search-index";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

type ShopIndex = {
  index: SearchIndex;
  lessons: Map<string, { signature: string; lesson: LearnerLesson; documents: readonly string[] }>;
};

const MOST_SHOPS = 50;

// Kept by database as well, so that two databases in one process never share a shop's index.
const held = new WeakMap<object, Map<ShopId, ShopIndex>>();

function shelf(db: Database): Map<ShopId, ShopIndex> {
  // A transaction is another object over the same database; its session is what they share.
  const key = (db as unknown as { session: object }).session;
  let found = held.get(key);
  if (!found) {
    found = new Map();
    held.set(key, found);
  }
  return found;
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
  const shops = shelf(scope.db);
  const wanted = signatures(scope);
  let shop = shops.get(scope.shopId);
  if (!shop) {
    shop = { index: buildSearchIndex([]), lessons: new Map() };
    if (shops.size >= MOST_SHOPS) {
      const [oldest] = shops.keys();
      if (oldest !== undefined) shops.delete(oldest);
    }
  }
  // Last in the map is searched last.
  shops.delete(scope.shopId);
  shops.set(scope.shopId, shop);

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
    shop.lessons.set(id, {
      signature: wanted.get(id) ?? "",
      lesson,
      documents: documents.map((document) => document.id),
    });
  }
  return { index: shop.index, lessons: new Map([...shop.lessons].map(([id, { lesson }]) => [id, lesson])) };
}

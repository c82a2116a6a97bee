import { sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";

export type Moment = Readonly<{ lessonId: string; recordingId: string; startMs: number; words: string }>;

/** Words that only make every cue match. */
const SMALL =
  /^(?:the|an?|of|to|at|on|in|for|with|and|or|my|its?|is|are|be|do|does|what|which|where|how|i|you|we)$/i;

/** A query as FTS5 reads it: every word quoted, so that nothing typed is syntax; the last one may be a beginning. */
function matchOf(text: string): string | null {
  const words = (text.slice(0, 300).match(/[\p{L}\p{N}]+/gu) ?? [])
    .filter((word) => !SMALL.test(word))
    .slice(0, 12);
  if (words.length === 0) return null;
  return words.map((word, n) => `"${word}"${n === words.length - 1 ? "*" : ""}`).join(" ");
}

/** Cues of published captions with these words, best first. */
export function findMoments(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  text: string,
  limit: number,
): Moment[] {
  const match = matchOf(text);
  if (match === null) return [];
  return scope.db.all<Moment>(sql`
    select lesson_id as lessonId, recording_id as recordingId, start_ms as startMs, words
    from caption_words
    where caption_words match ${match} and shop_id = ${scope.shopId}
    order by bm25(caption_words), start_ms
    limit ${limit}`);
}

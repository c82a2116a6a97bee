import { sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";
import { CHAT } from "./trade-words";

export type Moment = Readonly<{ lessonId: string; recordingId: string; startMs: number; words: string }>;

/** A query as FTS5 reads it: every word quoted, so that nothing typed is syntax; the last one may be a beginning. */
function matchOf(text: string): string | null {
  const words = (text.slice(0, 300).match(/[\p{L}\p{N}]+/gu) ?? [])
    .filter((word) => !CHAT.has(word.toLowerCase()))
    .slice(0, 12);
  if (words.length === 0) return null;
  return words.map((word, n) => `"${word}"${n === words.length - 1 ? "*" : ""}`).join(" ");
}

/**
 * Cues of published captions with all words of a text, best first. The texts are tried in turn: "torque" is rarely said
 * aloud, so without a cue that has every word those that name the thing are found.
 */
export function findMoments(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  texts: readonly string[],
  limit: number,
): Moment[] {
  for (const text of texts) {
    const match = matchOf(text);
    if (match === null) continue;
    const found = scope.db.all<Moment>(sql`
      select lesson_id as lessonId, recording_id as recordingId, start_ms as startMs, words
      from caption_words
      where caption_words match ${match} and shop_id = ${scope.shopId}
      order by bm25(caption_words), start_ms
      limit ${limit}`);
    if (found.length > 0) return found;
  }
  return [];
}

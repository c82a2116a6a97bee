import { sql } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";
import { componentsIn } from "~/lessons/component-key";
import { searchWords } from "./search-words";
import { CHAT, SOFT_WORDS } from "./trade-words";

export type Moment = Readonly<{ lessonId: string; recordingId: string; startMs: number; words: string }>;

const quoted = (words: string) => `"${words}"`;

function wordsOf(text: string): string[] {
  return (text.slice(0, 300).match(/[\p{L}\p{N}]+/gu) ?? [])
    .filter((word) => !CHAT.has(word.toLowerCase()))
    .slice(0, 12);
}

/** A query as FTS5 reads it: every word quoted, so that nothing typed is syntax; the last one may be a beginning. */
function matchOf(text: string): string | null {
  const words = wordsOf(text);
  if (words.length === 0) return null;
  return words.map((word, n) => `${quoted(word)}${n === words.length - 1 ? "*" : ""}`).join(" ");
}

/** The same with every part by all the names that it goes by: who types "drop link" finds who says "sway bar link". */
function matchOfNames(text: string): string | null {
  const parts = componentsIn(text);
  if (parts.length === 0) return null;
  const ofNames = new Set(parts.flatMap(({ names }) => names.flatMap(searchWords)));
  const rest = wordsOf(text).filter((word) => {
    const [plain = ""] = searchWords(word);
    return !ofNames.has(plain) && !SOFT_WORDS.has(plain);
  });
  return [...parts.map(({ names }) => `(${names.map(quoted).join(" OR ")})`), ...rest.map(quoted)].join(
    " AND ",
  );
}

/**
 * Cues of published captions with all words of a text, best first. The texts are tried in turn: "torque" is rarely said
 * aloud, so without a cue that has every word those that name the thing are found, by any of its names.
 */
export function findMoments(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  texts: readonly string[],
  limit: number,
): Moment[] {
  for (const match of [...texts.map(matchOf), ...texts.map(matchOfNames)]) {
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

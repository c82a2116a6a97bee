import MiniSearch, { type Options } from "minisearch";
import type { SearchDocument } from "./search-document";
import { searchWord, searchWords } from "./search-words";

/** One object for building and searching, so that both see words alike. */
const OPTIONS: Options<SearchDocument> = {
  fields: ["component", "names", "kindWords", "detail", "chapter", "lesson", "vehicle"],
  storeFields: ["type", "lessonId", "markId", "kind", "component"],
  tokenize: searchWords,
  processTerm: searchWord,
  searchOptions: {
    boost: { component: 5, names: 3, lesson: 1.5, vehicle: 1.5, detail: 1.2, chapter: 1, kindWords: 1 },
    // Whole words first; a beginning or a slip of the finger counts for less.
    weights: { prefix: 0.4, fuzzy: 0.3 },
  },
};

export type SearchIndex = MiniSearch<SearchDocument>;

export function buildSearchIndex(documents: readonly SearchDocument[]): SearchIndex {
  const index = new MiniSearch(OPTIONS);
  index.addAll(documents);
  return index;
}

/** Puts the documents of a lesson in place of those it had. */
export function replaceDocuments(
  index: SearchIndex,
  former: readonly string[],
  documents: readonly SearchDocument[],
): void {
  index.discardAll(former.filter((id) => index.has(id)));
  index.addAll(documents);
}

export type Hit = Readonly<{
  id: string;
  type: SearchDocument["type"];
  lessonId: string;
  markId: string;
  kind: string;
  component: string;
  score: number;
}>;

/** What was found, and whether it has every word that was asked for. */
export type Found = Readonly<{ hits: readonly Hit[]; complete: boolean }>;

/** Documents that have every word, or, where none has, those that have most of them: the more words, the higher. */
export function findDocuments(index: SearchIndex, words: readonly string[]): Found {
  if (words.length === 0) return { hits: [], complete: true };
  const last = words.length - 1;
  const search = (combineWith: "AND" | "OR") =>
    index.search(words.join(" "), {
      combineWith,
      prefix: (_term, n) => n === last,
      fuzzy: (term) => (/\d/.test(term) || term.length < 3 ? false : term.length < 5 ? 1 : 2),
    }) as unknown as (Hit & { queryTerms: string[] })[];
  const all = search("AND");
  if (all.length > 0 || words.length === 1) return { hits: all, complete: true };
  // Half of the words, and never a lone one of a longer question: that would be a guess.
  const need = Math.max(2, Math.ceil(words.length / 2));
  const hits = search("OR").flatMap((hit) => {
    const has = new Set(hit.queryTerms).size;
    return has >= need ? [{ ...hit, score: hit.score * (has / words.length) ** 4 }] : [];
  });
  return { hits, complete: false };
}

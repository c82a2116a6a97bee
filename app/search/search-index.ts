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

/** Documents that have every word, or, where none has, those that have most of them. */
export function findDocuments(index: SearchIndex, words: readonly string[]): Hit[] {
  if (words.length === 0) return [];
  const last = words.length - 1;
  const search = (combineWith: "AND" | "OR") =>
    index.search(words.join(" "), {
      combineWith,
      prefix: (_term, n) => n === last,
      fuzzy: (term) => (/\d/.test(term) || term.length < 3 ? false : term.length < 8 ? 1 : 2),
    }) as unknown as Hit[];
  const all = search("AND");
  if (all.length > 0 || words.length === 1) return all;
  // Half of the words, and never a lone one of a longer question: that would be a guess.
  const need = Math.max(2, Math.ceil(words.length / 2));
  return (search("OR") as (Hit & { queryTerms: string[] })[]).filter(
    (hit) => new Set(hit.queryTerms).size >= need,
  );
}

import MiniSearch, { type Options } from "minisearch";
import type { SearchDocument } from "./search-document";
import { searchWords } from "./search-words";

/** The fields of a document and how much a word found there counts. */
const FIELDS = { component: 5, names: 3, lesson: 1.5, vehicle: 1.5, detail: 1.2, chapter: 1, kindWords: 1 };
type Field = keyof typeof FIELDS;

/** What a mark says of itself; the rest is said of the lesson or the chapter around it. */
const OWN: readonly Field[] = ["component", "names", "detail", "kindWords"];
const FIELD_NAMES = Object.keys(FIELDS) as Field[];

/** One object for building and searching, so that both see words alike. */
const OPTIONS: Options<SearchDocument> = {
  fields: FIELD_NAMES,
  storeFields: ["type", "lessonId", "markId", "around"],
  tokenize: searchWords,
  processTerm: (word) => word,
  searchOptions: {
    boost: FIELDS,
    // Whole words first; a beginning counts for less.
    weights: { prefix: 0.4, fuzzy: 0 },
  },
};

/** Documents by their words, and every word with the number of documents that have it. */
export type SearchIndex = Readonly<{ documents: MiniSearch<SearchDocument>; words: Map<string, number> }>;

const wordsOf = (document: SearchDocument) =>
  new Set(FIELD_NAMES.flatMap((field) => searchWords(document[field])));

export function emptyIndex(): SearchIndex {
  return { documents: new MiniSearch(OPTIONS), words: new Map() };
}

/** Puts the documents of a lesson in place of those it had. */
export function replaceDocuments(
  { documents, words }: SearchIndex,
  former: readonly SearchDocument[],
  next: readonly SearchDocument[],
): void {
  documents.removeAll([...former]);
  for (const word of former.flatMap((document) => [...wordsOf(document)])) {
    const left = (words.get(word) ?? 0) - 1;
    if (left > 0) words.set(word, left);
    else words.delete(word);
  }
  documents.addAll([...next]);
  for (const word of next.flatMap((document) => [...wordsOf(document)]))
    words.set(word, (words.get(word) ?? 0) + 1);
}

export type Hit = Readonly<{
  type: SearchDocument["type"];
  lessonId: string;
  markId: string;
  score: number;
}>;

/** What must be found, what only orders the finds, and the word that may still be unfinished. */
export type Wanted = Readonly<{ must: readonly string[]; may: readonly string[]; last: string | null }>;

/**
 * Documents that have every word of `must`, best first. A mark has to have them itself: a word that only its lesson
 * or chapter says counts where it names, with the rest of the query, the part that the lesson is about, and never alone.
 */
export function findDocuments({ documents }: SearchIndex, { must, may, last }: Wanted): Hit[] {
  if (must.length === 0 && may.length === 0) return [];
  const search = (words: readonly string[], combineWith: "AND" | "OR") =>
    documents.search({
      combineWith,
      queries: words.map((word) => ({ queries: [word], prefix: word === last })),
    });
  const found = must.length === 0 ? search(may, "AND") : search(must, "AND");
  const also = new Map(must.length === 0 ? [] : search(may, "OR").map(({ id, score }) => [id, score]));
  const has = (word: string, term: string) => (word === last ? term.startsWith(word) : term === word);
  return found.flatMap((hit): Hit[] => {
    const own = new Set(
      Object.entries(hit.match)
        .filter(([, fields]) => fields.some((field) => OWN.includes(field as Field)))
        .map(([term]) => term),
    );
    const around = (hit["around"] as readonly (readonly string[])[]).filter((name) =>
      name.every((part) => must.some((word) => has(word, part))),
    );
    const ofItself = must.filter((word) => [...own].some((term) => has(word, term)));
    const said = (word: string) =>
      ofItself.includes(word) || around.some((name) => name.some((part) => has(word, part)));
    const says = must.length === 0 || (ofItself.length > 0 && must.every(said));
    if (hit["type"] === "mark" && !says) return [];
    return [
      {
        type: hit["type"] as Hit["type"],
        lessonId: hit["lessonId"] as string,
        markId: hit["markId"] as string,
        score: hit.score + (also.get(hit.id) ?? 0),
      },
    ];
  });
}

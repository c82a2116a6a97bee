import { COMPONENTS } from "~/lessons/components";
import { readQuantity } from "~/quantities/parse";
import type { Quantity } from "~/quantities/quantity";
import { correctWord, splitWord } from "./correct-word";
import { plainWord, searchWord } from "./search-words";
import {
  CHAT,
  HOW_MUCH,
  INTENT_PHRASES,
  INTENT_WORDS,
  SOFT_WORDS,
  SPELLINGS,
  SURE_WORDS,
  type Intent,
} from "./trade-words";

/**
 * A query taken apart. `text` is what was typed, slips of the finger put right; `must` has to be found, `may` only
 * orders what is found, `last` is the word that may still be unfinished. `unknown`: words that the library does not
 * have at all, so that nothing in it can answer.
 */
export type Query = Readonly<{
  text: string;
  must: readonly string[];
  may: readonly string[];
  last: string | null;
  unknown: readonly string[];
  intent: Intent | null;
  /** Nothing but the intent's own kind is an answer. */
  sure: boolean;
  quantity: Quantity | null;
}>;

const LONGEST = 300;
const MOST_WORDS = 24;

/** Words of the trade, whether or not a library has them: none of these is a slip of the finger for another. */
const VOCABULARY: ReadonlySet<string> = new Set([
  ...COMPONENTS.flatMap(({ names }) => names.flatMap((name) => name.split(/[^\p{L}\p{N}]+/u)).map(plainWord)),
  ...Object.keys(SPELLINGS),
  ...Object.values(INTENT_WORDS).flat(),
]);
const VOCABULARY_COUNTS = new Map([...VOCABULARY].map((word) => [word, 1]));

const CHAT_WORDS = new Set([...CHAT].map(plainWord));

/** The longest stretch of words, from a number on, that reads as a quantity. */
function findQuantity(words: readonly string[]): { quantity: Quantity; from: number; to: number } | null {
  for (let from = 0; from < words.length; from += 1) {
    if (!/^[-−]?[\d.,½¼¾⅛⅜⅝⅞]/.test(words[from] ?? "")) continue;
    for (let to = Math.min(words.length, from + 4); to > from; to -= 1) {
      const read = readQuantity(words.slice(from, to).join(" "));
      if (read.ok) return { quantity: read.quantity, from, to };
    }
  }
  return null;
}

/** The words as they were meant: run-together ones apart, slips put right, by what the library and the trade know. */
function meant(word: string, isLast: boolean, library: ReadonlyMap<string, number>): string[] {
  const plain = plainWord(word);
  const known = (part: string) =>
    library.has(searchWord(part)) || VOCABULARY.has(part) || CHAT_WORDS.has(part);
  if (known(plain) || /\d/.test(plain)) return [plain];
  if (isLast && [...library.keys(), ...VOCABULARY].some((term) => term.startsWith(plain))) return [plain];
  const parts = splitWord(plain, (part) => library.has(searchWord(part)) || VOCABULARY.has(part));
  if (parts) return parts;
  return [correctWord(plain, library) ?? correctWord(plain, VOCABULARY_COUNTS) ?? plain];
}

function intentOf(
  text: string,
  words: readonly string[],
  last: string | null,
  quantity: Quantity | null,
): Pick<Query, "intent" | "sure"> {
  for (const [phrase, intent] of INTENT_PHRASES)
    if (phrase.test(text)) return { intent, sure: intent === "torque" };
  // "drain plug tor": the word is still being typed.
  const says = (list: readonly string[] | undefined) =>
    words.some(
      (word) =>
        list?.includes(word) ||
        (word === last && word.length > 2 && list?.some((full) => full.startsWith(word))),
    );
  for (const intent of Object.keys(INTENT_WORDS) as Intent[])
    if (says(INTENT_WORDS[intent])) return { intent, sure: says(SURE_WORDS[intent]) };
  if (quantity?.dimension === "torque") return { intent: "torque", sure: false };
  return { intent: HOW_MUCH.test(text) ? "capacity" : null, sure: false };
}

/** Takes a query apart by the words that the library has; never throws, whatever is typed. */
export function readQuery(typedText: string, library: ReadonlyMap<string, number> = new Map()): Query {
  const typed = typedText
    .slice(0, LONGEST)
    .replace(/\p{C}/gu, " ")
    .split(/\s+/)
    .filter((word) => word !== "")
    .slice(0, MOST_WORDS);
  const found = findQuantity(typed);
  const rest = found ? typed.filter((_, n) => n < found.from || n >= found.to) : typed;
  const raw = rest.flatMap((word) => word.replace(/[’']s\b/g, "").match(/[\p{L}\p{N}]+(?:[.,]\d+)?/gu) ?? []);
  const unfinished = found && found.to >= typed.length ? -1 : raw.length - 1;
  const words = raw.flatMap((word, n) => {
    const parts = meant(word, n === unfinished, library);
    return parts.map((part, m) => ({
      plain: part,
      word: searchWord(part),
      last: n === unfinished && m === parts.length - 1,
    }));
  });
  const asked = words.filter(({ plain }) => !CHAT_WORDS.has(plain));
  const last = asked.find((word) => word.last)?.word ?? null;
  const text = words.map(({ plain }) => plain).join(" ");
  const all = [...new Set(asked.map(({ word }) => word))];
  const isSoft = (word: string) =>
    SOFT_WORDS.has(word) ||
    (word === last &&
      word.length > 2 &&
      !library.has(word) &&
      [...SOFT_WORDS].some((soft) => soft.startsWith(word)));
  const must = all.filter((word) => !isSoft(word));
  const isKnown = (word: string) =>
    library.has(word) || (word === last && [...library.keys()].some((term) => term.startsWith(word)));
  return {
    text,
    // Where nothing but the intent was said ("torque"), its words are looked for after all.
    must: must.length > 0 || found ? must : all,
    may: must.length > 0 || found ? all.filter(isSoft) : [],
    last,
    unknown: must.filter((word) => !isKnown(word)),
    quantity: found?.quantity ?? null,
    ...intentOf(`${typedText.slice(0, LONGEST)} ${text}`, all, last, found?.quantity ?? null),
  };
}

import { readQuantity } from "~/quantities/parse";
import type { Quantity } from "~/quantities/quantity";
import { searchWords } from "./search-words";

/** What a person wants to know, as far as the words tell. */
export type Intent =
  "torque" | "size" | "measure" | "pressure" | "capacity" | "part" | "caution" | "supply" | "how";

/** A query taken apart. `words` are what must be found; the words of the intent only order the answers. */
export type Query = Readonly<{ words: readonly string[]; intent: Intent | null; quantity: Quantity | null }>;

/** Words that say nothing about what is looked for. Common usage, no source. */
const SMALL = new Set(
  "a an the of to at on in for with from and or my your its it is are was be do does did i we you need needs should must can this that what whats which where when how much many tell me please value spec specification correct right use used fit fits take takes go goes get there have has".split(
    " ",
  ),
);

const INTENT_WORDS: Readonly<Record<Exclude<Intent, "how">, readonly string[]>> = {
  torque: ["torque", "tight", "tighten", "tightening", "tightness", "nm", "ftlb", "pull", "click"],
  size: ["size", "socket", "wrench", "tool", "hex", "key", "bit", "driver"],
  measure: [
    "gap",
    "clearance",
    "thickness",
    "diameter",
    "wear",
    "limit",
    "minimum",
    "maximum",
    "min",
    "max",
    "play",
    "depth",
    "length",
    "runout",
    "resistance",
    "voltage",
    "temperature",
  ],
  pressure: ["pressure", "psi", "kpa"],
  capacity: ["capacity", "quart", "liter", "fill", "volume", "gallon"],
  part: ["part", "number", "replace", "new"],
  caution: ["caution", "danger", "warning", "careful", "hazard", "safety", "risk"],
  supply: ["grease", "lubricant", "locker", "sealant", "cleaner", "fluid"],
};

/** Words of an intent that are no component themselves, so they need not be found in the answer. */
const ONLY_INTENT = new Set([
  "torque",
  "tight",
  "tighten",
  "tightening",
  "tightness",
  "nm",
  "ftlb",
  "size",
  "tool",
  "minimum",
  "maximum",
  "min",
  "max",
  "limit",
  "capacity",
  "part",
  "number",
  "caution",
  "danger",
  "warning",
  "careful",
  "hazard",
  "psi",
  "kpa",
]);

const LONGEST = 300;

/** The longest stretch of words, from a number on, that reads as a quantity. */
function findQuantity(words: readonly string[]): { quantity: Quantity; from: number; to: number } | null {
  for (let from = 0; from < words.length; from += 1) {
    if (!/^[\d.,½¼¾⅛⅜⅝⅞]/.test(words[from] ?? "")) continue;
    for (let to = Math.min(words.length, from + 4); to > from; to -= 1) {
      const read = readQuantity(words.slice(from, to).join(" "));
      if (read.ok) return { quantity: read.quantity, from, to };
    }
  }
  return null;
}

/** Takes a query apart; never throws, whatever is typed. */
export function readQuery(text: string): Query {
  const typed = text
    .slice(0, LONGEST)
    .replace(/\p{C}/gu, " ")
    .split(/\s+/)
    .filter((word) => word !== "")
    .slice(0, 24);
  const found = findQuantity(typed);
  const rest = found ? typed.filter((_, n) => n < found.from || n >= found.to) : typed;
  const asksHow = /^how\b(?! (?:much|many|tight|thick|long|deep|far)\b)/i.test(text.trim());
  const words = rest
    .flatMap((word) => word.match(/[\p{L}\p{N}]+(?:[.,]\d+)?/gu) ?? [])
    .flatMap((raw) => searchWords(raw).map((word) => ({ raw: raw.toLowerCase(), word })))
    .filter(({ raw, word }) => !SMALL.has(raw) && !SMALL.has(word));
  const intents = Object.entries(INTENT_WORDS) as [Exclude<Intent, "how">, readonly string[]][];
  let intent: Intent | null = null;
  // In this order: who asks for the torque of a socket head bolt wants the torque.
  for (const [name, list] of intents)
    if (intent === null && words.some(({ word }) => list.includes(word))) intent = name;
  if (/\bhow tight\b/i.test(text)) intent = "torque";
  if (/\bhow (?:much|many)\b/i.test(text) && intent === null) intent = "capacity";
  if (intent === null && found?.quantity.dimension === "torque") intent = "torque";
  if (intent === null && asksHow) intent = "how";
  const must = words.map(({ word }) => word).filter((word) => !ONLY_INTENT.has(word));
  return {
    // Where nothing but the intent was said ("torque"), its words are looked for after all.
    words: must.length > 0 || found ? [...new Set(must)] : [...new Set(words.map(({ word }) => word))],
    intent,
    quantity: found?.quantity ?? null,
  };
}

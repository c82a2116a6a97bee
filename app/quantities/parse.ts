import { normalText, LONGEST } from "./normal-text";
import type { Quantity } from "./quantity";
import { anyPhraseAt } from "./read-phrase";
import { readValues } from "./read-values";
import { refuse, type Refusal } from "./refusal";
import {
  bareUnitOf,
  scanQuantityAt,
  settleQuantity,
  withoutUnit,
  type Reading,
  type ReadOptions,
} from "./scan-quantity";
import { isAmbiguous, readUnitAt } from "./unit-spellings";
import { isUnit, type Unit } from "./units";

export type { Refusal, RefusalReason } from "./refusal";
export type { ReadOptions } from "./scan-quantity";
export { readThread, type Thread } from "./read-thread";
export { readValues } from "./read-values";

const EMPTY = "Nothing typed. Type a number and its unit, like 88 N·m.";
const LONG = `That is over ${LONGEST} characters. Type the value alone.`;

/** Starts reading a text, or refuses it for its length. */
export function startReading(text: string, options: ReadOptions): Reading | Refusal {
  if (text.length > LONGEST) return refuse("too-long", LONGEST, LONG);
  if (text.trim() === "") return refuse("empty", 0, EMPTY);
  return { source: text, s: normalText(text), options };
}

function skip(s: string, i: number): number {
  let next = i;
  while (s[next] === " ") next++;
  return next;
}

/**
 * Reads one value with its unit, as technicians type it ("65 ft-lb", "1-5/16\"", "0,8 mm", "½ turn").
 * Ranges, limits and stages are more than one value: see `readValues`. Never throws.
 */
export function readQuantity(
  text: string,
  options: ReadOptions = {},
): { ok: true; quantity: Quantity } | Refusal {
  const r = startReading(text, options);
  if ("ok" in r) return r;
  const read = readOne(r);
  if (read.ok || (read.reason !== "no-number" && read.reason !== "no-unit" && read.reason !== "trailing"))
    return read;
  const several = readValues(text, options);
  if (!several.ok || several.values.every(({ quantity }) => quantity === null)) return read;
  return refuse(
    "trailing",
    read.at,
    `“${text.trim().slice(0, 40)}” is a limit, a range or several values. Type one value alone.`,
  );
}

function readOne(r: Reading): { ok: true; quantity: Quantity } | Refusal {
  const text = r.source;
  let start = skip(r.s, 0);
  const filler = anyPhraseAt(r.s, start, [
    "approximately",
    "approx.",
    "approx",
    "about",
    "ca.",
    "ca",
    "~",
    "=",
  ]);
  if (filler >= 0) start = skip(r.s, filler);
  const scanned = scanQuantityAt(r, start);
  if (!scanned)
    return refuse("no-number", start, "There is no number here. Type a number and its unit, like 88 N·m.");
  if (!scanned.ok) return scanned;
  const unit = scanned.unit ?? bareUnitOf(r, scanned);
  let end = scanned.end;
  if (!unit) return withoutUnit(r, scanned);
  if (r.s[end] === ".") end++;
  end = skip(r.s, end);
  if (end < r.s.length) {
    if (!scanned.unit) return withoutUnit(r, scanned);
    return refuse(
      "trailing",
      end,
      `${text.slice(scanned.start, scanned.end).trim()} was read, but not “${text.slice(end, end + 24).trim()}”. Type one value alone.`,
    );
  }
  const quantity = settleQuantity(r, scanned, unit);
  return "ok" in quantity ? quantity : { ok: true, quantity };
}

/** Reads a unit however it is spelled ("ft-lb", "Nm", "US qt"). */
export function readUnit(
  text: string,
  options: Pick<ReadOptions, "country"> = {},
): { ok: true; unit: Unit } | Refusal {
  if (isUnit(text)) return { ok: true, unit: text };
  const r = startReading(text, options);
  if ("ok" in r) return refuse(r.reason, 0, "Name a unit, like N·m.");
  const start = skip(r.s, 0);
  if (r.s[start] === "'" && skip(r.s, start + 1) === r.s.length) return { ok: true, unit: "ft" };
  const found = readUnitAt(r.s, start);
  let end = found ? found.end : start;
  if (r.s[end] === ".") end++;
  if (!found || skip(r.s, end) < r.s.length)
    return refuse("unknown-unit", start, `“${text.trim().slice(0, 24)}” is not a unit known here.`);
  const { meaning } = found;
  if (!isAmbiguous(meaning)) return { ok: true, unit: meaning };
  if (meaning.us && options.country?.toUpperCase() === "US") return { ok: true, unit: meaning.us };
  return refuse("ambiguous", start, meaning.ask);
}

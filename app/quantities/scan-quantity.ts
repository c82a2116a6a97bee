import { over, plus, ratio, times, type Rational } from "./exact";
import { quantityOf, type Country, type Quantity } from "./quantity";
import { readNumberAt, type NumberFound } from "./read-number";
import { wordedTurnAt } from "./read-phrase";
import { refuse, type Refusal } from "./refusal";
import { dimensionOf, type Dimension, type Unit } from "./units";
import {
  isAmbiguous,
  nameOf,
  readUnitAt,
  unitQuestion,
  wrongDimension,
  type UnitFound,
} from "./unit-spellings";

/** What the reader is told about the place a text was typed in. */
export type ReadOptions = Readonly<{
  /** The dimension asked for; another one is refused. */
  dimension?: Dimension;
  /** ISO 3166 code of the shop's country: "US" decides which pint, quart and gallon are meant. */
  country?: Country;
  /** The unit of a number typed without one. Fractions of an inch stay inches. */
  bareUnit?: Unit;
}>;

/** The text being read: as typed, in normal form, and how it is to be read. */
export type Reading = Readonly<{
  source: string;
  s: string;
  options: ReadOptions;
  also?: readonly Dimension[];
}>;

/** A number with or without its unit, found in the text; not yet a quantity. */
export type Scanned = Readonly<{
  ok: true;
  number: Rational;
  places: number;
  significant: number;
  negative: boolean;
  fraction: boolean;
  leadingPoint: boolean;
  improper: boolean;
  unit: Unit | null;
  start: number;
  end: number;
}>;

// A vacuum, a toe-out, a camber and a voltage can be below nought; a torque and a volume cannot.
const SIGNED: ReadonlySet<Dimension> = new Set([
  "temperature",
  "temperature-difference",
  "angle",
  "length",
  "pressure",
  "voltage",
  "current",
  "ratio",
]);

function skip(s: string, i: number): number {
  let next = i;
  while (s[next] === " ") next++;
  return next;
}

function settleUnit(r: Reading, found: UnitFound, numberStart: number): Unit | Refusal {
  const { dimension: wanted, country } = r.options;
  const typed = r.source.slice(numberStart, found.end).trim();
  const { meaning } = found;
  if (isAmbiguous(meaning)) {
    if (meaning.energy) return refuse("wrong-dimension", found.start, meaning.ask);
    if (meaning.us && country?.toUpperCase() === "US")
      return checkDimension(r, meaning.us, typed, found.start);
    if (meaning.us && wanted && wanted !== "volume")
      return refuse("wrong-dimension", found.start, wrongDimension(typed, meaning.us, "volume", wanted));
    return refuse("ambiguous", found.start, `${typed}: ${meaning.ask}`);
  }
  return checkDimension(r, meaning, typed, found.start);
}

function checkDimension(r: Reading, unit: Unit, typed: string, at: number): Unit | Refusal {
  const wanted = r.options.dimension;
  const is = dimensionOf(unit);
  if (!wanted || is === wanted || r.also?.includes(is)) return unit;
  if (wanted === "temperature-difference") {
    if (unit === "°C") return "Δ°C";
    if (unit === "°F") return "Δ°F";
    if (unit === "K") return "ΔK";
  }
  if (wanted === "force" && unit === "lb") return "lbf";
  if (wanted === "force" && unit === "kg") return "kgf";
  if (wanted === "angle" && unit === "min") return "arcmin";
  if ((wanted === "temperature" || wanted === "temperature-difference") && unit === "deg")
    return refuse("no-unit", at, `${typed}: °C or °F?`);
  if ((wanted === "pressure" || wanted === "stress") && (is === "pressure" || is === "stress")) return unit;
  return refuse("wrong-dimension", at, wrongDimension(typed, unit, is, wanted));
}

/** Degrees and minutes (1°30'), feet and inches (5' 6"): the second number behind the first, if there is one. */
function secondPart(
  r: Reading,
  from: number,
  limit: number,
  mark: (s: string, i: number) => number,
): { found: NumberFound; end: number } | null {
  const start = skip(r.s, from);
  const found = readNumberAt(r.s, start);
  if (!found || !found.ok || Number(found.number.n) / Number(found.number.d) >= limit) return null;
  const end = mark(r.s, skip(r.s, found.end));
  return end < 0 ? null : { found, end };
}

const minuteMark = (s: string, i: number): number => {
  if (s[i] === "'" && s[i + 1] !== "'") return i + 1;
  const unit = readUnitAt(s, i);
  return unit && unit.start === i && (unit.meaning === "min" || unit.meaning === "arcmin") ? unit.end : -1;
};
const secondMark = (s: string, i: number): number =>
  s[i] === '"' ? i + 1 : s[i] === "'" && s[i + 1] === "'" ? i + 2 : -1;
const inchMark = (s: string, i: number): number => {
  const unit = readUnitAt(s, i);
  return unit && unit.start === i && unit.meaning === "in" ? unit.end : -1;
};

const SIXTY = ratio(60n, 1n);
const TWELVE = ratio(12n, 1n);

/**
 * Finds a number and its unit at i of the normal text. Null when no number starts there;
 * `unit` is null when the number stands alone.
 */
export function scanQuantityAt(r: Reading, i: number): Scanned | Refusal | null {
  const { s } = r;
  const start = skip(s, i);
  let pos = start;
  // "Δ18 °F" is a difference of 18 °F.
  const delta = s[pos] === "Δ";
  if (delta) pos = skip(s, pos + 1);

  const worded = wordedTurnAt(s, pos);
  if (worded)
    return {
      ok: true,
      number: ratio(BigInt(worded.n), BigInt(worded.d)),
      places: worded.d === 1 ? 0 : 2,
      significant: 2,
      negative: false,
      fraction: worded.d !== 1,
      leadingPoint: false,
      improper: false,
      unit: "turn",
      start,
      end: worded.end,
    };

  const signed = s[pos] === "-" || s[pos] === "+";
  const negative = s[pos] === "-";
  if (signed) pos = skip(s, pos + 1);
  const found = readNumberAt(s, pos);
  if (!found || !found.ok) return found;
  const sign = negative ? ratio(-1n, 1n) : ratio(1n, 1n);
  const make = (
    number: Rational,
    unit: Unit | null,
    end: number,
    figures: { places: number; significant: number; fraction: boolean },
  ): Scanned => ({
    ok: true,
    number: times(sign, number),
    places: figures.places,
    significant: figures.significant,
    negative,
    fraction: figures.fraction,
    leadingPoint: found.leadingPoint,
    improper:
      found.fraction &&
      found.number.n >= found.number.d &&
      !/[ \-½⅓⅔¼¾⅛⅜⅝⅞⅕-⅚⅒]/.test(s.slice(found.start, found.end)),
    unit,
    start,
    end,
  });

  const behind = skip(s, found.end);
  if (s[behind] === "'" && s[behind + 1] !== "'") {
    if (r.options.dimension === "angle") return make(found.number, "arcmin", behind + 1, found);
    const inches = found.whole ? secondPart(r, behind + 1, 12, inchMark) : null;
    if (inches)
      return make(plus(times(found.number, TWELVE), inches.found.number), "in", inches.end, inches.found);
    const feet = checkDimension(r, "ft", r.source.slice(start, behind + 1), behind);
    return typeof feet === "string" ? make(found.number, feet, behind + 1, found) : feet;
  }

  // "5/8-in" and "10-mm": a hyphen may hold number and unit together.
  const hyphen = s[found.end] === "-" && /[A-Za-z]/.test(s[found.end + 1] ?? "");
  const word = readUnitAt(s, hyphen ? found.end + 1 : found.end);
  if (!word) return make(found.number, null, found.end, found);
  // "22.0 mm min" and "22 min" of a length: there "min" is a limit, not minutes.
  if (word.meaning === "min" && r.options.dimension && !["time", "angle"].includes(r.options.dimension))
    return make(found.number, null, found.end, found);
  const unit = settleUnit(r, word, start);
  if (typeof unit !== "string") return unit;

  if (unit === "deg" && found.whole) {
    const minutes = secondPart(r, word.end, 60, minuteMark);
    if (minutes) {
      const seconds = minutes.found.whole ? secondPart(r, minutes.end, 60, secondMark) : null;
      const whole = plus(times(found.number, SIXTY), minutes.found.number);
      if (!seconds) return make(whole, "arcmin", minutes.end, minutes.found);
      // One second is a sixtieth of a minute: two decimals of a minute stand for it.
      return make(plus(whole, over(seconds.found.number, SIXTY)), "arcmin", seconds.end, {
        places: 2,
        significant: minutes.found.significant + 2,
        fraction: false,
      });
    }
  }
  if (unit === "ft" && found.whole) {
    const inches = secondPart(r, word.end, 12, inchMark);
    if (inches)
      return make(plus(times(found.number, TWELVE), inches.found.number), "in", inches.end, inches.found);
  }
  const difference: Partial<Record<Unit, Unit>> = delta ? { "°C": "Δ°C", "°F": "Δ°F", K: "ΔK" } : {};
  return make(found.number, difference[unit] ?? unit, word.end, found);
}

/** The unit that a number without one has by custom: fractions and `.625` are inches. Null when it must be asked. */
export function bareUnitOf(r: Reading, scanned: Scanned): Unit | null {
  const { dimension, bareUnit } = r.options;
  const inchesFit = dimension === undefined || dimension === "length";
  if (scanned.fraction && inchesFit && (!bareUnit || dimensionOf(bareUnit) === "length")) return "in";
  if (bareUnit) return bareUnit;
  return scanned.leadingPoint && inchesFit ? "in" : null;
}

/** The refusal for a number that stands without a unit, or before a word that is none. */
export function withoutUnit(r: Reading, scanned: Scanned): Refusal {
  const typed = r.source.slice(scanned.start, scanned.end).trim();
  const question = unitQuestion(r.options.dimension ?? "torque");
  const next = skip(r.s, scanned.end);
  const word = /^[^\s\d,;()+]{1,24}/.exec(r.source.slice(next, next + 24))?.[0];
  if (word && /[^.-]/.test(word))
    return refuse("unknown-unit", next, `“${word}” is not a unit known here. ${typed}: ${question}`);
  return refuse("no-unit", scanned.end, `${typed} has no unit: ${question}`);
}

/** Makes the quantity of what was scanned, in the given unit; refuses what cannot be. */
export function settleQuantity(r: Reading, scanned: Scanned, unit: Unit, text?: string): Quantity | Refusal {
  const dimension = dimensionOf(unit);
  const typed = text ?? r.source.slice(scanned.start, scanned.end).trim();
  if (scanned.negative && !SIGNED.has(dimension)) {
    const name = nameOf(dimension);
    return refuse("negative", scanned.start, `${name[0]?.toUpperCase()}${name.slice(1)} cannot be negative.`);
  }
  if (scanned.improper && dimension !== "length" && dimension !== "angle")
    return refuse(
      "bad-number",
      scanned.start,
      `${typed} is written as a fraction. For a range write it with a dash.`,
    );
  const quantity = quantityOf(typed, scanned.number, unit, scanned.places, scanned.significant);
  if (dimension === "temperature" && quantity.si < 0)
    return refuse("bad-number", scanned.start, `${typed} is below absolute zero.`);
  return quantity;
}

import { SAME_SIZE_MM, standIn, type StandIn } from "~/fasteners/hex-fit";
import { convertNumber } from "~/quantities/convert";
import { exactOf } from "~/quantities/exact";
import { isFraction, lastPlace, quantityOf, type Quantity } from "~/quantities/quantity";
import { sameKind, unitRatio, type Dimension, type Unit } from "~/quantities/units";
import { writtenStep, type AskedNumber, type AskedPart, type AskedValue } from "./asked";

/** How one number of an answer was graded, and what the feedback needs to know. */
export type NumberGrade = Readonly<
  | { outcome: "right" | "right-other-unit"; standIn: StandIn | null }
  | { outcome: "within-tolerance" | "superseded" | "other" }
  | { outcome: "other-fastener"; component: string }
  | { outcome: "wrong-unit"; factor: number | null; tooMuch: boolean; meant: Unit }
>;

/**
 * The shop's quiz tolerances, used where a mark gives none of its own: parts of the value for torque, pressure and
 * volume, degrees for angles, kelvin for temperatures. They are never shown as a specification.
 */
export type QuizTolerance = Readonly<{
  torque: number;
  pressure: number;
  volume: number;
  angleDeg: number;
  temperatureK: number;
}>;

/** What applies when the shop has set nothing. */
export const QUIZ_TOLERANCE: QuizTolerance = {
  torque: 0.04,
  pressure: 0.03,
  volume: 0.02,
  angleDeg: 5,
  temperatureK: 2,
};

/** Half a per cent of a torque, a pressure or a volume is the same value: no wrench or gauge tells them apart. */
const SAME = 0.005;
const SAME_DIMENSIONS: ReadonlySet<Dimension> = new Set(["torque", "pressure", "stress", "volume"]);
/** Dimensions for which the grading rule names a tolerance. */
const TOLERATED: ReadonlySet<Dimension> = new Set([
  "torque",
  "pressure",
  "stress",
  "volume",
  "angle",
  "temperature",
  "temperature-difference",
  "length",
]);
const ROUGHLY = 1e-9;
/** Below this an angle that is no tightening angle is an alignment setting, where 5° is no tolerance. */
const TIGHTENING_DEG = 30;

/** Units that people mix up; a bare number right in one of these is "right number, wrong unit". */
const MIXED_UP: Partial<Record<Dimension, readonly Unit[]>> = {
  torque: ["N·m", "lbf·ft", "lbf·in", "kgf·m", "kgf·cm"],
  length: ["mm", "in", "thou", "cm"],
  pressure: ["kPa", "psi", "bar"],
  volume: ["L", "US qt", "US pt", "US gal", "imp qt", "imp pt", "imp gal"],
  temperature: ["°C", "°F"],
  "temperature-difference": ["Δ°C", "Δ°F"],
  mass: ["g", "kg", "oz", "lb"],
  force: ["N", "kN", "lbf", "kgf"],
  angle: ["deg", "turn", "arcmin"],
  voltage: ["V", "mV"],
  current: ["A", "mA"],
  resistance: ["Ω", "kΩ", "MΩ"],
  time: ["s", "min", "h"],
  speed: ["km/h", "mph"],
};

type Band = Readonly<{ below: number; above: number }>;

const noLimit = (sense: AskedNumber["sense"]): boolean => !["min", "max", "limit"].includes(sense);

/** The tolerance around an asked number, in the unit written. */
function bandOf(number: AskedNumber, shop: QuizTolerance, tightening: boolean): Band {
  const { written, own, sense } = number;
  const limit = !noLimit(sense);
  if (limit && written.dimension === "length") return { below: 0, above: 0 };
  const band = own ?? defaultBand(number, shop, tightening);
  if (sense === "limit") return { below: 0, above: 0 };
  if (sense === "min") return { below: 0, above: band.above };
  if (sense === "max") return { below: band.below, above: 0 };
  return band;
}

function both(width: number): Band {
  return { below: width, above: width };
}

function defaultBand(number: AskedNumber, shop: QuizTolerance, tightening: boolean): Band {
  const { written } = number;
  const size = Math.abs(written.value);
  const halfPlace = isFraction(written) ? 0 : writtenStep(number) / 2;
  switch (written.dimension) {
    case "torque":
      return both(shop.torque * size);
    case "pressure":
    case "stress":
      return both(shop.pressure * size);
    case "volume":
      return both(shop.volume * size);
    case "angle":
      return tightening || Math.abs(written.si) >= TIGHTENING_DEG
        ? both(shop.angleDeg * unitRatio("deg", written.unit))
        : both(halfPlace);
    case "temperature":
      return both(shop.temperatureK * unitRatio("K", written.unit));
    case "temperature-difference":
      return both(shop.temperatureK * unitRatio("ΔK", written.unit));
    case "length":
      // A fraction is exact; this is only what a hundredth of a millimetre rounds to.
      return isFraction(written) ? both(SAME_SIZE_MM * unitRatio("mm", written.unit)) : both(halfPlace);
    default:
      return both(halfPlace);
  }
}

/** Typed minus asked in the unit written, and how far apart two equal numbers may come out. */
function distance(number: AskedNumber, typed: Quantity): { off: number; slack: number } {
  const { written } = number;
  const there = convertNumber(typed.value, typed.unit, written.unit);
  return { off: there - written.value, slack: ROUGHLY * Math.max(Math.abs(written.value), Math.abs(there)) };
}

function within(band: Band, off: number, slack: number): boolean {
  return off >= -band.below - slack && off <= band.above + slack;
}

/** Whether the number typed is the asked one: equal, rightly rounded, or within half a per cent. */
function isRight(number: AskedNumber, typed: Quantity, shop: QuizTolerance, tightening: boolean): boolean {
  const { written, sense, own } = number;
  if (!sameKind(written.unit, typed.unit)) return false;
  const { off, slack } = distance(number, typed);
  if (Math.abs(off) <= slack) return true;

  if (SAME_DIMENSIONS.has(written.dimension) && Math.abs(off) <= SAME * Math.abs(written.value) + slack)
    return true;

  const step = lastPlace(typed) * unitRatio(typed.unit, written.unit);
  const digits = typed.significant >= 2 || written.significant < 2;
  if (step === 0 || !digits) return false;
  const half = Math.abs(off) <= step / 2 + slack;
  if (noLimit(sense)) {
    const band = bandOf({ ...number, sense: "value" }, shop, tightening);
    // A mass or a voltage has no shop tolerance; in another unit half a per cent is left for rounding it.
    const converted = !own && !TOLERATED.has(written.dimension) && typed.unit !== written.unit;
    const rounding = converted && Math.abs(off) <= SAME * Math.abs(written.value) + slack;
    return half && (rounding || within(band, off, slack));
  }
  // A limit whose side is not written may be rounded only where it makes no difference.
  if (sense === "limit")
    return half && typed.unit !== written.unit && step <= 0.1 * writtenStep(number) + slack;
  const keepsLimit = sense === "min" ? off >= -slack : off <= slack;
  if (!keepsLimit) return false;
  // A limit in another unit is rounded away from danger, which can be a whole place: min 22.0 mm is 0.867 in.
  const roundedAway =
    typed.unit !== written.unit && Math.abs(off) < step - slack && step <= 1.5 * writtenStep(number) + slack;
  if (written.dimension === "length") return half || roundedAway;
  return (half || roundedAway) && within(bandOf(number, shop, tightening), off, slack);
}

function toolMatch(number: AskedNumber, typed: Quantity): { right: boolean; standIn: StandIn | null } {
  const [tool, hex] = [
    convertNumber(typed.value, typed.unit, "mm"),
    convertNumber(number.written.value, number.written.unit, "mm"),
  ];
  if (Math.abs(tool - hex) <= SAME_SIZE_MM + ROUGHLY) return { right: true, standIn: null };
  const row = standIn(tool, hex);
  return { right: row !== null, standIn: row };
}

/** Inches and thousandths of an inch count as one unit. */
function sameUnit(a: Unit, b: Unit): boolean {
  return a === b || (["in", "thou"].includes(a) && ["in", "thou"].includes(b));
}

/** The same figures in another unit. */
function figuresIn(typed: Quantity, unit: Unit): Quantity {
  return quantityOf(typed.text, exactOf(typed.value), unit, typed.places, typed.significant);
}

const ORDER = [
  "right",
  "right-other-unit",
  "within-tolerance",
  "missing-angle",
  "wrong-unit",
  "superseded",
  "other-fastener",
  "other",
] as const;

/** Where an outcome stands from best to worst. */
export function badness(outcome: (typeof ORDER)[number]): number {
  return ORDER.indexOf(outcome);
}

/** Grades one typed number against one asked number; see "The grading rule". */
export function gradeNumber(
  number: AskedNumber,
  typed: Quantity,
  asked: AskedValue,
  shop: QuizTolerance,
): NumberGrade {
  const { written } = number;
  if (!sameKind(written.unit, typed.unit)) return { outcome: "other" };
  const unit = sameUnit(written.unit, typed.unit) ? "right" : "right-other-unit";
  const matches = (candidate: AskedNumber, quantity: Quantity): boolean =>
    asked.tool
      ? sameKind(candidate.written.unit, quantity.unit) && toolMatch(candidate, quantity).right
      : isRight(candidate, quantity, shop, asked.tightening);

  if (asked.tool) {
    const match = toolMatch(number, typed);
    if (match.right) return { outcome: unit, standIn: match.standIn };
  } else if (isRight(number, typed, shop, asked.tightening)) return { outcome: unit, standIn: null };

  if (asked.superseded.some((old) => matches(old, typed))) return { outcome: "superseded" };
  const other = asked.others.find((row) => matches(row.number, typed));
  if (other) return { outcome: "other-fastener", component: other.component };
  if (asked.tool) return { outcome: "other" };

  const { off, slack } = distance(number, typed);
  // Outside a range the shop's per cent do not count: its ends are a minimum and a maximum already.
  const outside = (number.sense === "low" && off < -slack) || (number.sense === "high" && off > slack);
  const lenient = number.own !== null || !outside || written.dimension === "length";
  const band = bandOf(number, shop, asked.tightening);
  if (lenient && within(band, off, slack)) return { outcome: "within-tolerance" };

  for (const meant of [written.unit, ...(MIXED_UP[written.dimension] ?? [])]) {
    if (meant === typed.unit) continue;
    const factor = unitRatio(typed.unit, meant);
    if (Math.abs(factor - 1) < ROUGHLY && written.dimension !== "temperature") continue;
    if (!matches(number, figuresIn(typed, meant))) continue;
    const noFactor = written.dimension === "temperature";
    return {
      outcome: "wrong-unit",
      factor: noFactor ? null : Math.max(factor, 1 / factor),
      tooMuch: off > 0,
      meant,
    };
  }
  return { outcome: "other" };
}

/** Grades one typed number for a range: inside it, or against the nearer end. */
export function gradeInRange(
  part: Extract<AskedPart, { kind: "range" }>,
  typed: Quantity,
  asked: AskedValue,
  shop: QuizTolerance,
): NumberGrade {
  if (!sameKind(part.low.written.unit, typed.unit)) return { outcome: "other" };
  const low = distance(part.low, typed);
  const high = distance(part.high, typed);
  if (low.off >= -low.slack && high.off <= high.slack) {
    const unit = sameUnit(part.low.written.unit, typed.unit) ? "right" : "right-other-unit";
    return { outcome: unit, standIn: null };
  }
  const nearer = Math.abs(low.off) <= Math.abs(high.off) ? part.low : part.high;
  const grade = gradeNumber(nearer, typed, asked, shop);
  if (grade.outcome !== "other") return grade;
  // A number from the middle of the range in the wrong unit: right in the unit it was meant in.
  const { written } = part.low;
  for (const meant of [written.unit, ...(MIXED_UP[written.dimension] ?? [])]) {
    if (meant === typed.unit || asked.tool) continue;
    const figures = figuresIn(typed, meant);
    const [a, b] = [distance(part.low, figures), distance(part.high, figures)];
    if (a.off < -a.slack || b.off > b.slack) continue;
    const factor = unitRatio(typed.unit, meant);
    return {
      outcome: "wrong-unit",
      factor: written.dimension === "temperature" ? null : Math.max(factor, 1 / factor),
      tooMuch: high.off > 0,
      meant,
    };
  }
  return grade;
}

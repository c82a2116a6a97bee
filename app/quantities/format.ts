import { compare, exactOf, minus, over, plus, ratio, times, type Rational } from "./exact";
import { convertExact } from "./convert";
import { isFraction, type Quantity } from "./quantity";
import { placesIn, writeRounded, type Sense } from "./round";
import { unitRatio, type Unit } from "./units";
import type { TypedValue } from "./value";

/** Which units a person wants to see first. */
export type UnitPreference = "metric" | "inch";

const THIN_SPACE = "\u2009";

/** A unit as shown: a difference of temperature carries no Δ, a plain ratio nothing. */
export function unitLabel(unit: Unit): string {
  if (unit === "deg") return "°";
  if (unit === "1") return "";
  return unit.replace("Δ", "");
}

function withUnit(figure: string, unit: Unit): string {
  if (unit === "arcmin" || unit === "1") return figure;
  if (unit === "deg" || unit === "%") return `${figure}${unitLabel(unit)}`;
  const label = unit === "turn" && !/^(?:1|.*\/.*|0\..*)$/.test(figure) ? "turns" : unitLabel(unit);
  return `${figure}${THIN_SPACE}${label}`;
}

function signed(figure: string): string {
  return figure.startsWith("-") ? `−${figure.slice(1)}` : figure;
}

/** 1.3125 as "1-5/16": the fraction with the smallest divisor that gives the number. */
function writeFraction(value: number): string | null {
  const size = Math.abs(value);
  const whole = Math.floor(size);
  for (const d of [2, 3, 4, 5, 6, 8, 10, 12, 16, 32, 64, 128]) {
    const n = Math.round((size - whole) * d);
    if (n > 0 && n < d && Math.abs(whole + n / d - size) < 1e-12)
      return `${value < 0 ? "−" : ""}${whole > 0 ? `${whole}-` : ""}${n}/${d}`;
  }
  return null;
}

function degreesMinutes(minutes: Rational, places: number, sense: Sense): string {
  const text = writeRounded(minutes, places, sense);
  const size = Math.abs(Number(text));
  const degrees = Math.floor(size / 60);
  const rest = writeRounded(minus(exactOf(size), ratio(BigInt(degrees * 60), 1n)), places);
  return `${text.startsWith("-") ? "−" : ""}${degrees}°${rest.padStart(places ? places + 3 : 2, "0")}′`;
}

function figureOf(value: Rational, unit: Unit, places: number, sense: Sense): string {
  return unit === "arcmin"
    ? degreesMinutes(value, places, sense)
    : signed(writeRounded(value, places, sense));
}

/**
 * A quantity as shown, in its own unit or another of its dimension. In its own unit the figure is as typed;
 * a converted one has the precision that was given (NIST SP 811, B.7.2, see `placesIn`).
 * `sense`: a minimum goes "up" and a maximum "down", so that conversion never widens a limit.
 * Thin space between figure and unit, none before ° and %.
 */
export function formatQuantity(
  quantity: Quantity,
  unit: Unit = quantity.unit,
  sense: Sense = "nearest",
): { figure: string; unit: Unit; text: string } {
  const fraction = unit === quantity.unit && isFraction(quantity) ? writeFraction(quantity.value) : null;
  const figure =
    fraction ??
    figureOf(
      convertExact(exactOf(quantity.value), quantity.unit, unit),
      unit,
      placesIn(quantity, unit, sense),
      sense,
    );
  return { figure, unit, text: withUnit(figure, unit) };
}

/**
 * A limit that does not say on which side it lies cannot be rounded away from danger: in another unit it keeps a tenth
 * of the last place given, so that 0.5 mm reads 0.0197 in and never 0.020 in, which would pass 0.508 mm.
 */
function limitText(quantity: Quantity, unit: Unit): string {
  const usual = formatQuantity(quantity, unit);
  if (unit === quantity.unit || isFraction(quantity) || quantity.dimension === "temperature")
    return usual.text;
  const step = (Number(`1e-${quantity.places}`) * unitRatio(quantity.unit, unit)) / 10;
  const places = Math.max(placesIn(quantity, unit), Math.ceil(-Math.log10(step) - 1e-9));
  return withUnit(
    figureOf(convertExact(exactOf(quantity.value), quantity.unit, unit), unit, places, "nearest"),
    unit,
  );
}

const METRIC: ReadonlySet<Unit> = new Set<Unit>(
  "N·m kgf·m kgf·cm daN·m cN·m mm cm m µm km kPa Pa bar MPa mbar hPa kgf/cm² mmHg N/mm² m³ L mL °C K Δ°C ΔK g kg N kN kgf m/s km/h".split(
    " ",
  ) as Unit[],
);
const INCH: ReadonlySet<Unit> = new Set<Unit>([
  ...("lbf·ft lbf·in ozf·in in ft thou mi psi inHg °F Δ°F lb oz lbf mph".split(" ") as Unit[]),
  ...(["US qt", "US pt", "US gal", "US fl oz", "imp qt", "imp pt", "imp gal", "imp fl oz"] as const),
]);

/** The unit that says the same in the other system; null when both systems use the same. */
function counterpart(quantity: Quantity): Unit | null {
  const { unit, dimension } = quantity;
  switch (dimension) {
    case "torque":
      if (unit === "cN·m") return "lbf·in";
      // Common practice, no source: below about 11 lbf·ft wrenches are marked in lbf·in.
      if (METRIC.has(unit)) return Math.abs(quantity.si) < 15 ? "lbf·in" : "lbf·ft";
      return "N·m";
    case "length":
      if (unit === "µm" || unit === "mm" || unit === "cm") return "in";
      if (unit === "m") return "ft";
      if (unit === "km") return "mi";
      if (unit === "mi") return "km";
      return unit === "ft" ? "m" : "mm";
    case "pressure":
      return METRIC.has(unit)
        ? unit === "mmHg" || unit === "mbar" || unit === "hPa"
          ? "inHg"
          : "psi"
        : "kPa";
    case "volume":
      if (METRIC.has(unit)) return quantity.si < 0.0005 ? "US fl oz" : "US qt";
      return quantity.si < 0.0005 ? "mL" : "L";
    case "temperature":
      return unit === "°F" ? "°C" : "°F";
    case "temperature-difference":
      return unit === "Δ°F" ? "Δ°C" : "Δ°F";
    case "mass":
      if (METRIC.has(unit)) return quantity.si < 1 ? "oz" : "lb";
      return unit === "oz" ? "g" : "kg";
    case "force":
      return METRIC.has(unit) ? "lbf" : "N";
    case "speed":
      return METRIC.has(unit) ? "mph" : "km/h";
    case "angle":
      return unit === "turn" ? "deg" : null;
    case "stress":
    case "voltage":
    case "current":
    case "resistance":
    case "time":
    case "rotation-speed":
    case "ratio":
      return null;
    default:
      return dimension satisfies never;
  }
}

/** The two units that a plate shows, preferred first. The unit typed is always one of them. */
export function pairUnits(quantity: Quantity, prefer: UnitPreference): [Unit, Unit | null] {
  const { unit } = quantity;
  const other = counterpart(quantity);
  if (other === null || other === unit) return [unit, null];
  if (unit === "turn") return ["deg", "turn"];
  if (quantity.dimension === "torque" && METRIC.has(unit) && unit !== "N·m" && prefer === "metric")
    return ["N·m", unit];
  const typedFirst = prefer === "metric" ? METRIC.has(unit) : INCH.has(unit);
  return typedFirst ? [unit, other] : [other, unit];
}

/** One value of a mark as shown: its words in the first and in the second unit. */
export type ValuePart = Readonly<{
  role: TypedValue["role"];
  action: TypedValue["action"];
  first: string;
  second: string | null;
}>;

function joinRange(low: string, high: string, unit: Unit): string {
  if (unit === "arcmin" || low.startsWith("−") || high.startsWith("−"))
    return `${unit === "arcmin" ? low : withUnit(low, unit)} to ${unit === "arcmin" ? high : withUnit(high, unit)}`;
  return `${low}–${withUnit(high, unit)}`;
}

/** Both ends in one unit with as many decimals each; the low end goes up and the high end down. */
function rangeFigures(
  low: Rational,
  high: Rational,
  from: Unit,
  to: Unit,
  places: number,
): [low: string, high: string] {
  const [a, b] = [convertExact(low, from, to), convertExact(high, from, to)];
  let shown = places;
  const write = (): [string, string] => [figureOf(a, to, shown, "up"), figureOf(b, to, shown, "down")];
  const crossed = () =>
    compare(exactOf(Number(writeRounded(a, shown, "up"))), exactOf(Number(writeRounded(b, shown, "down")))) >
    0;
  while (shown < 12 && crossed()) shown++;
  return write();
}

function rangeText(low: Quantity, high: Quantity, unit: Unit): string {
  if (low.unit === high.unit && low.unit === unit)
    return joinRange(formatQuantity(low).figure, formatQuantity(high).figure, unit);
  const places = Math.max(placesIn(low, unit, "up"), placesIn(high, unit, "down"));
  const highInLow = convertExact(exactOf(high.value), high.unit, low.unit);
  const [a, b] = rangeFigures(exactOf(low.value), highInLow, low.unit, unit, places);
  return joinRange(a, b, unit);
}

const differenceUnit = (unit: Unit): Unit =>
  unit === "°C" ? "Δ°C" : unit === "°F" ? "Δ°F" : unit === "K" ? "ΔK" : unit;

/** The lower and upper end of a value with its tolerance, in the unit of the value. */
function ends(value: Quantity, tolerance: Quantity): [Rational, Rational] {
  const middle = exactOf(value.value);
  const band =
    tolerance.unit === "%"
      ? times(
          middle.n < 0n ? ratio(-middle.n, middle.d) : middle,
          over(exactOf(tolerance.value), ratio(100n, 1n)),
        )
      : convertExact(exactOf(tolerance.value), tolerance.unit, differenceUnit(value.unit));
  return [minus(middle, band), plus(middle, band)];
}

function tolerancedText(value: Quantity, tolerance: Quantity, unit: Unit): string {
  const shown = formatQuantity(value, unit);
  if (unit === value.unit) {
    const band = formatQuantity(tolerance);
    if (tolerance.unit === differenceUnit(unit) && unit !== "arcmin")
      return `${shown.figure} ± ${withUnit(band.figure, unit)}`;
    return `${shown.text} ± ${band.text}`;
  }
  const [low, high] = ends(value, tolerance);
  const places = placesIn(value, unit);
  const [a, b] = rangeFigures(low, high, value.unit, unit, places);
  return `${shown.text} (${joinRange(a, b, unit)})`;
}

const ACTION_WORDS = {
  seat: "seat by hand",
  torque: "",
  loosen: "loosen fully",
  "back-off": "back off",
  angle: "",
  wait: "wait",
  "turn-while-tightening": "turn while tightening",
} as const;

const ROLE_WORDS: Partial<Record<TypedValue["role"], string>> = { min: "min", max: "max", limit: "limit" };

type Drawn = { part: ValuePart; angle: boolean };

function draw(
  values: readonly TypedValue[],
  at: number,
  prefer: UnitPreference,
): { drawn: Drawn; used: number } {
  const row = values[at] as TypedValue;
  const { quantity, role, action } = row;
  const drawn = (first: string, second: string | null, used: number) => ({
    drawn: { part: { role, action, first, second }, angle: action === "angle" },
    used,
  });
  if (!quantity) {
    const seated = row.text.replace(/^(?:past|after|from|beyond|until|to) /i, "");
    const words = action === "seat" || action === null ? seated : ACTION_WORDS[action];
    return drawn(words, null, 1);
  }
  // A 19 mm socket is no 0.75 in socket: sizes stay as they are marked on the tool. A square drive has one name.
  const tool = role === "size" || role === "drive";
  const [firstUnit, secondUnit] = tool
    ? [quantity.unit, role === "drive" || METRIC.has(quantity.unit) ? null : counterpart(quantity)]
    : pairUnits(quantity, prefer);
  const both = (write: (unit: Unit) => string, used: number) =>
    drawn(write(firstUnit), secondUnit ? write(secondUnit) : null, used);

  const next = values[at + 1];
  const afterNext = values[at + 2];
  const { quantity: nextQuantity } = next ?? { quantity: null };
  if (role === "min" && next?.role === "max" && nextQuantity && next.action === action)
    return both((unit) => rangeText(quantity, nextQuantity, unit), 2);
  if (next?.role === "tolerance" && nextQuantity && role !== "min" && role !== "max")
    return both((unit) => tolerancedText(quantity, nextQuantity, unit), 2);
  if (
    role === "value" &&
    next?.role === "min" &&
    afterNext?.role === "max" &&
    nextQuantity &&
    afterNext.quantity
  ) {
    const high = afterNext.quantity;
    return both(
      (unit) => `${formatQuantity(quantity, unit).text} (${rangeText(nextQuantity, high, unit)})`,
      3,
    );
  }
  const sense: Sense = role === "min" ? "up" : role === "max" ? "down" : "nearest";
  const word = action === "back-off" || action === "wait" ? ACTION_WORDS[action] : (ROLE_WORDS[role] ?? "");
  const write = (unit: Unit) =>
    role === "limit" ? limitText(quantity, unit) : formatQuantity(quantity, unit, sense).text;
  return both((unit) => `${word} ${write(unit)}`.trim(), 1);
}

/**
 * All values of one mark as shown, in the preferred units (`first`) and in the others (`second`, null when no value
 * has another unit): "80–95 N·m", "88 ± 4 N·m" and "65 lbf·ft (62–67 lbf·ft)", "min 22.0 mm", "30 N·m + 90°",
 * "seat by hand, 20 N·m, 40 N·m + 90°". `parts` are the same, one a stage.
 */
export function formatValues(
  values: readonly TypedValue[],
  prefer: UnitPreference,
): { first: string; second: string | null; parts: ValuePart[] } {
  const all: Drawn[] = [];
  for (let at = 0; at < values.length;) {
    const { drawn, used } = draw(values, at, prefer);
    all.push(drawn);
    at += used;
  }
  const join = (write: (part: ValuePart) => string) =>
    all.map(({ part, angle }, i) => `${i === 0 ? "" : angle ? " + " : ", "}${write(part)}`).join("");
  const second = all.some(({ part }) => part.second !== null && part.action !== "angle")
    ? join((part) => (part.action === "angle" ? part.first : (part.second ?? part.first)))
    : null;
  return { first: join((part) => part.first), second, parts: all.map(({ part }) => part) };
}

/** The text of a plain number in a unit, rounded like a value typed with the given decimals. */
export function formatNumber(value: number, unit: Unit, places: number): string {
  return withUnit(figureOf(exactOf(value), unit, places, "nearest"), unit);
}

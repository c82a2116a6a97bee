import { exact, exactOf, plus, ratio, toNumber, type Rational } from "./exact";
import { convertExact } from "./convert";
import { isFraction, type Quantity } from "./quantity";
import { dimensionOf, type Unit } from "./units";

/** To the nearest figure (half to even), or always up (a minimum), or always down (a maximum). */
export type Sense = "nearest" | "up" | "down";

function divide(n: bigint, d: bigint, sense: Sense): bigint {
  const floor = n >= 0n ? n / d : -((-n + d - 1n) / d);
  const rest = n - floor * d;
  if (rest === 0n || sense === "down") return floor;
  if (sense === "up") return floor + 1n;
  const twice = rest * 2n;
  if (twice === d) return floor % 2n === 0n ? floor : floor + 1n;
  return twice < d ? floor : floor + 1n;
}

/** The exact number rounded to whole multiples of 10^−places. */
export function roundExact(value: Rational, places: number, sense: Sense = "nearest"): Rational {
  const scale = 10n ** BigInt(places);
  return ratio(divide(value.n * scale, value.d, sense), scale);
}

/** Writes an exact number with the given decimals, ASCII minus, no grouping. Half goes to the even digit. */
export function writeRounded(value: Rational, places: number, sense: Sense = "nearest"): string {
  const scale = 10n ** BigInt(places);
  const whole = divide(value.n * scale, value.d, sense);
  const digits = (whole < 0n ? -whole : whole).toString().padStart(places + 1, "0");
  const figure = places === 0 ? digits : `${digits.slice(0, -places)}.${digits.slice(-places)}`;
  return whole < 0n ? `-${figure}` : figure;
}

/** Writes a number with the given decimals, ASCII minus, rounded as a decimal (0.125 is a half exactly). */
export function roundFigure(value: number, places: number, sense: Sense = "nearest"): string {
  return writeRounded(exactOf(value), places, sense);
}

/** Decimals written in a plain decimal text. */
export function decimalPlaces(text: string): number {
  const point = text.indexOf(".");
  return point < 0 ? 0 : text.length - point - 1;
}

/** Rounds a decimal text to significant digits, half to even (NIST SP 811, B.7.1). */
export function roundToSignificant(text: string, digits: number): string {
  const value = exact(text);
  if (value.n === 0n) return text;
  let places = digits - 1 - Math.floor(Math.log10(Math.abs(toNumber(value))));
  places = Math.max(0, places);
  const figure = writeRounded(value, places);
  // 9.996 to three digits is 10.0, not 10.00
  const grown = figure.replace(/[-.]/g, "").replace(/^0+/, "").length > digits && places > 0;
  return grown ? writeRounded(value, places - 1) : figure;
}

/** Adds decimal texts and rounds to the place of the least precise one. */
export function sumAsGiven(texts: readonly string[]): string {
  const sum = texts.reduce((total, text) => plus(total, exact(text)), ratio(0n, 1n));
  return writeRounded(sum, texts.length ? Math.min(...texts.map(decimalPlaces)) : 0);
}

/** Half a unit of the last digit over the value, as a fraction: 0.0139 for "36" (NIST SP 811, B.7.2). */
export function relativeRoundingError(text: string): number {
  return (0.5 * Number(`1e-${decimalPlaces(text)}`)) / Math.abs(Number(text));
}

// How much coarser than the figure given a converted figure may be. SP 811 asks for a comparable rounding error:
// 88 N·m (0.57 %) is 65 lbf·ft (0.77 %), but 36 ft (1.4 %) is not 11 m (4.5 %).
const COMPARABLE = 1.5;
const MOST_PLACES = 12;

/**
 * Decimals for a quantity written in another unit, after NIST SP 811 B.7.2: the fewest that keep a comparable
 * relative rounding error, two significant digits, and an actual error inside what was given.
 * Temperatures keep the decimals typed. A fraction of an inch is exact and keeps what a hundredth of a millimetre
 * or a ten-thousandth of an inch resolves.
 */
export function placesIn(quantity: Quantity, unit: Unit, sense: Sense = "nearest"): number {
  const dimension = dimensionOf(unit);
  const given = exactOf(quantity.value);
  const converted = convertExact(given, quantity.unit, unit);
  if (isFraction(quantity)) {
    const most = dimension === "length" && unit !== "mm" ? 4 : dimension === "angle" ? 0 : 2;
    for (let places = 0; places < most; places++)
      if (toNumber(roundExact(converted, places)) === toNumber(converted)) return places;
    return most;
  }
  if (unit === quantity.unit || dimension === "temperature") return quantity.places;
  if (given.n === 0n) return quantity.places;

  const halfStep = 0.5 * Number(`1e-${quantity.places}`);
  const error = halfStep / Math.abs(quantity.value);
  const size = Math.abs(toNumber(converted));
  for (let places = 0; places < MOST_PLACES; places++) {
    const step = Number(`1e-${places}`);
    if (size < 9.5 * step) continue;
    if ((0.5 * step) / size > COMPARABLE * error) continue;
    const off = Math.abs(toNumber(roundExact(converted, places, sense)) - toNumber(converted)) / size;
    if (off <= error * (1 + 1e-12)) return places;
  }
  return MOST_PLACES;
}

import { toNumber, type Rational } from "./exact";
import { dimensionOf, toCanonical, type Dimension, type Unit } from "./units";

/**
 * A number that never travels without its unit.
 * `text` is what was typed; `value` is in `unit`; `si` is the canonical number (N·m, m, degree, Pa, m³, K …).
 * `places` are the decimals typed and `significant` the significant digits typed (every digit typed counts);
 * of a fraction they are those of its decimal form, and `isFraction` tells that it is exact.
 */
export type Quantity = Readonly<{
  text: string;
  value: number;
  unit: Unit;
  dimension: Dimension;
  si: number;
  places: number;
  significant: number;
}>;

/** Where the value is used decides which pints and gallons are meant; ISO 3166 two-letter code. */
export type Country = string;

const FRACTION =
  /\d\s*[/\u2044\u2215]\s*\d|[\u00BC-\u00BE\u2150-\u215E]|\b(?:quarters?|hal(?:f|ves)|thirds?)\b/i;

/** Whether the quantity was typed as a fraction (3/4, 1½): fractions are exact. */
export function isFraction(quantity: Pick<Quantity, "text">): boolean {
  return FRACTION.test(quantity.text);
}

/** Builds a quantity from an exact number; the canonical number is the double nearest to the exact one. */
export function quantityOf(
  text: string,
  number: Rational,
  unit: Unit,
  places: number,
  significant: number,
): Quantity {
  return {
    text,
    value: toNumber(number),
    unit,
    dimension: dimensionOf(unit),
    si: toNumber(toCanonical(number, unit)),
    places,
    significant,
  };
}

/** The last place typed, in the unit typed: 0.1 for "24.0 mm", 1 for "65 lbf·ft", 0 for a fraction. */
export function lastPlace(quantity: Quantity): number {
  return isFraction(quantity) ? 0 : Number(`1e-${quantity.places}`);
}

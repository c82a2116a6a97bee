import type { Quantity } from "~/quantities/quantity";
import { isFraction } from "~/quantities/quantity";
import type { MarkValue } from "./mark";

/** The figure of a text as typed, whatever stands around it: "torque to 80.5 Nm" → "80.5". */
const FIGURE = /\d+(?:[.,](\d+))?|[.,](\d+)/;

/**
 * The quantity of a stored value row, with the precision that was typed. Null for a step without a figure.
 * The row already holds number and unit, so nothing is parsed but the digits; `readQuantity` of the row's text gives the same.
 */
export function quantityOfValue(row: MarkValue): Quantity | null {
  const { text, value, unit, dimension, number } = row;
  if (value === null || unit === null || dimension === null || number === null) return null;
  const decimal = isFraction(row) ? String(value) : (FIGURE.exec(text)?.[0] ?? String(value));
  const [, decimals = ""] = decimal.split(/[.,]/);
  const digits = decimal.replace(/[-.,]/g, "").replace(/^0+(?=\d)/, "");
  return { text, value, unit, dimension, si: number, places: decimals.length, significant: digits.length };
}

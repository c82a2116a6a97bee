import { exactOf, toNumber, type Rational } from "./exact";
import type { Quantity } from "./quantity";
import { fromCanonical, sameKind, toCanonical, type Unit, UNITS } from "./units";

/** Converts an exact number; throws when the units measure different things, which is a bug of the caller. */
export function convertExact(value: Rational, from: Unit, to: Unit): Rational {
  if (!sameKind(from, to))
    throw new TypeError(`${from} (${UNITS[from].dimension}) is no ${UNITS[to].dimension}: ${to}`);
  return from === to ? value : fromCanonical(toCanonical(value, from), to);
}

/**
 * The value in another unit of the same dimension: the double nearest to the exact result.
 * Throws when the units measure different things or the value is not finite.
 */
export function convertNumber(value: number, from: Unit, to: Unit): number {
  if (!Number.isFinite(value)) throw new RangeError("Only finite numbers convert");
  return toNumber(convertExact(exactOf(value), from, to));
}

/** The number of a quantity in another unit of its dimension. */
export function convert(quantity: Quantity, unit: Unit): number {
  return convertNumber(quantity.value, quantity.unit, unit);
}

/** Whether two quantities are the same amount, whatever their units: canonical numbers within 1e-9 relative. */
export function sameQuantity(a: Quantity, b: Quantity): boolean {
  if (!sameKind(a.unit, b.unit)) return false;
  return Math.abs(a.si - b.si) <= 1e-9 * Math.max(Math.abs(a.si), Math.abs(b.si));
}

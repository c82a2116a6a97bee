import { exactOf, minus, over, ratio, times, toNumber, type Rational } from "./exact";
import { convertExact } from "./convert";
import { lastPlace, type Quantity } from "./quantity";
import { roundExact, writeRounded } from "./round";

/** Writes sixty-fourths of an inch in lowest terms: 84 is "1-5/16". */
export function writeSixtyFourths(sixtyFourths: number): string {
  const sign = sixtyFourths < 0 ? "−" : "";
  const size = Math.abs(sixtyFourths);
  const whole = Math.floor(size / 64);
  let [n, d] = [size % 64, 64];
  if (n === 0) return `${sign}${whole}`;
  while (n % 2 === 0) [n, d] = [n / 2, d / 2];
  return `${sign}${whole > 0 ? `${whole}-` : ""}${n}/${d}`;
}

/**
 * A length as an inch fraction. `equal` only when the fraction and the length differ by no more than half a
 * sixty-fourth of the precision given; else `text` names the nearest fraction and by how much it is off:
 * "nearest 15/16, 0.2 mm small" for 24.0 mm (the fraction is the smaller).
 */
export type InchFraction = Readonly<{ equal: boolean; fraction: string; text: string }>;

/** The nearest sixty-fourth of an inch to a length; see `InchFraction`. Throws when the quantity is no length. */
export function inchFraction(quantity: Quantity): InchFraction {
  const inches = convertExact(exactOf(quantity.value), quantity.unit, "in");
  const sixtyFourths = roundExact(times(inches, ratio(64n, 1n)), 0);
  const fraction = writeSixtyFourths(toNumber(sixtyFourths));
  const off = minus(over(sixtyFourths, ratio(64n, 1n)), inches);
  const precision = convertExact(exactOf(lastPlace(quantity)), quantity.unit, "in");
  if (Math.abs(toNumber(off)) <= toNumber(precision) / 128)
    return { equal: true, fraction, text: `${fraction}\u2009in` };

  const inch = quantity.unit === "in" || quantity.unit === "thou" || quantity.unit === "ft";
  const unit = inch ? "in" : "mm";
  const gap = inch ? off : convertExact(off, "in", "mm");
  const size: Rational = gap.n < 0n ? ratio(-gap.n, gap.d) : gap;
  // One figure is enough to say how far off: 0.2 mm, 0.05 mm.
  const places = Math.max(0, -Math.floor(Math.log10(toNumber(size))));
  const word = off.n < 0n ? "small" : "large";
  return {
    equal: false,
    fraction,
    text: `nearest ${fraction}, ${writeRounded(size, places)}\u2009${unit} ${word}`,
  };
}

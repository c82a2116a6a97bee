/** A fraction of whole numbers, always in lowest terms with a positive denominator. */
export type Rational = Readonly<{ n: bigint; d: bigint }>;

function gcd(a: bigint, b: bigint): bigint {
  let [x, y] = [a < 0n ? -a : a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** The fraction n/d in lowest terms. `d` must not be 0. */
export function ratio(n: bigint, d: bigint): Rational {
  const sign = d < 0n ? -1n : 1n;
  const common = gcd(n, d * sign) || 1n;
  return { n: (n * sign) / common, d: (d * sign) / common };
}

const DECIMAL = /^(-?)(\d*)(?:\.(\d*))?(?:e([+-]?\d+))?$/i;

/** Reads a plain decimal such as "0.45359237" or "1e-7" without losing a digit. Throws on anything else. */
export function exact(decimal: string): Rational {
  const parts = DECIMAL.exec(decimal);
  if (!parts || ((parts[2] ?? "") === "" && (parts[3] ?? "") === ""))
    throw new Error(`Not a decimal: ${decimal}`);
  const fraction = parts[3] ?? "";
  const digits = BigInt(`${parts[2] ?? ""}${fraction}`);
  const power = Number(parts[4] ?? 0) - fraction.length;
  const n = parts[1] === "-" ? -digits : digits;
  return power >= 0 ? ratio(n * 10n ** BigInt(power), 1n) : ratio(n, 10n ** BigInt(-power));
}

/** The decimal that a number prints as: 0.1 is one tenth here, not its nearest binary fraction. */
export function exactOf(value: number): Rational {
  return exact(String(value));
}

/** The product of all factors. */
export function times(...factors: readonly Rational[]): Rational {
  let [n, d] = [1n, 1n];
  for (const factor of factors) [n, d] = [n * factor.n, d * factor.d];
  return ratio(n, d);
}

/** a / b; `b` must not be 0. */
export function over(a: Rational, b: Rational): Rational {
  return ratio(a.n * b.d, a.d * b.n);
}

/** a + b */
export function plus(a: Rational, b: Rational): Rational {
  return ratio(a.n * b.d + b.n * a.d, a.d * b.d);
}

/** a − b */
export function minus(a: Rational, b: Rational): Rational {
  return ratio(a.n * b.d - b.n * a.d, a.d * b.d);
}

/** −1, 0 or 1 as a is less than, equal to or more than b. */
export function compare(a: Rational, b: Rational): -1 | 0 | 1 {
  const difference = a.n * b.d - b.n * a.d;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

/** The double nearest to the fraction. */
export function toNumber(value: Rational): number {
  if (value.n === 0n) return 0;
  const negative = value.n < 0n;
  const n = negative ? -value.n : value.n;
  // 70 bits of quotient and a sticky last bit round once, in Number(), and so to the nearest double.
  const shift = 70 - (n.toString(2).length - value.d.toString(2).length);
  const scaled = shift >= 0 ? n << BigInt(shift) : n;
  const divisor = shift >= 0 ? value.d : value.d << BigInt(-shift);
  const quotient = scaled / divisor;
  const sticky = scaled % divisor === 0n ? quotient : quotient | 1n;
  const magnitude = Number(sticky) * 2 ** -shift;
  return negative ? -magnitude : magnitude;
}

import { unit as mathUnit } from "mathjs";
import { expect, test } from "vitest";
import { seeded } from "../../tests/support/seeded";
import factors from "../../tests/reference/unit-factor.json";
import conversions from "../../tests/reference/unit-conversion.json";
import { convert, convertNumber, sameQuantity } from "./convert";
import { readQuantity } from "./parse";
import { canonicalUnit, DIMENSIONS, isUnit, unitsOf, UNITS, type Unit } from "./units";

function unit(symbol: string): Unit {
  if (!isUnit(symbol)) throw new Error(`no such unit: ${symbol}`);
  return symbol;
}

test.each(factors)("factor 1 $input.from in $input.to = $expected ($source)", (row) => {
  const got = convertNumber(row.input.value, unit(row.input.from), unit(row.input.to));
  expect(Math.abs(got - row.expected)).toBeLessThanOrEqual(row.tolerance);
});

test.each(conversions)("$input.value $input.from in $input.to = $expected ($source)", (row) => {
  const difference = "delta" in row.input && row.input.delta === true ? "Δ" : "";
  const got = convertNumber(
    row.input.value,
    unit(difference + row.input.from),
    unit(difference + row.input.to),
  );
  expect(Math.abs(got - row.expected)).toBeLessThanOrEqual(row.tolerance);
});

// Each right-hand side is whole-number arithmetic on the published definitions alone: 0.453 592 37 kg,
// 9.806 65 m/s², 25.4 mm, 231 in³ (GNU units 2.22), 4.546 09 L (Weights and Measures Act 1985).
const DEFINED: readonly (readonly [Unit, Unit, bigint, bigint])[] = [
  ["lbf·ft", "N·m", 45359237n * 980665n * 3048n, 10n ** 17n],
  ["lbf·in", "N·m", 45359237n * 980665n * 254n, 10n ** 17n],
  ["ozf·in", "N·m", 45359237n * 980665n * 254n, 16n * 10n ** 17n],
  ["kgf·m", "N·m", 980665n, 10n ** 5n],
  ["kgf·cm", "N·m", 980665n, 10n ** 7n],
  ["daN·m", "N·m", 10n, 1n],
  ["cN·m", "N·m", 1n, 100n],
  ["lbf·ft", "lbf·in", 12n, 1n],
  ["psi", "Pa", 45359237n * 980665n * 10n ** 8n, 254n * 254n * 10n ** 13n],
  ["kgf/cm²", "Pa", 980665n, 10n],
  ["inHg", "Pa", 135951n * 980665n * 254n, 10n ** 10n],
  ["mmHg", "Pa", 135951n * 980665n, 10n ** 9n],
  ["US gal", "mL", 231n * 254n ** 3n, 10n ** 6n],
  ["US fl oz", "mL", 231n * 254n ** 3n, 128n * 10n ** 6n],
  ["imp gal", "mL", 454609n, 100n],
  ["imp pt", "mL", 454609n, 800n],
  ["imp qt", "US qt", 454609n * 10n ** 4n, 231n * 254n ** 3n],
  ["mi", "km", 5280n * 3048n, 10n ** 7n],
  ["mph", "km/h", 5280n * 3048n, 10n ** 7n],
  ["oz", "g", 45359237n, 16n * 10n ** 5n],
  ["thou", "µm", 254n, 10n],
  ["turn", "deg", 360n, 1n],
  ["arcmin", "deg", 1n, 60n],
];

test.each(DEFINED)("1 %s in %s agrees with the definitions to 1e-15", (from, to, n, d) => {
  const scale = 10n ** 40n;
  const digits = String((n * scale) / d).padStart(41, "0");
  const expected = Number(`${digits.slice(0, -40)}.${digits.slice(-40)}`);
  for (const value of [1, 65, 0.035, 1234.5]) {
    const got = convertNumber(value, from, to);
    expect(Math.abs(got / (value * expected) - 1)).toBeLessThanOrEqual(1e-15);
    expect(Math.abs(convertNumber(got, to, from) / value - 1)).toBeLessThanOrEqual(1e-15);
  }
});

// Named in mathjs and ours alike. Temperatures are compared as temperatures, not as differences.
const MATHJS: Partial<Record<Unit, string>> = {
  "N·m": "N m",
  "lbf·ft": "lbf ft",
  "lbf·in": "lbf in",
  "kgf·m": "kgf m",
  "kgf·cm": "kgf cm",
  mm: "mm",
  cm: "cm",
  m: "m",
  µm: "um",
  km: "km",
  in: "in",
  ft: "ft",
  thou: "mil",
  mi: "mi",
  deg: "deg",
  turn: "cycle",
  arcmin: "arcmin",
  kPa: "kPa",
  Pa: "Pa",
  bar: "bar",
  psi: "psi",
  MPa: "MPa",
  mbar: "mbar",
  hPa: "hPa",
  "kgf/cm²": "kgf/cm^2",
  L: "L",
  mL: "mL",
  "US qt": "qt",
  "US pt": "pt",
  "US gal": "gal",
  "US fl oz": "floz",
  "°C": "degC",
  "°F": "degF",
  K: "K",
  g: "g",
  kg: "kg",
  lb: "lbm",
  oz: "oz",
  N: "N",
  kN: "kN",
  lbf: "lbf",
  kgf: "kgf",
  V: "V",
  mV: "mV",
  Ω: "ohm",
  kΩ: "kohm",
  MΩ: "Mohm",
  s: "s",
  min: "min",
  h: "h",
  "km/h": "km/h",
  mph: "mi/h",
  "m/s": "m/s",
};

test("4,000 random conversions agree with mathjs to 1e-9 (its psi is rounded)", () => {
  const random = seeded(20261201);
  const pairs = DIMENSIONS.flatMap((dimension) => {
    const known = unitsOf(dimension).filter((u) => MATHJS[u]);
    return known.flatMap((a) => known.filter((b) => b !== a).map((b) => [a, b] as const));
  });
  expect(pairs.length).toBeGreaterThan(150);
  let compared = 0;
  for (; compared < 4000; compared++) {
    const [from, to] = pairs[Math.floor(random() * pairs.length)] as readonly [Unit, Unit];
    const value = Number((10 ** (random() * 6 - 2)).toPrecision(1 + Math.floor(random() * 6)));
    const theirs = mathUnit(value, MATHJS[from] ?? "").toNumber(MATHJS[to] ?? "");
    const ours = convertNumber(value, from, to);
    const room = 1e-9 * Math.max(Math.abs(theirs), from.startsWith("°") || from === "K" ? 500 : 0);
    expect(Math.abs(ours - theirs), `${value} ${from} in ${to}`).toBeLessThanOrEqual(room);
  }
  expect(compared).toBe(4000);
});

test("every unit converts to every other of its dimension and back within 2e-15", () => {
  const random = seeded(7);
  for (const dimension of DIMENSIONS)
    for (const from of unitsOf(dimension))
      for (const to of unitsOf(dimension)) {
        if (dimension === "temperature") continue;
        const value = Number((random() * 1000 + 0.001).toPrecision(6));
        const back = convertNumber(convertNumber(value, from, to), to, from);
        expect(Math.abs(back / value - 1), `${value} ${from} by ${to}`).toBeLessThanOrEqual(2e-15);
      }
});

test("−40 is the same in °C and °F, and 100 °C is 373.15 K", () => {
  expect(convertNumber(-40, "°C", "°F")).toBe(-40);
  expect(convertNumber(-40, "°F", "°C")).toBe(-40);
  expect(convertNumber(100, "°C", "K")).toBe(373.15);
  expect(convertNumber(68, "°F", "°C")).toBe(20);
});

test("a difference of 9 °F is 5 °C, never −12.8 °C", () => {
  expect(convertNumber(9, "Δ°F", "Δ°C")).toBe(5);
});

test("a torque does not convert to a force, a length or a pressure", () => {
  for (const other of ["N", "m", "Pa", "lbf"] as const)
    expect(() => convertNumber(1, "N·m", other)).toThrow(TypeError);
});

test("every unit names the source of its factor, and every dimension has a canonical unit that it converts to", () => {
  for (const [symbol, entry] of Object.entries(UNITS)) expect(entry.source, symbol).not.toBe("");
  for (const dimension of DIMENSIONS) {
    const canonical = canonicalUnit(dimension);
    for (const u of unitsOf(dimension)) expect(Number.isFinite(convertNumber(1, u, canonical)), u).toBe(true);
  }
});

function read(text: string) {
  const result = readQuantity(text);
  if (!result.ok) throw new Error(result.error);
  return result.quantity;
}

test("the same amount in other words is the same quantity", () => {
  expect(sameQuantity(read("780 in-lb"), read("65 ft-lb"))).toBe(true);
  expect(sameQuantity(read("0.5 in"), read("12.7 mm"))).toBe(true);
  expect(sameQuantity(read("88 Nm"), read("65 ft-lb"))).toBe(false);
  expect(sameQuantity(read("88 N"), read("88 Nm"))).toBe(false);
  expect(convert(read("1/3 turn"), "deg")).toBeCloseTo(120, 12);
  expect(read("1/3 turn").si).toBe(120);
});

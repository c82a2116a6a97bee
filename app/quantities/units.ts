import { exact, minus, over, plus, ratio, times, toNumber, type Rational } from "./exact";

/** What is measured. Torque is its own dimension: it is never an energy. */
export const DIMENSIONS = [
  "torque",
  "length",
  "angle",
  "pressure",
  "stress",
  "volume",
  "temperature",
  "temperature-difference",
  "mass",
  "force",
  "voltage",
  "current",
  "resistance",
  "time",
  "speed",
  "rotation-speed",
  "ratio",
] as const;
export type Dimension = (typeof DIMENSIONS)[number];

/**
 * One unit: `factor` times (value + `offset`) is the canonical number of its dimension.
 * `source` names the definition that the factor is the product of.
 */
type UnitEntry = Readonly<{ dimension: Dimension; factor: Rational; offset?: Rational; source: string }>;

const YARD_AND_POUND =
  "international yard and pound agreement 1959: in = 25.4 mm, lb = 0.453 592 37 kg (exact)";
const GRAVITY = "CGPM 3 (1901): standard gravity 9.806 65 m/s² (exact)";
const FORCE_POUND = `${YARD_AND_POUND}; ${GRAVITY}`;
const SI = "SI, the decimal prefix";
const US_GALLON = "US gallon = 231 in³ (NIST Handbook 44, appendix C; exact)";
const IMPERIAL_GALLON = "imperial gallon = 4.546 09 L (UK Weights and Measures Act 1985, exact)";
const MERCURY = "conventional mercury, 13 595.1 kg/m³ at standard gravity (NIST SP 811, appendix B.8)";
const ANGLE = "full circle = 360°, degree = 60 minutes";
const TEMPERATURE = "ITS-90: 0 °C = 273.15 K; °F = 1.8 °C + 32, so 0 °F = 459.67 × 5/9 K";

const ONE = ratio(1n, 1n);
const INCH = exact("0.0254");
const FOOT = times(exact("12"), INCH);
const MILE = times(exact("5280"), FOOT);
const POUND = exact("0.45359237");
const OUNCE = over(POUND, exact("16"));
const G0 = exact("9.80665");
const POUND_FORCE = times(POUND, G0);
const OUNCE_FORCE = times(OUNCE, G0);
const LITRE = exact("0.001");
const USGAL = times(exact("231"), INCH, INCH, INCH);
const IMPGAL = times(exact("4.54609"), LITRE);
const MERCURY_DENSITY = exact("13595.1");
const FIVE_NINTHS = ratio(5n, 9n);

/** Every unit that can be typed, with its dimension and exact factor to the canonical unit. */
export const UNITS = {
  "N·m": { dimension: "torque", factor: ONE, source: SI },
  "lbf·ft": { dimension: "torque", factor: times(POUND_FORCE, FOOT), source: FORCE_POUND },
  "lbf·in": { dimension: "torque", factor: times(POUND_FORCE, INCH), source: FORCE_POUND },
  "ozf·in": { dimension: "torque", factor: times(OUNCE_FORCE, INCH), source: FORCE_POUND },
  "kgf·m": { dimension: "torque", factor: G0, source: GRAVITY },
  "kgf·cm": { dimension: "torque", factor: times(G0, exact("0.01")), source: GRAVITY },
  "daN·m": { dimension: "torque", factor: exact("10"), source: SI },
  "cN·m": { dimension: "torque", factor: exact("0.01"), source: SI },

  mm: { dimension: "length", factor: exact("0.001"), source: SI },
  cm: { dimension: "length", factor: exact("0.01"), source: SI },
  m: { dimension: "length", factor: ONE, source: SI },
  µm: { dimension: "length", factor: exact("0.000001"), source: SI },
  km: { dimension: "length", factor: exact("1000"), source: SI },
  in: { dimension: "length", factor: INCH, source: YARD_AND_POUND },
  ft: { dimension: "length", factor: FOOT, source: YARD_AND_POUND },
  thou: { dimension: "length", factor: times(INCH, exact("0.001")), source: YARD_AND_POUND },
  mi: { dimension: "length", factor: MILE, source: YARD_AND_POUND },

  deg: { dimension: "angle", factor: ONE, source: ANGLE },
  turn: { dimension: "angle", factor: exact("360"), source: ANGLE },
  arcmin: { dimension: "angle", factor: ratio(1n, 60n), source: ANGLE },

  kPa: { dimension: "pressure", factor: exact("1000"), source: SI },
  Pa: { dimension: "pressure", factor: ONE, source: SI },
  bar: { dimension: "pressure", factor: exact("100000"), source: "SI brochure: bar = 100 kPa" },
  psi: { dimension: "pressure", factor: over(POUND_FORCE, times(INCH, INCH)), source: FORCE_POUND },
  MPa: { dimension: "pressure", factor: exact("1000000"), source: SI },
  mbar: { dimension: "pressure", factor: exact("100"), source: "SI brochure: bar = 100 kPa" },
  hPa: { dimension: "pressure", factor: exact("100"), source: SI },
  "kgf/cm²": { dimension: "pressure", factor: over(G0, exact("0.0001")), source: GRAVITY },
  inHg: { dimension: "pressure", factor: times(MERCURY_DENSITY, G0, INCH), source: MERCURY },
  mmHg: { dimension: "pressure", factor: times(MERCURY_DENSITY, G0, exact("0.001")), source: MERCURY },
  "N/mm²": { dimension: "stress", factor: exact("1000000"), source: SI },

  "m³": { dimension: "volume", factor: ONE, source: SI },
  L: { dimension: "volume", factor: LITRE, source: SI },
  mL: { dimension: "volume", factor: times(LITRE, exact("0.001")), source: SI },
  "US qt": { dimension: "volume", factor: over(USGAL, exact("4")), source: US_GALLON },
  "US pt": { dimension: "volume", factor: over(USGAL, exact("8")), source: US_GALLON },
  "US gal": { dimension: "volume", factor: USGAL, source: US_GALLON },
  "US fl oz": { dimension: "volume", factor: over(USGAL, exact("128")), source: US_GALLON },
  "imp qt": { dimension: "volume", factor: over(IMPGAL, exact("4")), source: IMPERIAL_GALLON },
  "imp pt": { dimension: "volume", factor: over(IMPGAL, exact("8")), source: IMPERIAL_GALLON },
  "imp gal": { dimension: "volume", factor: IMPGAL, source: IMPERIAL_GALLON },
  "imp fl oz": { dimension: "volume", factor: over(IMPGAL, exact("160")), source: IMPERIAL_GALLON },

  "°C": { dimension: "temperature", factor: ONE, offset: exact("273.15"), source: TEMPERATURE },
  "°F": { dimension: "temperature", factor: FIVE_NINTHS, offset: exact("459.67"), source: TEMPERATURE },
  K: { dimension: "temperature", factor: ONE, source: SI },
  "Δ°C": { dimension: "temperature-difference", factor: ONE, source: TEMPERATURE },
  "Δ°F": { dimension: "temperature-difference", factor: FIVE_NINTHS, source: TEMPERATURE },
  ΔK: { dimension: "temperature-difference", factor: ONE, source: SI },

  g: { dimension: "mass", factor: exact("0.001"), source: SI },
  kg: { dimension: "mass", factor: ONE, source: SI },
  lb: { dimension: "mass", factor: POUND, source: YARD_AND_POUND },
  oz: { dimension: "mass", factor: OUNCE, source: YARD_AND_POUND },

  N: { dimension: "force", factor: ONE, source: SI },
  kN: { dimension: "force", factor: exact("1000"), source: SI },
  lbf: { dimension: "force", factor: POUND_FORCE, source: FORCE_POUND },
  kgf: { dimension: "force", factor: G0, source: GRAVITY },

  V: { dimension: "voltage", factor: ONE, source: SI },
  mV: { dimension: "voltage", factor: exact("0.001"), source: SI },
  A: { dimension: "current", factor: ONE, source: SI },
  mA: { dimension: "current", factor: exact("0.001"), source: SI },
  Ω: { dimension: "resistance", factor: ONE, source: SI },
  mΩ: { dimension: "resistance", factor: exact("0.001"), source: SI },
  kΩ: { dimension: "resistance", factor: exact("1000"), source: SI },
  MΩ: { dimension: "resistance", factor: exact("1000000"), source: SI },

  s: { dimension: "time", factor: ONE, source: SI },
  min: { dimension: "time", factor: exact("60"), source: "SI brochure, table 8" },
  h: { dimension: "time", factor: exact("3600"), source: "SI brochure, table 8" },
  "m/s": { dimension: "speed", factor: ONE, source: SI },
  "km/h": { dimension: "speed", factor: over(exact("1000"), exact("3600")), source: SI },
  mph: { dimension: "speed", factor: over(MILE, exact("3600")), source: YARD_AND_POUND },
  rpm: { dimension: "rotation-speed", factor: ONE, source: "turns in one minute" },
  "1": { dimension: "ratio", factor: ONE, source: SI },
  "%": { dimension: "ratio", factor: exact("0.01"), source: "SI brochure 5.4.7: % = 0.01" },
} as const satisfies Record<string, UnitEntry>;

/** The symbol of a unit, exactly as it is stored and shown. */
export type Unit = keyof typeof UNITS;

/** The units of one dimension, as a type. */
export type UnitOf<D extends Dimension> = {
  [U in Unit]: (typeof UNITS)[U]["dimension"] extends D ? U : never;
}[Unit];

const CANONICAL = {
  torque: "N·m",
  length: "m",
  angle: "deg",
  pressure: "Pa",
  stress: "Pa",
  volume: "m³",
  temperature: "K",
  "temperature-difference": "ΔK",
  mass: "kg",
  force: "N",
  voltage: "V",
  current: "A",
  resistance: "Ω",
  time: "s",
  speed: "m/s",
  "rotation-speed": "rpm",
  ratio: "1",
} as const satisfies Record<Dimension, Unit>;

/** The unit that canonical numbers of a dimension are in. */
export function canonicalUnit(dimension: Dimension): (typeof CANONICAL)[Dimension] {
  return CANONICAL[dimension];
}

/** All units of a dimension, in the order of the table. */
export function unitsOf(dimension: Dimension): Unit[] {
  return (Object.keys(UNITS) as Unit[]).filter((unit) => UNITS[unit].dimension === dimension);
}

/** Whether a text is exactly a unit symbol of the table. */
export function isUnit(text: string): text is Unit {
  return Object.hasOwn(UNITS, text);
}

/** The dimension that a unit measures. */
export function dimensionOf(unit: Unit): Dimension {
  return UNITS[unit].dimension;
}

/** Whether values of two units can be compared: same dimension, or pressure and stress. */
export function sameKind(a: Unit, b: Unit): boolean {
  return CANONICAL[UNITS[a].dimension] === CANONICAL[UNITS[b].dimension];
}

function entryOf(unit: Unit): UnitEntry {
  return UNITS[unit];
}

/** The exact canonical number (see `canonicalUnit`) of an exact value. */
export function toCanonical(value: Rational, unit: Unit): Rational {
  const { factor, offset } = entryOf(unit);
  return times(offset ? plus(value, offset) : value, factor);
}

/** The exact value in `unit` of an exact canonical number. */
export function fromCanonical(canonical: Rational, unit: Unit): Rational {
  const { factor, offset } = entryOf(unit);
  const value = over(canonical, factor);
  return offset ? minus(value, offset) : value;
}

/** The ratio of two units of one dimension as a number: how many `b` one `a` is. Offsets play no part. */
export function unitRatio(a: Unit, b: Unit): number {
  return toNumber(over(entryOf(a).factor, entryOf(b).factor));
}

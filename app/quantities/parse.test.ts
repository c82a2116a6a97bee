import { expect, test } from "vitest";
import { seeded } from "../../tests/support/seeded";
import { formatQuantity, formatValues } from "./format";
import { readQuantity, readThread, readUnit, readValues, type ReadOptions } from "./parse";
import { sameQuantity } from "./convert";
import { unitsOf, DIMENSIONS, type Unit } from "./units";

function summary(text: string, options: ReadOptions = {}): string {
  const read = readQuantity(text, options);
  return read.ok
    ? `${read.quantity.value} ${read.quantity.unit}`
    : `${read.at} ${read.reason}: ${read.error}`;
}

// Spellings are common practice in shops, no source.
test.each([
  ["65 ft-lb", "65 lbf·ft"],
  ["65 ft. lbs", "65 lbf·ft"],
  ["65 ft. lbs.", "65 lbf·ft"],
  ["65lb ft", "65 lbf·ft"],
  ["65 lbf·ft", "65 lbf·ft"],
  ["65 lb-ft", "65 lbf·ft"],
  ["65 lb.ft", "65 lbf·ft"],
  ["65 FT LBS", "65 lbf·ft"],
  ["65 ft/lbs", "65 lbf·ft"],
  ["65 foot pounds", "65 lbf·ft"],
  ["65 foot-pounds", "65 lbf·ft"],
  ["65 pound-feet", "65 lbf·ft"],
  ["780 in-lb", "780 lbf·in"],
  ["780 in lbs", "780 lbf·in"],
  ["780 inch pounds", "780 lbf·in"],
  ["780 lbf in", "780 lbf·in"],
  ["88Nm", "88 N·m"],
  ["88 N.m", "88 N·m"],
  ["88 N-m", "88 N·m"],
  ["88 N·m", "88 N·m"],
  ["88 N⋅m", "88 N·m"],
  ["88 nm", "88 N·m"],
  ["88 newton metres", "88 N·m"],
  ["88 Newton-meters", "88 N·m"],
  ["8.8 daNm", "8.8 daN·m"],
  ["8,8 mdaN", "8.8 daN·m"],
  ["880 cNm", "880 cN·m"],
  ["9 kgm", "9 kgf·m"],
  ["9 kg-m", "9 kgf·m"],
  ["9 m·kg", "9 kgf·m"],
  ["9 mkg", "9 kgf·m"],
  ["9 kgf·m", "9 kgf·m"],
  ["85 kgf-cm", "85 kgf·cm"],
  ["85 kg cm", "85 kgf·cm"],
  ["50 oz-in", "50 ozf·in"],
  ["50 in-oz", "50 ozf·in"],
  ["1-5/16", "1.3125 in"],
  ['1 5/16"', "1.3125 in"],
  ["1 5/16 ''", "1.3125 in"],
  ["1½ in", "1.5 in"],
  ["1 ½ in", "1.5 in"],
  ["13⁄16", "0.8125 in"],
  ["5/8-in", "0.625 in"],
  ["10-mm", "10 mm"],
  ["65-ft-lb", "65 lbf·ft"],
  [".625", "0.625 in"],
  [".625 in", "0.625 in"],
  ["0,8 mm", "0.8 mm"],
  ["0,035 in", "0.035 in"],
  ["35 thou", "35 thou"],
  ["35 thousandths", "35 thou"],
  ["12 µm", "12 µm"],
  ["12 μm", "12 µm"],
  ["12 microns", "12 µm"],
  ["5' 6\"", "66 in"],
  ["5 ft 6 in", "66 in"],
  ["100 km", "100 km"],
  ["60 miles", "60 mi"],
  ["90°", "90 deg"],
  ["90 degrees", "90 deg"],
  ["1/4 turn", "0.25 turn"],
  ["half a turn", "0.5 turn"],
  ["1°30'", "90 arcmin"],
  ["0° 10′", "10 arcmin"],
  ["-0°30'", "-30 arcmin"],
  ["35 psi", "35 psi"],
  ["35PSI", "35 psi"],
  ["240 kPa", "240 kPa"],
  ["2,3 bar", "2.3 bar"],
  ["0.8 MPa", "0.8 MPa"],
  ["0.8 mpa", "0.8 MPa"],
  ["980 hPa", "980 hPa"],
  ["980 mbar", "980 mbar"],
  ["2.5 kgf/cm²", "2.5 kgf/cm²"],
  ["2.5 kg/cm2", "2.5 kgf/cm²"],
  ["20 inHg", "20 inHg"],
  ["500 mmHg", "500 mmHg"],
  ["4.5 L", "4.5 L"],
  ["4.5 litres", "4.5 L"],
  ["500 ml", "500 mL"],
  ["500 cc", "500 mL"],
  ["5 US qt", "5 US qt"],
  ["5 qt US", "5 US qt"],
  ["5 imperial pints", "5 imp pt"],
  ["5 UK gal", "5 imp gal"],
  ["8 US fl oz", "8 US fl oz"],
  ["90 °C", "90 °C"],
  ["90C", "90 °C"],
  ["195 deg F", "195 °F"],
  ["-18 °C", "-18 °C"],
  ["−18 °C", "-18 °C"],
  ["Δ18 °F", "18 Δ°F"],
  ["450 g", "450 g"],
  ["16 oz", "16 oz"],
  ["2 lbs", "2 lb"],
  ["25 kN", "25 kN"],
  ["1000 lbf", "1000 lbf"],
  ["12.6 V", "12.6 V"],
  ["350 mV", "350 mV"],
  ["4.7 kΩ", "4.7 kΩ"],
  ["4.7 kohm", "4.7 kΩ"],
  ["10 MΩ", "10 MΩ"],
  ["10 mΩ", "10 mΩ"],
  ["10 A", "10 A"],
  ["30 s", "30 s"],
  ["5 min", "5 min"],
  ["2 hours", "2 h"],
  ["50 km/h", "50 km/h"],
  ["30 mph", "30 mph"],
  ["850 rpm", "850 rpm"],
  ["35 % ", "35 %"],
  ["about 88 Nm", "88 N·m"],
  ["１２ Ｎｍ", "12 N·m"],
  ["88\u2009N·m", "88 N·m"],
  ["1,234,567 mi", "1234567 mi"],
  ["1,234.5 km", "1234.5 km"],
  ["1.234,5 km", "1234.5 km"],
])("reads %j as %s", (text, expected) => {
  expect(summary(text)).toBe(expected);
});

function read(text: string) {
  const result = readQuantity(text);
  if (!result.ok) throw new Error(result.error);
  return result.quantity;
}

test("keeps the text, the places and the significant digits typed", () => {
  expect(read("  24.0 mm ")).toMatchObject({
    text: "24.0 mm",
    places: 1,
    significant: 3,
    dimension: "length",
  });
  expect(read("0.035 in")).toMatchObject({ places: 3, significant: 2, si: 0.000889 });
  expect(read("100 Nm")).toMatchObject({ places: 0, significant: 3, si: 100 });
  expect(read("1.000 in")).toMatchObject({ places: 3, significant: 4 });
});

test.each([
  ["65", {}, "2 no-unit: 65 has no unit: lbf·ft, lbf·in or N·m?"],
  ["65", { dimension: "torque" }, "2 no-unit: 65 has no unit: lbf·ft, lbf·in or N·m?"],
  ["22.0", { dimension: "length" }, "4 no-unit: 22.0 has no unit: mm or in?"],
  ["32", { dimension: "pressure" }, "2 no-unit: 32 has no unit: psi, kPa or bar?"],
  ["65 lbs", { dimension: "torque" }, "3 wrong-dimension: 65 lbs is not a torque yet: ft-lb or in-lb?"],
  ["9 kg", { dimension: "torque" }, "2 wrong-dimension: 9 kg is not a torque yet: kgf·m or kgf·cm?"],
  [
    "65 mm",
    { dimension: "torque" },
    "3 wrong-dimension: 65 mm is a length, not a torque: lbf·ft, lbf·in or N·m?",
  ],
  ["88 J", {}, "3 wrong-dimension: A joule is energy, not torque: lbf·ft, lbf·in or N·m?"],
  ["1,000", {}, "0 ambiguous: 1,000: thousands, or a decimal comma? Type 1000 or 1.000."],
  ["1,000 Nm", {}, "0 ambiguous: 1,000: thousands, or a decimal comma? Type 1000 or 1.000."],
  ["1 000 Nm", {}, "0 ambiguous: 1 000: one number or two? Type a large number without a space."],
  ["13 mil", {}, "3 ambiguous: 13 mil: “mil” can be millimetres or thousandths of an inch: mm or thou?"],
  ["5 pt", {}, "2 ambiguous: 5 pt: “pt” differs by a fifth: US pt or imperial pt?"],
  ["5 pt", { country: "GB" }, "2 ambiguous: 5 pt: “pt” differs by a fifth: US pt or imperial pt?"],
  ["5 qt", { country: "AU" }, "2 ambiguous: 5 qt: “qt” differs by a fifth: US qt or imperial qt?"],
  ["5 qt", { country: "US" }, "5 US qt"],
  ["5 fl oz", { country: "US" }, "5 US fl oz"],
  ["90°", { dimension: "temperature" }, "2 no-unit: 90°: °C or °F?"],
  ["10 °C", { dimension: "temperature-difference" }, "10 Δ°C"],
  ["30'", { dimension: "angle" }, "30 arcmin"],
  ["30'", {}, "30 ft"],
  ["19", { bareUnit: "mm" }, "19 mm"],
  ["3/4", { bareUnit: "mm" }, "0.75 in"],
  ["-5 Nm", {}, "0 negative: A torque cannot be negative."],
  ["-300 °C", {}, "0 bad-number: -300 °C is below absolute zero."],
  ["80/95 Nm", {}, "0 bad-number: 80/95 is not a fraction used on tools or rulers. For a range write 80-95."],
  ["1/0 in", {}, "0 bad-number: 1/0 is not a fraction used on tools or rulers. For a range write 1-0."],
  ["1.2.3 Nm", {}, "0 bad-number: 1.2.3 can be read in more than one way. Type one number with a point."],
  ["65 foo", {}, "3 unknown-unit: “foo” is not a unit known here. 65: lbf·ft, lbf·in or N·m?"],
  ["65 lbf·ft today", {}, "10 trailing: 65 lbf·ft was read, but not “today”. Type one value alone."],
  ["", {}, "0 empty: Nothing typed. Type a number and its unit, like 88 N·m."],
  ["   ", {}, "0 empty: Nothing typed. Type a number and its unit, like 88 N·m."],
  ["80-95 Nm", {}, "2 trailing: “80-95 Nm” is a limit, a range or several values. Type one value alone."],
  ["max 9 Nm", {}, "0 trailing: “max 9 Nm” is a limit, a range or several values. Type one value alone."],
  ["snug", {}, "0 no-number: There is no number here. Type a number and its unit, like 88 N·m."],
  ["NaN Nm", {}, "0 no-number: There is no number here. Type a number and its unit, like 88 N·m."],
  [
    "1234567890123456 Nm",
    {},
    "0 bad-number: That number has more digits than any gauge shows. Type it shorter.",
  ],
  ["m in", {}, "0 no-number: There is no number here. Type a number and its unit, like 88 N·m."],
  ["3 m in", {}, "4 trailing: 3 m was read, but not “in”. Type one value alone."],
] as const satisfies readonly (readonly [string, ReadOptions, string])[])(
  "%j with %j: %s",
  (text, options, expected) => {
    expect(summary(text, options)).toBe(expected);
  },
);

test("over 200 characters is refused", () => {
  expect(readQuantity(`88 Nm${" ".repeat(200)}`)).toMatchObject({ ok: false, reason: "too-long", at: 200 });
  expect(readValues("1".repeat(201))).toMatchObject({ ok: false, reason: "too-long" });
  expect(readThread("M10".padEnd(201, "x"))).toMatchObject({ ok: false, reason: "too-long" });
});

function rows(text: string, options: ReadOptions = {}): string {
  const read = readValues(text, options);
  if (!read.ok) return `${read.at} ${read.reason}`;
  return read.values
    .map(({ role, action, quantity }) =>
      [role, action, quantity && `${quantity.value} ${quantity.unit}`].filter((x) => x !== null).join(" "),
    )
    .join("; ");
}

test.each([
  ["88 Nm", "value torque 88 N·m"],
  ["80-95 Nm", "min torque 80 N·m; max torque 95 N·m"],
  ["80–95 Nm", "min torque 80 N·m; max torque 95 N·m"],
  ["80 to 95 Nm", "min torque 80 N·m; max torque 95 N·m"],
  ["80 Nm to 95 Nm", "min torque 80 N·m; max torque 95 N·m"],
  ["between 80 and 95 Nm", "min torque 80 N·m; max torque 95 N·m"],
  ["0.6-0.8 mm", "min 0.6 mm; max 0.8 mm"],
  ["-5 to 10 °C", "min -5 °C; max 10 °C"],
  ["1-1/2 to 2 in", "min 1.5 in; max 2 in"],
  ["1/2-3/4", "min 0.5 in; max 0.75 in"],
  ["88 ± 4 Nm", "value torque 88 N·m; tolerance 4 N·m"],
  ["88 Nm +/- 4", "value torque 88 N·m; tolerance 4 N·m"],
  ["88 Nm ±5%", "value torque 88 N·m; tolerance 5 %"],
  ["88±5% Nm", "value torque 88 N·m; tolerance 5 %"],
  ["20 ± 5 °C", "value 20 °C; tolerance 5 Δ°C"],
  ["0°10' ± 5'", "value 10 arcmin; tolerance 5 arcmin"],
  ["22 +0/-0.05 mm", "value 22 mm; min 21.95 mm; max 22 mm"],
  ["22.0 +0.05 -0.10 mm", "value 22 mm; min 21.9 mm; max 22.05 mm"],
  ["max 9 Nm", "max torque 9 N·m"],
  ["9 Nm max.", "max torque 9 N·m"],
  ["no more than 9 Nm", "max torque 9 N·m"],
  ["≤ 0.05 mm", "max 0.05 mm"],
  ["at least 3.0 mm", "min 3 mm"],
  ["min 22.0 mm", "min 22 mm"],
  ["22.0 mm min", "min 22 mm"],
  ["not less than 3.0 mm", "min 3 mm"],
  ["> 12.4 V", "min 12.4 V"],
  ["wear limit 1.5 mm", "limit 1.5 mm"],
  ["30 Nm + 90°", "value torque 30 N·m; angle angle 90 deg"],
  ["30 Nm plus 90 degrees", "value torque 30 N·m; angle angle 90 deg"],
  ["30 Nm + 90", "value torque 30 N·m; angle angle 90 deg"],
  ["30 Nm then a further 90", "value torque 30 N·m; angle angle 90 deg"],
  ["30 Nm + 1/4 turn", "value torque 30 N·m; angle angle 0.25 turn"],
  ["20 Nm, 40 Nm, +90°", "stage torque 20 N·m; stage torque 40 N·m; angle angle 90 deg"],
  [
    "20 Nm then 40 Nm then 90° then 90°",
    "stage torque 20 N·m; stage torque 40 N·m; angle angle 90 deg; angle angle 90 deg",
  ],
  ["back off 180°", "stage back-off 180 deg"],
  [
    "40 Nm, back off 1/2 turn, 20 Nm + 60°",
    "stage torque 40 N·m; stage back-off 0.5 turn; stage torque 20 N·m; angle angle 60 deg",
  ],
  ["loosen 90°", "stage back-off 90 deg"],
  ["loosen, then 20 Nm + 60°", "stage loosen; value torque 20 N·m; angle angle 60 deg"],
  ["loosen fully, 20 Nm", "stage loosen; value torque 20 N·m"],
  ["hand tight + 3/4 turn", "stage seat; angle angle 0.75 turn"],
  ["finger tight, then half a turn", "stage seat; angle angle 0.5 turn"],
  ["snug", "stage seat"],
  ["1/4 turn past contact", "stage seat; angle angle 0.25 turn"],
  ["40 Nm, wait 5 min, +90°", "value torque 40 N·m; stage wait 5 min; angle angle 90 deg"],
  [
    "20 Nm, turn the hub while tightening, 40 Nm",
    "stage torque 20 N·m; stage turn-while-tightening; stage torque 40 N·m",
  ],
  ["20-25 Nm + 90°", "min torque 20 N·m; max torque 25 N·m; angle angle 90 deg"],
  ["30 Nm + 85-95°", "value torque 30 N·m; min angle 85 deg; max angle 95 deg"],
  ["88 Nm (65 ft-lb)", "value torque 88 N·m"],
  ["65 ft-lb / 88 Nm", "value torque 65 lbf·ft"],
  ["65 ft-lb, 88 Nm", "value torque 65 lbf·ft"],
  ["88 Nm or 100 Nm", "9 disagree"],
  ["20 Nm 40 Nm", "6 disagree"],
  ["88 Nm 19 mm", "6 disagree"],
  ["95-80 Nm", "0 order"],
  ["20 Nm - 90°", "8 wrong-dimension"],
  ["20, 40 Nm", "2 no-unit"],
  ["80-95", "5 no-unit"],
  ["88 ±", "4 no-number"],
  ["torque it well", "7 no-number"],
  ["turn 3/4", "8 no-unit"],
  ["3/4 drive", "4 trailing"],
  ["wait a bit", "5 no-number"],
] as const)("reads the values of %j: %s", (text, expected) => {
  expect(rows(text)).toBe(expected);
});

test("bar is a pressure only behind a number", () => {
  expect(rows("sway bar 24 mm")).toBe("0 no-number");
});

test("each end of a range can be read again alone", () => {
  const read = readValues("80-95 ft-lb");
  if (!read.ok) throw new Error(read.error);
  expect(read.values.map(({ text }) => text)).toEqual(["80 ft-lb", "95 ft-lb"]);
  for (const { text, quantity } of read.values) {
    const again = readQuantity(text);
    expect(again.ok && quantity && sameQuantity(again.quantity, quantity)).toBe(true);
  }
});

// Sizes: 1 in = 25.4 mm; ASME B1.1 number sizes 0.060 in + 0.013 in a number; ISO 261 coarse pitch of M10 is 1.5.
test.each([
  ["M10x1.25", "metric", 10, 1.25],
  ["m10 × 1,25", "metric", 10, 1.25],
  ["M10", "metric", 10, 1.5],
  ["M12 x 1.5 LH", "metric", 12, 1.5],
  ["M8x1-6g", "metric", 8, 1],
  ["M12-1.75", "metric", 12, 1.75],
  ["M10-6g", "metric", 10, 1.5],
  ["M10-1.25-6g", "metric", 10, 1.25],
  ["1/2-20 UNF", "unified", 12.7, 1.27],
  ["1/4-20", "unified", 6.35, 1.27],
  ["1-1/8-12 UNF-2A", "unified", 28.575, 25.4 / 12],
  ["#10-32", "unified", 4.826, 0.79375],
] as const)("reads the thread %s", (text, system, diameterMm, pitchMm) => {
  const read = readThread(text);
  if (!read.ok) throw new Error(read.error);
  expect(read.thread).toMatchObject({ system, text });
  expect(read.thread.diameterMm).toBeCloseTo(diameterMm, 9);
  expect(read.thread.pitchMm).toBeCloseTo(pitchMm, 9);
});

test("text that is no thread is refused", () => {
  for (const text of ["", "88 Nm", "M10x12", "M", "1/0-20", "M10x0", "x"])
    expect(readThread(text).ok, text).toBe(false);
});

test("unit symbols and spellings read as units, ambiguous ones are asked", () => {
  expect(readUnit("ft-lb")).toEqual({ ok: true, unit: "lbf·ft" });
  expect(readUnit("lbf.ft")).toEqual({ ok: true, unit: "lbf·ft" });
  expect(readUnit("US qt")).toEqual({ ok: true, unit: "US qt" });
  expect(readUnit("mil")).toMatchObject({ ok: false, reason: "ambiguous" });
  expect(readUnit("banana")).toMatchObject({ ok: false, reason: "unknown-unit" });
  for (const dimension of DIMENSIONS)
    for (const unit of unitsOf(dimension)) expect(readUnit(unit)).toEqual({ ok: true, unit });
});

test("what is shown can be read again: 3,000 random values in every unit", () => {
  const random = seeded(42);
  const units = DIMENSIONS.flatMap((dimension) => unitsOf(dimension)).filter(
    (unit): unit is Unit => unit !== "1" && unit !== "m³" && !unit.startsWith("Δ"),
  );
  for (let i = 0; i < 3000; i++) {
    const unit = units[Math.floor(random() * units.length)] as Unit;
    const figure = (random() * 10 ** Math.floor(random() * 4) + 0.01).toFixed(Math.floor(random() * 4));
    const first = readQuantity(`${figure} ${unit}`);
    if (!first.ok) throw new Error(`${figure} ${unit}: ${first.error}`);
    const shown = formatQuantity(first.quantity).text;
    const again = readQuantity(shown);
    if (!again.ok) throw new Error(`${shown}: ${again.error}`);
    const decimalMinutes = unit === "arcmin" ? 1e-6 : 0;
    expect(Math.abs(again.quantity.si - first.quantity.si), shown).toBeLessThanOrEqual(
      1e-9 * first.quantity.si + decimalMinutes,
    );
  }
});

const ALPHABET = [
  ..."0123456789.,/-+±°'\" ()%~<>=#½¾⅛⁄–−×·µΩΔ²",
  "Nm",
  "ft",
  "lb",
  "in",
  " to ",
  " then ",
  "min",
  "max",
  "mm",
  "turn",
  "loosen",
  "back off ",
  "snug",
  "wait ",
  "qt",
  "°C",
  "M10x",
  "\u2009",
  "\ud83d",
  "\u0000",
  "é",
  "between ",
  "and",
  "constructor",
  "__proto__",
];

test("20,000 random strings are read or refused with a place in the text, never thrown at", () => {
  const random = seeded(1);
  let readable = 0;
  for (let i = 0; i < 20000; i++) {
    const length = Math.floor(random() * (i % 10 === 0 ? 80 : 12));
    let text = "";
    for (let j = 0; j < length; j++) text += ALPHABET[Math.floor(random() * ALPHABET.length)];
    const dimension = i % 3 === 0 ? DIMENSIONS[i % DIMENSIONS.length] : undefined;
    const options: ReadOptions = dimension ? { dimension } : {};
    for (const result of [readQuantity(text, options), readValues(text, options), readThread(text)])
      if (!result.ok) {
        expect(result.error).not.toBe("");
        expect(result.at).toBeGreaterThanOrEqual(0);
        expect(result.at).toBeLessThanOrEqual(text.length);
      }
    const values = readValues(text, options);
    if (!values.ok) continue;
    readable++;
    for (const { quantity } of values.values) {
      if (!quantity) continue;
      expect(Number.isFinite(quantity.si), text).toBe(true);
      expect(Number.isFinite(quantity.value), text).toBe(true);
    }
    for (const prefer of ["metric", "inch"] as const)
      expect(formatValues(values.values, prefer).first, text).not.toMatch(/NaN|undefined|Infinity/);
  }
  expect(readable).toBeGreaterThan(300);
});

test("hostile text of 200 characters is refused at once", () => {
  const started = performance.now();
  for (const piece of [
    "1",
    "1,",
    "1/",
    "-",
    "1-",
    "(",
    "1 to ",
    "±",
    "ft-",
    "N.",
    "+90°",
    "then ",
    "1 ",
    "' ",
    "°",
    "back off ",
  ])
    for (const text of [piece.repeat(200).slice(0, 200), `${piece.repeat(200).slice(0, 195)} Nm`]) {
      readQuantity(text);
      readValues(text);
      readThread(text);
    }
  expect(performance.now() - started).toBeLessThan(2000);
});

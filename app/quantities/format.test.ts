import { expect, test } from "vitest";
import { seeded } from "../../tests/support/seeded";
import { convert } from "./convert";
import { formatQuantity, formatValues, pairUnits } from "./format";
import { readQuantity, readValues } from "./parse";
import type { Sense } from "./round";
import { unitsOf, type Unit } from "./units";

function read(text: string) {
  const result = readQuantity(text);
  if (!result.ok) throw new Error(`${text}: ${result.error}`);
  return result.quantity;
}

// A thin space is written "_" in these tables so that it can be seen.
const seen = (text: string) => text.replaceAll("\u2009", "_");

// 36 ft → 11.0 m: NIST SP 811 B.7.2; 40.1 in → 101.9 cm: NIST LC 1137; the other rows follow the same rule.
test.each([
  ["65 ft-lb", "N·m", "88_N·m"],
  ["88 Nm", "lbf·ft", "65_lbf·ft"],
  ["24.0 mm", "in", "0.945_in"],
  ["36 ft", "m", "11.0_m"],
  ["40.1 in", "cm", "101.9_cm"],
  ["10 Nm", "lbf·ft", "7.4_lbf·ft"],
  ["9 Nm", "lbf·in", "80_lbf·in"],
  ["100 Nm", "lbf·ft", "74_lbf·ft"],
  ["780 in-lb", "N·m", "88.1_N·m"],
  ["5 US qt", "L", "4.7_L"],
  ["4.5 L", "US qt", "4.8_US qt"],
  ["0.035 in", "mm", "0.89_mm"],
  ["0,8 mm", "in", "0.031_in"],
  ["13/16 in", "mm", "20.64_mm"],
  ["1/2 in", "mm", "12.7_mm"],
  ["32 psi", "kPa", "221_kPa"],
  ["195 °F", "°C", "91_°C"],
  ["90 °C", "°F", "194_°F"],
  ["-18 °C", "°C", "−18_°C"],
  ["3/4 turn", "deg", "270°"],
  ["1/3 turn", "deg", "120°"],
  ["90°", "deg", "90°"],
  ["35%", "%", "35%"],
  ["1°5'", "arcmin", "1°05′"],
  ["-0°30'", "arcmin", "−0°30′"],
  ["1-5/16", "in", "1-5/16_in"],
  ["1½ in", "in", "1-1/2_in"],
  ["24.0 mm", "mm", "24.0_mm"],
  ["2 turns", "turn", "2_turns"],
  ["1/2 turn", "turn", "1/2_turn"],
  ["0 mm", "in", "0_in"],
] as const)("%s in %s shows as %s", (text, unit, expected) => {
  expect(seen(formatQuantity(read(text), unit).text)).toBe(expected);
});

test("a minimum goes up and a maximum down, so that conversion never widens a limit", () => {
  expect(formatQuantity(read("22.0 mm"), "in", "up").figure).toBe("0.867");
  expect(formatQuantity(read("22.0 mm"), "in", "down").figure).toBe("0.866");
  expect(formatQuantity(read("10 mm"), "in", "down").figure).toBe("0.39");
  expect(formatQuantity(read("9 Nm"), "lbf·in", "down").figure).toBe("79");
});

// 1 in = 25.4 mm: 0.5 mm is 0.019685 in, 1.2 mm is 0.047244 in, 0.020 in is 0.508 mm.
test.each([
  ["limit 0.5 mm", "limit_0.0197_in", "limit_0.5_mm"],
  ["wear limit 1.2 mm", "limit_0.0472_in", "limit_1.2_mm"],
  ["limit 0.020 in", "limit_0.020_in", "limit_0.508_mm"],
] as const)("%s keeps a tenth of its last place in the other unit", (text, first, second) => {
  const typed = readValues(text);
  if (!typed.ok) throw new Error(typed.error);
  const shown = formatValues(typed.values, "inch");
  expect([shown.first, shown.second].map((each) => seen(each ?? "").replace(" ", "_"))).toEqual([
    first,
    second,
  ]);
});

test("2,000 random limits stay on their side in every unit of their dimension", () => {
  const random = seeded(99);
  for (let i = 0; i < 2000; i++) {
    const dimension = (["torque", "length", "pressure", "volume", "mass"] as const)[i % 5] ?? "torque";
    const units = unitsOf(dimension);
    const [from, to] = [0, 1].map(() => units[Math.floor(random() * units.length)]) as [Unit, Unit];
    const quantity = read(`${(random() * 200 + 1).toFixed(i % 3)} ${from}`);
    const exactly = convert(quantity, to);
    const slack = 1e-12 * exactly;
    const shown = (sense: Sense) => Number(formatQuantity(quantity, to, sense).figure);
    expect(shown("up"), `${quantity.text} min in ${to}`).toBeGreaterThanOrEqual(exactly - slack);
    expect(shown("down"), `${quantity.text} max in ${to}`).toBeLessThanOrEqual(exactly + slack);
    // What is shown is never further off than what was typed is rounded.
    const half = 0.5 * 10 ** -quantity.places * (exactly / quantity.value);
    expect(Math.abs(shown("nearest") - exactly), quantity.text).toBeLessThanOrEqual(half + slack);
  }
});

test.each([
  ["88 Nm", "88_N·m", "65_lbf·ft"],
  ["65 ft-lb ±5%", "88_N·m (84–92_N·m)", "65_lbf·ft ± 5%"],
  ["88 ± 4 Nm", "88 ± 4_N·m", "65_lbf·ft (62–67_lbf·ft)"],
  ["80-95 Nm", "80–95_N·m", "59.1–70.0_lbf·ft"],
  ["min 22.0 mm", "min 22.0_mm", "min 0.867_in"],
  ["max 9 Nm", "max 9_N·m", "max 79_lbf·in"],
  ["30 Nm + 90°", "30_N·m + 90°", "22_lbf·ft + 90°"],
  ["20 Nm, 40 Nm, +90°", "20_N·m, 40_N·m + 90°", "15_lbf·ft, 29.5_lbf·ft + 90°"],
  ["loosen, then 20 Nm + 60°", "loosen fully, 20_N·m + 60°", "loosen fully, 15_lbf·ft + 60°"],
  ["hand tight + 3/4 turn", "hand tight + 270°", null],
  ["1/4 turn past contact", "contact + 90°", null],
  ["back off 180°, 20 Nm", "back off 180°, 20_N·m", "back off 180°, 15_lbf·ft"],
  ["20 ± 5 °C", "20 ± 5_°C", "68_°F (59–77_°F)"],
  ["-5 to 10 °C", "−5_°C to 10_°C", "23–50_°F"],
  ["0°10' ± 5'", "0°10′ ± 0°05′", null],
  ["1.5 kgm", "15_N·m", "1.5_kgf·m"],
  ["12.6 V", "12.6_V", null],
  ["snug", "snug", null],
] as const)("%s shows as %s and %s with metric units first", (text, first, second) => {
  const values = readValues(text);
  if (!values.ok) throw new Error(values.error);
  const shown = formatValues(values.values, "metric");
  expect(seen(shown.first)).toBe(first);
  expect(shown.second === null ? null : seen(shown.second)).toBe(second);
  if (second !== null && text !== "1.5 kgm")
    expect(seen(formatValues(values.values, "inch").first)).toBe(second);
});

test("a plate always shows the unit typed, and the preferred system first", () => {
  expect(pairUnits(read("65 ft-lb"), "metric")).toEqual(["N·m", "lbf·ft"]);
  expect(pairUnits(read("65 ft-lb"), "inch")).toEqual(["lbf·ft", "N·m"]);
  expect(pairUnits(read("9 Nm"), "inch")).toEqual(["lbf·in", "N·m"]);
  expect(pairUnits(read("9 kgm"), "metric")).toEqual(["N·m", "kgf·m"]);
  expect(pairUnits(read("9 kgm"), "inch")).toEqual(["lbf·ft", "kgf·m"]);
  expect(pairUnits(read("2.3 bar"), "metric")).toEqual(["bar", "psi"]);
  expect(pairUnits(read("90°"), "inch")).toEqual(["deg", null]);
  expect(pairUnits(read("3/4 turn"), "inch")).toEqual(["deg", "turn"]);
});

function sizes(text: string) {
  const values = readValues(text, { role: "size" });
  if (!values.ok) throw new Error(values.error);
  const shown = formatValues(values.values, "inch");
  return [seen(shown.first), shown.second === null ? null : seen(shown.second)];
}

test("a tool's size stays as it is marked on the tool", () => {
  expect(sizes("19 mm")).toEqual(["19_mm", null]);
  expect(sizes("13/16")).toEqual(["13/16_in", "20.64_mm"]);
});

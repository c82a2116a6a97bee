import { expect, test } from "vitest";
import rows from "../../tests/reference/inch-fraction.json";
import { convert } from "./convert";
import { inchFraction, writeSixtyFourths } from "./inch-fraction";
import { readQuantity } from "./parse";

function read(text: string) {
  const result = readQuantity(text);
  if (!result.ok) throw new Error(`${text}: ${result.error}`);
  return result.quantity;
}

test.each(rows)("reads $input.text as inches (verified: $verified; $source)", (row) => {
  const quantity = read(row.input.text);
  const expected = row.expected;
  expect(quantity.unit).toBe("in");
  if (typeof expected === "number") {
    expect(Math.abs(quantity.value - expected)).toBeLessThanOrEqual(row.tolerance);
  } else {
    expect(Math.abs(quantity.value - expected.in)).toBeLessThanOrEqual(row.tolerance);
    expect(Math.abs(convert(quantity, "mm") - expected.mm)).toBeLessThanOrEqual(row.tolerance);
    expect(inchFraction(quantity)).toMatchObject({ equal: true, fraction: row.input.text });
  }
});

test("24.0 mm is not 15/16: the nearest fraction is named, and how far it is off", () => {
  expect(inchFraction(read("24.0 mm"))).toEqual({
    equal: false,
    fraction: "15/16",
    text: "nearest 15/16, 0.2\u2009mm small",
  });
});

test("a fraction is equal only within half a sixty-fourth of the precision given", () => {
  for (const [text, fraction] of [
    ["12.7 mm", "1/2"],
    ["19.05 mm", "3/4"],
    ["20.6375 mm", "13/16"],
    ["33.3375 mm", "1-5/16"],
    ["0.9375 in", "15/16"],
  ] as const)
    expect(inchFraction(read(text))).toEqual({ equal: true, fraction, text: `${fraction}\u2009in` });
  expect(inchFraction(read("19 mm")).text).toBe("nearest 3/4, 0.05\u2009mm large");
  expect(inchFraction(read("0.938 in")).text).toBe("nearest 15/16, 0.0005\u2009in small");
  expect(inchFraction(read("20.64 mm")).equal).toBe(false);
});

test("writes sixty-fourths in lowest terms", () => {
  expect([1, 2, 32, 64, 84, 127].map(writeSixtyFourths)).toEqual([
    "1/64",
    "1/32",
    "1/2",
    "1",
    "1-5/16",
    "1-63/64",
  ]);
});

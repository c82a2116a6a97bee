import { expect, test } from "vitest";
import { standIn, STAND_INS } from "./hex-fit";

test("a 3/4 in tool stands in on a 19 mm hex, and not the other way (clearance by ASME B18.2.2)", () => {
  expect(standIn(19.05, 19)?.tool).toBe("3/4 in");
  expect(standIn(19, 19.05)).toBeNull();
});

test("every stand-in is the larger tool on the smaller hex, by at most 0.07 mm", () => {
  for (const row of STAND_INS) {
    expect(row.toolMm).toBeGreaterThan(row.hexMm);
    expect(row.toolMm - row.hexMm).toBeLessThanOrEqual(0.07);
  }
});

test("close sizes that only nearly fit do not stand in", () => {
  for (const [tool, hex] of [
    [16, 15.875],
    [24, 23.8125],
    [11.1125, 11],
    [12.7, 13],
    [22.225, 22],
  ] as const)
    expect(standIn(tool, hex)).toBeNull();
});

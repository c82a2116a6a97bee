import { expect, test } from "vitest";
import { formatExactTimecode, formatTimecode, momentParam, readMoment, readTimecode } from "./timecode";

test("what is written can be read back", () => {
  for (const ms of [0, 1000, 59_000, 60_000, 83_000, 3_599_000, 3_600_000, 7_384_000])
    expect(readTimecode(formatTimecode(ms))).toBe(ms);
});

test("fractions and bare seconds are read; nonsense is not", () => {
  expect(readTimecode("1:23.5")).toBe(83_500);
  expect(readTimecode("83")).toBe(83_000);
  expect(readTimecode("1:75")).toBeNull();
  expect(readTimecode("soon")).toBeNull();
  expect(readTimecode("")).toBeNull();
});

test("the moment in the address survives the way there and back", () => {
  expect(readMoment(new URLSearchParams({ t: momentParam(404_110) }))).toBe(404_100);
  expect(readMoment(new URLSearchParams("t=-3"))).toBe(0);
  expect(readMoment(new URLSearchParams(""))).toBe(0);
});

test("an exact timecode reads back to the millisecond", () => {
  expect(formatExactTimecode(764_350)).toBe("12:44.35");
  expect(formatExactTimecode(764_000)).toBe("12:44");
  for (const ms of [0, 7, 999, 1_000, 59_999, 61_010, 3_723_456])
    expect(readTimecode(formatExactTimecode(ms))).toBe(ms);
});

import { expect, test } from "vitest";
import { PART_BYTES } from "./limits";
import {
  missingParts,
  retryAfterMs,
  secondsLeft,
  sentBytes,
  withMoment,
  type Moment,
} from "./upload-progress";

const plan = { sizeBytes: 3 * PART_BYTES + 1000, partBytes: PART_BYTES };

test("an upload that goes on sends what storage lacks and nothing else", () => {
  expect(missingParts(plan, new Set()).map(({ n }) => n)).toEqual([1, 2, 3, 4]);
  expect(missingParts(plan, new Set([1, 3]))).toEqual([
    { n: 2, from: PART_BYTES, to: 2 * PART_BYTES },
    { n: 4, from: 3 * PART_BYTES, to: 3 * PART_BYTES + 1000 },
  ]);
  expect(missingParts(plan, new Set([1, 2, 3, 4]))).toEqual([]);
  // A part that the file does not have counts for nothing.
  expect(missingParts(plan, new Set([9])).length).toBe(4);
});

test("whole parts and those on their way are counted, never more than the file", () => {
  expect(sentBytes(plan, new Set([1, 4]), [])).toBe(PART_BYTES + 1000);
  expect(sentBytes(plan, new Set([1]), [500, 70])).toBe(PART_BYTES + 570);
  // Browsers count the whole request, which may be a little larger than the part.
  expect(sentBytes(plan, new Set([1, 2, 3]), [2000])).toBe(plan.sizeBytes);
});

test("the time left follows the last ten seconds", () => {
  let moments: Moment[] = [];
  expect(secondsLeft(moments, 100)).toBeNull();
  for (let s = 0; s <= 30; s += 1)
    moments = withMoment(moments, { at: s * 1000, bytes: s < 20 ? 0 : (s - 20) * 10 });
  // 100 of 400 bytes after 30 seconds, ten a second: 30 seconds more.
  expect(moments[0]?.at).toBe(21_000);
  expect(secondsLeft(moments, 400)).toBe(30);
  expect(
    secondsLeft(
      [
        { at: 0, bytes: 5 },
        { at: 9000, bytes: 5 },
      ],
      400,
    ),
  ).toBeNull();
  expect(
    secondsLeft(
      [
        { at: 0, bytes: 0 },
        { at: 50, bytes: 300 },
      ],
      400,
    ),
  ).toBeNull();
});

test("tries come at growing distances, soon enough to notice that the network is back", () => {
  expect([0, 1, 2, 3, 4, 5, 6, 500].map(retryAfterMs)).toEqual([
    500, 1000, 2000, 4000, 8000, 15_000, 15_000, 15_000,
  ]);
});

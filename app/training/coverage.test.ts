import { expect, test } from "vitest";
import type { RecordingId } from "#drizzle/schema/ids";
import { coverage } from "./coverage";

const clip = (
  recordingId: string,
  inMs: number,
  outMs: number,
  cuts: { fromMs: number; toMs: number }[] = [],
) => ({
  recordingId: recordingId as RecordingId,
  inMs,
  outMs,
  cuts,
});
const stretch = (recordingId: string, fromMs: number, toMs: number) => ({ recordingId, fromMs, toMs });

test("nothing played is nothing seen, all played is all seen", () => {
  expect(coverage([], [clip("a", 0, 60_000)])).toBe(0);
  expect(coverage([stretch("a", 0, 60_000)], [clip("a", 0, 60_000)])).toBe(1);
});

test("the same seconds over and over count once", () => {
  const again = Array.from({ length: 50 }, () => stretch("a", 0, 15_000));
  expect(coverage(again, [clip("a", 0, 60_000)])).toBe(0.25);
});

test("overlapping and touching stretches join, in any order", () => {
  const stretches = [
    stretch("a", 30_000, 45_000),
    stretch("a", 10_000, 30_000),
    stretch("a", 20_000, 40_000),
  ];
  expect(coverage(stretches, [clip("a", 0, 70_000)])).toBe(0.5);
});

test("only what the lesson plays counts: outside the clip, in a cut, in another recording is nothing", () => {
  const clips = [clip("a", 10_000, 60_000, [{ fromMs: 20_000, toMs: 50_000 }])];
  expect(
    coverage([stretch("a", 0, 10_000), stretch("a", 20_000, 50_000), stretch("b", 0, 60_000)], clips),
  ).toBe(0);
  expect(coverage([stretch("a", 0, 60_000)], clips)).toBe(1);
  expect(coverage([stretch("a", 10_000, 20_000)], clips)).toBe(0.5);
});

test("clips of several recordings weigh by their length", () => {
  const clips = [clip("a", 0, 90_000), clip("b", 5_000, 15_000)];
  expect(coverage([stretch("a", 0, 90_000)], clips)).toBeCloseTo(0.9, 12);
  expect(coverage([stretch("b", 0, 20_000)], clips)).toBeCloseTo(0.1, 12);
});

test("a lesson without clips has nothing to see", () => {
  expect(coverage([stretch("a", 0, 1000)], [])).toBe(0);
});

import { expect, test } from "vitest";
import { PEAK_COUNT, readPeaks, soundPeaks } from "./sound-peaks";

test("a loud moment in silence stands where it was, at its height", () => {
  const samples = new Int16Array(180_000);
  samples[90_000] = -32768;
  samples[150_000] = 16384;
  const peaks = readPeaks(soundPeaks(samples));
  expect(peaks).toHaveLength(PEAK_COUNT);
  expect(peaks[900]).toBe(255);
  expect(peaks[1500]).toBe(128);
  expect(peaks.filter((peak) => peak > 0)).toHaveLength(2);
});

test("a recording without sound is flat, nothing stored is nothing", () => {
  expect(new Set(readPeaks(soundPeaks(new Int16Array(0))))).toEqual(new Set([0]));
  expect(readPeaks(null)).toEqual([]);
});

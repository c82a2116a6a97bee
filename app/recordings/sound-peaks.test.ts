import { expect, test } from "vitest";
import { PEAK_COUNT, PeakCollector, readPeaks, soundPeaks } from "./sound-peaks";

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

test("sound that comes sample by sample has the same peaks", () => {
  // 36 seconds at 8,000 samples a second: 20 ms a peak, two stretches of the collector.
  const samples = Int16Array.from({ length: 288_000 }, (_, at) =>
    Math.round(30_000 * Math.sin(at / 7) * Math.sin(at / 90_000)),
  );
  const collector = new PeakCollector(8000);
  for (const sample of samples) collector.add(sample);
  expect(collector.peaks()).toBe(soundPeaks(samples));
});

test("a short recording fills the whole lane", () => {
  const collector = new PeakCollector(8000);
  for (let at = 0; at < 8000; at += 1) collector.add(at < 4000 ? 0 : 32767);
  const peaks = readPeaks(collector.peaks());
  expect(peaks).toHaveLength(PEAK_COUNT);
  expect([peaks[0], peaks[899], peaks[900], peaks[1799]]).toEqual([0, 0, 255, 255]);
});

test("a recording without sound is flat, nothing stored is nothing", () => {
  expect(new Set(readPeaks(soundPeaks(new Int16Array(0))))).toEqual(new Set([0]));
  expect(new Set(readPeaks(new PeakCollector(8000).peaks()))).toEqual(new Set([0]));
  expect(readPeaks(null)).toEqual([]);
});

import { expect, test } from "vitest";
import type { RecordingId } from "#drizzle/schema/ids";
import { fileTime, lessonDuration, lessonTime, nearestLessonTime } from "./lesson-time";

const clips = [
  { recordingId: "A" as RecordingId, inMs: 10_000, outMs: 40_000, cuts: [{ fromMs: 20_000, toMs: 25_000 }] },
  { recordingId: "B" as RecordingId, inMs: 0, outMs: 5_000, cuts: [] },
];

test("a cut is skipped and the second clip follows without a gap", () => {
  expect(lessonDuration(clips)).toBe(30_000);
  expect(lessonTime(clips, "A", 10_000)).toBe(0);
  expect(lessonTime(clips, "A", 26_000)).toBe(11_000);
  expect(lessonTime(clips, "B", 1_000)).toBe(26_000);
});

test("a moment that is not played has no lesson time", () => {
  expect(lessonTime(clips, "A", 22_000)).toBeNull();
  expect(lessonTime(clips, "A", 5_000)).toBeNull();
  expect(lessonTime(clips, "C", 0)).toBeNull();
});

test("file time is the inverse of lesson time at every half second", () => {
  for (let ms = 0; ms < 30_000; ms += 500) {
    const at = fileTime(clips, ms);
    expect(at && lessonTime(clips, at.recordingId, at.fileMs)).toBe(ms);
  }
});

test("past the end is the end, before the start is the start", () => {
  expect(fileTime(clips, 99_000)).toEqual({ recordingId: "B", fileMs: 5_000 });
  expect(fileTime(clips, -5)).toEqual({ recordingId: "A", fileMs: 10_000 });
  expect(fileTime([], 0)).toBeNull();
});

test("a moment in a cut-out is shown as the next one that plays", () => {
  expect(nearestLessonTime(clips, "A", 22_000)).toBe(10_000);
  expect(nearestLessonTime(clips, "A", 5_000)).toBe(0);
  expect(nearestLessonTime(clips, "A", 99_000)).toBe(25_000);
  expect(nearestLessonTime(clips, "B", 1_000)).toBe(26_000);
});

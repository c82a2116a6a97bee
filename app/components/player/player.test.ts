import { expect, test } from "vitest";
import type { RecordingId } from "#drizzle/schema/ids";
import { piecesOf } from "~/lessons/lesson-time";
import { fileMsAt, follow, lessonMsAt, pieceAt } from "./follow-pieces";
import { spread } from "./spread";
import { StretchRecorder } from "./stretch-recorder";

const [A, B] = ["A", "B"] as unknown as [RecordingId, RecordingId];
// Clip one: 10 s to 60 s of A without 20–30 s. Clip two: the first 15 s of B.
const PIECES = piecesOf([
  { recordingId: A, inMs: 10_000, outMs: 60_000, cuts: [{ fromMs: 20_000, toMs: 30_000 }] },
  { recordingId: B, inMs: 0, outMs: 15_000, cuts: [] },
]);

test("a moment of the lesson finds its file and comes back", () => {
  for (const lessonMs of [0, 9_999, 10_000, 25_000, 39_999, 40_000, 54_999]) {
    const index = pieceAt(PIECES, lessonMs);
    const piece = PIECES[index]!;
    expect(lessonMsAt(piece, fileMsAt(piece, lessonMs))).toBe(lessonMs);
  }
  expect(pieceAt(PIECES, 40_000)).toBe(2);
  expect(pieceAt(PIECES, 9_000_000)).toBe(2);
  expect(pieceAt([], 5)).toBe(-1);
});

test("playing skips the cut, crosses into the next recording and stops after the last", () => {
  expect(follow(PIECES, 0, 19_000)).toEqual({ do: "play-on", leftMs: 1_000 });
  expect(follow(PIECES, 0, 20_000)).toEqual({ do: "go", piece: 1 });
  // A file may end a little before the length that was probed.
  expect(follow(PIECES, 1, 59_970)).toEqual({ do: "go", piece: 2 });
  expect(follow(PIECES, 2, 15_000)).toEqual({ do: "stop" });
});

test("what was played is kept, what was jumped over is not", () => {
  const recorder = new StretchRecorder();
  for (let ms = 1_000; ms <= 6_000; ms += 250) recorder.playing("A", ms);
  recorder.playing("A", 42_000);
  recorder.playing("A", 42_500);
  recorder.stopped();
  recorder.playing("B", 0);
  recorder.playing("B", 1_000);
  expect(recorder.take()).toEqual([
    { recordingId: "A", fromMs: 1_000, toMs: 6_000 },
    { recordingId: "A", fromMs: 42_000, toMs: 42_500 },
    { recordingId: "B", fromMs: 0, toMs: 1_000 },
  ]);
});

test("telling in between loses nothing and tells nothing twice", () => {
  const recorder = new StretchRecorder();
  const told = [];
  for (let ms = 0; ms <= 60_000; ms += 250) {
    recorder.playing("A", ms);
    if (ms % 15_000 === 0) told.push(...recorder.take());
  }
  recorder.stopped();
  told.push(...recorder.take());
  expect(told.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0)).toBe(60_000);
  expect(recorder.take()).toEqual([]);
});

test("a report that failed is told with the next one; dragging the timeline tells nothing", () => {
  const recorder = new StretchRecorder();
  recorder.playing("A", 0);
  recorder.playing("A", 2_000);
  const first = recorder.take();
  recorder.putBack(first);
  recorder.playing("A", 2_100);
  recorder.stopped();
  expect(recorder.take()).toEqual(first);
});

test("marks on the lane keep their order, stay on it and never touch", () => {
  const places = [0.5, 0.5, 0.505, 0.99, 1, 0];
  const placed = spread(places, 0.06);
  const sorted = placed.toSorted((a, b) => a - b);
  sorted.forEach((place, n) => {
    expect(place).toBeGreaterThanOrEqual(-1e-9);
    expect(place).toBeLessThanOrEqual(1 + 1e-9);
    if (n > 0) expect(place - (sorted[n - 1] as number)).toBeGreaterThanOrEqual(0.06 - 1e-9);
  });
  expect(placed[5]).toBe(Math.min(...placed));
  expect(spread([0.1, 0.9], 0.05)).toEqual([0.1, 0.9]);
  expect(spread([0.2, 0.2, 0.2], 0.9)).toEqual([0, 0.5, 1]);
});

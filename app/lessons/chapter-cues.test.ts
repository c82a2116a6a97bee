import { expect, test } from "vitest";
import type { ChapterId, RecordingId } from "#drizzle/schema/ids";
import { chapterCues } from "./chapter-cues";
import type { SnapshotChapter, SnapshotClip } from "./snapshot";

const A = "a" as RecordingId;
const B = "b" as RecordingId;

function chapter(id: string, recordingId: RecordingId, startMs: number, endMs: number): SnapshotChapter {
  return { id: id as ChapterId, recordingId, startMs, endMs, title: `Nut & <${id}>`, phase: "install" };
}

const chapters = [chapter("one", A, 0, 60), chapter("two", A, 60, 100), chapter("three", B, 0, 50)];
const clips: SnapshotClip[] = [
  { recordingId: A, inMs: 10, outMs: 90, cuts: [{ fromMs: 20, toMs: 30 }] },
  { recordingId: B, inMs: 5, outMs: 50, cuts: [] },
];
const spans = (recordingId?: string) =>
  chapterCues(chapters, clips, recordingId).map((cue) => `${cue.identifier} ${cue.startMs}-${cue.endMs}`);

test("in lesson time chapters lie end to end, cuts left out", () => {
  expect(spans()).toEqual(["one 0-40", "two 40-70", "three 70-115"]);
});

test("in the time of a file a cut stays a gap", () => {
  expect(spans(A)).toEqual(["one 10-20", "one 30-60", "two 60-90"]);
  expect(spans(B)).toEqual(["three 5-50"]);
  expect(spans("elsewhere")).toEqual([]);
});

test("a title is words, not markup", () => {
  expect(chapterCues(chapters, clips)[0]?.text).toBe("Nut &amp; &lt;one&gt;");
});

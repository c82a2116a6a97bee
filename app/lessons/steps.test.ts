import { expect, test } from "vitest";
import type { ChapterId, RecordingId } from "#drizzle/schema/ids";
import type { LearnerMark } from "./learner-lesson.server";
import type { Mark, Phase } from "./mark";
import { groupVariants, lengthWords, stepAt, stepsOf } from "./steps";

const [A, B] = ["A", "B"] as unknown as [RecordingId, RecordingId];

const chapter = (id: string, recordingId: RecordingId, startMs: number, endMs: number) => ({
  id: id as ChapterId,
  recordingId,
  startMs,
  endMs,
  title: id,
  phase: "install" as Phase,
});

function mark(id: string, chapterId: string, atMs: number, given: Partial<Mark> = {}): LearnerMark {
  const applies = { yearFrom: null, yearTo: null, engine: "", drive: "", variant: "", question: "" };
  const plain = {
    id,
    chapterId,
    atMs,
    recordingId: A,
    kind: "torque",
    component: id,
    componentKey: "",
    side: "none",
    position: "",
    toolName: "",
    signalWord: null,
    applies,
  };
  return { mark: { ...plain, ...given } as unknown as Mark, showing: "checked", doubts: [] };
}
const panel = (id: string, atMs: number, signalWord: Mark["signalWord"]) =>
  mark(id, "one", atMs, { kind: "caution", signalWord });

const CLIP_A = { recordingId: A, inMs: 0, outMs: 60_000, cuts: [] };

test("the most severe panel leads, the others stand where they bite", () => {
  const [step] = stepsOf({ clips: [CLIP_A], chapters: [chapter("one", A, 0, 60_000)] }, [
    mark("nut", "one", 30_000),
    panel("notice", 10_000, "NOTICE"),
    panel("warning", 40_000, "WARNING"),
    panel("caution", 20_000, "CAUTION"),
    mark("bolt", "one", 15_000),
  ]);
  expect(step?.lead?.mark.id).toBe("warning");
  expect(step?.items.map((item) => (item.form === "variants" ? "" : item.mark.mark.id))).toEqual([
    "notice",
    "bolt",
    "caution",
    "nut",
  ]);
});

test("steps stand in the order in which the clips play, in lesson time, without what is cut", () => {
  const steps = stepsOf(
    {
      clips: [
        { recordingId: B, inMs: 5_000, outMs: 25_000, cuts: [] },
        { recordingId: A, inMs: 0, outMs: 60_000, cuts: [{ fromMs: 10_000, toMs: 30_000 }] },
      ],
      chapters: [
        chapter("start", A, 0, 20_000),
        chapter("cut", A, 20_000, 30_000),
        chapter("end", A, 30_000, 60_000),
        chapter("before", B, 0, 30_000),
      ],
    },
    [],
  );
  expect(steps.map(({ n, chapter, startMs, endMs }) => [n, chapter.id, startMs, endMs])).toEqual([
    [1, "before", 0, 20_000],
    [2, "start", 20_000, 30_000],
    [3, "end", 30_000, 60_000],
  ]);
  expect([0, 19_999, 20_000, 45_000, 99_000].map((ms) => stepAt(steps, ms))).toEqual([0, 0, 1, 2, 2]);
});

const variant = (id: string, which: string, given: Partial<Mark> = {}) =>
  mark(id, "one", 0, {
    component: "Lower nut",
    applies: { yearFrom: null, yearTo: null, engine: "", drive: "", variant: which, question: "" },
    ...given,
  });

test("only what differs in what it applies to is a variant", () => {
  const [pair] = groupVariants([variant("a", "flanged nut"), variant("b", "plain nut")]);
  expect(pair).toMatchObject({ question: "Which of these is on the car?" });
  // Said twice in one lesson, and left and right, are no variants.
  expect(groupVariants([variant("a", ""), variant("b", "")])).toHaveLength(2);
  expect(
    groupVariants([variant("a", "old", { side: "left" }), variant("b", "new", { side: "right" })]),
  ).toHaveLength(2);
  // Marks without a name are never taken for one another.
  expect(
    groupVariants([variant("a", "old", { component: "" }), variant("b", "new", { component: "" })]),
  ).toHaveLength(2);
});

test("length in words", () => {
  expect([0, 59_999, 60_000, 1_120_000, 3_660_000].map(lengthWords)).toEqual([
    "0 s",
    "59 s",
    "1 min",
    "18 min 40 s",
    "1 h 1 min",
  ]);
});

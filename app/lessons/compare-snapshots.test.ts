import { expect, test } from "vitest";
import type {
  CaptionTrackId,
  ChapterId,
  CitationId,
  LessonId,
  MarkId,
  RecordingId,
} from "#drizzle/schema/ids";
import { compareSnapshots, isSame, type Comparable } from "./compare-snapshots";
import type { Mark, MarkValue } from "./mark";

const newtonMetres = (text: string, number: number): MarkValue => ({
  role: "value",
  action: null,
  hardware: "either",
  text,
  dimension: "torque",
  unit: "N·m",
  value: number,
  number,
});

const NUT: Mark = {
  id: "nut" as MarkId,
  lessonId: "l" as LessonId,
  chapterId: "c" as ChapterId,
  recordingId: "r" as RecordingId,
  atMs: 0,
  kind: "torque",
  state: "inked",
  component: "Lower link nut",
  componentKey: "sway-bar-link+lower+nut",
  side: "none",
  position: "",
  applies: { yearFrom: null, yearTo: null, engine: "", drive: "", variant: "", question: "" },
  safetyCritical: true,
  needs: "",
  note: "",
  values: [newtonMetres("88 Nm", 88)],
  thread: "M12x1.75",
  propertyClass: "8.8",
  condition: "clean-dry",
  conditionDetail: "",
  reuse: "replace-always",
  reuseDetail: "",
  tightenAt: "ride-height",
  runDown: "included",
  checkAgain: "not-stated",
  checkAgainDetail: "",
  threadDirection: "right",
  wheelLoad: "not-stated",
  sequence: "",
  tightenedState: "",
  toolName: "",
  partNumber: "",
  partRule: "not-stated",
  quantity: "",
  product: "",
  signalWord: null,
  words: "",
  reason: "",
  replaces: "",
  said: "",
  source: null,
  check: null,
  inkedBy: "Marta",
};

const LESSON: Comparable = {
  title: "Links",
  summary: "",
  system: "suspension",
  position: "",
  vehicles: [],
  clips: [{ recordingId: "r" as RecordingId, inMs: 0, outMs: 100, cuts: [] }],
  chapters: [
    { id: "one" as ChapterId, recordingId: "r", startMs: 0, endMs: 50, title: "Strip", phase: "remove" },
    { id: "two" as ChapterId, recordingId: "r", startMs: 50, endMs: 100, title: "Build", phase: "install" },
  ],
  marks: [NUT],
  captionTracks: [],
};

function changesTo(change: Partial<Mark>) {
  return compareSnapshots(LESSON, { ...LESSON, marks: [{ ...NUT, ...change }] }).marks.map(
    ({ what, before, after, facts }) => [what, before, after, ...facts],
  );
}

test("the same lesson is the same, whoever checked it", () => {
  const checked: Mark = {
    ...NUT,
    state: "checked",
    check: { outcome: "confirmed", by: "Dario", on: "2026-11-12", ownWork: false, reason: "" },
  };
  expect(isSame(compareSnapshots(LESSON, { ...LESSON, marks: [checked] }))).toBe(true);
});

test("changed: a number, role, component, thread, condition or rule differs", () => {
  expect(changesTo({ values: [newtonMetres("80 Nm", 80)] })).toEqual([["changed", "88 Nm", "80 Nm"]]);
  expect(changesTo({ values: [{ ...newtonMetres("88 Nm", 88), role: "max" }] })).toEqual([
    ["changed", "88 Nm", "max 88 Nm"],
  ]);
  expect(changesTo({ component: "Upper link nut" })).toEqual([["changed", "88 Nm", "88 Nm", "component"]]);
  expect(changesTo({ thread: "M14x1.5" })).toEqual([["changed", "88 Nm", "88 Nm", "thread"]]);
  expect(changesTo({ condition: "oiled" })).toEqual([["changed", "88 Nm", "88 Nm", "thread condition"]]);
  expect(changesTo({ reuse: "reuse" })).toEqual([["changed", "88 Nm", "88 Nm", "reuse"]]);
});

test("reworded: another spelling or unit of the same value, another source or note", () => {
  expect(changesTo({ values: [{ ...newtonMetres("88.0 N·m", 88 * (1 + 1e-12)), unit: "N·m" }] })).toEqual([
    ["reworded", "88 Nm", "88.0 N·m"],
  ]);
  const feet = newtonMetres("64.905470 lbf·ft", 88 * (1 + 1e-12));
  expect(changesTo({ values: [{ ...feet, unit: "lbf·ft", value: 64.90547 }] })).toEqual([
    ["reworded", "88 Nm", "64.905470 lbf·ft"],
  ]);
  expect(changesTo({ note: "paint mark" })).toEqual([["reworded", "88 Nm", "88 Nm", "note"]]);
  const source = {
    citationId: "s" as CitationId,
    kind: "maker" as const,
    title: "Manual",
    edition: "3",
    dated: "",
    place: "page 31",
    readOn: "2026-11-09",
    readBy: "Marta",
  };
  expect(changesTo({ source })).toEqual([["reworded", "88 Nm", "88 Nm", "source"]]);
});

test("new and removed marks, chapters and the rest", () => {
  const bolt = { ...NUT, id: "bolt" as MarkId, component: "Bracket bolt" };
  const compared = compareSnapshots(LESSON, {
    ...LESSON,
    title: "Front links",
    marks: [bolt],
    chapters: [
      {
        id: "one" as ChapterId,
        recordingId: "r",
        startMs: 0,
        endMs: 40,
        title: "Strip down",
        phase: "remove",
      },
      { id: "three" as ChapterId, recordingId: "r", startMs: 40, endMs: 100, title: "Fit", phase: null },
    ],
    captionTracks: [
      { id: "t" as CaptionTrackId, recordingId: "r" as RecordingId, language: "en", label: "English" },
    ],
  });
  expect(compared.marks.map(({ what, title }) => `${what} ${title}`)).toEqual([
    "new Bracket bolt",
    "removed Lower link nut",
  ]);
  expect(compared.chapters.map(({ what, before, after }) => `${what}: ${before} > ${after}`)).toEqual([
    "renamed: Strip > Strip down",
    "moved: Strip down > Strip down",
    "new:  > Fit",
    "removed: Build > ",
  ]);
  expect(compared.other).toEqual(["title", "captions"]);
  expect(isSame(compared)).toBe(false);
});

test("the words of a caution are what it says", () => {
  const caution: Mark = { ...NUT, kind: "caution", values: [], signalWord: "WARNING", words: "Stands." };
  const compared = compareSnapshots(
    { ...LESSON, marks: [caution] },
    { ...LESSON, marks: [{ ...caution, signalWord: "DANGER" }] },
  );
  expect(compared.marks).toMatchObject([
    { what: "changed", before: "WARNING: Stands.", after: "DANGER: Stands." },
  ]);
});

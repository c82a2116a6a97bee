import type { ChapterId, MarkId } from "#drizzle/schema/ids";
import { changedValues } from "./changed-values";
import { holdsFigure, type Mark, type Phase } from "./mark";
import { markTitle, PHASE_WORDS } from "./mark-words";
import type { Snapshot } from "./snapshot";
import { valuesText } from "./values-text";

/** What is compared: a snapshot, or a draft that is to become one and may still lack phases. */
export type Comparable = Readonly<
  Pick<
    Snapshot,
    "title" | "summary" | "system" | "position" | "vehicles" | "clips" | "marks" | "captionTracks"
  > & {
    chapters: readonly Readonly<{
      id: ChapterId;
      recordingId: string;
      startMs: number;
      endMs: number;
      title: string;
      phase: Phase | null;
    }>[];
  }
>;

/**
 * - "changed": the value says something else; people who rely on it are told and asked again.
 * - "reworded": something around it changed: spelling, unit, source, note.
 */
export type MarkChange = Readonly<{
  what: "changed" | "reworded" | "new" | "removed";
  markId: MarkId;
  kind: Mark["kind"];
  title: string;
  before: string;
  after: string;
  /** Which facts differ, in words, when figure and words are the same. */
  facts: readonly string[];
}>;

export type ChapterChange = Readonly<{
  what: "new" | "removed" | "renamed" | "moved" | "phase";
  chapterId: ChapterId;
  before: string;
  after: string;
}>;

export type Comparison = Readonly<{
  marks: readonly MarkChange[];
  chapters: readonly ChapterChange[];
  /** Other parts of the lesson that differ: "title", "vehicles", "recordings", "captions" … */
  other: readonly string[];
}>;

/** What a mark says, in one line: its value as typed, or its words. */
export function markSays(mark: Mark): string {
  switch (mark.kind) {
    case "torque":
    case "measure":
      return valuesText(mark.values);
    case "tool":
      return [mark.toolName, valuesText(mark.values)].filter(Boolean).join(" ");
    case "part":
      return [mark.component, mark.partNumber, mark.quantity].filter(Boolean).join(", ");
    case "supply":
      return mark.product;
    case "caution":
      return [mark.signalWord, mark.words].filter(Boolean).join(": ");
    case "correction":
      return `${mark.words} (not ${mark.replaces})`;
    default:
      return mark.kind satisfies never;
  }
}

const FACTS: readonly (readonly [words: string, of: (mark: Mark) => unknown])[] = [
  ["component", (mark) => mark.component],
  ["place on the car", (mark) => [mark.side, mark.position]],
  ["what it applies to", (mark) => mark.applies],
  ["thread", (mark) => [mark.thread, mark.propertyClass]],
  ["thread condition", (mark) => [mark.condition, mark.conditionDetail]],
  ["reuse", (mark) => [mark.reuse, mark.reuseDetail, mark.partRule]],
  ["height to tighten at", (mark) => mark.tightenAt],
  ["run-down torque", (mark) => mark.runDown],
  ["check again", (mark) => [mark.checkAgain, mark.checkAgainDetail]],
  ["thread direction", (mark) => mark.threadDirection],
  ["wheel load", (mark) => mark.wheelLoad],
  ["tightening order", (mark) => mark.sequence],
  ["state when tightened", (mark) => mark.tightenedState],
  ["safety-critical", (mark) => mark.safetyCritical],
  ["what the work needs", (mark) => mark.needs],
  ["note", (mark) => mark.note],
  ["reason", (mark) => mark.reason],
  ["source", (mark) => mark.source],
  ["moment", (mark) => [mark.chapterId, mark.recordingId, mark.atMs]],
];

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);

function compareMarks(before: readonly Mark[], after: readonly Mark[]): MarkChange[] {
  const former = new Map(before.map((mark) => [mark.id, mark]));
  const kept = new Set(after.map((mark) => mark.id));
  const changed = new Set(changedValues(before, after).map((pair) => pair.after.id));
  const row = (
    what: MarkChange["what"],
    mark: Mark,
    old: Mark | null,
    facts: readonly string[] = [],
  ): MarkChange => ({
    what,
    markId: mark.id,
    kind: mark.kind,
    title: markTitle(mark),
    before: old ? markSays(old) : "",
    after: what === "removed" ? "" : markSays(mark),
    facts,
  });
  return [
    ...after.flatMap((mark) => {
      const old = former.get(mark.id);
      if (!old) return [row("new", mark, null)];
      const facts = FACTS.flatMap(([words, of]) => (same(of(old), of(mark)) ? [] : [words]));
      if (changed.has(mark.id)) return [row("changed", mark, old, facts)];
      const says = markSays(old) !== markSays(mark);
      if (!says && facts.length === 0) return [];
      // Words of a caution or a correction are what it says; no figure rests on them.
      return [row(says && !holdsFigure(mark.kind) ? "changed" : "reworded", mark, old, facts)];
    }),
    ...before.filter((mark) => !kept.has(mark.id)).map((mark) => row("removed", mark, mark)),
  ];
}

function compareChapters(before: Comparable["chapters"], after: Comparable["chapters"]): ChapterChange[] {
  const former = new Map(before.map((chapter) => [chapter.id, chapter]));
  const kept = new Set(after.map((chapter) => chapter.id));
  const phase = (value: Phase | null) => (value === null ? "no phase" : PHASE_WORDS[value]);
  return [
    ...after.flatMap((chapter): ChapterChange[] => {
      const old = former.get(chapter.id);
      if (!old) return [{ what: "new", chapterId: chapter.id, before: "", after: chapter.title }];
      const changes: ChapterChange[] = [];
      if (old.title !== chapter.title)
        changes.push({ what: "renamed", chapterId: chapter.id, before: old.title, after: chapter.title });
      if (old.phase !== chapter.phase)
        changes.push({
          what: "phase",
          chapterId: chapter.id,
          before: `${chapter.title}: ${phase(old.phase)}`,
          after: phase(chapter.phase),
        });
      if (
        old.startMs !== chapter.startMs ||
        old.endMs !== chapter.endMs ||
        old.recordingId !== chapter.recordingId
      )
        changes.push({ what: "moved", chapterId: chapter.id, before: chapter.title, after: chapter.title });
      return changes;
    }),
    ...before
      .filter((chapter) => !kept.has(chapter.id))
      .map(({ id, title }): ChapterChange => ({ what: "removed", chapterId: id, before: title, after: "" })),
  ];
}

/**
 * What learners get to see differently. With `changed` as the data rules define it: a canonical number, role,
 * component, thread, condition or rule differs; another spelling or unit of the same value is "reworded".
 */
export function compareSnapshots(before: Comparable, after: Comparable): Comparison {
  const other: [string, (of: Comparable) => unknown][] = [
    ["title", (of) => of.title],
    ["summary", (of) => of.summary],
    ["system", (of) => of.system],
    ["position", (of) => of.position],
    ["vehicles", (of) => of.vehicles],
    [
      "recordings",
      (of) => of.clips.map(({ recordingId, inMs, outMs, cuts }) => [recordingId, inMs, outMs, cuts]),
    ],
    ["captions", (of) => of.captionTracks.map((track) => track.id)],
  ];
  return {
    marks: compareMarks(before.marks, after.marks),
    chapters: compareChapters(before.chapters, after.chapters),
    other: other.flatMap(([words, of]) => (same(of(before), of(after)) ? [] : [words])),
  };
}

/** True when learners would see nothing new. */
export function isSame({ marks, chapters, other }: Comparison): boolean {
  return marks.length === 0 && chapters.length === 0 && other.length === 0;
}

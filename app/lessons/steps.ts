import type { LearnerMark } from "./learner-lesson.server";
import { lessonDuration, lessonTime, piecesOf } from "./lesson-time";
import type { SignalWord } from "./mark";
import type { Snapshot, SnapshotChapter, SnapshotClip } from "./snapshot";

/** Marks of one component that differ in what they apply to: all are shown, with the question that settles it. */
export type Variants = Readonly<{ question: string; marks: readonly LearnerMark[] }>;

/** One thing in a step, in working order. */
export type StepItem =
  | Readonly<{ form: "panel"; mark: LearnerMark; lessonMs: number | null }>
  | Readonly<{ form: "plate"; mark: LearnerMark; lessonMs: number | null }>
  | Readonly<{ form: "variants"; variants: Variants; lessonMs: number | null }>;

/** A chapter as the step sheet shows it. Times are lesson time in ms. */
export type Step = Readonly<{
  n: number;
  chapter: SnapshotChapter;
  startMs: number;
  endMs: number;
  /** The one panel that stands before everything else in the step. */
  lead: LearnerMark | null;
  items: readonly StepItem[];
}>;

const SEVERITY: readonly SignalWord[] = ["DANGER", "WARNING", "CAUTION", "NOTICE"];

function severity(mark: LearnerMark): number {
  const word = mark.mark.signalWord;
  return word === null ? SEVERITY.length : SEVERITY.indexOf(word);
}

function appliesKey({ mark: { applies } }: LearnerMark): string {
  return JSON.stringify([
    applies.yearFrom,
    applies.yearTo,
    applies.engine,
    applies.drive,
    applies.variant.trim().toLowerCase(),
  ]);
}

function sameThing({ mark }: LearnerMark): string {
  const name = mark.componentKey || mark.component.trim().toLowerCase();
  return JSON.stringify([
    mark.kind,
    name || mark.id,
    mark.side,
    mark.position.trim().toLowerCase(),
    mark.kind === "tool" ? mark.toolName.trim().toLowerCase() : "",
  ]);
}

/** Splits marks into single ones and variants of one component that a vehicle has not settled. Order is kept. */
export function groupVariants(marks: readonly LearnerMark[]): (LearnerMark | Variants)[] {
  const groups = new Map<string, LearnerMark[]>();
  for (const mark of marks) {
    const key = sameThing(mark);
    const group = groups.get(key);
    if (group) group.push(mark);
    else groups.set(key, [mark]);
  }
  return [...groups.values()].flatMap((group): (LearnerMark | Variants)[] => {
    if (new Set(group.map(appliesKey)).size < 2) return group;
    const question = group.map(({ mark }) => mark.applies.question.trim()).find((text) => text !== "");
    return [{ question: question ?? "Which of these is on the car?", marks: group }];
  });
}

/** Where a chapter plays in lesson time: from its first kept moment to its last; null when the lesson skips all of it. */
function chapterSpan(
  clips: readonly SnapshotClip[],
  chapter: SnapshotChapter,
): { startMs: number; endMs: number } | null {
  const inside = piecesOf(clips).filter(
    (piece) =>
      piece.recordingId === chapter.recordingId &&
      piece.toMs > chapter.startMs &&
      piece.fromMs < chapter.endMs,
  );
  const first = inside[0];
  const last = inside.at(-1);
  if (!first || !last) return null;
  return {
    startMs: first.lessonStartMs + Math.max(0, chapter.startMs - first.fromMs),
    endMs: last.lessonStartMs + Math.min(chapter.endMs, last.toMs) - last.fromMs,
  };
}

/**
 * The lesson as a list of steps in the order they play, each with its plates in working order. At most one signal panel,
 * the most severe, leads a step; the rest stand at the moment where they bite. Chapters that the lesson skips are left out.
 */
export function stepsOf(
  snapshot: Pick<Snapshot, "clips" | "chapters">,
  marks: readonly LearnerMark[],
): Step[] {
  const { clips } = snapshot;
  const at = (mark: LearnerMark) => lessonTime(clips, mark.mark.recordingId, mark.mark.atMs);
  const shown = snapshot.chapters
    .map((chapter) => ({ chapter, span: chapterSpan(clips, chapter) }))
    .flatMap(({ chapter, span }) => (span ? [{ chapter, ...span }] : []))
    .toSorted((a, b) => a.startMs - b.startMs);
  return shown.map(({ chapter, startMs, endMs }, index) => {
    const own = marks
      .filter(({ mark, showing }) => mark.chapterId === chapter.id && showing !== "pencilled")
      .map((mark) => ({ mark, lessonMs: at(mark) }))
      .toSorted(
        (a, b) => (a.lessonMs ?? endMs) - (b.lessonMs ?? endMs) || (a.mark.mark.id < b.mark.mark.id ? -1 : 1),
      );
    const panels = own
      .filter(({ mark }) => mark.mark.kind === "caution")
      .toSorted((a, b) => severity(a.mark) - severity(b.mark));
    const lead = panels[0]?.mark ?? null;
    const items: StepItem[] = [];
    const times = new Map(own.map(({ mark, lessonMs }) => [mark, lessonMs]));
    const plates = own.filter(({ mark }) => mark.mark.kind !== "caution").map(({ mark }) => mark);
    for (const group of groupVariants(plates)) {
      if ("question" in group)
        items.push({
          form: "variants",
          variants: group,
          lessonMs: times.get(group.marks[0] as LearnerMark) ?? null,
        });
      else items.push({ form: "plate", mark: group, lessonMs: times.get(group) ?? null });
    }
    for (const { mark, lessonMs } of panels) if (mark !== lead) items.push({ form: "panel", mark, lessonMs });
    items.sort((a, b) => (a.lessonMs ?? endMs) - (b.lessonMs ?? endMs));
    return { n: index + 1, chapter, startMs, endMs, lead, items };
  });
}

/** The step that plays at a moment of lesson time: the last one that has begun. */
export function stepAt(steps: readonly Pick<Step, "startMs">[], lessonMs: number): number {
  let found = 0;
  steps.forEach((step, index) => {
    if (step.startMs <= lessonMs) found = index;
  });
  return found;
}

/** How long a lesson is, in words: 1120000 → "18 min 40 s". */
export function lengthWords(ms: number): string {
  const seconds = Math.floor(ms / 1000);
  const [h, m, s] = [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60, seconds % 60];
  const parts = [h > 0 ? `${h} h` : "", m > 0 ? `${m} min` : "", s > 0 && h === 0 ? `${s} s` : ""].filter(
    Boolean,
  );
  return parts.join(" ") || "0 s";
}

/** The length of a lesson's kept clips, in words. */
export function lessonLength(clips: readonly SnapshotClip[]): string {
  return lengthWords(lessonDuration(clips));
}

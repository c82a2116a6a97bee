import { otherNames } from "~/lessons/component-key";
import type { LearnerLesson, LearnerMark } from "~/lessons/learner-lesson.server";
import { lessonTime } from "~/lessons/lesson-time";
import type { Mark, MarkKind } from "~/lessons/mark";
import { mayAnswer } from "~/lessons/showing";
import { valuesText } from "~/lessons/values-text";
import { searchWords } from "./search-words";

/** One thing that can be found: a mark, a chapter or a lesson. The text fields are searched, the rest is carried. */
export type SearchDocument = Readonly<{
  id: string;
  type: "mark" | "chapter" | "lesson";
  lessonId: string;
  markId: string;
  kind: MarkKind | "";
  /** What it applies to, in the lesson's words. */
  component: string;
  /** Every other name of it that the trade uses. */
  names: string;
  /** What kind of thing it is, in words people search with. */
  kindWords: string;
  detail: string;
  chapter: string;
  lesson: string;
  vehicle: string;
  /** The parts that its lesson and chapter are about, each name as search words. */
  around: readonly (readonly string[])[];
}>;

const KIND_WORDS: Readonly<Record<MarkKind, string>> = {
  torque: "torque tighten",
  tool: "tool size socket wrench",
  measure: "measure measurement",
  part: "part number replace",
  supply: "supply",
  caution: "caution warning danger",
  correction: "correction wrong",
};

/** Words for what a measure measures, by its dimension. */
const DIMENSION_WORDS: Readonly<Record<string, string>> = {
  pressure: "pressure",
  volume: "capacity fill",
  temperature: "temperature",
  voltage: "voltage volt",
  resistance: "resistance ohm",
  length: "size distance",
  angle: "angle turn",
};

/** "HL-7031-40" is also typed as "HL703140". */
const runTogether = (partNumber: string) => partNumber.replace(/[^\p{L}\p{N}]+/gu, "");

function detailOf(mark: Mark): string {
  return [
    mark.toolName,
    mark.partNumber,
    runTogether(mark.partNumber),
    mark.product,
    mark.words,
    mark.reason,
    mark.side === "none" ? "" : mark.side,
    mark.position,
    mark.applies.variant,
    mark.thread,
    valuesText(mark.values),
    mark.kind === "measure" ? (DIMENSION_WORDS[mark.values[0]?.dimension ?? ""] ?? "") : "",
  ]
    .filter(Boolean)
    .join(" ");
}

/** A waiting value is found, so that the page can say whom to ask; a value in doubt is not. */
export function isFindable({ mark, showing }: LearnerMark): boolean {
  if (mark.kind === "correction") return false;
  return mayAnswer(showing) || showing === "withheld";
}

/** Everything of one lesson that can be found. */
export function documentsOf(lesson: LearnerLesson): SearchDocument[] {
  const { snapshot } = lesson;
  const vehicle = snapshot.vehicles.map((found) => `${found.make} ${found.model} ${found.engine}`).join(" ");
  const around = (...titles: string[]) => otherNames(titles.join(" / ")).map(searchWords);
  const common = {
    lessonId: snapshot.lessonId as string,
    lesson: snapshot.title,
    vehicle,
    around: around(snapshot.title),
  };
  const chapters = new Map(snapshot.chapters.map((chapter) => [chapter.id as string, chapter.title]));
  const plays = ({ mark }: LearnerMark) => lessonTime(snapshot.clips, mark.recordingId, mark.atMs) !== null;
  return [
    {
      ...common,
      id: `lesson:${snapshot.lessonId}`,
      type: "lesson",
      markId: "",
      kind: "",
      component: "",
      names: otherNames(snapshot.title).join(" "),
      kindWords: "",
      detail: `${snapshot.summary} ${snapshot.system} ${snapshot.position}`,
      chapter: "",
    },
    ...snapshot.chapters.map((chapter): SearchDocument => ({
      ...common,
      id: `chapter:${snapshot.lessonId}:${chapter.id}`,
      type: "chapter",
      markId: "",
      kind: "",
      component: "",
      names: otherNames(chapter.title).join(" "),
      kindWords: chapter.phase,
      detail: "",
      chapter: chapter.title,
    })),
    ...lesson.marks
      .filter((found) => isFindable(found) && plays(found))
      .map(({ mark }): SearchDocument => ({
        ...common,
        id: `mark:${mark.id}`,
        type: "mark",
        markId: mark.id,
        kind: mark.kind,
        component: mark.component || mark.toolName || mark.product || mark.words,
        names: otherNames(mark.component).join(" "),
        kindWords: KIND_WORDS[mark.kind],
        detail: detailOf(mark),
        chapter: chapters.get(mark.chapterId) ?? "",
        around: around(snapshot.title, chapters.get(mark.chapterId) ?? ""),
      })),
  ];
}

import type { AppliesTo } from "~/lessons/mark";
import { valuesText } from "~/lessons/values-text";
import { vehiclesWords, yearsWords } from "~/lessons/vehicle-words";
import type { FoundValue, SearchResult } from "./search-shop.server";

/** One answer as other programs read it: figures as typed, `si` canonical (N·m, m, Pa, m³, degree, K), `atMs` in lesson time. */
export type FoundJson = Readonly<{
  answers: readonly Readonly<{
    markId: string;
    lessonId: string;
    lessonTitle: string;
    chapterTitle: string;
    kind: string;
    component: string;
    text: string;
    value: number | null;
    unit: string | null;
    si: number | null;
    atMs: number;
    state: string;
    /** For which cars the lesson is, and what stands against the figure ("" for nothing): no figure goes without them. */
    vehicle: string;
    warning: string;
  }>[];
  moments: readonly Readonly<{
    lessonId: string;
    lessonTitle: string;
    chapterTitle: string;
    atMs: number;
    snippet: string;
    /** What is right where the snippet is wrong, else "". */
    correction: string;
  }>[];
  lessons: readonly Readonly<{ lessonId: string; lessonTitle: string; vehicle: string }>[];
}>;

/** Which of several variants a value is for: a program must not take one for all. */
function variantWords({ yearFrom, yearTo, engine, drive, variant }: AppliesTo): string {
  return [yearsWords(yearFrom, yearTo), engine, drive, variant].filter(Boolean).join(", ");
}

function answerJson({
  lessonId,
  lessonTitle,
  chapterTitle,
  vehicles,
  found: { mark, showing, doubts },
  atMs,
}: FoundValue): FoundJson["answers"][number] {
  const lead = mark.values.find((row) => row.value !== null);
  const text =
    mark.values.length > 0
      ? valuesText(mark.values)
      : mark.kind === "part"
        ? mark.partNumber
        : mark.kind === "supply"
          ? mark.product
          : mark.words;
  return {
    markId: mark.id,
    lessonId,
    lessonTitle,
    chapterTitle,
    kind: mark.kind,
    component: [mark.component || mark.toolName, variantWords(mark.applies)].filter(Boolean).join(", "),
    text,
    value: lead?.value ?? null,
    unit: lead?.unit ?? null,
    si: lead?.number ?? null,
    atMs,
    state: mark.state,
    vehicle: vehiclesWords(vehicles),
    warning:
      doubts.length > 0 ? "somebody says this looks wrong" : showing === "unchecked" ? "not yet checked" : "",
  };
}

/** A search result for other programs. Waiting values carry no figure; they are left out of the answers. */
export function foundJson(result: Pick<SearchResult, "answers" | "moments" | "lessons">): FoundJson {
  return {
    answers: result.answers.filter(({ found }) => found.showing !== "withheld").map(answerJson),
    moments: result.moments.map(({ lessonId, lessonTitle, chapterTitle, atMs, words, correction }) => ({
      lessonId,
      lessonTitle,
      chapterTitle,
      atMs,
      snippet: words,
      correction,
    })),
    lessons: result.lessons.map(({ lessonId, lessonTitle, vehicles }) => ({
      lessonId,
      lessonTitle,
      vehicle: vehiclesWords(vehicles),
    })),
  };
}

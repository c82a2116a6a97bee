import type { Scope } from "~/auth/scope.server";
import { componentKey, componentsIn } from "~/lessons/component-key";
import { correctionAt } from "~/lessons/correction-at";
import type { LearnerLesson, LearnerMark } from "~/lessons/learner-lesson.server";
import { lessonTime } from "~/lessons/lesson-time";
import type { Mark } from "~/lessons/mark";
import { mayAnswer } from "~/lessons/showing";
import { sameKind } from "~/quantities/units";
import type { Quantity } from "~/quantities/quantity";
import { findMoments } from "./find-moments.server";
import { readQuery, type Intent, type Query } from "./read-query";
import { sharedComponents } from "./search-document";
import { findDocuments, type Hit } from "./search-index";
import { sameValue } from "./same-value";
import { shopIndex } from "./shop-index.server";

export type FoundValue = Readonly<{
  lessonId: string;
  lessonTitle: string;
  chapterTitle: string;
  lesson: LearnerLesson["snapshot"];
  found: LearnerMark;
  /** In lesson time. */
  atMs: number;
  /** Its place among the values of the lesson. */
  order: number;
  score: number;
}>;

export type FoundMoment = Readonly<{
  lessonId: string;
  lessonTitle: string;
  chapterTitle: string;
  atMs: number;
  words: string;
  /** What is right where the words are wrong, else "". */
  correction: string;
}>;
export type FoundLesson = Readonly<{
  lessonId: string;
  lessonTitle: string;
  vehicles: LearnerLesson["snapshot"]["vehicles"];
}>;

export type SearchResult = Readonly<{
  query: Query;
  /** For the chosen vehicle, for any vehicle, or, with none chosen, for all. */
  answers: readonly FoundValue[];
  /** Values for other vehicles than the chosen one: never mixed in. */
  elsewhere: readonly FoundValue[];
  moments: readonly FoundMoment[];
  lessons: readonly FoundLesson[];
}>;

const KINDS_OF: Readonly<Record<Intent, readonly Mark["kind"][]>> = {
  torque: ["torque"],
  size: ["tool"],
  measure: ["measure"],
  pressure: ["measure"],
  capacity: ["measure"],
  part: ["part"],
  caution: ["caution"],
  supply: ["supply"],
  how: [],
};

/** The dimension that an intent asks for, where the kind alone does not tell. */
const DIMENSION_OF: Partial<Record<Intent, string>> = { pressure: "pressure", capacity: "volume" };

/** Whether a mark holds the quantity that was searched: lengths of tools exactly, the rest as near as a gauge tells. */
function holdsQuantity(mark: Mark, quantity: Quantity): boolean {
  return mark.values.some(
    (row) =>
      row.number !== null &&
      row.unit !== null &&
      ((sameKind(row.unit, quantity.unit) &&
        Math.abs(row.number - quantity.si) <=
          Math.abs(quantity.si) * (row.dimension === "length" ? 1e-4 : 0.01)) ||
        // "88 degrees" may be said of a thermostat.
        (quantity.unit === "deg" && row.dimension === "temperature" && row.value === quantity.value)),
  );
}

/** The components that a query asks for; one of them must be what an answer is about. */
function aboutSame(query: string, mark: Mark): number {
  const wanted = componentsIn(query).map(({ key }) => key);
  if (wanted.length === 0) return 1;
  const has = new Set(componentsIn(mark.component).map(({ key }) => key));
  return wanted.some((key) => has.has(key)) ? 2.5 : 0.6;
}

function rank(query: Query, text: string, hit: Pick<Hit, "score">, found: LearnerMark): number {
  const { mark, showing } = found;
  let score = hit.score * aboutSame(text, mark);
  if (query.intent) {
    if (KINDS_OF[query.intent].includes(mark.kind)) score *= 20;
    if (query.intent === "part" && mark.partNumber !== "") score *= 3;
    const dimension = DIMENSION_OF[query.intent];
    if (dimension) score *= mark.values.some((row) => row.dimension === dimension) ? 3 : 0.3;
  } else if (mark.kind === "torque" || mark.kind === "measure") score *= 1.5;
  if (query.quantity) {
    if (!holdsQuantity(mark, query.quantity)) score *= 0.05;
    else if (query.quantity.dimension === "length" && mark.kind === "tool") score *= 2;
  }
  // What was seen on one car answers less than what is specified.
  if (mark.values.some((row) => row.role === "measured")) score *= 0.5;
  if (!mayAnswer(showing)) score *= 0.8;
  return score;
}

/** Which of two values a lesson writes down first. */
function comesBefore(a: FoundValue, b: FoundValue): boolean {
  return a.atMs < b.atMs || (a.atMs === b.atMs && a.order < b.order);
}

function chapterTitle(lesson: LearnerLesson["snapshot"], recordingId: string, fileMs: number): string {
  return (
    lesson.chapters.find(
      (chapter) => chapter.recordingId === recordingId && fileMs >= chapter.startMs && fileMs < chapter.endMs,
    )?.title ?? ""
  );
}

/** Whether a value is for the chosen vehicle: the lesson names it, or names none at all. */
function fitsVehicle(lesson: LearnerLesson["snapshot"], vehicleId: string): boolean {
  return lesson.vehicles.length === 0 || lesson.vehicles.some((vehicle) => vehicle.id === vehicleId);
}

/** Finds values, moments and lessons of the shop. `vehicleId` "" = none chosen. */
export function searchShop(scope: Scope, text: string, vehicleId: string, limit: number): SearchResult {
  const query = readQuery(text);
  const { index, lessons } = shopIndex(scope);
  const values: FoundValue[] = [];
  const add = (lesson: LearnerLesson, found: LearnerMark, score: number) => {
    const { mark } = found;
    const atMs = lessonTime(lesson.snapshot.clips, mark.recordingId, mark.atMs);
    if (atMs === null || score <= 0) return;
    values.push({
      lessonId: lesson.snapshot.lessonId,
      lessonTitle: lesson.snapshot.title,
      chapterTitle: chapterTitle(lesson.snapshot, mark.recordingId, mark.atMs),
      lesson: lesson.snapshot,
      found,
      atMs,
      order: lesson.marks.indexOf(found),
      score,
    });
  };

  const { hits, complete } = findDocuments(index, query.words);
  const namesParts = componentsIn(text).length > 0;
  for (const hit of hits) {
    // A named part that the library does not know is not answered with another one.
    if (!complete && namesParts && sharedComponents(text, hit.component) === 0) continue;
    const lesson = lessons.get(hit.lessonId);
    const found = hit.type === "mark" ? lesson?.marks.find(({ mark }) => mark.id === hit.markId) : undefined;
    if (lesson && found) add(lesson, found, rank(query, text, hit, found));
  }
  // A quantity alone ("88 Nm", "10 mm") is looked up by its value, not by its digits.
  if (query.words.length === 0 && query.quantity)
    for (const lesson of lessons.values())
      for (const found of lesson.marks)
        if (mayAnswer(found.showing) && holdsQuantity(found.mark, query.quantity))
          add(lesson, found, rank(query, text, { score: 1 }, found));

  values.sort((a, b) => b.score - a.score || a.atMs - b.atMs || (a.found.mark.id < b.found.mark.id ? -1 : 1));
  const best = values[0]?.score ?? 0;
  const worth: FoundValue[] = [];
  for (const value of values) {
    if (value.score < best * 0.08) break;
    const again = worth.findIndex(({ found }) => sameValue(found.mark, value.found.mark));
    if (again < 0) worth.push(value);
    // Said twice: the first moment stands, in the place of the better one.
    else if (comesBefore(value, worth[again] as FoundValue)) worth[again] = value;
  }
  const answers = worth.filter(({ lesson }) => vehicleId === "" || fitsVehicle(lesson, vehicleId));
  const elsewhere = worth.filter((value) => !answers.includes(value));

  // "Torque" is rarely said aloud: without a cue that has every word, those that name the thing are found.
  const said = findMoments(scope, text, limit * 2);
  const moments = (said.length > 0 ? said : findMoments(scope, query.words.join(" "), limit * 2)).flatMap(
    (moment): FoundMoment[] => {
      const lesson = lessons.get(moment.lessonId);
      if (!lesson || (vehicleId !== "" && !fitsVehicle(lesson.snapshot, vehicleId))) return [];
      const atMs = lessonTime(lesson.snapshot.clips, moment.recordingId, moment.startMs);
      return atMs === null
        ? []
        : [
            {
              lessonId: moment.lessonId,
              lessonTitle: lesson.snapshot.title,
              chapterTitle: chapterTitle(lesson.snapshot, moment.recordingId, moment.startMs),
              atMs,
              words: moment.words,
              correction: correctionAt(
                lesson.marks.map(({ mark }) => mark),
                { ...moment, endMs: moment.startMs, text: moment.words },
              ),
            },
          ];
    },
  );

  const seen = new Set<string>();
  const found = hits
    .filter((hit) => hit.type !== "mark")
    .flatMap((hit): FoundLesson[] => {
      const lesson = lessons.get(hit.lessonId);
      if (!lesson || seen.has(hit.lessonId)) return [];
      seen.add(hit.lessonId);
      return [
        { lessonId: hit.lessonId, lessonTitle: lesson.snapshot.title, vehicles: lesson.snapshot.vehicles },
      ];
    });
  return {
    query,
    answers: answers.slice(0, limit),
    elsewhere: elsewhere.slice(0, limit),
    moments: moments.slice(0, limit),
    lessons: found.slice(0, limit),
  };
}

/** Other values of the same component in the same lesson: stages, new and reused hardware, the upper beside the lower. */
export function besides(value: FoundValue, lesson: LearnerLesson): readonly LearnerMark[] {
  const key = value.found.mark.componentKey || componentKey(value.found.mark.component);
  const main = key.split("+")[0] ?? key;
  return lesson.marks.filter(
    ({ mark, showing }) =>
      mark.id !== value.found.mark.id &&
      mark.kind === value.found.mark.kind &&
      mayAnswer(showing) &&
      (mark.componentKey.split("+")[0] ?? "") === main,
  );
}

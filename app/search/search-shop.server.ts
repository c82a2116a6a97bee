import type { Scope } from "~/auth/scope.server";
import { correctionAt } from "~/lessons/correction-at";
import type { LearnerLesson, LearnerMark } from "~/lessons/learner-lesson.server";
import { lessonTime } from "~/lessons/lesson-time";
import { mayAnswer } from "~/lessons/showing";
import type { SnapshotVehicle } from "~/lessons/snapshot";
import { groupVariants } from "~/lessons/steps";
import { findMoments } from "./find-moments.server";
import { isHeldBack } from "./held-back";
import { namedVehicle, valueFits } from "./named-vehicle";
import { holdsQuantity, isElsewhere, rankValue } from "./rank-value";
import { readQuery, type Query } from "./read-query";
import { saysLess, sameValue } from "./same-value";
import { isFindable } from "./search-document";
import { findDocuments } from "./search-index";
import { shopIndex } from "./shop-index.server";

export type FoundValue = Readonly<{
  lessonId: string;
  lessonTitle: string;
  chapterTitle: string;
  vehicles: readonly SnapshotVehicle[];
  found: LearnerMark;
  /** In lesson time. */
  atMs: number;
  /** What settles which of several variants is on the car; "" where there is one value. Variants stand side by side. */
  question: string;
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
  vehicles: readonly SnapshotVehicle[];
}>;

export type SearchResult = Readonly<{
  query: Query;
  /** For the vehicle that was chosen or named; with none, for all. */
  answers: readonly FoundValue[];
  /** Values for other vehicles than that one: never mixed in. */
  elsewhere: readonly FoundValue[];
  moments: readonly FoundMoment[];
  lessons: readonly FoundLesson[];
}>;

type Ranked = Readonly<{ lesson: LearnerLesson; found: LearnerMark; atMs: number; rank: number }>;
type IsFor = (vehicle: SnapshotVehicle) => boolean;

/** An answer worth less than this part of the best one is left out. */
const WORTH = 0.08;

function chapterTitle(lesson: LearnerLesson["snapshot"], recordingId: string, fileMs: number): string {
  return (
    lesson.chapters.find(
      (chapter) => chapter.recordingId === recordingId && fileMs >= chapter.startMs && fileMs < chapter.endMs,
    )?.title ?? ""
  );
}

/** Whether a lesson is for the vehicle: it names it, or names none at all. */
function lessonFits({ vehicles }: LearnerLesson["snapshot"], isFor: IsFor | null): boolean {
  return isFor === null || vehicles.length === 0 || vehicles.some(isFor);
}

function markFits({ snapshot }: LearnerLesson, { mark }: LearnerMark, isFor: IsFor | null): boolean {
  if (isFor === null || snapshot.vehicles.length === 0) return true;
  return snapshot.vehicles.some((vehicle) => isFor(vehicle) && valueFits(mark.applies, vehicle));
}

/** Marks that answer the query, best first. */
function rankedValues(query: Query, { index, lessons }: ReturnType<typeof shopIndex>): Ranked[] {
  const values: Ranked[] = [];
  const add = (lesson: LearnerLesson, found: LearnerMark, score: number) => {
    const { snapshot } = lesson;
    const atMs = lessonTime(snapshot.clips, found.mark.recordingId, found.mark.atMs);
    if (atMs === null || isElsewhere(query, found.mark, snapshot)) return;
    const rank = rankValue(query, found, score);
    if (rank > 0) values.push({ lesson, found, atMs, rank });
  };
  if (query.unknown.length > 0) return [];
  for (const hit of findDocuments(index, query)) {
    const lesson = lessons.get(hit.lessonId);
    const found = hit.type === "mark" ? lesson?.marks.find(({ mark }) => mark.id === hit.markId) : undefined;
    if (lesson && found) add(lesson, found, hit.score);
  }
  // A quantity alone ("88 Nm", "10 mm socket") is looked up by its value, not by its digits.
  if (query.must.length === 0 && query.quantity)
    for (const lesson of lessons.values())
      for (const found of lesson.marks)
        if (isFindable(found) && mayAnswer(found.showing) && holdsQuantity(found.mark, query.quantity))
          add(lesson, found, 1);
  return values.toSorted(
    (a, b) => b.rank - a.rank || a.atMs - b.atMs || (a.found.mark.id < b.found.mark.id ? -1 : 1),
  );
}

/** Each value once: the first moment of it, and of a value said in part only the whole. */
function eachOnce(values: readonly Ranked[]): Ranked[] {
  const once: Ranked[] = [];
  for (const value of values) {
    const { mark } = value.found;
    const at = once.findIndex(
      ({ found }) => sameValue(found.mark, mark) || saysLess(found.mark, mark) || saysLess(mark, found.mark),
    );
    const other = once[at];
    if (!other) once.push(value);
    else if (
      saysLess(other.found.mark, mark) ||
      (!saysLess(mark, other.found.mark) && comesBefore(value, other))
    )
      once[at] = value;
  }
  return once;
}

function comesBefore(a: Ranked, b: Ranked): boolean {
  if (a.atMs !== b.atMs) return a.atMs < b.atMs;
  return a.lesson.marks.indexOf(a.found) < b.lesson.marks.indexOf(b.found);
}

/**
 * The best values, at most `limit`; a component with variants counts once, and all its variants stand together: never
 * one alone where the vehicle does not settle which is on the car.
 */
function withVariants(
  values: readonly Ranked[],
  isFor: IsFor | null,
  limit: number,
): (Ranked & { question: string })[] {
  const shown = new Set<string>();
  let count = 0;
  return values.flatMap((value) => {
    if (count >= limit) return [];
    if (shown.has(value.found.mark.id)) return [];
    const open = value.lesson.marks.filter(
      (found) => isFindable(found) && markFits(value.lesson, found, isFor),
    );
    const group = groupVariants(open).find(
      (found) => "question" in found && found.marks.some(({ mark }) => mark.id === value.found.mark.id),
    );
    const all = group && "question" in group ? group.marks : [value.found];
    const question = group && "question" in group ? group.question : "";
    count += 1;
    return all.flatMap((found) => {
      const { mark } = found;
      const atMs = lessonTime(value.lesson.snapshot.clips, mark.recordingId, mark.atMs);
      if (atMs === null || shown.has(mark.id)) return [];
      shown.add(mark.id);
      return [{ ...value, found, atMs, question }];
    });
  });
}

function foundValue({
  lesson: { snapshot },
  found,
  atMs,
  question,
}: Ranked & { question: string }): FoundValue {
  const { mark } = found;
  return {
    lessonId: snapshot.lessonId,
    lessonTitle: snapshot.title,
    chapterTitle: chapterTitle(snapshot, mark.recordingId, mark.atMs),
    vehicles: snapshot.vehicles,
    found,
    atMs,
    question,
  };
}

/** Finds values, moments and lessons of the shop. `vehicleId` "" = none chosen. */
export function searchShop(scope: Scope, text: string, vehicleId: string, limit: number): SearchResult {
  const shop = shopIndex(scope);
  const { index, lessons } = shop;
  const named = namedVehicle(
    text,
    [...lessons.values()].flatMap(({ snapshot }) => snapshot.vehicles),
  );
  const query = readQuery(named.rest, index.words);
  const chosen: IsFor | null = vehicleId === "" ? null : ({ id }) => id === vehicleId;
  const isFor: IsFor | null =
    chosen && named.fits
      ? (vehicle) => chosen(vehicle) && named.fits?.(vehicle) === true
      : (chosen ?? named.fits);

  const values = rankedValues(query, shop);
  const best = values[0]?.rank ?? 0;
  const worth = eachOnce(values.filter(({ rank }) => rank >= best * WORTH));
  const answers = worth.filter(({ lesson, found }) => markFits(lesson, found, isFor));
  const elsewhere = worth.filter(({ lesson, found }) => !markFits(lesson, found, chosen ?? named.fits));

  const seen = new Set<string>();
  return {
    query,
    answers: withVariants(answers, isFor, limit).map(foundValue),
    elsewhere: withVariants(elsewhere, null, limit).map(foundValue),
    moments: findMoments(scope, [named.rest, query.text, query.must.join(" ")], limit * 3)
      .flatMap((moment): FoundMoment[] => {
        const lesson = lessons.get(moment.lessonId);
        if (!lesson || !lessonFits(lesson.snapshot, isFor) || isHeldBack(lesson, moment)) return [];
        const { lessonId, recordingId, startMs, words } = moment;
        const atMs = lessonTime(lesson.snapshot.clips, recordingId, startMs);
        if (atMs === null) return [];
        return [
          {
            lessonId,
            lessonTitle: lesson.snapshot.title,
            chapterTitle: chapterTitle(lesson.snapshot, recordingId, startMs),
            atMs,
            words,
            correction: correctionAt(
              lesson.marks.map(({ mark }) => mark),
              { recordingId, startMs, endMs: startMs, text: words },
            ),
          },
        ];
      })
      .slice(0, limit),
    lessons: findDocuments(index, query)
      .flatMap((hit): FoundLesson[] => {
        const lesson = hit.type === "mark" ? undefined : lessons.get(hit.lessonId);
        if (!lesson || seen.has(hit.lessonId) || !lessonFits(lesson.snapshot, isFor)) return [];
        seen.add(hit.lessonId);
        const { lessonId, title, vehicles } = lesson.snapshot;
        return [{ lessonId, lessonTitle: title, vehicles }];
      })
      .slice(0, limit),
  };
}

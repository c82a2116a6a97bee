import type { ChapterId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import { isBushedJoint } from "~/lessons/component-key";
import type { Draft, DraftChapter } from "~/lessons/draft";
import { nearestLessonTime } from "~/lessons/lesson-time";
import { holdsFigure, needsSource, type Mark } from "~/lessons/mark";
import { markTitle } from "~/lessons/mark-words";
import { formatTimecode } from "~/lessons/timecode";
import { findContradictions } from "./contradictions";
import { REQUIRED_CAUTIONS, type RequiredCaution } from "./required-cautions";

/** The place on the bench where a line of the gate is put right. */
export type Place =
  | Readonly<{ kind: "lesson"; id: LessonId }>
  | Readonly<{ kind: "mark"; id: MarkId }>
  | Readonly<{ kind: "chapter"; id: ChapterId }>
  | Readonly<{ kind: "recording"; id: RecordingId }>
  | Readonly<{ kind: "captions"; id: RecordingId }>
  | Readonly<{ kind: "new-caution"; id: LessonId }>
  | Readonly<{ kind: "check"; id: MarkId | LessonId }>;

/** One thing that the gate says. While a line stops, the lesson cannot be published. */
export type GateLine = Readonly<{ stops: boolean; sentence: string; where: Place }>;

/** What the gate must know besides the draft. */
export type GateFacts = Readonly<{
  /** Recordings that have a current caption track. */
  captioned: readonly RecordingId[];
  /** Marks that an instructor stopped with "This looks wrong". */
  inDoubt: readonly MarkId[];
}>;

/** A figure that rests on a document. What was measured on this one car rests on the recording. */
export function restsOnSource(mark: Mark): boolean {
  return needsSource(mark.kind) && mark.values.some((value) => value.role !== "measured");
}

/** A torque that goes on by angle: the fastener may be stretched. "Back off 90°" is no such angle. */
function isTorquePlusAngle(mark: Mark): boolean {
  return (
    mark.kind === "torque" &&
    mark.values.some((value) => value.dimension === "torque" && value.number !== null) &&
    mark.values.some((value) => value.dimension === "angle" && value.action !== "back-off")
  );
}

const WHY_NOT_PLAYING: Readonly<Record<string, string>> = {
  uploading: "is still being uploaded",
  checking: "is still being looked through",
  preparing: "is still being prepared",
  converting: "is still being converted",
  "needs-converting": "does not play in browsers",
  refused: "was refused",
};

function ofRecordings(draft: Draft): GateLine[] {
  if (draft.clips.length === 0)
    return [
      {
        stops: true,
        sentence: "The lesson has no recording. Add one.",
        where: { kind: "lesson", id: draft.lesson.id },
      },
    ];
  const clips = [...new Map(draft.clips.map((clip) => [clip.recordingId, clip])).values()];
  return clips.flatMap((clip): GateLine[] => {
    if (clip.state === "ready" && !clip.deleted) return [];
    const why = clip.deleted ? "was deleted" : (WHY_NOT_PLAYING[clip.state] ?? "does not play");
    const what = clip.stateReason === "" || clip.deleted ? "" : ` ${clip.stateReason}`;
    return [
      {
        stops: true,
        sentence: `The recording “${clip.title}” ${why}.${what}`,
        where: { kind: "recording", id: clip.recordingId },
      },
    ];
  });
}

function ofChapters(draft: Draft): GateLine[] {
  if (draft.chapters.length === 0)
    return [
      {
        stops: true,
        sentence: "The lesson has no chapter. Add one.",
        where: { kind: "lesson", id: draft.lesson.id },
      },
    ];
  return draft.chapters.flatMap((chapter): GateLine[] => {
    const where: Place = { kind: "chapter", id: chapter.id };
    if (chapter.phase === null)
      return [{ stops: true, sentence: `The chapter “${chapter.title}” has no phase. Choose one.`, where }];
    if (chapter.state === "pencilled")
      return [
        { stops: true, sentence: `The chapter “${chapter.title}” is in pencil. Ink it or change it.`, where },
      ];
    return [];
  });
}

function namesOf(draft: Draft): (mark: Mark) => string {
  return (mark) => {
    const at = nearestLessonTime(draft.clips, mark.recordingId, mark.atMs);
    return `“${markTitle(mark)}” at ${formatTimecode(at)}`;
  };
}

function ofMark(mark: Mark, name: string, facts: GateFacts): GateLine[] {
  const where: Place = { kind: "mark", id: mark.id };
  const stop = (sentence: string, place: Place = where): GateLine => ({
    stops: true,
    sentence,
    where: place,
  });
  if (mark.state === "pencilled") return [stop(`${name} is in pencil. Ink it, change it or erase it.`)];
  const lines: GateLine[] = [];
  if (needsSource(mark.kind) && mark.values.length === 0) lines.push(stop(`${name} has no value.`));
  if (restsOnSource(mark) && mark.source === null)
    lines.push(stop(`${name} has no source. Name the document, the page and the day it was read.`));
  if (isTorquePlusAngle(mark) && mark.reuse === "not-stated")
    lines.push(
      stop(
        `${name} is tightened by angle, and whether the fastener may be used again is not stated. Look it up and say so.`,
      ),
    );
  if (mark.kind === "torque" && mark.tightenAt === "not-stated" && isBushedJoint(mark.component))
    lines.push(
      stop(
        `${name} is a rubber-bushed joint, and the height at which it is tightened is not stated. Tightened at the wrong height the rubber is twisted for the rest of its life.`,
      ),
    );
  if (mark.check?.outcome === "disputed")
    lines.push(
      stop(`${name} is disputed by ${mark.check.by}: “${mark.check.reason}”. Settle it first.`, {
        kind: "check",
        id: mark.id,
      }),
    );
  if (facts.inDoubt.includes(mark.id))
    lines.push({
      stops: false,
      sentence: `${name} is in doubt: learners do not see its figure until somebody clears the doubt.`,
      where,
    });
  return lines;
}

/** Everything written in the lesson that can bring a danger up. What cautions themselves say does not. */
function lessonWords(draft: Draft): string {
  const marks = draft.marks
    .filter((mark) => mark.kind !== "caution")
    .flatMap((mark) => [mark.component, mark.toolName, mark.product, mark.needs]);
  return [
    draft.lesson.title,
    draft.lesson.summary,
    ...draft.chapters.map((chapter) => chapter.title),
    ...marks,
  ].join(" · ");
}

/** What brings a danger up in this lesson, in words; null when nothing does. */
function broughtUpBy(rule: RequiredCaution, draft: Draft, words: string): string | null {
  const { system, title } = draft.lesson;
  if (rule.systems.includes(system) && !(rule.unless?.test(title) ?? false)) return "work of this kind";
  const found = rule.words.exec(words)?.[0];
  return found === undefined ? null : `“${found}”`;
}

function ofCautions(draft: Draft): GateLine[] {
  const words = lessonWords(draft);
  const phases = new Map(draft.chapters.map((chapter: DraftChapter) => [chapter.id, chapter.phase]));
  const cautions = draft.marks.filter((mark) => mark.kind === "caution" && mark.state !== "pencilled");
  return REQUIRED_CAUTIONS.flatMap((rule): GateLine[] => {
    const by = broughtUpBy(rule, draft, words);
    if (by === null) return [];
    const covering = cautions.filter(
      (mark) =>
        rule.covered.test(`${mark.words} ${mark.reason}`) &&
        (rule.phase === null || phases.get(mark.chapterId) === rule.phase),
    );
    if (covering.length === 0) {
      const where: Place = { kind: "new-caution", id: draft.lesson.id };
      const inPhase = rule.phase === null ? "" : ` in a chapter of phase ${rule.phase}`;
      return [
        {
          stops: rule.stops,
          sentence: `A caution on ${rule.topic} is missing${inPhase}; ${by} calls for it. ${rule.reason}`,
          where,
        },
      ];
    }
    // Somebody gets hurt: that is never a NOTICE, which is about the car.
    const strongest = covering.find((mark) => mark.signalWord !== "NOTICE");
    const first = covering[0];
    if (rule.phase !== null && !strongest && first)
      return [
        {
          stops: false,
          sentence: `The caution on ${rule.topic} stands as NOTICE, which is for the car. A person can be hurt: make it a WARNING.`,
          where: { kind: "mark", id: first.id },
        },
      ];
    return [];
  });
}

function ofUnchecked(draft: Draft): GateLine[] {
  const unchecked = draft.marks.filter((mark) => mark.state === "inked" && holdsFigure(mark.kind));
  const critical = unchecked.filter((mark) => mark.safetyCritical);
  const where: Place = { kind: "check", id: draft.lesson.id };
  const rest = unchecked.length - critical.length;
  const lines: GateLine[] = [];
  if (critical.length > 0)
    lines.push({
      stops: false,
      sentence: `${critical.length} safety-critical ${critical.length === 1 ? "value is" : "values are"} not checked. Learners see “Value waiting for check” and no figure.`,
      where,
    });
  if (rest > 0)
    lines.push({
      stops: false,
      sentence: `${rest} ${rest === 1 ? "value is" : "values are"} not yet checked. Learners see “not yet checked” before the figure.`,
      where,
    });
  return lines;
}

function ofCaptions(draft: Draft, facts: GateFacts): GateLine[] {
  const clips = [...new Map(draft.clips.map((clip) => [clip.recordingId, clip])).values()];
  return clips
    .filter((clip) => !facts.captioned.includes(clip.recordingId))
    .map((clip) => ({
      stops: false,
      sentence: `The recording “${clip.title}” has no captions. Nobody can find its words or watch it beside a running compressor.`,
      where: { kind: "captions", id: clip.recordingId },
    }));
}

/** All that stands between a draft and its next revision, what stops first. Empty: nothing does. */
export function gate(draft: Draft, facts: GateFacts): GateLine[] {
  const name = namesOf(draft);
  const withdrawn: GateLine[] =
    draft.lesson.withdrawnAt === null
      ? []
      : [
          {
            stops: false,
            sentence: "The lesson was withdrawn. Publishing brings it back into the library.",
            where: { kind: "lesson", id: draft.lesson.id },
          },
        ];
  const lines = [
    ...withdrawn,
    ...ofRecordings(draft),
    ...ofChapters(draft),
    ...draft.marks.flatMap((mark) => ofMark(mark, name(mark), facts)),
    ...findContradictions(draft.marks, draft.chapters).map(({ markId, sentence }): GateLine => ({
      stops: true,
      sentence,
      where: { kind: "mark", id: markId },
    })),
    ...ofCautions(draft),
    ...ofUnchecked(draft),
    ...ofCaptions(draft, facts),
  ];
  return [...lines.filter((line) => line.stops), ...lines.filter((line) => !line.stops)];
}

/** True when nothing stops. */
export function isOpen(lines: readonly GateLine[]): boolean {
  return lines.every((line) => !line.stops);
}

import type { Draft } from "./draft";
import { fingerprintOf } from "./fingerprint";
import type { Mark } from "./mark";
import type { Snapshot } from "./snapshot";

function markParts(mark: Mark): unknown {
  const { check: _check, state: _state, inkedBy: _inkedBy, said: _said, values, source, ...rest } = mark;
  return [rest, values.map((value) => value.text), source, fingerprintOf(mark)];
}

function parts(
  lesson: Omit<Snapshot, "chapters" | "captionTracks" | "format" | "recordedBy" | "lessonId">,
): unknown {
  return [
    lesson.title,
    lesson.summary,
    lesson.system,
    lesson.position,
    lesson.vehicles.map(({ id, make, model, yearFrom, yearTo, engine, drive }) => [
      id,
      make,
      model,
      yearFrom,
      yearTo,
      engine,
      drive,
    ]),
    lesson.clips.map(({ recordingId, inMs, outMs, cuts }) => [recordingId, inMs, outMs, cuts]),
    lesson.marks.filter((mark) => mark.state !== "pencilled").map(markParts),
  ];
}

function chapterParts(
  chapters: readonly Readonly<
    Record<"id" | "title", string> & { phase: string | null; startMs: number; endMs: number }
  >[],
) {
  return chapters.map(({ id, startMs, endMs, title, phase }) => [id, startMs, endMs, title, phase]);
}

/**
 * Whether publishing the draft would show learners something else than the revision does. Checks and pencil marks do
 * not count: they reach or miss learners without a new revision. Captions are compared by publishing itself.
 */
export function draftDiffers(draft: Draft, published: Snapshot): boolean {
  const { lesson, vehicles, clips, marks } = draft;
  const { title, summary, system, position } = lesson;
  return (
    JSON.stringify([
      parts({ title, summary, system, position, vehicles, clips, marks }),
      chapterParts(draft.chapters),
    ]) !== JSON.stringify([parts(published), chapterParts(published.chapters)])
  );
}

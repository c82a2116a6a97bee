import type { ChapterId, ClipId, LessonId, RecordingId } from "#drizzle/schema/ids";
import type { Mark, Phase } from "./mark";
import { SNAPSHOT_FORMAT, type Snapshot, type SnapshotClip, type SnapshotVehicle } from "./snapshot";

export type System =
  | "steering"
  | "suspension"
  | "brakes"
  | "wheels"
  | "engine"
  | "cooling"
  | "fuel"
  | "electrical"
  | "high-voltage"
  | "restraint"
  | "air-conditioning"
  | "driveline"
  | "body"
  | "workshop";

export type RecordingState =
  "uploading" | "checking" | "preparing" | "ready" | "needs-converting" | "converting" | "refused";

export type DraftLesson = Readonly<{
  id: LessonId;
  title: string;
  summary: string;
  system: System;
  position: string;
  /** Optimistic lock: every change of the draft adds one. */
  version: number;
  /** Number of the newest revision; null while never published. */
  newestRevision: number | null;
  createdAt: number;
  changedAt: number;
  withdrawnAt: number | null;
}>;

/** A clip with what the bench and the publish gate must know of its recording. Times in ms of the file. */
export type DraftClip = SnapshotClip &
  Readonly<{
    id: ClipId;
    title: string;
    /** Null until the file was probed. */
    durationMs: number | null;
    state: RecordingState;
    stateReason: string;
    /** Who uploaded the recording. */
    recordedBy: string;
    deleted: boolean;
  }>;

export type DraftChapter = Readonly<{
  id: ChapterId;
  recordingId: RecordingId;
  startMs: number;
  endMs: number;
  title: string;
  /** Null until a person names it. */
  phase: Phase | null;
  state: "pencilled" | "inked";
}>;

/** The lesson as it stands on the bench. Chapters are in playing order; marks in order of recording and moment. */
export type Draft = Readonly<{
  lesson: DraftLesson;
  vehicles: readonly SnapshotVehicle[];
  clips: readonly DraftClip[];
  chapters: readonly DraftChapter[];
  /** Not erased, pencilled ones included. */
  marks: readonly Mark[];
}>;

/**
 * What a revision of this draft would hold. Pencilled marks stay out.
 * The publish gate comes first: a chapter without a phase, or a draft without a clip, is a fault of the caller and throws.
 */
export function buildSnapshot(draft: Draft, captionTracks: Snapshot["captionTracks"]): Snapshot {
  const first = draft.clips[0];
  if (!first) throw new Error(`lesson ${draft.lesson.id} has no clip`);
  return {
    format: SNAPSHOT_FORMAT,
    lessonId: draft.lesson.id,
    title: draft.lesson.title,
    summary: draft.lesson.summary,
    system: draft.lesson.system,
    position: draft.lesson.position,
    vehicles: draft.vehicles,
    recordedBy: first.recordedBy,
    clips: draft.clips.map(({ recordingId, inMs, outMs, cuts }) => ({ recordingId, inMs, outMs, cuts })),
    chapters: draft.chapters.map(({ id, recordingId, startMs, endMs, title, phase }) => {
      if (phase === null) throw new Error(`chapter ${id} has no phase`);
      return { id, recordingId, startMs, endMs, title, phase };
    }),
    marks: draft.marks.filter((mark) => mark.state !== "pencilled"),
    captionTracks,
  };
}

/**
 * Sorts chapters as the lesson plays them: by the first clip that shows their recording, then by start.
 * A chapter whose recording is in no clip comes last.
 */
export function inPlayingOrder<C extends Readonly<{ recordingId: RecordingId; startMs: number }>>(
  chapters: readonly C[],
  clips: readonly Readonly<{ recordingId: RecordingId }>[],
): C[] {
  const order = new Map<string, number>();
  clips.forEach((clip, n) => {
    if (!order.has(clip.recordingId)) order.set(clip.recordingId, n);
  });
  const place = (chapter: C) => order.get(chapter.recordingId) ?? clips.length;
  return chapters.toSorted((a, b) => place(a) - place(b) || a.startMs - b.startMs);
}

import type { CaptionTrackId, ChapterId, LessonId, RecordingId, VehicleId } from "#drizzle/schema/ids";
import type { Mark, Phase } from "./mark";

/** A stretch of one recording; cuts are skipped by the player. All times are in the file. */
export type SnapshotClip = Readonly<{
  recordingId: RecordingId;
  inMs: number;
  outMs: number;
  cuts: readonly Readonly<{ fromMs: number; toMs: number }>[];
}>;

export type SnapshotChapter = Readonly<{
  id: ChapterId;
  recordingId: RecordingId;
  startMs: number;
  endMs: number;
  title: string;
  phase: Phase;
}>;

export type SnapshotVehicle = Readonly<{
  id: VehicleId;
  make: string;
  model: string;
  yearFrom: number | null;
  yearTo: number | null;
  engine: string;
  drive: string;
}>;

/**
 * What a revision holds: everything a learner's page needs, in one row.
 * Format 1. Pencilled marks never enter. Withheld figures are in it; `forLearner` strips them on the way out,
 * because a check may come after the revision.
 */
export type Snapshot = Readonly<{
  format: 1;
  lessonId: LessonId;
  title: string;
  summary: string;
  system: string;
  position: string;
  vehicles: readonly SnapshotVehicle[];
  /** Who recorded it: the uploader of the first clip. */
  recordedBy: string;
  clips: readonly SnapshotClip[];
  chapters: readonly SnapshotChapter[];
  marks: readonly Mark[];
  captionTracks: readonly Readonly<{
    id: CaptionTrackId;
    recordingId: RecordingId;
    language: string;
    label: string;
  }>[];
}>;

export const SNAPSHOT_FORMAT = 1;

/** Reads a stored snapshot; an unknown format is a fault of ours, not of the reader. */
export function readSnapshot(text: string): Snapshot {
  const snapshot = JSON.parse(text) as Snapshot;
  if (snapshot.format !== SNAPSHOT_FORMAT)
    throw new Error(`snapshot format ${String(snapshot.format)} is unknown`);
  return snapshot;
}

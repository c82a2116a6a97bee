import { and, eq, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import { currentTracks, type CaptionTrack } from "~/captions/load-tracks.server";
import type { LessonId, MarkId, ShopId } from "#drizzle/schema/ids";
import { doubts } from "#drizzle/schema/index";
import { compareSnapshots, type Comparable, type Comparison } from "~/lessons/compare-snapshots";
import type { Draft } from "~/lessons/draft";
import { loadDraft } from "~/lessons/load-draft.server";
import { readSnapshot, type Snapshot } from "~/lessons/snapshot";
import { gate, type GateLine } from "./gate";
import { findRevision } from "./load-revision.server";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

export type BeforePublishing = Readonly<{
  draft: Draft;
  lines: readonly GateLine[];
  tracks: readonly CaptionTrack[];
  /** The newest revision and what the draft changes in it; null while never published. */
  former: Readonly<{ n: number; snapshot: Snapshot; comparison: Comparison }> | null;
}>;

function stoppedMarks(scope: InShop, lessonId: LessonId): MarkId[] {
  return scope.db
    .select({ markId: doubts.markId })
    .from(doubts)
    .where(
      and(
        eq(doubts.shopId, scope.shopId),
        eq(doubts.lessonId, lessonId),
        eq(doubts.stops, true),
        isNull(doubts.clearedAt),
      ),
    )
    .all()
    .map(({ markId }) => markId);
}

/** The caption tracks as a snapshot names them. */
export function namedTracks(tracks: readonly CaptionTrack[]): Snapshot["captionTracks"] {
  return tracks.map(({ id, recordingId, language, label }) => ({ id, recordingId, language, label }));
}

function comparable(draft: Draft, tracks: readonly CaptionTrack[]): Comparable {
  return {
    ...draft.lesson,
    vehicles: draft.vehicles,
    clips: draft.clips,
    chapters: draft.chapters,
    marks: draft.marks.filter((mark) => mark.state !== "pencilled"),
    captionTracks: namedTracks(tracks),
  };
}

/** Everything that is looked at before a lesson is published; undefined: no such lesson in this shop. */
export function beforePublishing(scope: InShop, lessonId: LessonId): BeforePublishing | undefined {
  const draft = loadDraft(scope, lessonId);
  if (!draft) return undefined;
  const tracks = currentTracks(
    scope,
    draft.clips.map((clip) => clip.recordingId),
  );
  const lines = gate(draft, {
    captioned: tracks.map((track) => track.recordingId),
    inDoubt: stoppedMarks(scope, lessonId),
  });
  const { newestRevision } = draft.lesson;
  const row = newestRevision === null ? undefined : findRevision(scope, lessonId, newestRevision);
  if (!row) return { draft, lines, tracks, former: null };
  const snapshot = readSnapshot(row.snapshot);
  return {
    draft,
    lines,
    tracks,
    former: { n: row.n, snapshot, comparison: compareSnapshots(snapshot, comparable(draft, tracks)) },
  };
}

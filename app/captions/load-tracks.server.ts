import { and, asc, count, eq, inArray, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { CaptionTrackId, RecordingId, ShopId } from "#drizzle/schema/ids";
import { captionTracks, cues, users } from "#drizzle/schema/index";
import type { Cue } from "./cue";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

export type CaptionTrack = Readonly<{
  id: CaptionTrackId;
  recordingId: RecordingId;
  language: string;
  label: string;
  fileName: string;
  warnings: readonly string[];
  createdBy: string;
  createdAt: number;
  publishedAt: number | null;
  cueCount: number;
}>;

/** The current tracks of these recordings (not replaced), by recording and language. */
export function currentTracks(scope: InShop, recordingIds: readonly RecordingId[]): CaptionTrack[] {
  if (recordingIds.length === 0) return [];
  return scope.db
    .select({
      id: captionTracks.id,
      recordingId: captionTracks.recordingId,
      language: captionTracks.language,
      label: captionTracks.label,
      fileName: captionTracks.fileName,
      warnings: captionTracks.warnings,
      createdBy: users.name,
      createdAt: captionTracks.createdAt,
      publishedAt: captionTracks.publishedAt,
      cueCount: count(cues.id),
    })
    .from(captionTracks)
    .innerJoin(users, eq(users.id, captionTracks.createdBy))
    .leftJoin(cues, eq(cues.trackId, captionTracks.id))
    .where(
      and(
        eq(captionTracks.shopId, scope.shopId),
        inArray(captionTracks.recordingId, [...recordingIds]),
        isNull(captionTracks.replacedAt),
      ),
    )
    .groupBy(captionTracks.id)
    .orderBy(asc(captionTracks.recordingId), asc(captionTracks.language), asc(captionTracks.id))
    .all();
}

/** A track of the shop with the file as it was uploaded, replaced ones too. */
export function findTrack(scope: InShop, trackId: CaptionTrackId) {
  return scope.db
    .select({
      id: captionTracks.id,
      recordingId: captionTracks.recordingId,
      fileName: captionTracks.fileName,
      original: captionTracks.original,
    })
    .from(captionTracks)
    .where(and(eq(captionTracks.shopId, scope.shopId), eq(captionTracks.id, trackId)))
    .get();
}

/** The cues of a track in order of their start. */
export function trackCues(scope: InShop, trackId: CaptionTrackId): (Cue & { id: string })[] {
  return scope.db
    .select({
      id: cues.id,
      startMs: cues.startMs,
      endMs: cues.endMs,
      text: cues.text,
      identifier: cues.identifier,
    })
    .from(cues)
    .where(and(eq(cues.shopId, scope.shopId), eq(cues.trackId, trackId)))
    .orderBy(asc(cues.n))
    .all();
}

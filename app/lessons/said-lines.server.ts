import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";
import { plainText } from "~/captions/cue-text";
import { trackCues } from "~/captions/load-tracks.server";
import { lessonTime } from "./lesson-time";
import type { Snapshot } from "./snapshot";

/** One thing that is said, in lesson time. */
export type SaidLine = Readonly<{ atMs: number; endMs: number; text: string }>;

/** What is said in a lesson, in one language: the first of each recording. Cues that the lesson cuts are left out. */
export function saidLines(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  snapshot: Pick<Snapshot, "clips" | "captionTracks">,
): SaidLine[] {
  const { clips, captionTracks } = snapshot;
  const language = captionTracks[0]?.language;
  const tracks = captionTracks.filter((track) => track.language === language);
  const lines = tracks.flatMap((track) =>
    trackCues(scope, track.id).flatMap((cue): SaidLine[] => {
      const atMs = lessonTime(clips, track.recordingId, cue.startMs);
      const text = plainText(cue.text).replace(/\s+/g, " ").trim();
      if (atMs === null || text === "") return [];
      return [{ atMs, endMs: atMs + Math.max(0, cue.endMs - cue.startMs), text }];
    }),
  );
  return lines.toSorted((a, b) => a.atMs - b.atMs);
}

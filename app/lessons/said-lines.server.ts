import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";
import { plainText } from "~/captions/cue-text";
import { trackCues } from "~/captions/load-tracks.server";
import { correctionAt } from "./correction-at";
import { lessonTime } from "./lesson-time";
import type { Snapshot } from "./snapshot";

/** One thing that is said, in lesson time; `correction`: what is right where it is wrong, else "". */
export type SaidLine = Readonly<{ atMs: number; endMs: number; text: string; correction: string }>;

/** What is said in a lesson, in one language: the first of each recording. Cues that the lesson cuts are left out. */
export function saidLines(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  snapshot: Pick<Snapshot, "clips" | "captionTracks" | "marks">,
): SaidLine[] {
  const { clips, captionTracks, marks } = snapshot;
  const language = captionTracks[0]?.language;
  const tracks = captionTracks.filter((track) => track.language === language);
  const lines = tracks.flatMap((track) =>
    trackCues(scope, track.id).flatMap((cue): SaidLine[] => {
      const atMs = lessonTime(clips, track.recordingId, cue.startMs);
      const text = plainText(cue.text).replace(/\s+/g, " ").trim();
      if (atMs === null || text === "") return [];
      const correction = correctionAt(marks, {
        recordingId: track.recordingId,
        startMs: cue.startMs,
        endMs: cue.endMs,
        text,
      });
      return [{ atMs, endMs: atMs + Math.max(0, cue.endMs - cue.startMs), text, correction }];
    }),
  );
  return lines.toSorted((a, b) => a.atMs - b.atMs);
}

import type { Cue } from "~/captions/cue";
import { escapeCueText } from "~/captions/cue-text";
import { piecesOf } from "./lesson-time";
import type { SnapshotChapter, SnapshotClip } from "./snapshot";

/**
 * The chapters as cues, for the stretches that the lesson plays. With a recording: its chapters in the time of its
 * file, as a player of that file needs them. Without: all of them in lesson time. Pieces that follow each other
 * without a gap are one cue.
 */
export function chapterCues(
  chapters: readonly SnapshotChapter[],
  clips: readonly SnapshotClip[],
  recordingId?: string,
): Cue[] {
  const cues: Cue[] = [];
  const pieces = piecesOf(clips).filter(
    (piece) => recordingId === undefined || piece.recordingId === recordingId,
  );
  for (const piece of pieces)
    for (const chapter of chapters) {
      if (chapter.recordingId !== piece.recordingId) continue;
      const from = Math.max(chapter.startMs, piece.fromMs);
      const to = Math.min(chapter.endMs, piece.toMs);
      if (to <= from) continue;
      const shift = recordingId === undefined ? piece.lessonStartMs - piece.fromMs : 0;
      const last = cues.at(-1);
      if (last && last.identifier === chapter.id && last.endMs === from + shift)
        cues[cues.length - 1] = { ...last, endMs: to + shift };
      else
        cues.push({
          startMs: from + shift,
          endMs: to + shift,
          text: escapeCueText(chapter.title),
          identifier: chapter.id,
        });
    }
  return cues.toSorted((a, b) => a.startMs - b.startMs);
}

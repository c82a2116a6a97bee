import { fileTime } from "~/lessons/lesson-time";
import type { SnapshotClip } from "~/lessons/snapshot";
import { momentParam } from "~/lessons/timecode";

/** Where a browser without JavaScript plays a moment: the recording itself, from that second (W3C Media Fragments). */
export function playHref(clips: readonly SnapshotClip[], lessonMs: number): string {
  const at = fileTime(clips, lessonMs);
  return at === null ? "#recording" : `/recordings/${at.recordingId}/play#t=${momentParam(at.fileMs)}`;
}

import type { SnapshotClip } from "~/lessons/snapshot";
import { formatTimecode } from "~/lessons/timecode";
import { playHref } from "./play-href";
import { useJump } from "./player-context";

/** "Play from 6:42": moves the recording on this page, or opens it there without JavaScript. */
export function MomentLink({
  clips,
  lessonMs,
  about,
}: {
  clips: readonly SnapshotClip[];
  lessonMs: number;
  /** What plays there, for people who hear the link alone. */
  about: string;
}) {
  const jump = useJump();
  return (
    <a
      href={playHref(clips, lessonMs)}
      onClick={(event) => {
        event.preventDefault();
        jump({ toMs: lessonMs, play: true });
      }}
      className="no-print inline-flex min-h-11 items-center text-sm font-semibold"
    >
      Play from {formatTimecode(lessonMs)}
      <span className="sr-only">: {about}</span>
    </a>
  );
}

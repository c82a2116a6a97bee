import type { Scope } from "~/auth/scope.server";
import type { PlaybackLink } from "~/components/player/bench-player";
import type { DraftClip } from "~/lessons/draft";

/** Links to the recordings of these clips, by recording; those that do not play now are left out. */
export async function playbackLinks(
  _scope: Scope,
  _clips: readonly DraftClip[],
  _now: number,
): Promise<Record<string, PlaybackLink>> {
  return {};
}

import { piecesOf } from "~/lessons/lesson-time";
import type { SnapshotClip } from "~/lessons/snapshot";

/** A stretch of a recording that was played; times in the file, ms. */
export type Stretch = Readonly<{ recordingId: string; fromMs: number; toMs: number }>;

/** The stretches as their union: sorted, without overlap. */
function union(stretches: readonly Readonly<{ fromMs: number; toMs: number }>[]) {
  const merged: { fromMs: number; toMs: number }[] = [];
  for (const { fromMs, toMs } of stretches.toSorted((a, b) => a.fromMs - b.fromMs)) {
    const last = merged.at(-1);
    if (last && fromMs <= last.toMs) last.toMs = Math.max(last.toMs, toMs);
    else if (toMs > fromMs) merged.push({ fromMs, toMs });
  }
  return merged;
}

/**
 * How much of a lesson was seen, 0 to 1: the kept part of its clips that the stretches cover. Twice over counts once,
 * what the lesson cuts out counts neither way, and so do stretches of a recording that the lesson no longer plays.
 * A lesson without any clip has nothing to see: 0.
 */
export function coverage(stretches: readonly Stretch[], clips: readonly SnapshotClip[]): number {
  let length = 0;
  let seen = 0;
  // Two clips may play the same seconds of a recording; each plays on its own.
  for (const piece of piecesOf(clips)) {
    length += piece.toMs - piece.fromMs;
    const inside = stretches.flatMap(({ recordingId, fromMs, toMs }) =>
      recordingId === piece.recordingId && toMs > piece.fromMs && fromMs < piece.toMs
        ? [{ fromMs: Math.max(fromMs, piece.fromMs), toMs: Math.min(toMs, piece.toMs) }]
        : [],
    );
    seen += union(inside).reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0);
  }
  return length === 0 ? 0 : Math.min(1, seen / length);
}

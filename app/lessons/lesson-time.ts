import type { SnapshotClip } from "./snapshot";

/** The kept pieces of the clips in playing order, with where each begins in lesson time. Times in ms. */
export type Piece = Readonly<{
  recordingId: string;
  fromMs: number;
  toMs: number;
  lessonStartMs: number;
  clip: number;
}>;

/** Cuts a lesson's clips into the pieces that play. */
export function piecesOf(clips: readonly SnapshotClip[]): Piece[] {
  const pieces: Piece[] = [];
  let lessonStartMs = 0;
  clips.forEach((clip, n) => {
    let fromMs = clip.inMs;
    const add = (toMs: number) => {
      if (toMs <= fromMs) return;
      pieces.push({ recordingId: clip.recordingId, fromMs, toMs, lessonStartMs, clip: n });
      lessonStartMs += toMs - fromMs;
    };
    for (const cut of clip.cuts.toSorted((a, b) => a.fromMs - b.fromMs)) {
      add(Math.min(cut.fromMs, clip.outMs));
      fromMs = Math.max(fromMs, Math.min(cut.toMs, clip.outMs));
    }
    add(clip.outMs);
  });
  return pieces;
}

/** Lesson time of a moment in a recording's file; null when the lesson does not play that moment. */
export function lessonTime(
  clips: readonly SnapshotClip[],
  recordingId: string,
  fileMs: number,
): number | null {
  const pieces = piecesOf(clips).filter((piece) => piece.recordingId === recordingId);
  const inside = pieces.find((piece) => fileMs >= piece.fromMs && fileMs < piece.toMs);
  if (inside) return inside.lessonStartMs + fileMs - inside.fromMs;
  // The very end of a piece belongs to it when nothing else starts there.
  const atEnd = pieces.find((piece) => fileMs === piece.toMs);
  return atEnd ? atEnd.lessonStartMs + fileMs - atEnd.fromMs : null;
}

/** Lesson time of a moment, or of the next one that the lesson plays when this one is cut out; past the last: its end. */
export function nearestLessonTime(
  clips: readonly SnapshotClip[],
  recordingId: string,
  fileMs: number,
): number {
  const exact = lessonTime(clips, recordingId, fileMs);
  if (exact !== null) return exact;
  const own = piecesOf(clips).filter((piece) => piece.recordingId === recordingId);
  const next = own.find((piece) => piece.fromMs > fileMs);
  if (next) return next.lessonStartMs;
  const last = own.at(-1);
  return last ? last.lessonStartMs + last.toMs - last.fromMs : 0;
}

/** Where a moment of lesson time lies: the recording and the time in its file. Past the end: the end. */
export function fileTime(
  clips: readonly SnapshotClip[],
  lessonMs: number,
): { recordingId: string; fileMs: number } | null {
  const pieces = piecesOf(clips);
  const last = pieces.at(-1);
  if (!last) return null;
  const piece =
    pieces.find(
      (piece) =>
        lessonMs >= piece.lessonStartMs && lessonMs < piece.lessonStartMs + piece.toMs - piece.fromMs,
    ) ?? (lessonMs < 0 ? (pieces[0] ?? last) : last);
  const fileMs = piece.fromMs + Math.max(0, lessonMs - piece.lessonStartMs);
  return { recordingId: piece.recordingId, fileMs: Math.min(fileMs, piece.toMs) };
}

/** How long the lesson plays, in ms. */
export function lessonDuration(clips: readonly SnapshotClip[]): number {
  return piecesOf(clips).reduce((sum, piece) => sum + piece.toMs - piece.fromMs, 0);
}

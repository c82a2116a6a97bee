import type { Piece } from "~/lessons/lesson-time";

/** The piece that holds a moment of lesson time; past the end the last one. -1 when the lesson plays nothing. */
export function pieceAt(pieces: readonly Piece[], lessonMs: number): number {
  let found = pieces.length === 0 ? -1 : 0;
  pieces.forEach((piece, index) => {
    if (lessonMs >= piece.lessonStartMs) found = index;
  });
  return found;
}

/** Where a moment of lesson time lies in its piece's file. */
export function fileMsAt(piece: Piece, lessonMs: number): number {
  return Math.min(piece.toMs, piece.fromMs + Math.max(0, lessonMs - piece.lessonStartMs));
}

/** Lesson time of a moment in a piece's file; before and past the piece its edges. */
export function lessonMsAt(piece: Piece, fileMs: number): number {
  return piece.lessonStartMs + Math.min(Math.max(fileMs, piece.fromMs), piece.toMs) - piece.fromMs;
}

/** What a player has to do at a moment of a piece's file: play on, go to the next piece, or stop. */
export type Follow =
  | Readonly<{ do: "play-on"; leftMs: number }>
  | Readonly<{ do: "go"; piece: number }>
  | Readonly<{ do: "stop" }>;

/** A hair before the end counts as the end: files end a little before the length that was probed. */
const HAIR_MS = 40;

/** Plays pieces one after the other: skips cuts, crosses to the next clip, stops after the last. */
export function follow(pieces: readonly Piece[], index: number, fileMs: number): Follow {
  const piece = pieces[index];
  if (!piece) return { do: "stop" };
  const leftMs = piece.toMs - fileMs;
  if (leftMs > HAIR_MS) return { do: "play-on", leftMs };
  return index + 1 < pieces.length ? { do: "go", piece: index + 1 } : { do: "stop" };
}

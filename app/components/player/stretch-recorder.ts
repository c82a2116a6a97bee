export type PlayedStretch = Readonly<{ recordingId: string; fromMs: number; toMs: number }>;

/** Reports come a few times a second; a longer step in the file is a jump, not playing. At twice the speed, in a sleeping tab. */
const LONGEST_STEP_MS = 3_000;
/** Shorter than this is a touch of the timeline, not watching. */
const SHORTEST_MS = 300;

/** Collects what was really played, from reports of where the player is. Knows no clock and no network. */
export class StretchRecorder {
  #open: { recordingId: string; fromMs: number; toMs: number } | null = null;
  #closed: PlayedStretch[] = [];

  /** The player plays and stands here. */
  playing(recordingId: string, fileMs: number): void {
    const ms = Math.round(fileMs);
    const open = this.#open;
    if (open && open.recordingId === recordingId && ms >= open.toMs && ms - open.toMs <= LONGEST_STEP_MS) {
      open.toMs = ms;
      return;
    }
    this.stopped();
    this.#open = { recordingId, fromMs: ms, toMs: ms };
  }

  /** The player paused, jumped or crossed to another recording. */
  stopped(): void {
    if (this.#open && this.#open.toMs - this.#open.fromMs >= SHORTEST_MS) this.#closed.push(this.#open);
    this.#open = null;
  }

  /** What is to be told, and forgets it. The stretch under way goes on from where it is. */
  take(): PlayedStretch[] {
    const open = this.#open;
    this.stopped();
    if (open) this.#open = { recordingId: open.recordingId, fromMs: open.toMs, toMs: open.toMs };
    const taken = this.#closed;
    this.#closed = [];
    return taken;
  }

  /** Telling failed: it is told again with the next. */
  putBack(stretches: readonly PlayedStretch[]): void {
    this.#closed.unshift(...stretches);
  }
}

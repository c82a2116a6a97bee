/** What the parts of a player show. Times are lesson time in ms. */
export type PlayerState = Readonly<{
  momentMs: number;
  playing: boolean;
  /** "idle": nothing was loaded yet. */
  phase: "idle" | "loading" | "ready";
  /** A sentence when it does not play. */
  problem: string | null;
  captions: boolean;
  muted: boolean;
  rate: number;
}>;

export type Jump = Readonly<{ toMs: number; play: boolean }>;

/** The state that picture, rail, step sheet and list of words share. One a page. */
export class PlayerStore {
  #state: PlayerState;
  #listeners = new Set<() => void>();
  /** Set by the picture once it is there; until then the last jump waits. */
  #onJump: ((jump: Jump) => void) | null = null;
  #waiting: Jump | null = null;

  constructor(momentMs: number) {
    this.#state = {
      momentMs,
      playing: false,
      phase: "idle",
      problem: null,
      captions: true,
      muted: false,
      rate: 1,
    };
  }

  readonly get = (): PlayerState => this.#state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  set(change: Partial<PlayerState>): void {
    this.#state = { ...this.#state, ...change };
    for (const listener of this.#listeners) listener();
  }

  /** Goes to a moment; before the picture is there, it is fetched and starts there. */
  readonly jump = (jump: Jump): void => {
    this.set({ momentMs: jump.toMs, problem: null });
    if (this.#onJump) this.#onJump(jump);
    else {
      this.#waiting = jump;
      this.set({ phase: "loading" });
    }
  };

  /** The picture takes over; returns the jump that waited. */
  connect(onJump: (jump: Jump) => void): Jump | null {
    this.#onJump = onJump;
    const waiting = this.#waiting;
    this.#waiting = null;
    return waiting;
  }

  /** Puts the picture away; the moment stays. */
  close(): void {
    this.set({ phase: "idle", playing: false, problem: null });
  }

  disconnect(): void {
    this.#onJump = null;
  }
}

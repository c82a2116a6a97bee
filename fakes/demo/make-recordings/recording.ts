import type { Voice } from "./narrate";
import type { Scene } from "./scenes/paint";
import type { Sound } from "./sounds";

/** What is drawn from a moment on (ms), until the next shot. */
export type Shot = readonly [atMs: number, scene: Scene];

export type Recording = {
  job: string;
  /** The caption file whose words are spoken. */
  captions: string;
  voice: Voice;
  shots: readonly Shot[];
  sounds: readonly Sound[];
};

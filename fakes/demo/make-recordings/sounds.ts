import { RATE } from "./narrate";

/** A sound of the shop, made here: from a moment, for so many seconds. */
export type Sound = { atMs: number; seconds: number; kind: "click" | "clunk" | "grind" | "engine" | "pour" };

/** Noise that comes out the same each time. */
function noise(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 0x8000_0000 - 1;
  };
}

/** Amplitude of a sound at a second after its start, between -1 and 1. */
function shape(kind: Sound["kind"], seconds: number): (at: number) => number {
  const random = noise(seconds * 1000 + kind.length);
  const fade = (at: number) => Math.min(1, at / 0.4, (seconds - at) / 0.4);
  let low = 0;
  switch (kind) {
    case "click":
      return (at) => Math.exp(-at * 90) * (0.5 * Math.sin(at * 2 * Math.PI * 2100) + 0.35 * random());
    case "clunk":
      return (at) => Math.exp(-at * 22) * (0.7 * Math.sin(at * 2 * Math.PI * 95) + 0.2 * random());
    case "grind":
      return (at) => {
        low += 0.35 * (random() - low);
        const pulse = 0.6 + 0.4 * Math.sin(at * 1.9) * Math.sin(at * 0.7);
        return 0.11 * fade(at) * pulse * (low + 0.5 * Math.sin(at * 2 * Math.PI * 172));
      };
    case "engine":
      return (at) => {
        low += 0.05 * (random() - low);
        const beat = Math.sin(at * 2 * Math.PI * 26) + 0.5 * Math.sin(at * 2 * Math.PI * 52);
        return 0.035 * fade(at) * (beat + 2 * low);
      };
    case "pour":
      return (at) => {
        low += 0.12 * (random() - low);
        return 0.1 * fade(at) * low * (0.7 + 0.3 * Math.sin(at * 2 * Math.PI * 3.1));
      };
  }
}

/** Adds a sound and, under everything, the faint air of a room. */
export function addSounds(track: Float32Array, sounds: readonly Sound[]): void {
  const air = noise(7);
  for (let i = 0, low = 0; i < track.length; i++) {
    low += 0.2 * (air() - low);
    track[i] = track[i]! + 0.0018 * low;
  }
  for (const { atMs, seconds, kind } of sounds) {
    const start = Math.round((atMs / 1000) * RATE);
    const at = shape(kind, seconds);
    for (let i = 0; i < seconds * RATE && start + i < track.length; i++)
      track[start + i] = track[start + i]! + at(i / RATE);
  }
}

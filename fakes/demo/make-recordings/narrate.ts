import { execFileSync } from "node:child_process";
import type { SpokenCue } from "./cues";

export const RATE = 22_050;

/** One voice: the name that espeak-ng knows, and words a minute when there is time enough. */
export type Voice = { name: string; words: number };

const SPOKEN: readonly [RegExp, string][] = [
  [/\[[^\]]*\]/g, " "],
  [/HL-2209/g, "H L 2 2 0 9"],
  [/HL 7031, dash 40/g, "H L 70 31, dash 40"],
  [/6R-2110/g, "6 rib, twenty one ten"],
  [/5W-30/g, "5 W 30"],
  [/19\/32/g, "nineteen thirty seconds"],
  [/13\/16/g, "thirteen sixteenths"],
  [/\bA\/C\b/g, "A C"],
  [/\bpsi\b/g, "P S I"],
  [/\b20(1\d)\b/g, "20 $1"],
  [/\b2060\b/g, "20 60"],
  [/\b2110\b/g, "21 10"],
  [/\bM(\d+) by\b/g, "M $1 by"],
  [/\bdegrees C\b/g, "degrees C."],
];

/** What the voice is given to read: sound notes left out, part numbers and years as a person says them. */
export function spokenText(caption: string): string {
  return SPOKEN.reduce((text, [pattern, words]) => text.replace(pattern, words), caption).trim();
}

function samplesOf(wav: Buffer): Int16Array {
  const data = wav.indexOf("data", 12, "latin1") + 8;
  return new Int16Array(
    wav.buffer.slice(wav.byteOffset + data, wav.byteOffset + wav.length - (wav.length % 2)),
  );
}

const isLoud = (sample: number): boolean => Math.abs(sample) > 160;

function withoutSilence(samples: Int16Array): Int16Array {
  const first = samples.findIndex(isLoud);
  return first < 0 ? new Int16Array(0) : samples.subarray(first, samples.findLastIndex(isLoud) + 1);
}

function speak(voice: Voice, words: number, text: string): Int16Array {
  const args = ["-v", voice.name, "-s", String(Math.round(words)), "-a", "110", "--stdout", text];
  return withoutSilence(samplesOf(execFileSync("espeak-ng", args, { maxBuffer: 32 << 20 })));
}

/** Shortens speech without raising its pitch, where the voice cannot talk faster. */
function squeeze(samples: Int16Array, factor: number): Int16Array {
  const raw = ["-f", "s16le", "-ar", String(RATE), "-ac", "1"];
  const out = execFileSync(
    "ffmpeg",
    ["-v", "error", ...raw, "-i", "-", "-af", `atempo=${factor.toFixed(3)}`, ...raw, "-"],
    {
      input: Buffer.from(samples.buffer, samples.byteOffset, samples.byteLength),
      maxBuffer: 32 << 20,
    },
  );
  return new Int16Array(out.buffer.slice(out.byteOffset, out.byteOffset + out.length - (out.length % 2)));
}

/** The words of one cue, spoken within its window: as fast as needed, no faster. */
export function speakCue(voice: Voice, cue: SpokenCue): Int16Array {
  const text = spokenText(cue.text);
  if (text === "") return new Int16Array(0);
  const room = ((cue.endMs - cue.startMs) / 1000) * RATE;
  let words = voice.words;
  let samples = speak(voice, words, text);
  for (let tries = 0; samples.length > room && words < 300 && tries < 5; tries++) {
    words = Math.min(300, words * Math.max(1.03, samples.length / room));
    samples = speak(voice, words, text);
  }
  return samples.length > room ? squeeze(samples, (samples.length / room) * 1.01) : samples;
}

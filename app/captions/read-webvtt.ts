import webvtt from "webvtt-parser";
import type { Cue } from "./cue";
import { losesWordsInBrowser } from "./cue-text";

export const MOST_BYTES = 2_000_000;
export const MOST_CUES = 10_000;
export const MOST_CUE_CHARACTERS = 2_000;
const MOST_WARNINGS = 50;

/** A file that was not taken: why, and at which line (from 1) where there is one. */
export type CaptionRefusal = Readonly<{ ok: false; error: string; line: number | null }>;

/**
 * A file as a browser reads it: cues by start, then longest first, raw text kept. A cue that ends before it starts is
 * read, with a warning, since the standard reads it; `showable` leaves it out.
 */
export type ReadCaptions = Readonly<{
  ok: true;
  format: "vtt";
  cues: readonly Cue[];
  warnings: readonly string[];
}>;

function refuse(error: string, line: number | null = null): CaptionRefusal {
  return { ok: false, error, line };
}

/** Bytes to text: UTF-8 with or without a byte-order mark, nothing else. */
function decode(bytes: Uint8Array): string | undefined {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return undefined;
  }
}

/** The signature line as the WebVTT standard asks for it, after one byte-order mark at most. */
function hasSignature(text: string): boolean {
  return /^WEBVTT(?:[ \t\r\n]|$)/.test(text);
}

/** The first line (from 1) whose cue holds too many characters; 0 when none does. Comments and styles are no cues. */
function tooLongCue(lines: readonly string[]): number {
  let inCue = false;
  let start = 0;
  let characters = 0;
  for (const [n, line] of lines.entries()) {
    if (line.includes("-->")) {
      inCue = true;
      start = n + 1;
      characters = 0;
    } else if (line === "") inCue = false;
    else if (inCue) {
      characters += line.length;
      if (characters > MOST_CUE_CHARACTERS) return start;
    }
  }
  return 0;
}

/**
 * Reads a WebVTT file. Faults inside the file become warnings with their line; only a file that is not WebVTT, not
 * UTF-8 or too large is refused, with a sentence.
 * Source: W3C WebVTT, sections 4.1 and 6.1; the reading itself is the package's.
 */
export function readWebVtt(file: Uint8Array | string): ReadCaptions | CaptionRefusal {
  const size = typeof file === "string" ? file.length : file.byteLength;
  if (size > MOST_BYTES)
    return refuse(
      "The file is larger than 2 MB. Captions of one recording are far smaller: choose the .vtt file itself.",
    );
  const decoded = typeof file === "string" ? file : decode(file);
  if (decoded === undefined)
    return refuse(
      "The file is not in UTF-8. Save it as UTF-8 in the program that made it and choose it again.",
    );
  const text = decoded.startsWith("\ufeff") && typeof file === "string" ? decoded.slice(1) : decoded;
  if (!hasSignature(text))
    return refuse(
      "The file does not start with WEBVTT, so it is not a WebVTT caption file. Export the captions as .vtt.",
      1,
    );
  const lines = text.split(/\r\n|\r|\n/);
  const timings = lines.reduce((count, line) => count + (line.includes("-->") ? 1 : 0), 0);
  if (timings > MOST_CUES)
    return refuse(
      `The file has ${timings} cues; ${MOST_CUES} are the most. Split it by recording and choose the part for this one.`,
    );
  const longLine = tooLongCue(lines);
  if (longLine > 0)
    return refuse(
      `The cue at line ${longLine} has more than ${MOST_CUE_CHARACTERS} characters. Split it into shorter cues.`,
      longLine,
    );
  let parsed: ReturnType<InstanceType<typeof webvtt.WebVTTParser>["parse"]>;
  try {
    parsed = new webvtt.WebVTTParser().parse(text);
  } catch (error) {
    // Markup nested deeper than the stack holds.
    if (error instanceof RangeError)
      return refuse("A cue has markup nested too deep to read. Remove the markup and choose the file again.");
    throw error;
  }
  const cues = parsed.cues.map((cue): Cue => ({
    startMs: Math.round(cue.startTime * 1000),
    endMs: Math.round(cue.endTime * 1000),
    text: cue.text,
    identifier: cue.id,
  }));
  const warnings = parsed.errors.map(({ line, message }) => `Line ${line}: ${message}`);
  for (const cue of cues) {
    if (cue.endMs <= cue.startMs)
      warnings.push(`The cue at ${clock(cue.startMs)} ends before it starts, so it is never shown.`);
    if (losesWordsInBrowser(cue.text))
      warnings.push(
        `The cue at ${clock(cue.startMs)} has a bare "<". It is written out as &lt; so that the words after it show.`,
      );
  }
  if (warnings.length > MOST_WARNINGS) {
    const more = warnings.length - MOST_WARNINGS;
    warnings.splice(MOST_WARNINGS, warnings.length, `And ${more} more like these.`);
  }
  return { ok: true, format: "vtt", cues, warnings };
}

/** The cues that can be shown at all: they end after they start. */
export function showable(cues: readonly Cue[]): Cue[] {
  return cues.filter((cue) => cue.endMs > cue.startMs);
}

/** ms as WebVTT writes them: "00:12:44.350". */
export function clock(ms: number): string {
  const whole = Math.max(0, Math.round(ms));
  const pad = (n: number, digits = 2) => String(n).padStart(digits, "0");
  const seconds = Math.floor(whole / 1000);
  return `${pad(Math.floor(seconds / 3600))}:${pad(Math.floor(seconds / 60) % 60)}:${pad(seconds % 60)}.${pad(whole % 1000, 3)}`;
}

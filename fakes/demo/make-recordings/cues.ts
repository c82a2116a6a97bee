import { readFileSync } from "node:fs";
import webvtt from "webvtt-parser";

export type SpokenCue = { startMs: number; endMs: number; text: string };
export type Chapter = { startMs: number; endMs: number; title: string; phase: string };

/** The cues of a caption file as plain text, in order of start. */
export function readCues(file: string): SpokenCue[] {
  const { cues } = new webvtt.WebVTTParser().parse(readFileSync(file, "utf8"));
  return cues.map(({ startTime, endTime, text }) => ({
    startMs: Math.round(startTime * 1000),
    endMs: Math.round(endTime * 1000),
    text: text
      .replace(/<[^>]*>/g, "")
      .replace(/\s+/g, " ")
      .trim(),
  }));
}

/** Title and chapters of a recording; the end of the last chapter is the length of the recording. */
export function readChapters(file: string): { title: string; chapters: Chapter[] } {
  return JSON.parse(readFileSync(file, "utf8")) as { title: string; chapters: Chapter[] };
}

import { readdirSync, readFileSync } from "node:fs";
import webvtt from "webvtt-parser";
import { describe, expect, it } from "vitest";

const folder = new URL(".", import.meta.url).pathname;
const JOBS = [
  "brake-pads-half-done",
  "click-wrench",
  "foss-sway-bar-links",
  "oil-drain-filter",
  "serpentine-belt",
  "sway-bar-links",
  "thermostat",
  "wheel-nuts",
];
const PHASES = ["prepare", "remove", "inspect", "install", "verify"];
/** Tracks that a person wrote; the other two are kept as automatic captions come. */
const WRITTEN = JOBS.map((job) =>
  job === "oil-drain-filter" || job === "serpentine-belt" ? `${job}.clean.vtt` : `${job}.vtt`,
);

type Box = { type: string; start: number; size: number };

/** The boxes between two places of an MP4 file (ISO/IEC 14496-12, 4.2: size, four letters, a 64-bit size when it is 1). */
function boxes(file: Buffer, from = 0, to = file.length): Box[] {
  const found: Box[] = [];
  for (let at = from; at + 8 <= to;) {
    const short = file.readUInt32BE(at);
    const size = short === 1 ? Number(file.readBigUInt64BE(at + 8)) : short === 0 ? to - at : short;
    if (size < 8 || at + size > to) throw new Error(`a box of ${size} bytes at ${at} does not fit`);
    found.push({ type: file.toString("latin1", at + 4, at + 8), start: at, size });
    at += size;
  }
  return found;
}

/** Length in ms as the movie header says it (ISO/IEC 14496-12, 8.2.2). */
function lengthMs(file: Buffer): number {
  const moov = boxes(file).find(({ type }) => type === "moov")!;
  const header = boxes(file, moov.start + 8, moov.start + moov.size).find(({ type }) => type === "mvhd")!;
  const at = header.start + 8;
  return file[at] === 1
    ? (Number(file.readBigUInt64BE(at + 24)) / file.readUInt32BE(at + 20)) * 1000
    : (file.readUInt32BE(at + 16) / file.readUInt32BE(at + 12)) * 1000;
}

const recording = (job: string) => readFileSync(`${folder}recordings/${job}.mp4`);
const caption = (name: string) => readFileSync(`${folder}captions/${name}`, "utf8");
const parse = (name: string) => new webvtt.WebVTTParser().parse(caption(name));
type Chapter = { startMs: number; endMs: number; title: string; phase: string };
const chaptersOf = (job: string) =>
  JSON.parse(caption(`${job}.chapters.json`)) as { title: string; chapters: Chapter[] };

describe("recordings of the demo", () => {
  it("are one file for each job and at most 30 MB together", () => {
    const files = readdirSync(`${folder}recordings`).toSorted();
    expect(files).toEqual(JOBS.map((job) => `${job}.mp4`));
    expect(JOBS.reduce((sum, job) => sum + recording(job).length, 0)).toBeLessThanOrEqual(30_000_000);
  });

  it.each(JOBS)("%s can start before it is all there: moov stands before mdat", (job) => {
    const types = boxes(recording(job)).map(({ type }) => type);
    expect(types[0]).toBe("ftyp");
    expect(types).toContain("mdat");
    expect(types.indexOf("moov")).toBeGreaterThan(0);
    expect(types.indexOf("moov")).toBeLessThan(types.indexOf("mdat"));
  });

  it.each(JOBS)("%s has H.264 pictures and AAC sound", (job) => {
    const file = recording(job);
    const moov = boxes(file).find(({ type }) => type === "moov")!;
    const head = file.toString("latin1", moov.start, moov.start + moov.size);
    expect(head).toContain("avc1");
    expect(head).toContain("mp4a");
  });

  it.each(JOBS)("%s has chapters without a gap, as long as the recording", (job) => {
    const { title, chapters } = chaptersOf(job);
    expect(title).not.toBe("");
    expect(chapters[0]!.startMs).toBe(0);
    for (const [i, { startMs, endMs, phase, title: name }] of chapters.entries()) {
      expect(endMs).toBeGreaterThan(startMs);
      expect(PHASES).toContain(phase);
      expect(name.trim()).not.toBe("");
      if (i > 0) expect(startMs).toBe(chapters[i - 1]!.endMs);
    }
    expect(Math.abs(lengthMs(recording(job)) - chapters.at(-1)!.endMs)).toBeLessThanOrEqual(200);
  });
});

describe("captions of the demo", () => {
  const names = readdirSync(`${folder}captions`).filter((name) => name.endsWith(".vtt"));

  it.each(names)("%s is read without an error and ends before its recording does", (name) => {
    const { cues, errors } = parse(name);
    expect(errors).toEqual([]);
    expect(cues.length).toBeGreaterThan(0);
    const { chapters } = chaptersOf(name.replace(/(\.clean)?\.vtt$/, ""));
    for (const { startTime, endTime } of cues) {
      expect(endTime).toBeGreaterThan(startTime);
      expect(endTime * 1000).toBeLessThanOrEqual(chapters.at(-1)!.endMs);
    }
  });

  it.each(WRITTEN)("%s has at most two lines, and cues that follow one another", (name) => {
    const { cues } = parse(name);
    for (const [i, { startTime, text }] of cues.entries()) {
      expect(text.split("\n").length).toBeLessThanOrEqual(2);
      if (i > 0) expect(startTime).toBeGreaterThanOrEqual(cues[i - 1]!.endTime);
    }
  });

  it.each(["brake-pads-half-done", "click-wrench", "foss-sway-bar-links", "wheel-nuts"])(
    "%s can be read in time: 42 characters a line, 20 a second",
    (job) => {
      for (const { startTime, endTime, text } of parse(`${job}.vtt`).cues) {
        for (const line of text.split("\n")) expect(line.length, line).toBeLessThanOrEqual(42);
        expect(text.length / (endTime - startTime), text).toBeLessThanOrEqual(20);
      }
    },
  );
});

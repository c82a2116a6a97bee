// Caption files written by others, read where they lie, beside the project or where CAPTION_SUITE says. They are the inputs of the
// web-platform-tests (webvtt/parsing) and of a browser maker's tests, with what a browser makes of each.
import { existsSync, readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { plainText } from "~/captions/cue-text";
import { readWebVtt } from "~/captions/read-webvtt";

type Expected = { start: number; end: number; text: string; id?: string; plain?: string };
type Entry = {
  file: string;
  format: string;
  expectCues?: Expected[];
  expectReject?: string;
  disputed?: unknown;
};

const folder = process.env["CAPTION_SUITE"] ?? "../shared/captions";
const given = folder !== "" && existsSync(`${folder}/manifest.json`);
const entries = given
  ? (JSON.parse(readFileSync(`${folder}/manifest.json`, "utf8")) as { tests: Entry[] }).tests.filter(
      (entry) => !entry.disputed && entry.format === "vtt",
    )
  : [];

const sorted = <C extends { start: number; end: number }>(cues: readonly C[]) =>
  [...cues].toSorted((a, b) => a.start - b.start || b.end - a.end);

function verdict(entry: Entry): string {
  const read = readWebVtt(readFileSync(`${folder}/${entry.file}`));
  if (entry.expectReject) return read.ok ? "taken, should be refused" : "right";
  if (!read.ok) return `refused: ${read.error}`;
  const got = sorted(read.cues.map((cue) => ({ ...cue, start: cue.startMs / 1000, end: cue.endMs / 1000 })));
  const expected = sorted(entry.expectCues ?? []);
  if (got.length !== expected.length) return `${got.length} cues for ${expected.length}`;
  const wrong = expected.find((cue, n) => {
    const own = got[n];
    return (
      own === undefined ||
      Math.abs(own.start - cue.start) > 0.0006 ||
      Math.abs(own.end - cue.end) > 0.0006 ||
      own.text !== cue.text ||
      own.identifier !== (cue.id ?? "")
    );
  });
  return wrong ? `differs at ${JSON.stringify(wrong)}` : "right";
}

test("reads the caption files of others as a browser does", () => {
  if (!given) {
    console.log("caption suite: not given");
    return;
  }
  const verdicts = entries.map((entry) => `${entry.file}: ${verdict(entry)}`);
  const right = verdicts.filter((line) => line.endsWith(": right")).length;
  console.log(`caption suite: ${right} of ${entries.length}`);
  expect(verdicts.filter((line) => !line.endsWith(": right"))).toEqual([]);
  expect(entries.length).toBeGreaterThan(200);
});

test("plain words are those of a browser wherever all markup is closed", () => {
  const cues = entries
    .flatMap((entry) => entry.expectCues ?? [])
    .filter((cue) => cue.plain !== undefined && !/<(?!\/?[a-z][^<>]*>|\/>|\d[\d:.]*\s*>)/i.test(cue.text));
  if (given) console.log(`caption suite: plain words of ${cues.length} cues compared`);
  const wrong = cues.filter((cue) => plainText(cue.text) !== cue.plain);
  expect(wrong).toEqual([]);
  expect(cues.length > 80 || !given).toBe(true);
});

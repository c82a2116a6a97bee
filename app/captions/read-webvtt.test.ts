import { expect, test } from "vitest";
import { MOST_CUES, readWebVtt, showable } from "./read-webvtt";
import { writeWebVtt } from "./write-webvtt";
import { plainText } from "./cue-text";
import type { Cue } from "./cue";

const JOB = `WEBVTT - front links

NOTE recorded in bay 2

lower
00:12:44.350 --> 00:12:48.000 line:80%
<v Marta>Lower nut, <b>88</b> newton metres.
One smooth pull, stop at the first click.

12:50.000 --> 12:52.500
39
`;

function cuesOf(file: string | Uint8Array) {
  const read = readWebVtt(file);
  if (!read.ok) throw new Error(read.error);
  return read;
}

function refusalOf(file: string | Uint8Array) {
  const read = readWebVtt(file);
  return read.ok ? "taken" : read.error;
}

test("reads times, raw text and identifiers; a bare number is what was said", () => {
  expect(cuesOf(JOB)).toEqual({
    ok: true,
    format: "vtt",
    cues: [
      {
        startMs: 764_350,
        endMs: 768_000,
        text: "<v Marta>Lower nut, <b>88</b> newton metres.\nOne smooth pull, stop at the first click.",
        identifier: "lower",
      },
      { startMs: 770_000, endMs: 772_500, text: "39", identifier: "" },
    ],
    warnings: [],
  });
});

test("byte-order mark, CRLF and CR alone are read; the bytes and the text read alike", () => {
  const expected = cuesOf(JOB).cues;
  for (const text of [JOB, `\ufeff${JOB}`, JOB.replaceAll("\n", "\r\n"), JOB.replaceAll("\n", "\r")]) {
    expect(cuesOf(text).cues).toEqual(expected);
    expect(cuesOf(new TextEncoder().encode(text)).cues).toEqual(expected);
  }
});

test("what is not a WebVTT file in UTF-8 is refused with a sentence", () => {
  expect(refusalOf("")).toMatch(/does not start with WEBVTT/);
  expect(refusalOf("1\n00:00:01,000 --> 00:00:02,000\nlower nut\n")).toMatch(/does not start with WEBVTT/);
  expect(refusalOf("WEBVTTX\n")).toMatch(/does not start with WEBVTT/);
  expect(refusalOf(`\ufeff\ufeff${JOB}`)).toMatch(/does not start with WEBVTT/);
  expect(refusalOf(new TextEncoder().encode(`\ufeff\ufeff${JOB}`))).toMatch(/does not start with WEBVTT/);
  // 90° in windows-1252.
  expect(
    refusalOf(
      Uint8Array.from([..."WEBVTT\n\n00:01.000 --> 00:02.000\n90"].map((c) => c.charCodeAt(0)).concat(0xb0)),
    ),
  ).toMatch(/not in UTF-8/);
  expect(refusalOf(new Uint8Array(2_000_001))).toMatch(/larger than 2 MB/);
});

test("too many cues and too long cues are refused before they are read", () => {
  const many = (n: number) => `WEBVTT\n\n${"00:01.000 --> 00:02.000\nx\n\n".repeat(n)}`;
  expect(cuesOf(many(MOST_CUES)).cues).toHaveLength(MOST_CUES);
  expect(refusalOf(many(MOST_CUES + 1))).toMatch(/10001 cues; 10000 are the most/);
  // 8,000 nested tags: what overflows the stack of the reading.
  expect(readWebVtt(`WEBVTT\n\n00:01.000 --> 00:02.000\n${"<b>".repeat(8000)}x`)).toEqual({
    ok: false,
    error: "The cue at line 3 has more than 2000 characters. Split it into shorter cues.",
    line: 3,
  });
  const comment = `WEBVTT\n\nNOTE\n${"x".repeat(5000)}\n\n00:01.000 --> 00:02.000\n${"y".repeat(2000)}\n`;
  expect(cuesOf(comment).cues).toHaveLength(1);
});

test("faults inside the file are warnings with their line, and the rest is read", () => {
  const read = cuesOf(`WEBVTT

00:05.000 --> 00:04.000
backwards

00:06.000 -> 00:07.000
bad arrow

00:08.000 --> 00:09.000
Runout < 0.05 mm then 39 ft-lb
`);
  expect(read.cues.map((cue) => cue.text)).toEqual(["backwards", "Runout < 0.05 mm then 39 ft-lb"]);
  expect(read.warnings).toEqual([
    expect.stringMatching(/^Line 3: /),
    expect.stringMatching(/^Line 7: /),
    expect.stringMatching(/^Line 8: /),
    expect.stringMatching(/^Line 11: /),
    expect.stringMatching(/^Line 11: /),
    "The cue at 00:00:05.000 ends before it starts, so it is never shown.",
    'The cue at 00:00:08.000 has a bare "<". It is written out as &lt; so that the words after it show.',
  ]);
  expect(showable(read.cues)).toHaveLength(1);
});

test("what is written reads back: times, words and identifiers", () => {
  const cues: Cue[] = [
    { startMs: 0, endMs: 1, text: "one", identifier: "a" },
    { startMs: 59_999, endMs: 60_000, text: "Runout < 0.05 & 39 ft-lb --> done", identifier: "NOTE" },
    {
      startMs: 3_600_000,
      endMs: 360_000_000,
      text: "<i>two</i>\n\nthree &amp; four\n ",
      identifier: "b-->c",
    },
    { startMs: 360_000_001, endMs: 360_000_002, text: "", identifier: "STYLE x" },
  ];
  const back = cuesOf(writeWebVtt(cues));
  expect(back.cues.map(({ startMs, endMs }) => [startMs, endMs])).toEqual(
    cues.map(({ startMs, endMs }) => [startMs, endMs]),
  );
  expect(back.cues.map((cue) => plainText(cue.text))).toEqual([
    "one",
    "Runout < 0.05 & 39 ft-lb --> done",
    "two\nthree & four\n ",
    "",
  ]);
  expect(back.cues.map((cue) => cue.identifier)).toEqual(["a", "", "", ""]);
  expect(back.warnings).toEqual([]);
  expect(writeWebVtt(back.cues)).toBe(writeWebVtt(cues));
});

import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, expect, test } from "vitest";

const folder = mkdtempSync(join(tmpdir(), "doors-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function door(name: string, args: readonly string[], input = "") {
  const run = spawnSync("node_modules/.bin/tsx", [`app/doors/${name}.ts`, ...args], {
    encoding: "utf8",
    input,
  });
  const lines = run.stdout.trim().split("\n");
  return { status: run.status, lines: lines.map((line) => JSON.parse(line) as Record<string, unknown>) };
}

function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

const CAPTIONS = `WEBVTT

first
00:01.000 --> 00:04.500
<v Marta>Chock the wheels.

01:00:02.040 --> 01:00:05.000
Lower link nut, sixty-five foot-pounds.
`;

test("the captions door prints cues in seconds, text as written, and ids where there are any", () => {
  const { status, lines } = door("captions", [file("plain.vtt", CAPTIONS)]);
  expect(status).toBe(0);
  expect(lines).toEqual([
    {
      format: "vtt",
      cues: [
        { start: 1, end: 4.5, text: "<v Marta>Chock the wheels.", id: "first" },
        { start: 3602.04, end: 3605, text: "Lower link nut, sixty-five foot-pounds." },
      ],
      warnings: [],
    },
  ]);
});

test("the captions door refuses with a sentence and exit 1", () => {
  for (const path of [
    file("no-signature.vtt", "00:01.000 --> 00:02.000\nHello\n"),
    join(folder, "none.vtt"),
  ]) {
    const { status, lines } = door("captions", [path]);
    expect(status, path).toBe(1);
    expect(Object.keys(lines[0] ?? {})).toEqual(["error"]);
    expect(lines[0]?.["error"]).toMatch(/\.$/);
  }
});

test("the library door answers each line of standard input in the form of /api/search", () => {
  const library = mkdtempSync(join(folder, "library-"));
  writeFileSync(join(library, "links.vtt"), CAPTIONS);
  writeFileSync(
    join(library, "links.json"),
    JSON.stringify({
      title: "Front sway-bar links",
      vehicle: "2016 Aldren Foss 1.8",
      durationMs: 3_700_000,
      chapters: [{ startMs: 0, endMs: 3_700_000, title: "Fit the links", phase: "install" }],
      facts: [
        {
          atMs: 3_602_040,
          kind: "torque",
          text: "sixty-five foot-pounds",
          value: 65,
          unit: "lbf.ft",
          component: "lower link nut",
          role: "spec",
        },
        { atMs: 1_000, kind: "measurement", text: "an hour", value: 1, unit: "h", negative: true },
      ],
    }),
  );
  const { status, lines } = door("library", [library], "lower link nut torque\nflux capacitor charge\n");
  expect(status).toBe(0);
  expect(lines).toHaveLength(2);
  const [found, none] = lines as {
    answers: Record<string, unknown>[];
    moments: unknown[];
    lessons: unknown[];
  }[];
  expect(found?.answers[0]).toMatchObject({
    lessonTitle: "Front sway-bar links",
    chapterTitle: "Fit the links",
    kind: "torque",
    value: 65,
    unit: "lbf·ft",
    atMs: 3_602_040,
  });
  // 65 lbf·ft = 88.13 N·m: NIST SP 811, appendix B.8.
  expect(found?.answers[0]?.["si"]).toBeCloseTo(88.129, 2);
  expect(none).toEqual({ answers: [], moments: [], lessons: [] });
  expect(door("library", [join(folder, "none")]).status).toBe(1);
});

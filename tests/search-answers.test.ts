// What the search answers over the four narrated jobs of tests/corpus/dev; the queries and their answers are in
// tests/corpus/queries.ts.
import { readFileSync, readdirSync } from "node:fs";
import { expect, test } from "vitest";
import type { AnnotatedJob } from "~/doors/annotated-lesson";
import { publishJob, scratchShop } from "~/doors/scratch-shop.server";
import { foundJson, type FoundJson } from "~/search/found-json";
import { searchShop } from "~/search/search-shop.server";
import { vehicles } from "#drizzle/schema/index";
import { ANSWERED, FOR_VEHICLE, UNANSWERED, type Asked } from "./corpus/queries";

const folder = "tests/corpus/dev";
const scope = scratchShop();
for (const name of readdirSync(folder).filter((file) => file.endsWith(".vtt")))
  publishJob(
    scope,
    JSON.parse(readFileSync(`${folder}/${name.replace(/\.vtt$/, ".json")}`, "utf8")) as AnnotatedJob,
    readFileSync(`${folder}/${name}`),
    name,
  );

const ask = (query: string, vehicleId = "") => foundJson(searchShop(scope, query, vehicleId, 10));
const told = (found: FoundJson["answers"][number] | undefined) =>
  found ? `${found.kind} ${found.component} ${found.text} (${found.lessonTitle})` : "nothing";

function isRight(found: FoundJson["answers"][number] | undefined, asked: Asked): boolean {
  return (
    found !== undefined &&
    found.kind === asked.kind &&
    asked.component.split(" ").every((word) => found.component.includes(word)) &&
    (asked.texts.length === 0 || asked.texts.includes(found.text)) &&
    found.lessonTitle.includes(asked.in)
  );
}

const ALL = Object.values(ANSWERED).flat();

test("the right answer comes first for at least 95 of 100 queries", () => {
  const wrong = ALL.flatMap((asked) => {
    const first = ask(asked.query).answers[0];
    return isRight(first, asked) ? [] : [`${asked.query} → ${told(first)}`];
  });
  console.log(
    `first answers right: ${ALL.length - wrong.length} of ${ALL.length}${wrong.map((line) => `\n  ${line}`).join("")}`,
  );
  expect(ALL.length).toBeGreaterThanOrEqual(80);
  expect(wrong.length / ALL.length).toBeLessThanOrEqual(0.05);
});

test("what the library does not know is not answered with a figure of something else", () => {
  expect(
    UNANSWERED.flatMap((query) => {
      const [first] = ask(query).answers;
      return first ? [`${query} → ${told(first)}`] : [];
    }),
  ).toEqual([]);
});

test("a chosen vehicle gets its own value or none", () => {
  const all = scope.db.select().from(vehicles).all();
  expect(
    FOR_VEHICLE.map(({ model, query }) => {
      const vehicle = all.find((found) => found.model === model);
      return [model, query, ask(query, vehicle?.id ?? "none").answers[0]?.text ?? null];
    }),
  ).toEqual(FOR_VEHICLE.map(({ model, query, text }) => [model, query, text]));
});

test("with a vehicle chosen no answer and no moment is for another", () => {
  for (const vehicle of scope.db.select().from(vehicles).all())
    for (const { query } of ALL) {
      const found = searchShop(scope, query, vehicle.id, 10);
      const fits = (value: { vehicles: readonly { id: string }[] }) =>
        value.vehicles.some(({ id }) => id === vehicle.id);
      expect(found.answers.filter((value) => !fits(value))).toEqual([]);
      expect(found.elsewhere.filter(fits)).toEqual([]);
      const [own] = found.lessons.filter(fits);
      expect(found.moments.filter(({ lessonId }) => own && lessonId !== own.lessonId)).toEqual([]);
    }
});

test("superseded and negative figures never answer", () => {
  const torques = [
    "sway bar link lower nut torque",
    "wheel nut torque",
    "thermostat housing bolts torque",
    "engine oil capacity",
  ].flatMap((query) => ask(query).answers);
  // Said and taken back in the narrations: 74 and 80 lbf·ft, 12 N·m, 6 US qt; over-torqued by others: 150 lbf·ft.
  for (const text of ["74 lbf·ft", "80 lbf·ft", "12 N·m", "6 US qt", "150 lbf·ft"])
    expect(torques.map((found) => found.text)).not.toContain(text);
});

test("whatever is typed is searched or finds nothing, and never fails", () => {
  for (const query of [
    "",
    " ",
    '"',
    'a" OR words:*',
    "NEAR(a b)",
    "^*()-+:",
    "x".repeat(10_000),
    "\u0000\u0007\u202e",
    "🔧",
    "torque ".repeat(500),
    "'; drop table lessons; --",
    "%",
    "88",
    "- -",
  ])
    expect(() => ask(query)).not.toThrow();
});

test("a moment that is said is found by its words, with its second", () => {
  const [moment] = ask("paint mark across each nut").moments;
  expect(moment?.snippet).toContain("paint mark");
  expect(moment?.atMs).toBeGreaterThan(400_000);
});

test("a moment is found by another name of what is said", () => {
  const [moment] = ask("anti-roll bar bush").moments;
  expect(moment?.snippet).toContain("sway bar bushings");
  expect(ask("sump plug").moments.map(({ snippet }) => snippet.toLowerCase())).toContainEqual(
    expect.stringContaining("drain plug"),
  );
});

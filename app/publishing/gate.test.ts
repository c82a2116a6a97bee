import { eq } from "drizzle-orm";
import { beforeEach, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { importCaptions } from "~/captions/import-captions.server";
import type { ChapterId, LessonId, RecordingId } from "#drizzle/schema/ids";
import { doubts, lessons, type marks } from "#drizzle/schema/index";
import { COMPONENTS } from "~/lessons/components";
import {
  aChapter,
  aCitation,
  aDatabase,
  aLesson,
  aMark,
  aRecording,
  aScope,
  aShop,
  EIGHTY_EIGHT,
  NOON,
} from "../../tests/support/factories";
import { isOpen } from "./gate";
import { beforePublishing } from "./load-gate.server";
import { REQUIRED_CAUTIONS } from "./required-cautions";

let instructor: Scope;
beforeEach(() => {
  const db = aDatabase();
  instructor = aScope(db, aShop(db), "instructor");
});

type Place = { lessonId: LessonId; recordingId: RecordingId; chapterId: ChapterId };

/** A lesson of the engine that nothing stops: one chapter, captions. */
function aCleanLesson(given: Partial<typeof lessons.$inferInsert> = {}): Place {
  const of = aLesson(instructor, { title: "Valve cover gasket", ...given });
  importCaptions(
    instructor,
    of.recordingId,
    { fileName: "a.vtt", language: "en", file: "WEBVTT\n\n00:01.000 --> 00:02.000\nhello\n" },
    NOON,
  );
  return { ...of, chapterId: aChapter(instructor, of, { title: "Bolts" }) };
}

function linesOf(lessonId: LessonId) {
  return (beforePublishing(instructor, lessonId)?.lines ?? []).map(
    (line) => `${line.stops ? "STOP" : "warn"} ${line.where.kind}: ${line.sentence}`,
  );
}

type MarkGiven = Partial<typeof marks.$inferInsert>;
const sourced = (given: MarkGiven = {}): MarkGiven => ({
  component: "valve cover bolt",
  componentKey: "valve-cover+bolt",
  citationId: aCitation(instructor),
  ...given,
});

test("nothing is said of a lesson that is in order; unchecked values are a warning", () => {
  const of = aCleanLesson();
  expect(linesOf(of.lessonId)).toEqual([]);
  aMark(instructor, of, sourced());
  expect(linesOf(of.lessonId)).toEqual([
    "warn check: 1 value is not yet checked. Learners see “not yet checked” before the figure.",
  ]);
  aMark(
    instructor,
    of,
    sourced({ safetyCritical: true, component: "sump bolt", componentKey: "oil-pan+bolt" }),
  );
  const lines = beforePublishing(instructor, of.lessonId)?.lines ?? [];
  expect(isOpen(lines.filter((line) => line.where.kind === "check"))).toBe(true);
  expect(lines.find((line) => line.sentence.startsWith("1 safety-critical value"))?.stops).toBe(false);
});

test("stops on a lesson without recording or chapter, and on a chapter without phase or in pencil", () => {
  const { db } = instructor;
  const of = aLesson(instructor);
  expect(linesOf(of.lessonId)).toContain("STOP lesson: The lesson has no chapter. Add one.");
  aChapter(instructor, of, { title: "Strip", phase: null, endMs: 60_000 });
  aChapter(instructor, of, { title: "Build", state: "pencilled", startMs: 60_000 });
  expect(linesOf(of.lessonId).filter((line) => line.startsWith("STOP"))).toEqual([
    "STOP chapter: The chapter “Strip” has no phase. Choose one.",
    "STOP chapter: The chapter “Build” is in pencil. Ink it or change it.",
  ]);
  const { id: empty } = db
    .insert(lessons)
    .values({
      shopId: instructor.shopId,
      title: "Empty",
      system: "engine",
      createdBy: instructor.userId,
      createdAt: NOON,
      changedAt: NOON,
    })
    .returning({ id: lessons.id })
    .get();
  expect(linesOf(empty)).toEqual([
    "STOP lesson: The lesson has no recording. Add one.",
    "STOP lesson: The lesson has no chapter. Add one.",
  ]);
});

test("stops on a recording that does not play, with what to do", () => {
  for (const [given, sentence] of [
    [
      { state: "needs-converting", stateReason: "Convert it to H.264." },
      "The recording “Film” does not play in browsers. Convert it to H.264.",
    ],
    [{ state: "preparing" }, "The recording “Film” is still being prepared."],
    [{ deletedAt: NOON }, "The recording “Film” was deleted."],
  ] as const) {
    const of = aLesson(instructor, {}, aRecording(instructor, { title: "Film", ...given }));
    aChapter(instructor, of);
    expect(linesOf(of.lessonId)).toContain(`STOP recording: ${sentence}`);
  }
});

test("stops on pencil marks and on values without a source; what was measured rests on the recording", () => {
  const of = aCleanLesson();
  aMark(instructor, of, { ...sourced({ component: "cover bolt" }), state: "pencilled" });
  aMark(instructor, of, { component: "cam cap bolt", componentKey: "camshaft-cap", atMs: 125_000 });
  aMark(instructor, of, { kind: "measure", component: "gap", componentKey: "gap", atMs: 130_000 }, [
    { role: "measured", text: "0.2 mm", dimension: "length", unit: "mm", value: 0.2, number: 0.0002 },
  ]);
  aMark(instructor, of, { ...sourced({ component: "lid screw" }), atMs: 140_000 }, []);
  aMark(instructor, of, { kind: "tool", toolName: "socket", component: "", atMs: 150_000 }, [
    { role: "size", text: "10 mm", dimension: "length", unit: "mm", value: 10, number: 0.01 },
  ]);
  expect(linesOf(of.lessonId).filter((line) => line.startsWith("STOP"))).toEqual([
    "STOP mark: “cover bolt” at 1:00 is in pencil. Ink it, change it or erase it.",
    "STOP mark: “cam cap bolt” at 2:05 has no source. Name the document, the page and the day it was read.",
    "STOP mark: “lid screw” at 2:20 has no value.",
  ]);
});

const THIRTY: typeof EIGHTY_EIGHT = {
  role: "stage",
  action: "torque",
  text: "30 Nm",
  dimension: "torque",
  unit: "N·m",
  value: 30,
  number: 30,
};
const NINETY: typeof EIGHTY_EIGHT = {
  role: "angle",
  action: "angle",
  text: "90°",
  dimension: "angle",
  unit: "deg",
  value: 90,
  number: 90,
};

test("stops on torque plus angle whose reuse is not stated", () => {
  const of = aCleanLesson();
  const stops = () => linesOf(of.lessonId).filter((line) => line.includes("tightened by angle"));
  aMark(instructor, of, sourced({ reuse: "replace-always", component: "a", componentKey: "a" }), [
    THIRTY,
    NINETY,
  ]);
  aMark(instructor, of, sourced({ component: "b", componentKey: "b" }), [THIRTY]);
  // Backing off is no stretching, and an angle from contact is no torque plus angle.
  aMark(instructor, of, sourced({ component: "c", componentKey: "c" }), [
    THIRTY,
    { ...NINETY, action: "back-off" },
  ]);
  aMark(instructor, of, sourced({ component: "d", componentKey: "d" }), [
    { role: "value", action: "seat", text: "by hand" },
    NINETY,
  ]);
  expect(stops()).toEqual([]);
  aMark(instructor, of, sourced({ component: "head bolt", componentKey: "cylinder-head-bolt" }), [
    THIRTY,
    NINETY,
  ]);
  expect(stops()).toEqual([
    "STOP mark: “head bolt” at 1:00 is tightened by angle, and whether the fastener may be used again is not stated. Look it up and say so.",
  ]);
});

test("stops on a rubber-bushed joint whose height is not stated", () => {
  const of = aCleanLesson();
  const stops = () => linesOf(of.lessonId).filter((line) => line.includes("rubber-bushed"));
  aMark(instructor, of, sourced({ component: "wheel nut", componentKey: "wheel-nut" }));
  aMark(
    instructor,
    of,
    sourced({
      component: "control arm bolt, front",
      componentKey: "control-arm+bolt+front",
      tightenAt: "ride-height",
    }),
  );
  expect(stops()).toEqual([]);
  aMark(instructor, of, sourced({ component: "wishbone bolt, rear", componentKey: "control-arm+bolt+rear" }));
  expect(stops()).toHaveLength(1);
  expect(COMPONENTS.filter((component) => component.bushed).length).toBeGreaterThan(5);
});

test("a value in doubt is named", () => {
  const { db } = instructor;
  const of = aCleanLesson();
  const markId = aMark(instructor, of, sourced());
  db.insert(doubts)
    .values({
      shopId: instructor.shopId,
      lessonId: of.lessonId,
      markId,
      raisedBy: instructor.userId,
      stops: true,
      reason: "x",
      at: NOON,
    })
    .run();
  expect(linesOf(of.lessonId)).toContain(
    "warn mark: “valve cover bolt” at 1:00 is in doubt: learners do not see its figure until somebody clears the doubt.",
  );
});

test("stops on contradictions: a supply against the thread condition, two torques for one fastener", () => {
  const of = aCleanLesson();
  const stops = () => linesOf(of.lessonId).filter((line) => line.startsWith("STOP"));
  aMark(instructor, of, sourced({ condition: "clean-dry" }));
  aMark(instructor, of, sourced({ condition: "clean-dry" }), [
    { ...EIGHTY_EIGHT, text: "65 ft-lb", unit: "lbf·ft", value: 65, number: 88.1 },
  ]);
  expect(stops()).toEqual([
    "STOP mark: “valve cover bolt” is written down twice with different values: 88 Nm and 65 ft-lb. Say what tells them apart, or erase one.",
  ]);
  aMark(
    instructor,
    of,
    {
      kind: "supply",
      product: "penetrating oil",
      component: "valve cover bolt",
      componentKey: "valve-cover+bolt",
    },
    [],
  );
  expect(stops()).toHaveLength(1);
  aMark(
    instructor,
    of,
    {
      kind: "supply",
      product: "copper paste",
      component: "valve cover bolt",
      componentKey: "valve-cover+bolt",
    },
    [],
  );
  expect(stops()).toContain(
    "STOP mark: “valve cover bolt” says threads clean and dry, and “copper paste” goes on the same fastener. One of the two is wrong.",
  );
});

test("another side, variant or stage of the work is no contradiction", () => {
  const of = aCleanLesson();
  const other = [{ ...EIGHTY_EIGHT, value: 70, number: 70 }];
  aMark(instructor, of, sourced({ side: "left" }));
  aMark(instructor, of, sourced({ side: "right" }), other);
  aMark(instructor, of, sourced({ side: "left", appliesVariant: "flanged nut" }), other);
  aMark(instructor, of, sourced({ side: "left", tightenedState: "engine cold" }), other);
  expect(linesOf(of.lessonId).filter((line) => line.startsWith("STOP"))).toEqual([]);
});

const caution = (of: Place, words: string, given: MarkGiven = {}) =>
  aMark(
    instructor,
    of,
    { kind: "caution", signalWord: "WARNING", words, component: "", componentKey: "", ...given },
    [],
  );

test("each required caution is asked for by its trigger, and a caution that covers it is enough", () => {
  const triggers: Record<
    string,
    [system: "engine" | "brakes" | "restraint" | "air-conditioning", title: string, words: string]
  > = {
    lifting: ["engine", "Sump plug, on the lift", "Set the lift onto its locks."],
    springs: ["engine", "Spring compressor in use", "A compressed spring flies."],
    airbags: ["restraint", "Front seat", "Disconnect the battery before you touch an airbag."],
    "high-voltage": ["engine", "Inverter cover", "High voltage: permit holders only."],
    fuel: ["engine", "Fuel rail", "Fuel sprays from a line under pressure."],
    refrigerant: ["air-conditioning", "Condenser", "Recover the refrigerant first."],
    "brake-dust": ["engine", "Brake pads", "Do not blow out the dust."],
    "hot-work": ["engine", "Bracket welding", "Keep an extinguisher at hand; sparks set fire."],
    "brake-pedal": ["brakes", "Bleeding, fluid", "Before the wheels turn: pump the brake pedal."],
    "hot-coolant": ["engine", "Radiator cap", "Scalds when it is hot."],
    "hot-exhaust": ["engine", "Catalytic converter", "It stays hot for an hour."],
    "clock-spring": ["engine", "Steering column", "Mark the clock spring at centre."],
    "electric-park-brake": ["engine", "Electric park brake motor", "Use service mode."],
    "hybrid-start": ["engine", "Hybrid oil change", "The engine starts by itself, silent until then."],
    glass: ["engine", "Windscreen", "Gloves: glass splinters."],
  };
  expect(Object.keys(triggers).toSorted()).toEqual(REQUIRED_CAUTIONS.map((rule) => rule.key).toSorted());
  for (const rule of REQUIRED_CAUTIONS) {
    const [system, title, words] = triggers[rule.key] ?? ["engine", "", ""];
    const of = aCleanLesson({ system, title });
    const verify = {
      ...of,
      chapterId: aChapter(instructor, of, { phase: "verify", title: "Look again", startMs: 1, endMs: 2 }),
    };
    const asked = () =>
      linesOf(of.lessonId).filter((line) => line.includes(`A caution on ${rule.topic} is missing`));
    expect(
      asked().map((line) => line.slice(0, 4)),
      rule.key,
    ).toEqual([rule.stops ? "STOP" : "warn"]);
    caution(of, words, { state: "pencilled" });
    expect(asked(), `${rule.key} in pencil`).toHaveLength(1);
    caution(rule.phase === "verify" ? verify : of, words);
    expect(asked(), `${rule.key} covered`).toEqual([]);
  }
});

test("no danger is read into work that has none", () => {
  for (const [system, title] of [
    ["engine", "Valve cover gasket"],
    ["electrical", "Battery test with a meter"],
    ["body", "Lift the hood and latch it"],
    ["air-conditioning", "Cabin air filter"],
    ["workshop", "Using a click wrench"],
  ] as const) {
    const of = aCleanLesson({ system, title });
    expect(linesOf(of.lessonId), title).toEqual([]);
  }
});

test("pumping the pedal counts in the verify phase only, and as a danger to people", () => {
  const of = aCleanLesson({ system: "brakes", title: "Brake fluid change" });
  const verify = { ...of, chapterId: aChapter(instructor, of, { phase: "verify", startMs: 1, endMs: 2 }) };
  caution(of, "Stands under the car.");
  const asked = () => linesOf(of.lessonId);
  caution(of, "Pump the brake pedal before the wheels turn.");
  expect(
    asked().some(
      (line) => line.startsWith("STOP new-caution") && line.includes("in a chapter of phase verify"),
    ),
  ).toBe(true);
  caution(verify, "Before the wheels turn: pump the brake pedal.", { signalWord: "NOTICE" });
  expect(asked()).toEqual([
    "warn mark: The caution on “Before the wheels turn: pump the brake pedal” stands as NOTICE, which is for the car. A person can be hurt: make it a WARNING.",
  ]);
  caution(verify, "Pump the pedal until it is hard.");
  expect(asked()).toEqual([]);
});

test("a recording without captions is a warning, once for two clips of it", () => {
  const of = aLesson(instructor, { title: "Valve cover gasket" }, aRecording(instructor, { title: "Film" }));
  aChapter(instructor, of);
  expect(linesOf(of.lessonId)).toEqual([
    "warn captions: The recording “Film” has no captions. Nobody can find its words or watch it beside a running compressor.",
  ]);
});

test("a withdrawn lesson says that publishing brings it back; another shop's lesson is not seen", () => {
  const { db } = instructor;
  const of = aCleanLesson();
  db.update(lessons).set({ withdrawnAt: NOON }).where(eq(lessons.id, of.lessonId)).run();
  expect(linesOf(of.lessonId)).toEqual([
    "warn lesson: The lesson was withdrawn. Publishing brings it back into the library.",
  ]);
  expect(beforePublishing(aScope(db, aShop(db), "owner"), of.lessonId)).toBeUndefined();
});

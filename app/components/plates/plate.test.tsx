import { renderToStaticMarkup } from "react-dom/server";
import { MemoryRouter } from "react-router";
import { describe, expect, test } from "vitest";
import type { ChapterId, CitationId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import type { LearnerMark } from "~/lessons/learner-lesson.server";
import type { Mark, MarkValue } from "~/lessons/mark";
import { forLearner, showingOf, type OpenDoubt } from "~/lessons/showing";
import { groupVariants } from "~/lessons/steps";
import { readValues } from "~/quantities/parse";
import { Plate, VariantPlates } from "./plate";
import type { PlateView } from "./plate-words";

const METRIC: PlateView = { units: "metric", timeZone: "America/Chicago" };
const INCH: PlateView = { ...METRIC, units: "inch" };

function valuesOf(text: string): MarkValue[] {
  const read = readValues(text);
  if (!read.ok) throw new Error(read.error);
  return read.values.map(({ role, action, quantity, text: typed }) => ({
    role,
    action,
    hardware: "either",
    text: typed,
    dimension: quantity?.dimension ?? null,
    unit: quantity?.unit ?? null,
    value: quantity?.value ?? null,
    number: quantity?.si ?? null,
  }));
}

const BARE: Mark = {
  id: "01JMARK0000000000000000001" as MarkId,
  lessonId: "01JLESSON00000000000000001" as LessonId,
  chapterId: "01JCHAPTER0000000000000001" as ChapterId,
  recordingId: "01JRECORD00000000000000001" as RecordingId,
  atMs: 402_000,
  kind: "torque",
  state: "inked",
  component: "Lower link nut to bar",
  componentKey: "lower link nut",
  side: "none",
  position: "",
  applies: { yearFrom: null, yearTo: null, engine: "", drive: "", variant: "", question: "" },
  safetyCritical: false,
  needs: "",
  note: "",
  values: valuesOf("65 lbf·ft"),
  thread: "",
  propertyClass: "",
  condition: "not-stated",
  conditionDetail: "",
  reuse: "not-stated",
  reuseDetail: "",
  tightenAt: "not-stated",
  runDown: "not-stated",
  checkAgain: "not-stated",
  checkAgainDetail: "",
  threadDirection: "not-stated",
  wheelLoad: "not-stated",
  sequence: "",
  tightenedState: "",
  toolName: "",
  partNumber: "",
  partRule: "not-stated",
  quantity: "",
  product: "",
  signalWord: null,
  words: "",
  reason: "",
  replaces: "",
  said: "sixty-five foot-pounds",
  source: {
    citationId: "01JC1TE0000000000000000001" as CitationId,
    kind: "maker",
    title: "Foss workshop manual",
    edition: "2nd edition",
    dated: "",
    place: "page 31",
    readOn: "2026-11-09",
    readBy: "Marta Osei",
  },
  check: null,
  inkedBy: "Marta Osei",
};
const CHECKED: Partial<Mark> = {
  state: "checked",
  check: { outcome: "confirmed", by: "D. Ruiz", on: "2026-11-12", ownWork: false, reason: "" },
};
const doubt = (stops: boolean): OpenDoubt => ({
  doubtId: "01JD0UBT000000000000000001",
  markId: BARE.id,
  stops,
  by: stops ? "Dario Ruiz" : "Tom Okafor",
  reason: "The card on the wall says something else.",
  // 2026-11-13 03:30 UTC is still the evening of the 12th in Chicago.
  at: Date.UTC(2026, 10, 13, 3, 30),
});

function learnerMark(change: Partial<Mark>, doubts: readonly OpenDoubt[] = []): LearnerMark {
  const mark = { ...BARE, ...change };
  const showing = showingOf(mark, doubts);
  return { mark: forLearner(mark, showing), showing, doubts };
}

const html = (element: React.ReactElement) =>
  renderToStaticMarkup(<MemoryRouter>{element}</MemoryRouter>).replaceAll("&#x27;", "'");
const words = (element: React.ReactElement) =>
  html(element)
    .replace(/<[^>]+>/g, " ")
    .replace(/[\s\u2009]+/g, " ");
const plate = (change: Partial<Mark>, doubts: readonly OpenDoubt[] = [], view = METRIC) =>
  words(<Plate of={learnerMark(change, doubts)} view={view} />);

describe("how a torque is shown", () => {
  test("checked: both units, preferred first, condition, source and checker", () => {
    const metric = plate(CHECKED);
    expect(metric).toMatch(/88 N·m 65 lbf·ft/);
    expect(plate(CHECKED, [], INCH)).toMatch(/65 lbf·ft 88 N·m/);
    expect(metric).toContain("Thread condition not stated: do not oil");
    expect(metric).toContain(
      "Maker's information: Foss workshop manual, 2nd edition, page 31, read 9 Nov 2026 by Marta Osei",
    );
    expect(metric).toContain("Checked 12 Nov 2026 by D. Ruiz");
    expect(metric).toContain("This looks wrong");
    expect(html(<Plate of={learnerMark(CHECKED)} view={METRIC} />)).toContain(
      `href="/lessons/${BARE.lessonId}/values/${BARE.id}/wrong"`,
    );
  });

  test("self-checked is never printed as checked", () => {
    const text = plate({
      state: "checked",
      check: { outcome: "confirmed", by: "Marta Osei", on: "2026-11-12", ownWork: true, reason: "" },
    });
    expect(text).toContain("Self-checked 12 Nov 2026 by Marta Osei");
    expect(text).not.toMatch(/\bChecked\b/);
    expect(text).toContain("88 N·m");
  });

  test("unchecked: the words come first, on a hatched plate, and no figure is set large", () => {
    const of = learnerMark({});
    const markup = html(<Plate of={of} view={METRIC} />);
    expect(words(<Plate of={of} view={METRIC} />)).toMatch(
      /Not yet checked\. As written down: 88 N·m \(65 lbf·ft\)/,
    );
    expect(markup).toContain("plate-hatched");
    expect(markup).not.toMatch(/text-[2-7]xl[^>]*>\s*(?:88|65)/);
  });

  test("withheld: the page holds no figure at all", () => {
    const of = learnerMark({
      safetyCritical: true,
      note: "65 again after a week",
      sequence: "65 then 88",
    });
    const markup = html(<Plate of={of} view={METRIC} />);
    expect(markup).toContain("Value waiting for check: ask Marta Osei");
    expect(markup).not.toMatch(/\b(?:65|88)\b/);
    expect(JSON.stringify(of)).not.toMatch(/\b(?:65|88)\b|sixty-five/);
  });

  test("in doubt: struck, with who and why, and no figure", () => {
    const of = learnerMark(CHECKED, [doubt(true)]);
    const markup = html(<Plate of={of} view={METRIC} />);
    expect(markup).toContain("plate-struck");
    expect(words(<Plate of={of} view={METRIC} />)).toContain(
      "Stopped 12 Nov 2026 by Dario Ruiz: The card on the wall says something else.",
    );
    expect(markup).not.toMatch(/\b(?:65|88)\b/);
  });

  test("a trainee's doubt warns beside the figure", () => {
    const text = plate(CHECKED, [doubt(false)]);
    expect(text).toContain("88 N·m");
    expect(text).toContain("Ask before you use it.");
    expect(text).toContain("Tom Okafor, 12 Nov 2026: The card on the wall says something else.");
  });

  test("pencilled marks show nothing", () => {
    expect(plate({ state: "pencilled" })).toBe("");
  });

  test("what breaks cars stands on the same plate as the torque", () => {
    const text = plate({
      ...CHECKED,
      values: valuesOf("20 Nm, 40 Nm, + 90°"),
      reuse: "replace-always",
      threadDirection: "left",
      condition: "as-supplied",
      tightenAt: "ride-height",
      runDown: "add-what-the-wrench-shows",
      checkAgain: "never",
      sequence: "1-3-2-4",
      side: "left",
      position: "front",
      thread: "M12x1.75",
    });
    expect(text).toMatch(/1 20 N·m .*2 40 N·m .*3 \+ 90/);
    for (const fact of [
      "NEW FASTENER",
      "LEFT-HAND THREAD",
      "As supplied: do not clean off or add anything",
      "Tighten at ride height, weight on the wheels",
      "Run-down torque: add what the wrench shows while running down",
      "Do not re-pull: loosen, replace, start again",
      "Tightening order: 1-3-2-4",
      "Front, left side",
      "Thread M12x1.75",
    ])
      expect(text).toContain(fact);
  });

  test("what the source leaves open is said plainly", () => {
    expect(plate(CHECKED)).toContain("Not stated in the source: reuse of the fastener");
    expect(plate({ ...CHECKED, source: null })).toContain("Source not recorded");
  });

  test("shop practice is agreed by two, not checked", () => {
    const source = { ...BARE.source!, kind: "shop-practice" as const, title: "Harrow Lane card 4" };
    const text = plate({ ...CHECKED, source });
    expect(text).toContain("Shop practice: Harrow Lane card 4");
    expect(text).toContain("Agreed by two: Marta Osei and D. Ruiz, 12 Nov 2026");
    expect(text).not.toContain("Checked");
  });
});

test("new and reused hardware have their own torque on one plate", () => {
  const [fresh, reused] = [valuesOf("25 Nm"), valuesOf("22 Nm")];
  const text = plate({
    ...CHECKED,
    values: [
      ...fresh.map((value) => ({ ...value, hardware: "new" as const })),
      ...reused.map((value) => ({ ...value, hardware: "reused" as const })),
    ],
  });
  expect(text).toMatch(/With a new fastener 25 N·m .*With a reused fastener 22 N·m/);
});

test("a limit keeps its side: a minimum in inches is not below the minimum", () => {
  // 22.0 mm is 0.866 14 in; rounded to nearest it would read 0.866 and pass a worn part.
  const text = plate({
    ...CHECKED,
    kind: "measure",
    component: "Disc thickness",
    values: valuesOf("min 22.0 mm"),
  });
  expect(text).toMatch(/min 22\.0 mm min 0\.867 in/);
  expect(text).toContain("Limit, without tolerance");
});

test("a tool shows its size in its own unit alone", () => {
  const text = plate(
    { ...CHECKED, kind: "tool", toolName: "socket", values: valuesOf("18 mm"), source: null },
    [],
    INCH,
  );
  expect(text).toMatch(/18 .*mm socket/);
  expect(text).not.toMatch(/\bin\b/);
  expect(text).toContain("Size noted from the recording");
});

const panel = (signalWord: Mark["signalWord"]) =>
  html(
    <Plate
      of={learnerMark({ kind: "caution", signalWord, words: "Turn the nut, not the stud.", values: [] })}
      view={METRIC}
    />,
  );

test("signal panels: a triangle where a person is hurt, none for NOTICE", () => {
  for (const word of ["DANGER", "WARNING", "CAUTION"] as const) {
    expect(panel(word)).toContain("<svg");
    expect(panel(word)).toContain(word);
  }
  expect(panel("NOTICE")).not.toContain("<svg");
});

const variant = (id: string, text: string, which: string) =>
  learnerMark({
    ...CHECKED,
    id: id as MarkId,
    values: valuesOf(text),
    applies: { ...BARE.applies, variant: which, question: "Flanged or plain nut?" },
  });

test("variants of one component stand together under the question that settles them", () => {
  const groups = groupVariants([
    variant("01JMARK0000000000000000001", "65 lbf·ft", "flanged nut"),
    variant("01JMARK0000000000000000002", "52 lbf·ft", "plain nut"),
  ]);
  expect(groups).toHaveLength(1);
  const [group] = groups;
  if (!group || !("question" in group)) throw new Error("these are variants");
  const text = words(<VariantPlates variants={group} view={INCH} />);
  expect(text).toMatch(/Flanged or plain nut\? .*Only: flanged nut.*65 lbf·ft.*Only: plain nut.*52 lbf·ft/);
});

test("the correction says what was wrong and what is right", () => {
  const text = plate({
    kind: "correction",
    replaces: "32 lbf·ft",
    words: "33 lbf·ft for the upper nut",
    values: [],
  });
  expect(text).toMatch(/Wrong in the recording: 32 lbf·ft .*Right: 33 lbf·ft for the upper nut/);
});

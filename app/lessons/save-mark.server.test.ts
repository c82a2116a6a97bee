import { eq } from "drizzle-orm";
import { ulid } from "ulid";
import { expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import type { MarkId } from "#drizzle/schema/ids";
import { checks, citations, documents, markValues, marks } from "#drizzle/schema/index";
import {
  aChapter,
  aCitation,
  aDatabase,
  aLesson,
  aMark,
  aPerson,
  aScope,
  aShop,
  NOON,
} from "../../tests/support/factories";
import { findCitation, listDocuments } from "./documents.server";
import { fingerprintOf } from "./fingerprint";
import { eraseMark, inkMark, putBackMark } from "./ink-mark.server";
import { loadDraft } from "./load-draft.server";
import type { Mark, MarkKind } from "./mark";
import { markFields } from "./mark-fields";
import { readMarkForm } from "./mark-form";
import { saveMark } from "./save-mark.server";

function aBench(given: { system?: "engine" | "suspension" } = {}) {
  const db = aDatabase();
  const scope = aScope(db, aShop(db), "instructor", { name: "Marta Oduya" });
  const of = aLesson(scope, { system: "engine", ...given });
  const first = aChapter(scope, of, { title: "Remove", startMs: 0, endMs: 300_000 });
  const second = aChapter(scope, of, { title: "Fit links", startMs: 300_000, endMs: 600_000 });
  return { db, scope, ...of, first, second };
}
type Bench = ReturnType<typeof aBench>;

function aForm(fields: Record<string, string>): FormData {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  return form;
}

function versionOf(bench: Bench): string {
  return String(loadDraft(bench.scope, bench.lessonId)?.lesson.version);
}

function post(
  bench: Bench,
  kind: MarkKind,
  fields: Record<string, string>,
  target: { markId: MarkId; isNew: boolean } = { markId: ulid() as MarkId, isNew: true },
  scope: Scope = bench.scope,
) {
  const place = { version: versionOf(bench), at: "5:30", chapterId: bench.second };
  const form = readMarkForm(kind, aForm({ ...place, ...fields }), "US");
  if (!form.ok) return { ok: false, reason: "fields", errors: form.errors } as const;
  return saveMark(scope, bench.lessonId, target, form.value, NOON);
}

function posted(
  bench: Bench,
  kind: MarkKind,
  fields: Record<string, string>,
  target?: { markId: MarkId; isNew: boolean },
): Mark {
  const saved = post(bench, kind, fields, target);
  if (!saved.ok) throw new Error(JSON.stringify(saved));
  const mark = loadDraft(bench.scope, bench.lessonId)?.marks.find((mark) => mark.id === saved.markId);
  if (!mark) throw new Error("not stored");
  return mark;
}

function errorsOf(bench: Bench, kind: MarkKind, fields: Record<string, string>) {
  const before = [bench.db.select().from(marks).all(), bench.db.select().from(documents).all()];
  const saved = post(bench, kind, fields);
  expect([bench.db.select().from(marks).all(), bench.db.select().from(documents).all()]).toEqual(before);
  if (saved.ok) throw new Error("was not refused");
  return "errors" in saved ? saved.errors : saved.reason;
}

const NEW_SOURCE = {
  documentId: "new",
  newKind: "maker",
  newTitle: "Workshop manual, group 04",
  newEdition: "3rd",
  newDated: "2025-02",
  place: "page 31",
  readOn: "2026-11-09",
};

const FILLED: Record<MarkKind, Record<string, string>> = {
  torque: {
    component: "Lower drop link nut",
    side: "both",
    position: "front",
    yearFrom: "2016",
    yearTo: "2021",
    engine: "2.0",
    drive: "4WD",
    variant: "flanged nut",
    question: "Flanged or plain nut?",
    value: "20 Nm, 40 Nm + 90°",
    reusedValue: "hand tight + 3/4 turn",
    thread: "M12 x 1.75",
    propertyClass: "8.8",
    condition: "named-lubricant",
    conditionDetail: "copper paste",
    reuse: "reuse-if",
    reuseDetail: "it cannot be turned by hand",
    tightenAt: "ride-height",
    runDown: "add-what-the-wrench-shows",
    checkAgain: "never",
    checkAgainDetail: "",
    threadDirection: "left",
    wheelLoad: "before-weight",
    sequence: "1-3-2-4",
    tightenedState: "engine cold",
    needs: "second person",
    note: "hold the stud",
    safetyCritical: "yes",
  },
  tool: {
    toolName: "Deep socket",
    size: "18 mm",
    toolDrive: "1/2 in",
    component: "sway bar link nut",
    side: "none",
    position: "",
    note: "an 11/16 in socket stands in, this way only",
    safetyCritical: "yes",
  },
  measure: {
    component: "Brake rotor thickness",
    side: "left",
    position: "front",
    value: "24.0 mm ± 0.1 mm",
    min: "22.0 mm",
    max: "24.2 mm",
    limit: "21.5 mm",
    measured: "22.6 mm",
    tightenedState: "cold",
    needs: "",
    note: "eight places",
  },
  part: {
    component: "Link nut",
    side: "both",
    position: "",
    partNumber: "HL-4410-2",
    partRule: "replace",
    quantity: "2 a side",
    note: "",
    needs: "",
  },
  supply: {
    product: "Silicone grease",
    component: "sway bar bushing",
    side: "both",
    position: "",
    quantity: "a film",
    note: "never mineral grease",
    needs: "",
  },
  caution: {
    hurt: "person",
    signalWord: "WARNING",
    words: "Put stands under the body before going under the car.",
    reason: "A car that slips off a jack crushes.",
    component: "",
    side: "none",
    position: "",
  },
  correction: {
    replaces: "fifty-six foot-pounds",
    words: "65 ft-lb",
    reason: "Read from the wrong line.",
    note: "",
  },
};

for (const kind of Object.keys(FILLED) as MarkKind[])
  test(`a ${kind} comes back from the database as it was typed, inked`, () => {
    const bench = aBench();
    const mark = posted(bench, kind, FILLED[kind]);
    expect(mark).toMatchObject({
      kind,
      state: "inked",
      atMs: 330_000,
      chapterId: bench.second,
      inkedBy: "Marta Oduya",
    });
    expect(markFields(mark)).toMatchObject(FILLED[kind]);
    // Saved again unchanged, it says the same.
    const again = posted(bench, kind, markFields(mark), { markId: mark.id, isNew: false });
    expect(fingerprintOf(again)).toBe(fingerprintOf(mark));
    expect(markFields(again)).toEqual(markFields(mark));
  });

test("a torque in stages with an angle and a value for reused hardware is five ordered rows", () => {
  const mark = posted(aBench(), "torque", FILLED.torque);
  expect(
    mark.values.map(({ role, action, hardware, text, number }) => [role, action, hardware, text, number]),
  ).toEqual([
    ["stage", "torque", "new", "20 Nm", 20],
    ["stage", "torque", "new", "40 Nm", 40],
    ["angle", "angle", "new", "90°", 90],
    ["stage", "seat", "reused", "hand tight", null],
    ["angle", "angle", "reused", "3/4 turn", 270],
  ]);
  expect(mark.componentKey).toBe("sway-bar-link+front+lower+nut");
});

// foot = 0.3048 m, pound = 0.45359237 kg (yard and pound agreement 1959), standard gravity 9.80665 m/s² (CGPM 3, 1901).
test("65 ft-lb is kept as typed with its exact newton metres", () => {
  const mark = posted(aBench(), "torque", { component: "drain plug", value: "65 ft-lb" });
  expect(mark.values).toMatchObject([{ text: "65 ft-lb", unit: "lbf·ft", value: 65 }]);
  expect(mark.values[0]?.number).toBeCloseTo(65 * 0.3048 * 0.45359237 * 9.80665, 9);
});

test("the condition of the threads is not stated until a person states it", () => {
  expect(posted(aBench(), "torque", { component: "drain plug", value: "30 Nm" }).condition).toBe(
    "not-stated",
  );
});

test("a torque with an angle is never pulled again, said or not", () => {
  const bench = aBench();
  const fields = { component: "head bolt", value: "30 Nm + 90°" };
  expect(posted(bench, "torque", fields).checkAgain).toBe("never");
  expect(
    errorsOf(bench, "torque", { ...fields, checkAgain: "after-distance", checkAgainDetail: "1000 km" }),
  ).toHaveProperty("checkAgain");
});

test("sizes that are names stay names; a bare number and a bare whole size are asked again", () => {
  const bench = aBench();
  for (const size of ["E18", "T30", "PH2"])
    expect(posted(bench, "tool", { toolName: "Socket", size }).values).toMatchObject([
      { role: "size", text: size, number: null, unit: null },
    ]);
  expect(posted(bench, "tool", { toolName: "Socket", size: "1-5/16" }).values).toMatchObject([
    { text: "1-5/16", unit: "in" },
  ]);
  expect(errorsOf(bench, "tool", { toolName: "Socket", size: "19" })).toEqual({
    size: "19 has no unit: mm or in?",
  });
  expect(errorsOf(bench, "tool", { toolName: "Wrench", size: "20-100 Nm" })).toHaveProperty("size");
});

test("each broken field has its own sentence and nothing is written", () => {
  const bench = aBench();
  const torque = { component: "drain plug", value: "65 ft-lb" };
  expect(errorsOf(bench, "torque", { ...torque, value: "65" })).toEqual({
    value: "65 has no unit: lbf·ft, lbf·in or N·m?",
  });
  expect(errorsOf(bench, "torque", { ...torque, value: "" })).toEqual({
    value: "Type the torque with its unit, like 65 ft-lb.",
  });
  expect(errorsOf(bench, "torque", { ...torque, value: "65 psi" })).toHaveProperty("value");
  expect(errorsOf(bench, "torque", { ...torque, component: " " })).toHaveProperty("component");
  expect(errorsOf(bench, "torque", { ...torque, thread: "M" })).toHaveProperty("thread");
  expect(errorsOf(bench, "torque", { ...torque, at: "soon" })).toEqual({
    at: "“soon” is not a time. Type it like 12:44.",
  });
  expect(errorsOf(bench, "torque", { ...torque, at: "10:01" })).toEqual({
    at: "That is outside the recording, which plays for 10:00.",
  });
  expect(errorsOf(bench, "torque", { ...torque, at: "1:00" })).toEqual({
    at: "1:00 is in “Remove”, not in “Fit links”. Change the moment or the chapter.",
  });
  expect(errorsOf(bench, "torque", { ...torque, variant: "flanged nut" })).toHaveProperty("question");
  expect(errorsOf(bench, "torque", { ...torque, yearFrom: "2021", yearTo: "2016" })).toHaveProperty("yearTo");
  expect(errorsOf(bench, "torque", { ...torque, condition: "named-thread-locker" })).toHaveProperty(
    "conditionDetail",
  );
  expect(errorsOf(bench, "torque", { ...torque, condition: "dry" })).toEqual({
    condition: "Choose one of the list.",
  });
  expect(errorsOf(bench, "torque", { ...torque, ...NEW_SOURCE, place: "" })).toHaveProperty("place");
  expect(errorsOf(bench, "torque", { ...torque, ...NEW_SOURCE, readOn: "2026-11-13" })).toEqual({
    readOn: "That day has not come yet.",
  });
  expect(errorsOf(bench, "measure", { component: "rotor", min: "22 mm", max: "21 mm" })).toHaveProperty(
    "max",
  );
  expect(errorsOf(bench, "measure", { component: "rotor", min: "22 mm", limit: "3 psi" })).toHaveProperty(
    "limit",
  );
  expect(errorsOf(bench, "measure", { component: "rotor" })).toHaveProperty("value");
});

test("words of injury are for people, NOTICE is for things", () => {
  const bench = aBench();
  const words = { words: "Turn the nut, not the stud." };
  expect(errorsOf(bench, "caution", { ...words, hurt: "person", signalWord: "NOTICE" })).toHaveProperty(
    "signalWord",
  );
  expect(errorsOf(bench, "caution", { ...words, hurt: "car", signalWord: "CAUTION" })).toHaveProperty(
    "signalWord",
  );
  expect(errorsOf(bench, "caution", { ...words, signalWord: "NOTICE" })).toHaveProperty("hurt");
  expect(posted(bench, "caution", { ...words, hurt: "car", signalWord: "NOTICE" }).signalWord).toBe("NOTICE");
});

test("a rubber-bushed joint has to say at which height it is tightened", () => {
  const bench = aBench();
  const fields = { component: "Lower wishbone pivot bolt", value: "70 Nm + 90°" };
  expect(errorsOf(bench, "torque", fields)).toHaveProperty("tightenAt");
  expect(posted(bench, "torque", { ...fields, tightenAt: "ride-height" }).tightenAt).toBe("ride-height");
});

test("the system makes a torque safety-critical, a person may add more, and nobody takes it back", () => {
  const critical = aBench({ system: "suspension" });
  expect(posted(critical, "torque", { component: "link nut", value: "65 ft-lb" }).safetyCritical).toBe(true);
  expect(posted(critical, "tool", { toolName: "Socket", size: "18 mm" }).safetyCritical).toBe(false);
  const bench = aBench();
  const plain = { component: "drain plug", value: "65 ft-lb" };
  const mark = posted(bench, "torque", plain);
  expect(mark.safetyCritical).toBe(false);
  const target = { markId: mark.id, isNew: false };
  expect(posted(bench, "torque", { ...plain, safetyCritical: "yes" }, target).safetyCritical).toBe(true);
  expect(posted(bench, "torque", plain, target).safetyCritical).toBe(true);
});

test("the same new form posted twice is one mark", () => {
  const bench = aBench();
  const target = { markId: ulid() as MarkId, isNew: true };
  const fields = { version: versionOf(bench), component: "drain plug", value: "65 ft-lb", ...NEW_SOURCE };
  expect(post(bench, "torque", fields, target)).toEqual({ ok: true, markId: target.markId });
  expect(post(bench, "torque", fields, target)).toEqual({ ok: true, markId: target.markId });
  expect(bench.db.select().from(marks).all()).toHaveLength(1);
  expect(bench.db.select().from(markValues).all()).toHaveLength(1);
  expect(bench.db.select().from(citations).all()).toHaveLength(1);
});

test("a form opened before somebody else's change is refused whole", () => {
  const bench = aBench();
  const version = versionOf(bench);
  posted(bench, "torque", { component: "drain plug", value: "65 ft-lb" });
  expect(errorsOf(bench, "torque", { version, component: "oil filter", value: "25 Nm" })).toBe("stale");
});

function aCheck(bench: Bench, mark: Mark): void {
  bench.db
    .insert(checks)
    .values({
      shopId: bench.scope.shopId,
      markId: mark.id,
      fingerprint: fingerprintOf(mark),
      checkerId: aPerson(bench.db, bench.scope.shopId, "instructor"),
      outcome: "confirmed",
      at: NOON,
      on: "2026-11-12",
    })
    .run();
}

test("a check stays when the same value is spelled another way, and falls with value, component, thread or source", () => {
  const bench = aBench();
  const fields = { component: "drain plug", value: "100 cm·N", thread: "M12x1.75", ...NEW_SOURCE };
  const first = posted(bench, "torque", { ...fields, value: "10 Nm" });
  const target = { markId: first.id, isNew: false };
  const document = { documentId: listDocuments(bench.scope)[0]?.id ?? "", newTitle: "" };
  const same = { ...fields, ...document, value: "10 Nm" };
  aCheck(bench, first);
  const now = () => loadDraft(bench.scope, bench.lessonId)?.marks[0];
  expect(now()?.state).toBe("checked");
  expect(posted(bench, "torque", { ...same, value: "1 daNm", thread: "M12 × 1.75" }, target).state).toBe(
    "checked",
  );
  for (const changed of [
    { value: "11 Nm" },
    { component: "filler plug" },
    { thread: "M14x1.5" },
    { place: "page 32" },
    { readOn: "2026-11-10" },
    { documentId: "", place: "" },
  ]) {
    expect(posted(bench, "torque", { ...same, ...changed }, target).state, JSON.stringify(changed)).toBe(
      "inked",
    );
    expect(posted(bench, "torque", same, target).state).toBe("checked");
  }
});

test("another person who saves the form unchanged keeps the citation and the check", () => {
  const bench = aBench();
  const mark = posted(bench, "torque", { component: "drain plug", value: "10 Nm", ...NEW_SOURCE });
  aCheck(bench, mark);
  const cited = mark.source && findCitation(bench.scope, mark.source.citationId);
  const scope = aScope(bench.db, bench.scope.shopId, "owner");
  const fields = { ...markFields(mark), ...cited };
  expect(post(bench, "torque", fields, { markId: mark.id, isNew: false }, scope).ok).toBe(true);
  expect(loadDraft(scope, bench.lessonId)?.marks[0]).toMatchObject({ state: "checked", source: mark.source });
});

test("a correction stands beside the value that it corrects", () => {
  const bench = aBench();
  const torque = posted(bench, "torque", { component: "Lower link nut", side: "left", value: "65 ft-lb" });
  const correction = posted(bench, "correction", { ...FILLED.correction, corrects: torque.id });
  expect(correction).toMatchObject({
    component: "Lower link nut",
    componentKey: torque.componentKey,
    side: "left",
  });
});

function gone(noun: string) {
  return { ok: false, reason: "missing", noun };
}

test("chapters, documents, marks and lessons of others are as absent as missing ones", () => {
  const bench = aBench();
  const other = aLesson(bench.scope);
  const otherChapter = aChapter(bench.scope, other);
  const otherMark = aMark(bench.scope, { ...other, chapterId: otherChapter });
  const theirs = aScope(bench.db, aShop(bench.db), "owner");
  const theirCitation = findCitation(theirs, aCitation(theirs));
  const torque = { component: "drain plug", value: "65 ft-lb" };
  expect(post(bench, "torque", { ...torque, chapterId: otherChapter })).toEqual(gone("chapter"));
  expect(post(bench, "torque", { ...torque, chapterId: ulid() })).toEqual(gone("chapter"));
  expect(
    post(bench, "torque", {
      ...torque,
      documentId: theirCitation?.documentId ?? "",
      place: "1",
      readOn: "2026-11-09",
    }),
  ).toEqual(gone("document"));
  expect(post(bench, "torque", torque, { markId: otherMark, isNew: false })).toEqual(gone("value"));
  expect(post(bench, "torque", torque, { markId: otherMark, isNew: true })).toEqual(gone("value"));
  expect(post(bench, "correction", { ...FILLED.correction, corrects: otherMark })).toEqual(gone("value"));
  const own = posted(bench, "torque", torque);
  expect(post(bench, "torque", torque, { markId: own.id, isNew: true }, theirs)).toEqual(gone("value"));
  expect(post(bench, "tool", { toolName: "Socket" }, { markId: own.id, isNew: false })).toEqual(
    gone("value"),
  );
  expect(post(bench, "torque", torque, undefined, theirs)).toEqual(gone("lesson"));
  expect(eraseMark(theirs, bench.lessonId, own.id, 1, NOON)).toEqual(gone("value"));
  expect(inkMark(bench.scope, bench.lessonId, otherMark, 1, NOON)).toEqual(gone("value"));
  expect(loadDraft(theirs, bench.lessonId)).toBeUndefined();
});

function pencil(bench: Bench, given: Partial<typeof marks.$inferInsert> = {}): MarkId {
  return aMark(
    bench.scope,
    { lessonId: bench.lessonId, recordingId: bench.recordingId, chapterId: bench.first },
    { state: "pencilled", inkedBy: null, inkedAt: null, ...given },
  );
}

function stateOf(bench: Bench, markId: MarkId) {
  return loadDraft(bench.scope, bench.lessonId)?.marks.find((mark) => mark.id === markId)?.state;
}

test("a pencilled mark is inked as it is, erased and put back; asked twice it is done once", () => {
  const bench = aBench();
  const markId = pencil(bench);
  const version = () => Number(versionOf(bench));
  const act = (work: typeof inkMark, from = version()) =>
    work(bench.scope, bench.lessonId, markId, from, NOON).ok;
  expect(stateOf(bench, markId)).toBe("pencilled");
  const opened = version();
  expect(act(inkMark)).toBe(true);
  expect(act(inkMark, opened)).toBe(true);
  expect(version()).toBe(opened + 1);
  expect(stateOf(bench, markId)).toBe("inked");
  expect(act(eraseMark)).toBe(true);
  expect(act(eraseMark)).toBe(true);
  expect(stateOf(bench, markId)).toBeUndefined();
  expect(post(bench, "torque", { component: "x", value: "1 Nm" }, { markId, isNew: false })).toMatchObject({
    reason: "missing",
  });
  expect(act(putBackMark)).toBe(true);
  expect(stateOf(bench, markId)).toBe("inked");
  expect(eraseMark(bench.scope, bench.lessonId, markId, opened, NOON)).toEqual({
    ok: false,
    reason: "stale",
  });
});

test("a pencilled mark that lacks something says what, and stays in pencil", () => {
  const bench = aBench();
  const markId = pencil(bench, { component: "" });
  expect(inkMark(bench.scope, bench.lessonId, markId, Number(versionOf(bench)), NOON)).toEqual({
    ok: false,
    reason: "fields",
    errors: { "": "This mark cannot be inked as it is. It names no fastener. Open it and complete it." },
  });
  expect(stateOf(bench, markId)).toBe("pencilled");
});

test("inking in a safety-critical system marks the value so", () => {
  const bench = aBench({ system: "suspension" });
  const markId = pencil(bench, { safetyCritical: false });
  inkMark(bench.scope, bench.lessonId, markId, Number(versionOf(bench)), NOON);
  expect(bench.db.select().from(marks).where(eq(marks.id, markId)).get()?.safetyCritical).toBe(true);
});

test("documents are offered with the one cited last first, and the same document is added once", () => {
  const bench = aBench();
  const torque = { component: "drain plug", value: "65 ft-lb" };
  posted(bench, "torque", { ...torque, ...NEW_SOURCE });
  posted(bench, "torque", { ...torque, ...NEW_SOURCE, newTitle: "Bulletin 7" });
  expect(listDocuments(bench.scope).map((document) => document.title)).toHaveLength(2);
  posted(bench, "torque", { ...torque, ...NEW_SOURCE, place: "page 40" });
  expect(listDocuments(bench.scope).map((document) => document.title)).toHaveLength(2);
});

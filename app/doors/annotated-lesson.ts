import { componentKey } from "~/lessons/component-key";
import { blankContent } from "~/lessons/mark-content";
import type { Mark, MarkKind, MarkValue, Phase } from "~/lessons/mark";
import { readQuantity } from "~/quantities/parse";
import type { Quantity } from "~/quantities/quantity";
import type { ChapterId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";

/** One annotated fact of a narration, in the form of the corpus. */
export type AnnotatedFact = Readonly<{
  atMs: number;
  kind: string;
  text: string;
  value?: number;
  unit?: string;
  min?: number;
  max?: number;
  angleDeg?: number;
  component?: string;
  role?: string;
  thread?: string;
  partNumber?: string;
  rule?: "replace" | "reuse";
  replaces?: number;
  superseded?: boolean;
  negative?: boolean;
}>;

/** A narration with its annotations, in the form of the corpus. */
export type AnnotatedJob = Readonly<{
  title: string;
  vehicle: string;
  durationMs: number;
  chapters: readonly Readonly<{ startMs: number; endMs: number; title: string; phase: Phase }>[];
  facts: readonly AnnotatedFact[];
}>;

const KINDS: Readonly<Record<string, MarkKind>> = {
  torque: "torque",
  tool: "tool",
  measurement: "measure",
  part: "part",
  consumable: "supply",
  caution: "caution",
  correction: "correction",
};

/** The corpus' spellings of units as they are typed here; "1", years and Torx sizes are no quantities. */
const UNITS: Readonly<Record<string, string>> = {
  "lbf.ft": "lbf·ft",
  "lbf.in": "lbf·in",
  "N.m": "N·m",
  degC: "°C",
  degF: "°F",
  Ohm: "Ω",
  kOhm: "kΩ",
  MOhm: "MΩ",
  qt: "US qt",
  um: "µm",
  deg: "°",
};

function quantity(value: number | undefined, unit: string | undefined): Quantity | null {
  if (value === undefined || unit === undefined) return null;
  const read = readQuantity(`${value} ${UNITS[unit] ?? unit}`);
  return read.ok ? read.quantity : null;
}

function row(
  role: MarkValue["role"],
  found: Quantity | null,
  action: MarkValue["action"] = null,
): MarkValue[] {
  if (!found) return [];
  const { text, dimension, unit, value, si } = found;
  return [{ role, action, hardware: "either", text, dimension, unit, value, number: si }];
}

function valuesOf(fact: AnnotatedFact, kind: MarkKind): MarkValue[] {
  const { value, unit, min, max, angleDeg } = fact;
  if (kind === "tool")
    return unit === "torx"
      ? [
          {
            role: "size",
            action: null,
            hardware: "either",
            text: `T${value}`,
            dimension: null,
            unit: null,
            value: null,
            number: null,
          },
        ]
      : row("size", quantity(value, unit));
  if (value === undefined) return [...row("min", quantity(min, unit)), ...row("max", quantity(max, unit))];
  if (fact.role === "measured") return row("measured", quantity(value, unit));
  const oneSided = min !== undefined ? "min" : max !== undefined ? "max" : "value";
  const main =
    unit === "deg" && kind === "torque"
      ? row("angle", quantity(value, unit), "angle")
      : row(oneSided, quantity(value, unit));
  const angle =
    angleDeg !== undefined && unit !== "deg" ? row("angle", quantity(angleDeg, "deg"), "angle") : [];
  return [...main, ...angle];
}

/** A fact as an inked mark; null for what is no fact, or superseded, or a wrench setting (never a specification). */
export function markOf(
  fact: AnnotatedFact,
  ids: { markId: MarkId; lessonId: LessonId; chapterId: ChapterId; recordingId: RecordingId },
): Mark | null {
  const kind = KINDS[fact.kind];
  if (!kind || fact.negative || fact.superseded || fact.role === "setting") return null;
  const component = fact.component ?? "";
  const words = kind === "caution" || kind === "correction" ? fact.text : "";
  return {
    ...blankContent(kind),
    id: ids.markId,
    lessonId: ids.lessonId,
    chapterId: ids.chapterId,
    recordingId: ids.recordingId,
    atMs: fact.atMs,
    // Inked by definition of the annotations, and answered as such: nothing here is held back for a check.
    state: "inked",
    safetyCritical: false,
    component,
    componentKey: componentKey(component),
    values: valuesOf(fact, kind),
    toolName: kind === "tool" ? fact.text : "",
    product: kind === "supply" ? fact.text : "",
    partNumber: fact.partNumber ?? "",
    partRule: fact.rule ?? "not-stated",
    thread: fact.thread ?? "",
    signalWord: kind === "caution" ? "CAUTION" : null,
    words,
    replaces: fact.replaces === undefined ? "" : String(fact.replaces),
    said: fact.text,
    source: null,
    check: null,
    inkedBy: "",
  };
}

/** "2016 Corvane Meridian 2.0" as year, make, model and engine. */
export function readVehicle(text: string): {
  year: number | null;
  make: string;
  model: string;
  engine: string;
} {
  const found = /^(?:(\d{4}) )?(\S+) (\S+)(?: (.*))?$/.exec(text.trim());
  if (!found) return { year: null, make: text.trim(), model: "", engine: "" };
  return {
    year: found[1] ? Number(found[1]) : null,
    make: found[2] ?? "",
    model: found[3] ?? "",
    engine: found[4] ?? "",
  };
}

import { valuesText } from "~/lessons/values-text";
import { quantityOfValue } from "~/lessons/quantity-of-value";
import type { Mark, MarkValue } from "~/lessons/mark";
import { formatQuantity, formatValues, type UnitPreference } from "~/quantities/format";
import type { Unit } from "~/quantities/units";
import type { TypedValue } from "~/quantities/value";
import type { Asked, GivenValue } from "./asked";
import type { Choice, QuestionDraft } from "./question";

/** The rows that a new fastener takes: what is said for reused hardware is another question. */
function rowsAsked(mark: Mark): MarkValue[] {
  return mark.values.filter((row) => row.hardware !== "reused");
}

/** The first row with a figure that stands for the value itself. */
function leading(mark: Mark): MarkValue | undefined {
  return rowsAsked(mark).find(
    (row) => row.value !== null && row.role !== "tolerance" && row.role !== "drive",
  );
}

/** Where a component sits, in words that go before it: "left", "front". */
function named(mark: Mark): string {
  const side = mark.side === "left" || mark.side === "right" ? `${mark.side} ` : "";
  const component = mark.component.trim();
  // An abbreviation keeps its capitals: "ABS sensor", but "lower link nut".
  const lower = /^[A-Z][a-z]/.test(component)
    ? component.charAt(0).toLowerCase() + component.slice(1)
    : component;
  const position =
    mark.position && !lower.toLowerCase().includes(mark.position.toLowerCase()) ? `${mark.position} ` : "";
  const variant = mark.applies.variant ? ` (${mark.applies.variant})` : "";
  return `${side}${position}${lower}${variant}`;
}

function plural(words: string): boolean {
  const last =
    words
      .replace(/ \(.*\)$/, "")
      .split(" ")
      .at(-1) ?? "";
  return /[^s]s$/.test(last) && !/(?:chassis|abs|gas|bellows)$/i.test(last);
}

/** What a mark asks, as a person would ask it at the car. */
export function promptOf(mark: Mark, vehicle: string): string {
  const what = named(mark);
  const on = vehicle ? ` on the ${vehicle}` : "";
  const verb = plural(what) ? "do" : "does";
  const lead = leading(mark);
  switch (mark.kind) {
    case "torque": {
      const angle = mark.values.some((row) => row.action === "angle");
      const stages = rowsAsked(mark).filter((row) => row.role === "stage").length;
      const detail = angle ? " Give torque and angle." : stages > 1 ? " Give every stage, in order." : "";
      if (lead?.dimension === "angle")
        return `How far ${plural(what) ? "are" : "is"} the ${what} turned${on}?`;
      return `What torque ${verb} the ${what} take${on}?${detail}`;
    }
    case "tool":
      return `What size of ${mark.toolName || "tool"} fits the ${what}${on}?`;
    case "measure":
      if (lead?.role === "max") return `What is the most the ${what} may be${on}?`;
      if (lead?.role === "min") return `What is the least the ${what} may be${on}?`;
      if (lead?.role === "limit") return `What is the limit for the ${what}${on}?`;
      if (rowsAsked(mark).some((row) => row.role === "max"))
        return `Between which limits does the ${what} lie${on}?`;
      return `What is the ${what}${on}?`;
    default:
      return `What belongs to the ${what}${on}?`;
  }
}

/** The numbers of a mark that a wrong answer could be: each value row that is no angle and no tolerance. */
function numbersOf(mark: Mark): GivenValue[] {
  return rowsAsked(mark).flatMap((row) =>
    row.value !== null &&
    row.unit !== null &&
    row.role !== "tolerance" &&
    row.role !== "drive" &&
    row.dimension !== "angle"
      ? [{ value: row.value, unit: row.unit }]
      : [],
  );
}

/** A question is asked of marks with a figure that is not an observation of one car. */
export function isAsked(mark: Mark): boolean {
  if (mark.state === "pencilled") return false;
  if (mark.kind !== "torque" && mark.kind !== "tool" && mark.kind !== "measure") return false;
  if (rowsAsked(mark).some((row) => row.role === "measured")) return false;
  return mark.component.trim() !== "" && leading(mark) !== undefined;
}

/** What the grading is asked for a mark, with the values it must not be confused with. */
export function askedOf(mark: Mark, marks: readonly Mark[], superseded: readonly GivenValue[]): Asked {
  const lead = leading(mark);
  const own = rowsAsked(mark).map((row) => row.number);
  const others = marks
    .filter(
      (other) =>
        other.id !== mark.id &&
        other.kind === mark.kind &&
        other.kind !== "measure" &&
        other.component.toLowerCase() !== mark.component.toLowerCase() &&
        !rowsAsked(other).some((row) => row.role === "measured"),
    )
    .flatMap((other) => {
      const row = leading(other);
      // The same figure on another fastener is no mistake.
      if (
        !row ||
        row.value === null ||
        row.unit === null ||
        own.includes(row.number) ||
        row.dimension !== lead?.dimension
      )
        return [];
      return [{ component: other.component, value: row.value, unit: row.unit as string }];
    });
  return {
    kind: mark.kind,
    text: valuesText(rowsAsked(mark).filter((row) => row.role !== "drive")),
    unit: lead?.unit ?? "",
    ...(others.length > 0 ? { others } : {}),
    ...(superseded.length > 0 ? { superseded } : {}),
  };
}

const typed = (rows: readonly MarkValue[]): TypedValue[] =>
  rows
    .filter((row) => row.role !== "drive")
    .map((row) => ({ role: row.role, action: row.action, text: row.text, quantity: quantityOfValue(row) }));

/** The figure of another unit of the same dimension that people really mix up with it. */
const MIXED_UP: Partial<Record<Unit, Unit>> = {
  "lbf·ft": "lbf·in",
  "lbf·in": "lbf·ft",
  "N·m": "lbf·ft",
  mm: "cm",
  kPa: "psi",
  psi: "kPa",
  bar: "psi",
};

/** Sizes that lie in the drawer beside each other, metric in mm and inch in fractions; common practice, no source. */
const METRIC_SIZES = [5, 6, 7, 8, 10, 12, 13, 14, 15, 16, 17, 18, 19, 21, 22, 24, 27, 30, 32];
const INCH_SIZES = [
  "1/4",
  "5/16",
  "3/8",
  "7/16",
  "1/2",
  "9/16",
  "5/8",
  "11/16",
  "3/4",
  "13/16",
  "7/8",
  "15/16",
  "1",
];

function neighbours(row: MarkValue): string[] {
  if (row.value === null) return [];
  if (row.unit === "mm") {
    const at = METRIC_SIZES.indexOf(row.value);
    return at < 0
      ? []
      : [METRIC_SIZES[at - 1], METRIC_SIZES[at + 1]].flatMap((size) => (size ? [`${size}\u2009mm`] : []));
  }
  if (row.unit === "in") {
    const at = INCH_SIZES.findIndex((size) => {
      const [n = 0, d = 1] = size.split("/").map(Number);
      return Math.abs(n / d - (row.value ?? 0)) < 1e-9;
    });
    return at < 0
      ? []
      : [INCH_SIZES[at - 1], INCH_SIZES[at + 1]].flatMap((size) => (size ? [`${size}\u2009in`] : []));
  }
  return [];
}

/** The order of the choices depends on the mark alone: the same for everybody, and not always the first. */
function turned<T>(list: readonly T[], seed: string): T[] {
  let sum = 0;
  for (const letter of seed) sum = (sum * 31 + letter.charCodeAt(0)) % 9973;
  const at = list.length === 0 ? 0 : sum % list.length;
  return [...list.slice(at), ...list.slice(0, at)];
}

/**
 * Choices from slips that happen: the same figure in another unit, another fastener of the lesson, a superseded value,
 * the angle left out, the neighbouring size. Null when there are fewer than three wrong ones worth offering.
 */
export function choicesOf(mark: Mark, asked: Asked, prefer: UnitPreference): Choice[] | null {
  const rows = rowsAsked(mark);
  const lead = leading(mark);
  if (!lead || lead.value === null || lead.unit === null) return null;
  const right = formatValues(typed(rows), prefer === "metric" ? "metric" : "inch");
  const quantity = quantityOfValue(lead);
  const rightText = quantity && rows.length === 1 ? formatQuantity(quantity).text : right.first;
  const wrong: Choice[] = [];
  const add = (text: string, why: string) => {
    if (text !== rightText && !wrong.some((choice) => choice.text === text)) wrong.push({ text, why });
  };
  if (mark.kind === "torque" && rows.some((row) => row.action === "angle")) {
    const torqueOnly = typed(rows.filter((row) => row.action !== "angle"));
    if (torqueOnly.length > 0)
      add(
        formatValues(torqueOnly, prefer).first,
        "The angle is missing: the bolt is not stretched and the joint is not clamped.",
      );
  }
  const mixed = MIXED_UP[lead.unit];
  if (mixed && rows.length === 1 && quantity && mark.kind !== "tool")
    add(
      formatQuantity({ ...quantity, unit: mixed }).text,
      `Right number, wrong unit: the value is in ${lead.unit}.`,
    );
  for (const old of asked.superseded ?? [])
    add(`${old.value}\u2009${old.unit}`, "That value was said or written once and is replaced.");
  for (const other of asked.others ?? [])
    add(`${other.value}\u2009${other.unit}`, `That is for the ${other.component.toLowerCase()}.`);
  if (mark.kind === "tool")
    for (const size of neighbours(lead))
      add(size, "The next size in the drawer: it does not fit, or it rounds the hex.");
  if (wrong.length < 3) return null;
  return turned([{ text: rightText, why: null }, ...wrong.slice(0, 3)], mark.id);
}

/** Numbers that a correction of the same component calls wrong, in the mark's own unit when it says none. */
function correctedNumbers(mark: Mark, marks: readonly Mark[]): GivenValue[] {
  const lead = leading(mark);
  if (!lead?.unit) return [];
  return marks
    .filter(
      (other) =>
        other.kind === "correction" && other.component.toLowerCase() === mark.component.toLowerCase(),
    )
    .flatMap((other) => {
      const figure = /\d+(?:[.,]\d+)?/.exec(other.replaces)?.[0];
      const value = figure === undefined ? Number.NaN : Number(figure.replace(",", "."));
      return Number.isFinite(value) && value !== lead.value ? [{ value, unit: lead.unit as string }] : [];
    });
}

/** What an earlier revision gave for a mark and the newest does not. */
export function replacedNumbers(mark: Mark, former: readonly Mark[]): GivenValue[] {
  const now = new Set(numbersOf(mark).map(({ value, unit }) => `${value} ${unit}`));
  const canonical = new Set(rowsAsked(mark).map((row) => row.number?.toPrecision(10)));
  return former
    .filter((old) => old.id === mark.id)
    .flatMap((old) =>
      rowsAsked(old)
        .filter((row) => !canonical.has(row.number?.toPrecision(10)))
        .flatMap((row) =>
          row.value !== null &&
          row.unit !== null &&
          row.dimension !== "angle" &&
          row.role !== "tolerance" &&
          !now.has(`${row.value} ${row.unit}`)
            ? [{ value: row.value, unit: row.unit as string }]
            : [],
        ),
    );
}

/**
 * The questions of a lesson: one numeric question for each value worth knowing by heart, and a choice question
 * where the lesson itself offers believable wrong answers. `vehicle` is named in the question when it is not obvious.
 */
export function questionsOf(
  marks: readonly Mark[],
  former: readonly Mark[],
  given: { vehicle: string; prefer: UnitPreference },
): QuestionDraft[] {
  return marks.filter(isAsked).flatMap((mark): QuestionDraft[] => {
    const superseded = [...replacedNumbers(mark, former), ...correctedNumbers(mark, marks)];
    const asked = askedOf(mark, marks, superseded);
    const common = {
      markId: mark.id,
      prompt: promptOf(mark, given.vehicle),
      safetyCritical: mark.safetyCritical,
      recordingId: mark.recordingId,
      atMs: mark.atMs,
      asked,
    };
    const choices = choicesOf(mark, asked, given.prefer);
    return [
      { ...common, kind: "numeric", choices: null },
      ...(choices ? [{ ...common, kind: "choice" as const, choices }] : []),
    ];
  });
}

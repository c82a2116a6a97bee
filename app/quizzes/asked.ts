import { convertNumber } from "~/quantities/convert";
import { exactOf, plus, times, toNumber } from "~/quantities/exact";
import { formatQuantity } from "~/quantities/format";
import { readUnit } from "~/quantities/parse";
import { isFraction, lastPlace, quantityOf, type Country, type Quantity } from "~/quantities/quantity";
import { readTyped, type ReadValue } from "~/quantities/read-values";
import { dimensionOf, sameKind, unitRatio, type Dimension, type Unit } from "~/quantities/units";

/** A number with its unit as other programs give it; the unit in any spelling. */
export type GivenValue = Readonly<{ value: number; unit: string }>;

/**
 * What a question asks for, in the shape of the `grade` door. `value`, or `min` and `max` (both: a range; one: a
 * limit) in `unit`; or `stages` in working order, an angle stage in "deg". `text` is the value as written: its places
 * count. `tolerance` is the mark's own, absolute, in `unit`. `angleDeg` is the angle after the torque.
 * Without any number the values are read out of `text`.
 */
export type Asked = Readonly<{
  text?: string;
  kind: string;
  value?: number;
  min?: number;
  max?: number;
  unit: string;
  tolerance?: number;
  angleDeg?: number;
  stages?: readonly GivenValue[];
  others?: readonly Readonly<{ component: string; value: number; unit: string }>[];
  superseded?: readonly GivenValue[];
}>;

/** One number to be graded alone. `written` carries its unit and the places it was written with. */
export type AskedNumber = Readonly<{
  /** "limit" is a wear limit that does not say on which side it lies; "low" and "high" are the ends of a range. */
  sense: "value" | "min" | "max" | "limit" | "low" | "high";
  written: Quantity;
  /** The mark's own tolerance below and above, in the unit written; null when it gives none. */
  own: Readonly<{ below: number; above: number }> | null;
}>;

/** One part of an answer: a number, or the two ends of a range. */
export type AskedPart = Readonly<
  { kind: "one"; one: AskedNumber; backOff?: true } | { kind: "range"; low: AskedNumber; high: AskedNumber }
>;

/** A question made ready for grading. */
export type AskedValue = Readonly<{
  tool: boolean;
  tightening: boolean;
  parts: readonly AskedPart[];
  others: readonly Readonly<{ component: string; number: AskedNumber }>[];
  superseded: readonly AskedNumber[];
  shown: string;
  country: Country | undefined;
}>;

/** The dimension of the first number of a part. */
export function partDimension(part: AskedPart): Dimension {
  return (part.kind === "one" ? part.one : part.low).written.dimension;
}

/** Whether a part is an angle that tightens, not one that backs off. */
export function isTighteningAngle(part: AskedPart): boolean {
  return partDimension(part) === "angle" && !(part.kind === "one" && part.backOff);
}

function plainQuantity(value: number, unit: Unit): Quantity {
  const figure = String(Math.abs(value));
  const point = figure.indexOf(".");
  const places = point < 0 ? 0 : figure.length - point - 1;
  const significant = figure.replace(".", "").replace(/^0+/, "").length || 1;
  return quantityOf(`${value} ${unit}`, exactOf(value), unit, places, significant);
}

/**
 * The quantity as it stands in the text, in the unit asked or, failing that, in the unit of the text;
 * when the text does not have that value, as the bare number prints.
 */
function asWritten(value: number, unit: Unit, rows: readonly ReadValue[]): Quantity {
  const same = rows.flatMap(({ quantity, role }) => {
    if (!quantity || role === "tolerance" || !sameKind(quantity.unit, unit)) return [];
    const there = convertNumber(quantity.value, quantity.unit, unit);
    return Math.abs(there - value) <= 1e-9 * Math.max(Math.abs(value), 1e-9) ? [quantity] : [];
  });
  return same.find((quantity) => quantity.unit === unit) ?? same[0] ?? plainQuantity(value, unit);
}

function toleranceInText(rows: readonly ReadValue[], written: Quantity): AskedNumber["own"] {
  const at = rows.findIndex((row) => row.quantity === written);
  const next = rows[at + 1]?.quantity;
  if (at < 0 || !next) return null;
  if (rows[at + 1]?.role === "tolerance") {
    if (next.unit === "%") {
      const band = toNumber(times(exactOf(Math.abs(written.value)), exactOf(next.si)));
      return { below: band, above: band };
    }
    const band = next.value * unitRatio(next.unit, written.unit);
    return { below: band, above: band };
  }
  const high = rows[at + 2]?.quantity;
  if (rows[at + 1]?.role === "min" && rows[at + 2]?.role === "max" && high) {
    const from = (q: Quantity) =>
      Math.abs(
        toNumber(plus(exactOf(convertNumber(q.value, q.unit, written.unit)), exactOf(-written.value))),
      );
    return { below: from(next), above: from(high) };
  }
  return null;
}

function shownNumber({ sense, written }: AskedNumber): string {
  const text = formatQuantity(written).text;
  return sense === "min" || sense === "max" || sense === "limit" ? `${sense} ${text}` : text;
}

/** A part as it is shown in feedback: "88 N·m", "80–95 N·m", "min 22.0 mm". */
export function shownPart(part: AskedPart): string {
  if (part.kind === "one") return `${part.backOff ? "back off " : ""}${shownNumber(part.one)}`;
  const [low, high] = [formatQuantity(part.low.written), formatQuantity(part.high.written)];
  return low.figure.startsWith("−") || low.unit === "arcmin"
    ? `${low.text} to ${high.text}`
    : `${low.figure}–${high.text}`;
}

function shownParts(parts: readonly AskedPart[]): string {
  let text = "";
  for (const [i, part] of parts.entries()) {
    const joiner = i === 0 ? "" : isTighteningAngle(part) ? " + " : ", ";
    text += joiner + shownPart(part);
  }
  return text;
}

/** Makes a question ready for grading, or says in a sentence what is wrong with it. */
export function prepareAsked(
  asked: Asked,
  country?: Country,
): { ok: true; asked: AskedValue } | { ok: false; error: string } {
  const unitRead = readUnit(asked.unit, { country: country ?? "US" });
  if (!unitRead.ok) return { ok: false, error: `The question's unit: ${unitRead.error}` };
  const { unit } = unitRead;
  const tool = asked.kind === "tool" && dimensionOf(unit) === "length";
  // A question that was written with a bare "qt" means the same "qt" in the answer.
  const bareVolume = readUnit(asked.unit).ok ? country : (country ?? "US");

  const textRead = asked.text
    ? readTyped(asked.text, { bareUnit: unit, ...(bareVolume ? { country: bareVolume } : {}) })
    : null;
  const rows = textRead?.ok ? textRead.values : [];

  const number = (sense: AskedNumber["sense"], value: number, own?: AskedNumber["own"]): AskedNumber => {
    const written = asWritten(value, unit, rows);
    const role = rows.find((row) => row.quantity === written)?.role;
    const limit = role === "min" || role === "max" || role === "limit";
    if (sense === "value" && limit && !spansRange(rows)) return { sense: role, written, own: own ?? null };
    return { sense, written, own: own ?? (sense === "value" ? toleranceInText(rows, written) : null) };
  };
  const given =
    asked.tolerance !== undefined && Number.isFinite(asked.tolerance)
      ? { below: Math.abs(asked.tolerance), above: Math.abs(asked.tolerance) }
      : undefined;

  const parts: AskedPart[] = [];
  const { value, min, max } = asked;
  for (const n of [value, min, max, asked.angleDeg, asked.tolerance])
    if (n !== undefined && !Number.isFinite(n))
      return { ok: false, error: "The question has a number that is none." };
  if (asked.stages && asked.stages.length > 0) {
    for (const stage of asked.stages) {
      const stageUnit = readUnit(stage.unit, { country: country ?? "US" });
      if (!stageUnit.ok || !Number.isFinite(stage.value))
        return { ok: false, error: "The question has a stage without a number or unit." };
      const written = asWritten(stage.value, stageUnit.unit, rows);
      const inText = toleranceInText(rows, written);
      const own = sameKind(stageUnit.unit, unit) ? (given ?? inText) : inText;
      parts.push({ kind: "one", one: { sense: "value", written, own } });
    }
  } else if (value !== undefined) {
    const bounds =
      min !== undefined && max !== undefined ? { below: value - min, above: max - value } : undefined;
    parts.push({ kind: "one", one: number("value", value, given ?? bounds) });
  } else if (min !== undefined && max !== undefined)
    parts.push({ kind: "range", low: number("low", min, given), high: number("high", max, given) });
  else if (min !== undefined) parts.push({ kind: "one", one: number("min", min, given) });
  else if (max !== undefined) parts.push({ kind: "one", one: number("max", max, given) });
  else parts.push(...partsOfText(rows, given));
  if (parts.length === 0) return { ok: false, error: "The question has no value." };
  if (asked.angleDeg !== undefined && !(value === undefined && partsHaveAngle(parts))) {
    const written = asWritten(asked.angleDeg, "deg", rows);
    parts.push({ kind: "one", one: { sense: "value", written, own: toleranceInText(rows, written) } });
  }

  const plain = (v: GivenValue): AskedNumber | null => {
    const u = readUnit(v.unit, { country: country ?? "US" });
    if (!u.ok || !Number.isFinite(v.value)) return null;
    return { sense: "value", written: plainQuantity(v.value, u.unit), own: null };
  };
  const others = (asked.others ?? []).flatMap((other) => {
    const found = plain(other);
    return found ? [{ component: other.component, number: found }] : [];
  });
  const superseded = (asked.superseded ?? []).flatMap((old) => plain(old) ?? []);
  return {
    ok: true,
    asked: {
      tool,
      tightening: asked.kind === "torque",
      parts,
      others,
      superseded,
      shown: shownParts(parts),
      country: bareVolume,
    },
  };
}

function spansRange(rows: readonly ReadValue[]): boolean {
  return rows.some((row, i) => row.role === "min" && rows[i + 1]?.role === "max");
}

function partsHaveAngle(parts: readonly AskedPart[]): boolean {
  return parts.some(isTighteningAngle);
}

function partsOfText(rows: readonly ReadValue[], given: AskedNumber["own"] | undefined): AskedPart[] {
  const parts: AskedPart[] = [];
  for (const [i, row] of rows.entries()) {
    const { quantity, role, action } = row;
    if (!quantity || role === "tolerance" || action === "wait") continue;
    const before = rows[i - 1];
    const next = rows[i + 1];
    if (role === "max" && before?.role === "min") continue;
    if (role === "min" && next?.role === "max" && next.quantity) {
      if (before?.quantity && before.role === "value" && before.action === action) continue;
      const own = given ?? null;
      parts.push({
        kind: "range",
        low: { sense: "low", written: quantity, own },
        high: { sense: "high", written: next.quantity, own },
      });
      continue;
    }
    const sense = role === "min" || role === "max" || role === "limit" ? role : "value";
    const inText = toleranceInText(rows, quantity);
    const own = quantity.dimension === "angle" ? inText : (given ?? inText);
    const one: AskedNumber = { sense, written: quantity, own };
    parts.push(action === "back-off" ? { kind: "one", one, backOff: true } : { kind: "one", one });
  }
  return parts;
}

/** The last place of a number as written, in its unit; 0 for a fraction, which is exact. */
export function writtenStep(number: AskedNumber): number {
  return isFraction(number.written) ? 0 : lastPlace(number.written);
}

import type { Hardware, MarkValue } from "~/lessons/mark";
import { quantityOfValue } from "~/lessons/quantity-of-value";
import { formatValues, type UnitPreference } from "~/quantities/format";

/** A value in pieces, so that a plate can set figure and unit in their own sizes: "min", "22.0", "mm". */
export type Figure = Readonly<{ before: string; figure: string; unit: string }>;

/** One stage of a value; `first` in the reader's unit, `second` in the other. */
export type FigureRow = Readonly<{ first: Figure; second: string | null; angle: boolean; words: boolean }>;

export type FigureGroup = Readonly<{ hardware: Hardware; rows: readonly FigureRow[] }>;

const THIN_SPACE = "\u2009";

/** Takes a shown value apart at the thin space before its unit. */
export function splitFigure(text: string): Figure {
  const [, before = "", rest = text] =
    /^((?:min|max|limit|back off|wait)\s)?(.*)$/s.exec(text)?.map((part) => part ?? "") ?? [];
  const at = rest.indexOf(THIN_SPACE);
  return {
    before: before.trim(),
    figure: at < 0 ? rest : rest.slice(0, at),
    unit: at < 0 ? "" : rest.slice(at + 1),
  };
}

/** The value rows of a mark as a plate shows them, for new and for reused hardware apart. */
export function figureGroups(values: readonly MarkValue[], units: UnitPreference): FigureGroup[] {
  const hardware = [...new Set(values.map((value) => value.hardware))];
  return hardware.map((kind) => {
    const rows = values
      .filter((value) => value.hardware === kind)
      .map((value) => ({
        role: value.role,
        action: value.action,
        text: value.text,
        quantity: quantityOfValue(value),
      }));
    return {
      hardware: kind,
      rows: formatValues(rows, units).parts.map((part) => ({
        first: splitFigure(part.first),
        second: part.second,
        angle: part.action === "angle",
        words: !/\d/.test(part.first),
      })),
    };
  });
}

/** All of a value in one line: "20 N·m, 40 N·m + 90° (15 lbf·ft, 30 lbf·ft + 90°)". */
export function valueLine(values: readonly MarkValue[], units: UnitPreference): string {
  const hardware = [...new Set(values.map((value) => value.hardware))];
  return hardware
    .map((kind) => {
      const rows = values
        .filter((value) => value.hardware === kind)
        .map((value) => ({
          role: value.role,
          action: value.action,
          text: value.text,
          quantity: quantityOfValue(value),
        }));
      const { first, second } = formatValues(rows, units);
      const line = second === null ? first : `${first} (${second})`;
      return kind === "either" ? line : `${kind} fastener ${line}`;
    })
    .join("; ");
}

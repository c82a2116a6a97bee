import type { Mark } from "~/lessons/mark";

/** Two figures said in two units agree when they differ by no more than rounding: "43 foot-pounds, that is 58 newton metres". */
const ROUNDED = 0.008;

function sameFigures(a: Mark, b: Mark): boolean {
  if (a.values.length !== b.values.length) return false;
  return a.values.every((row, n) => {
    const other = b.values[n];
    if (!other || row.role !== other.role || row.action !== other.action || row.dimension !== other.dimension)
      return false;
    if (row.number === null || other.number === null) return row.text === other.text;
    const apart = Math.abs(row.number - other.number);
    return apart <= Math.abs(row.number) * (row.unit === other.unit ? 1e-9 : ROUNDED);
  });
}

/** True when two marks of one lesson write down the same thing again: the first moment of it is answer enough. */
export function sameValue(a: Mark, b: Mark): boolean {
  return (
    a.lessonId === b.lessonId &&
    a.kind === b.kind &&
    a.component.toLowerCase() === b.component.toLowerCase() &&
    a.side === b.side &&
    a.position === b.position &&
    a.applies.variant === b.applies.variant &&
    a.toolName === b.toolName &&
    a.partNumber === b.partNumber &&
    a.product === b.product &&
    a.words === b.words &&
    sameFigures(a, b)
  );
}

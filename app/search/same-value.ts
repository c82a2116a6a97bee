import type { Mark, MarkValue } from "~/lessons/mark";
import { quantityOfValue } from "~/lessons/quantity-of-value";
import { convert } from "~/quantities/convert";
import { lastPlace, type Quantity } from "~/quantities/quantity";
import { sameKind } from "~/quantities/units";

/** Whether `other` is `exact` rounded to the place that `other` is written to. */
function isRounded(exact: Quantity, other: Quantity): boolean {
  return (
    Math.abs(convert(exact, other.unit) - other.value) <= lastPlace(other) / 2 + 1e-9 * Math.abs(other.value)
  );
}

/** True when two figures say the same, in one unit or in two: "43 foot-pounds, that is 58 newton metres". */
export function sameFigure(a: Quantity, b: Quantity): boolean {
  if (!sameKind(a.unit, b.unit)) return false;
  return a.unit === b.unit
    ? Math.abs(a.value - b.value) <= 1e-9 * Math.abs(a.value)
    : isRounded(a, b) || isRounded(b, a);
}

function sameRow(a: MarkValue, b: MarkValue): boolean {
  if (a.role !== b.role || a.action !== b.action || a.hardware !== b.hardware) return false;
  const [first, second] = [quantityOfValue(a), quantityOfValue(b)];
  return first && second ? sameFigure(first, second) : first === second && a.text === b.text;
}

function sameSubject(a: Mark, b: Mark): boolean {
  return (
    a.lessonId === b.lessonId &&
    a.kind === b.kind &&
    a.component.toLowerCase() === b.component.toLowerCase() &&
    a.side === b.side &&
    a.position === b.position &&
    JSON.stringify(a.applies) === JSON.stringify(b.applies) &&
    a.partNumber === b.partNumber &&
    a.product.toLowerCase() === b.product.toLowerCase() &&
    a.words === b.words &&
    // The words for a tool differ ("10 mil spanner", "10 mil heads"); its size is what it is.
    (a.values.length > 0 || a.toolName.toLowerCase() === b.toolName.toLowerCase())
  );
}

/** True when two marks of one lesson write down the same thing again: the first moment of it is answer enough. */
export function sameValue(a: Mark, b: Mark): boolean {
  return (
    sameSubject(a, b) &&
    a.values.length === b.values.length &&
    a.values.every((row, n) => sameRow(row, b.values[n] as MarkValue))
  );
}

/** True when `less` repeats a part of `more`, a torque without its angle say: it must not stand beside it as another value. */
export function saysLess(less: Mark, more: Mark): boolean {
  return (
    sameSubject(less, more) &&
    less.values.length > 0 &&
    less.values.length < more.values.length &&
    less.values.every((row) => more.values.some((other) => sameRow(row, other)))
  );
}

import type { Quantity } from "./quantity";

/** What one value of a mark stands for. */
export type ValueRole =
  "value" | "min" | "max" | "tolerance" | "stage" | "angle" | "limit" | "size" | "drive" | "measured";

/** What is done with the fastener in one stage of tightening. */
export type StepAction =
  "seat" | "torque" | "loosen" | "back-off" | "angle" | "wait" | "turn-while-tightening";

/**
 * One row of a mark's values, in working order. "Hand tight" and "loosen fully" have no quantity.
 * `text` is what was typed for this row; an end of a range that was typed without its unit has the unit added
 * ("80 Nm" of "80-95 Nm"), so that every row can be read again alone.
 */
export type TypedValue = Readonly<{
  role: ValueRole;
  action: StepAction | null;
  quantity: Quantity | null;
  text: string;
}>;

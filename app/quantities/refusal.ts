/** Why a text was not read. */
export type RefusalReason =
  | "empty"
  | "too-long"
  | "no-number"
  | "no-unit"
  | "wrong-dimension"
  | "unknown-unit"
  | "ambiguous"
  | "negative"
  | "bad-number"
  | "disagree"
  | "order"
  | "trailing";

/** A text that was not read: a sentence for a technician, and the character (counted from 0) that stopped it. */
export type Refusal = Readonly<{ ok: false; error: string; at: number; reason: RefusalReason }>;

/** Makes a refusal. */
export function refuse(reason: RefusalReason, at: number, error: string): Refusal {
  return { ok: false, error, at, reason };
}

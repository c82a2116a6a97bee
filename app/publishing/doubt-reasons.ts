/** Why a value looks wrong, one press each: the second of the two taps. */
export const DOUBT_REASONS = {
  maker: "It differs from the maker's information",
  variant: "It is for another vehicle or variant",
  fit: "It did not fit the car",
  other: "Something looks wrong",
} as const;

export type DoubtReason = keyof typeof DOUBT_REASONS;

/** The reason as kept: the button's words and what was typed. */
export function doubtWords(reason: DoubtReason, note: string): string {
  const typed = note.trim();
  return typed === "" ? `${DOUBT_REASONS[reason]}.` : `${DOUBT_REASONS[reason]}: ${typed}`;
}

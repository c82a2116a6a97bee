import type { System } from "./draft";
import type { MarkKind } from "./mark";

/**
 * Systems whose torques and measurements are safety-critical from the start, and why. A person can mark more values
 * so, never fewer. The list is the shop practice that this product was asked for (common practice, no source).
 */
export const SAFETY_CRITICAL: Readonly<Partial<Record<System, string>>> = {
  steering: "A joint that comes loose takes the steering with it.",
  suspension: "A joint that comes loose lets the wheel move out of place.",
  brakes: "A part that is not clamped or worn past its limit takes braking away.",
  wheels: "A wheel that is not clamped comes off.",
  restraint: "A seat belt or airbag that is not fastened as made does not hold.",
  fuel: "A joint that leaks fuel starts a fire.",
  "high-voltage": "A joint that heats or a cover that gaps can kill or burn.",
};

/** Why values of this kind are safety-critical in this system; null where they are not by themselves. */
export function safetyReason(system: System, kind: MarkKind): string | null {
  return kind === "torque" || kind === "measure" ? (SAFETY_CRITICAL[system] ?? null) : null;
}

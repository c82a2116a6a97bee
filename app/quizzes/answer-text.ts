import { readQuantity } from "~/quantities/parse";
import { isUnit, unitsOf, type Dimension, type Unit } from "~/quantities/units";
import { prepareAsked, partDimension, type Asked } from "./asked";

/** What a person typed and the unit chosen beside it ("" = none chosen). */
export type TypedAnswer = Readonly<{ text: string; unit: string }>;

/** One line for the grading: a unit in the text wins, since it was typed later and with care. */
export function answerLine({ text, unit }: TypedAnswer): string {
  const typed = text.trim();
  if (typed === "" || !isUnit(unit)) return typed;
  return readQuantity(typed).ok ? typed : `${typed} ${unit === "deg" ? "°" : unit}`;
}

const SHORT: Partial<Record<Dimension, readonly Unit[]>> = {
  torque: ["N·m", "lbf·ft", "lbf·in", "kgf·m"],
  length: ["mm", "in", "cm", "thou"],
  pressure: ["kPa", "bar", "psi"],
  volume: ["L", "mL", "US qt", "US pt", "US gal"],
  angle: ["deg", "turn"],
  temperature: ["°C", "°F"],
};

/** Units to choose from for a question with one figure; empty where the units belong into the text (stages, angles). */
export function unitChoices(asked: Asked): readonly Unit[] {
  const prepared = prepareAsked(asked);
  if (!prepared.ok) return [];
  const [part, ...more] = prepared.asked.parts;
  if (!part || more.length > 0) return [];
  const dimension = partDimension(part);
  const short = SHORT[dimension] ?? unitsOf(dimension);
  return isUnit(asked.unit) && !short.includes(asked.unit) ? [asked.unit, ...short] : short;
}

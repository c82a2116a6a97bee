import { convertNumber } from "~/quantities/convert";
import { formatQuantity } from "~/quantities/format";
import { readQuantity } from "~/quantities/parse";
import type { Unit } from "~/quantities/units";
import { partDimension, prepareAsked, type Asked } from "./asked";
import { answerLine, type TypedAnswer } from "./answer-text";

/** A typed answer beside the asked value on a logarithmic scale; places run from 0 (left) to 1 (right). */
export type AnswerScale = Readonly<{
  unit: Unit;
  you: Readonly<{ at: number; text: string }>;
  asked: Readonly<{ from: number; to: number; text: string }>;
  ticks: readonly Readonly<{ at: number; figure: string }>[];
}>;

const TICKS = [1, 3];

/**
 * The scale of one answer; null when there is nothing to draw (no number, stages, zero or negative values,
 * another dimension).
 */
export function answerScale(asked: Asked, answer: TypedAnswer): AnswerScale | null {
  const prepared = prepareAsked(asked);
  if (!prepared.ok || prepared.asked.parts.length !== 1) return null;
  const [part] = prepared.asked.parts;
  if (!part || partDimension(part) === "temperature") return null;
  const read = readQuantity(answerLine(answer));
  if (!read.ok || read.quantity.dimension !== partDimension(part)) return null;
  const low = part.kind === "range" ? part.low : part.one;
  const high = part.kind === "range" ? part.high : part.one;
  const unit = low.written.unit;
  const you = convertNumber(read.quantity.value, read.quantity.unit, unit);
  const from = low.written.value - (low.own?.below ?? 0);
  const to = convertNumber(high.written.value, high.written.unit, unit) + (high.own?.above ?? 0);
  if (!(you > 0 && from > 0 && to > 0)) return null;
  const [least, most] = [Math.min(you, from) / 2, Math.max(you, to) * 2];
  const place = (value: number) => (Math.log(value) - Math.log(least)) / (Math.log(most) - Math.log(least));
  const ticks = [];
  for (let power = Math.floor(Math.log10(least)); power <= Math.ceil(Math.log10(most)); power += 1)
    for (const step of TICKS) {
      const value = step * 10 ** power;
      if (value > least && value < most)
        ticks.push({ at: place(value), figure: String(Number(value.toPrecision(1))) });
    }
  return {
    unit,
    you: { at: place(you), text: formatQuantity(read.quantity, unit).text },
    asked: { from: place(from), to: place(to), text: prepared.asked.shown },
    // Many decades make a crowded line: whole powers of ten are enough then.
    ticks: ticks.length > 7 ? ticks.filter(({ figure }) => /^0*\.?0*10*$/.test(figure)) : ticks,
  };
}

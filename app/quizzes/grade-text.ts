import { convertNumber } from "~/quantities/convert";
import { formatQuantity } from "~/quantities/format";
import type { Quantity } from "~/quantities/quantity";
import type { Dimension } from "~/quantities/units";
import { shownPart, type AskedNumber, type AskedPart, type AskedValue } from "./asked";
import type { NumberGrade } from "./grade-number";

const COUNTS = [
  "",
  "",
  "twice",
  "three times",
  "four times",
  "five times",
  "six times",
  "seven times",
  "eight times",
  "nine times",
  "ten times",
  "eleven times",
  "twelve times",
];

/** "twelve times", "1.36 times", "9.8 times", "100 times". */
export function timesWords(factor: number): string {
  const whole = Math.round(factor);
  if (Math.abs(factor - whole) < 1e-6 * factor) return COUNTS[whole] || `${whole} times`;
  return `${factor < 3 ? factor.toFixed(2) : factor < 100 ? factor.toFixed(1) : Math.round(factor)} times`;
}

const WORDS: Partial<Record<Dimension, readonly [little: string, much: string]>> = {
  torque: ["too loose", "too tight"],
  pressure: ["too low", "too high"],
  volume: ["too little", "too much"],
  temperature: ["too cold", "too hot"],
  length: ["too small", "too big"],
  mass: ["too little", "too much"],
};

function consequence(dimension: Dimension, tooMuch: boolean, factor: number | null): string {
  if (dimension !== "torque" || factor === null) return "";
  if (!tooMuch) return factor >= 2 ? " The joint is not clamped." : " The joint is short of clamp load.";
  return factor >= 2
    ? " The fastener can break or strip its thread."
    : " The fastener can stretch past its limit.";
}

/** "Right number, wrong unit. 65 lbf·in is 7.3 N·m, twelve times too loose. The joint is not clamped." */
export function wrongUnitText(
  number: AskedNumber,
  typed: Quantity,
  grade: Extract<NumberGrade, { outcome: "wrong-unit" }>,
): string {
  const { dimension, unit } = number.written;
  const shown = formatQuantity(typed).text;
  // The typed amount is said in a unit that shows how far off it is: N·m for a torque.
  const plain = dimension === "torque" && typed.unit !== "N·m" ? "N·m" : unit;
  const is = plain === typed.unit ? "" : ` is ${formatQuantity(typed, plain).text},`;
  const [little, much] = WORDS[dimension] ?? ["too low", "too high"];
  const word = grade.tooMuch ? much : little;
  const times = grade.factor === null ? word : `${timesWords(grade.factor)} ${word}`;
  const right = is === "" ? ` The value is ${formatQuantity(number.written).text}.` : "";
  return `Right number, wrong unit. ${shown}${is === "" ? " is" : is} ${times}.${consequence(dimension, grade.tooMuch, grade.factor)}${right}`;
}

/** "The value is 88 N·m", "The limit is min 22.0 mm", "The limit is 0.5 mm". */
function named(whole: string): string {
  return `The ${/^(?:min|max|limit) /.test(whole) ? "limit" : "value"} is ${whole.replace(/^limit /, "")}`;
}

/** What is said of one number that is right, close, or wrong; `whole` is the answer as it should be. */
export function numberText(
  part: AskedPart,
  number: AskedNumber,
  typed: Quantity,
  grade: NumberGrade,
  asked: AskedValue,
): string {
  const shown = formatQuantity(typed).text;
  const whole = asked.shown;
  switch (grade.outcome) {
    case "right":
      return shown === whole ? `Right. ${whole}.` : `Right. ${named(whole)}.`;
    case "right-other-unit":
      if (grade.standIn)
        return `${grade.standIn.hex} is the size. A ${grade.standIn.tool} tool stands in on it, this way only: six-point, and never on a rounded, seized or safety-critical fastener.`;
      return asked.parts.length === 1 && part.kind === "one" && number.sense === "value"
        ? `Right. ${shown} is ${whole}.`
        : `Right in another unit. ${named(whole)}.`;
    case "within-tolerance":
      return `Close enough to count. ${named(whole)}.`;
    case "wrong-unit":
      return wrongUnitText(number, typed, grade);
    case "superseded":
      return `${shown} was the value before it was corrected. It is ${whole} now.`;
    case "other-fastener":
      return `${shown} belongs to ${grade.component}. Here it is ${whole}.`;
    case "other":
      return otherText(part, number, typed, whole);
    default:
      return grade satisfies never;
  }
}

function otherText(part: AskedPart, number: AskedNumber, typed: Quantity, whole: string): string {
  const { written, sense } = number;
  const shown = formatQuantity(typed).text;
  if (typed.dimension !== written.dimension) return `Not that one. ${named(whole)}.`;
  const off = convertNumber(typed.value, typed.unit, written.unit) - written.value;
  if (written.dimension === "length" && sense === "min" && off < 0)
    return `${shown} would let a worn part pass. Reject it below ${formatQuantity(written).text}.`;
  if (written.dimension === "length" && sense === "max" && off > 0)
    return `${shown} would let a worn part pass. Reject it above ${formatQuantity(written).text}.`;
  if (sense === "max" && off > 0) return `${shown} is over the maximum. It is ${shownPart(part)}.`;
  if (sense === "min" && off < 0) return `${shown} is under the minimum. It is ${shownPart(part)}.`;
  return `Not that one. ${named(whole)}.`;
}

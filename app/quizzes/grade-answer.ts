import { refuse, type Refusal } from "~/quantities/refusal";
import { isFraction, type Country, type Quantity } from "~/quantities/quantity";
import { readTyped, type ReadValue } from "~/quantities/read-values";
import { canonicalUnit, type Dimension } from "~/quantities/units";
import { unitQuestion, wrongDimension } from "~/quantities/unit-spellings";
import {
  isTighteningAngle,
  partDimension,
  prepareAsked,
  shownPart,
  type Asked,
  type AskedNumber,
  type AskedPart,
  type AskedValue,
} from "./asked";
import {
  badness,
  gradeInRange,
  gradeNumber,
  QUIZ_TOLERANCE,
  type NumberGrade,
  type QuizTolerance,
} from "./grade-number";
import { numberText } from "./grade-text";

export type { Asked, GivenValue } from "./asked";
export { QUIZ_TOLERANCE, type QuizTolerance } from "./grade-number";

/** What an answer came to. */
export const OUTCOMES = [
  "right",
  "right-other-unit",
  "within-tolerance",
  "wrong-unit",
  "superseded",
  "other-fastener",
  "missing-angle",
  "other",
  "no-unit",
  "unreadable",
] as const;
export type Outcome = (typeof OUTCOMES)[number];

/**
 * The outcome of an answer, and the feedback in shop words. `factor` is given with "wrong-unit": how many times too
 * loose or too tight (always 1 or more; none for temperatures).
 */
export type Grade = Readonly<{ outcome: Outcome; factor?: number; text: string }>;

/** What the shop has set: its country (which pint and gallon) and its quiz tolerances. */
export type GradeSettings = Readonly<{ country?: Country; tolerance?: Partial<QuizTolerance> }>;

/** Whether an outcome counts as right. */
export function countsAsRight(outcome: Outcome): boolean {
  return outcome === "right" || outcome === "right-other-unit" || outcome === "within-tolerance";
}

/** Whether the answer is asked again and costs no try. */
export function asksAgain(outcome: Outcome): boolean {
  return outcome === "no-unit" || outcome === "unreadable";
}

/** One typed number, or both ends of a typed range. */
type TypedPart = Readonly<{
  rows: readonly ReadValue[];
  range: boolean;
  dimension: Dimension;
  backOff: boolean;
}>;

type PartGrade = Readonly<{
  grade: NumberGrade;
  number: AskedNumber;
  typed: Quantity;
  part: AskedPart;
}>;

/** Grades a typed answer; see "The grading rule" in the product notes. Never throws. */
export function gradeAnswer(question: Asked, answer: string, settings: GradeSettings = {}): Grade {
  const prepared = prepareAsked(question, settings.country);
  if (!prepared.ok) return { outcome: "unreadable", text: prepared.error };
  const { asked } = prepared;
  const shop: QuizTolerance = { ...QUIZ_TOLERANCE, ...settings.tolerance };

  const read = readAnswer(answer, asked);
  if (!read.ok) return { outcome: isNoUnit(read) ? "no-unit" : "unreadable", text: read.error };
  const typed = groupRows(read.values);
  const [first] = typed;
  const main = mainDimension(asked);
  for (const { rows } of typed)
    for (const { quantity } of rows) {
      if (!quantity || isOf(quantity.dimension, main)) continue;
      // Behind a torque an angle is a step of it; alone, where a torque is asked, it is the wrong thing.
      if (quantity.dimension === "angle" && (asked.parts.length > 1 || typed.length > 1)) continue;
      const text = wrongDimension(quantity.text, quantity.unit, quantity.dimension, main);
      return { outcome: "no-unit", text };
    }
  if (!first)
    return { outcome: "unreadable", text: "There is no number here. Type the value with its unit." };
  return asked.parts.length === 1 ? gradeSingle(asked, typed, shop) : gradeStages(asked, typed, shop);
}

function isOf(is: Dimension, wanted: Dimension): boolean {
  return canonicalUnit(is) === canonicalUnit(wanted);
}

function isNoUnit(refusal: Refusal): boolean {
  return refusal.reason === "no-unit" || refusal.reason === "wrong-dimension";
}

// "19 mm socket" is a size with its tool.
const TOOL_WORDS: ReadonlySet<string> = new Set(
  "socket sockets wrench spanner key hex hexagon allen ring bit deep box combination".split(" "),
);

function withoutToolWords(answer: string): string {
  let words = answer.trimEnd().split(" ");
  while (words.length > 1 && TOOL_WORDS.has((words.at(-1) ?? "").toLowerCase())) words = words.slice(0, -1);
  return words.join(" ");
}

function readAnswer(answer: string, asked: AskedValue): { ok: true; values: ReadValue[] } | Refusal {
  const [part] = asked.parts as [AskedPart, ...AskedPart[]];
  const dimension = mainDimension(asked);
  const unit = (part.kind === "one" ? part.one : part.low).written.unit;
  const metricTool = asked.tool && (unit === "mm" || unit === "cm");
  const text = asked.tool && answer.length <= 200 ? withoutToolWords(answer) : answer;
  const read = readTyped(text, {
    dimension,
    ...(metricTool ? { bareUnit: "mm" as const } : {}),
    ...(asked.country ? { country: asked.country } : {}),
  });
  if (!read.ok) return read;
  const signed = asked.parts.some((p) => (p.kind === "one" ? p.one : p.low).written.value < 0);
  for (const row of read.values) {
    const { quantity } = row;
    if (!quantity) continue;
    const temperature =
      quantity.dimension === "temperature" || quantity.dimension === "temperature-difference";
    if (quantity.value < 0 && !temperature && !signed)
      return refuse("negative", row.at, `${quantity.text} is below nought. Type the value without a minus.`);
    const byCustom =
      isFraction(quantity) || quantity.dimension === "angle" || (metricTool && quantity.places === 0);
    if (!row.unitTyped && !byCustom)
      return refuse("no-unit", row.at, `${quantity.text} has no unit: ${unitQuestion(dimension)}`);
  }
  return read;
}

function mainDimension(asked: AskedValue): Dimension {
  const dimensions = asked.parts.map(partDimension);
  return dimensions.find((d) => d !== "angle") ?? "angle";
}

function groupRows(rows: readonly ReadValue[]): TypedPart[] {
  const typed: TypedPart[] = [];
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i] as ReadValue;
    const next = rows[i + 1];
    if (!row.quantity || row.role === "tolerance" || row.action === "wait") continue;
    const { dimension } = row.quantity;
    const before = rows[i - 1];
    if (row.role === "min" && next?.role === "max" && next.quantity) {
      i++;
      // "22 +0/-0.05 mm": the ends belong to the value before them.
      if (
        before?.role === "value" &&
        before.action === row.action &&
        before.quantity?.dimension === dimension
      )
        continue;
      typed.push({ rows: [row, next], range: true, dimension, backOff: false });
    } else typed.push({ rows: [row], range: false, dimension, backOff: row.action === "back-off" });
  }
  return typed;
}

function gradePart(
  part: AskedPart,
  typed: TypedPart,
  asked: AskedValue,
  shop: QuizTolerance,
): PartGrade | null {
  const quantities = typed.rows.flatMap((row) => row.quantity ?? []);
  const [a, b] = quantities;
  if (!a) return null;
  if (part.kind === "range") {
    if (!b) {
      const grade = gradeInRange(part, a, asked, shop);
      return { grade, number: nearerEnd(part, a), typed: a, part };
    }
    const low: PartGrade = { grade: gradeNumber(part.low, a, asked, shop), number: part.low, typed: a, part };
    const high: PartGrade = {
      grade: gradeNumber(part.high, b, asked, shop),
      number: part.high,
      typed: b,
      part,
    };
    return badness(high.grade.outcome) > badness(low.grade.outcome) ? high : low;
  }
  if (b) return null;
  return { grade: gradeNumber(part.one, a, asked, shop), number: part.one, typed: a, part };
}

function nearerEnd(part: Extract<AskedPart, { kind: "range" }>, typed: Quantity): AskedNumber {
  return typed.si <= (part.low.written.si + part.high.written.si) / 2 ? part.low : part.high;
}

function finish(result: PartGrade, asked: AskedValue): Grade {
  const { grade, part, number, typed } = result;
  const text = numberText(part, number, typed, grade, asked);
  if (grade.outcome === "wrong-unit" && grade.factor !== null)
    return { outcome: grade.outcome, factor: grade.factor, text };
  return { outcome: grade.outcome, text };
}

function gradeSingle(asked: AskedValue, typed: readonly TypedPart[], shop: QuizTolerance): Grade {
  const [part] = asked.parts as [AskedPart];
  const [first, second] = typed as [TypedPart, ...TypedPart[]];
  if (second) return severalTyped(asked, typed);
  const [row] = first.rows as [ReadValue, ...ReadValue[]];
  if (first.backOff && !(part.kind === "one" && part.backOff))
    return { outcome: "other", text: `That loosens it. The value is ${asked.shown}.` };
  if (part.kind === "one" && first.range)
    return { outcome: "other", text: `One value is asked for here, not a range: ${asked.shown}.` };
  if (part.kind === "one" && (part.one.sense === "min" || part.one.sense === "max")) {
    const opposite = part.one.sense === "min" ? "max" : "min";
    if (row.role === opposite)
      return {
        outcome: "other",
        text: `You typed a ${opposite}imum. The limit is a ${part.one.sense}imum: ${shownPart(part)}.`,
      };
  }
  const result = gradePart(part, first, asked, shop);
  return result
    ? finish(result, asked)
    : { outcome: "other", text: `Not that one. The value is ${asked.shown}.` };
}

/** Several values where one is asked: a question back when they may be two tries, wrong when they are stages. */
function severalTyped(asked: AskedValue, typed: readonly TypedPart[]): Grade {
  const torqueLike = typed.filter((t) => t.dimension !== "angle");
  const link = torqueLike[1]?.rows[0]?.link;
  const listed =
    torqueLike.length === typed.length && typed.slice(1).every((t) => t.rows[0]?.link === "comma");
  if (listed && link === "comma")
    return { outcome: "unreadable", text: "Those are different values. Type the one you mean." };
  const extraAngle = torqueLike.length < typed.length && mainDimension(asked) !== "angle";
  const why = extraAngle ? "There is no angle on this one" : "This is done in one step";
  return { outcome: "other", text: `${why}: ${asked.shown}.` };
}

function isAngle(dimension: Dimension): boolean {
  return dimension === "angle";
}

function gradeStages(asked: AskedValue, typed: readonly TypedPart[], shop: QuizTolerance): Grade {
  const askedAngles = asked.parts.filter(isTighteningAngle).length;
  const typedAngles = typed.filter((part) => isAngle(part.dimension) && !part.backOff).length;
  const sameSteps = asked.parts.length - askedAngles === typed.length - typedAngles;
  const wrongCount: Grade = {
    outcome: "other",
    text: `This takes ${asked.parts.length} steps: ${asked.shown}.`,
  };
  if (!sameSteps || typedAngles > askedAngles) return wrongCount;

  const results: PartGrade[] = [];
  let next = 0;
  let missing = 0;
  for (const part of asked.parts) {
    const given = typed[next];
    const backsOff = part.kind === "one" && part.backOff === true;
    const fits =
      given && isAngle(given.dimension) === isAngle(partDimension(part)) && given.backOff === backsOff;
    if (given && fits) {
      if (part.kind === "one" && given.range)
        return { outcome: "other", text: `A range was typed for one value: ${asked.shown}.` };
      const result = gradePart(part, given, asked, shop);
      if (!result) return wrongCount;
      results.push(result);
      next++;
    } else if (isTighteningAngle(part)) missing++;
    else return wrongCount;
  }
  if (next < typed.length) return wrongCount;

  const worst = worstOf(results);
  if (!worst) return wrongCount;
  if (missing > 0 && badness(worst.grade.outcome) <= badness("missing-angle"))
    return { outcome: "missing-angle", text: `The angle is missing. The value is ${asked.shown}.` };
  return finish(worst, asked);
}

/** The worst part; of two in the wrong unit the torque names the factor. */
function worstOf(results: readonly PartGrade[]): PartGrade | null {
  let worst: PartGrade | null = null;
  for (const result of results)
    if (!worst || badness(result.grade.outcome) > badness(worst.grade.outcome)) worst = result;
  return worst;
}

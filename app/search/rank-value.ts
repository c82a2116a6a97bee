import { componentsIn } from "~/lessons/component-key";
import type { LearnerMark } from "~/lessons/learner-lesson.server";
import type { Mark } from "~/lessons/mark";
import { quantityOfValue } from "~/lessons/quantity-of-value";
import { mayAnswer } from "~/lessons/showing";
import type { Quantity } from "~/quantities/quantity";
import { sameKind } from "~/quantities/units";
import type { Query } from "./read-query";
import { sameFigure } from "./same-value";
import { searchWords } from "./search-words";
import { NARROWER, OPPOSITES, type Intent } from "./trade-words";

const KIND_OF: Readonly<Record<Intent, Mark["kind"]>> = {
  torque: "torque",
  size: "tool",
  measure: "measure",
  pressure: "measure",
  capacity: "measure",
  part: "part",
  caution: "caution",
  supply: "supply",
};

/** The dimension that an intent asks for, where the kind alone does not tell. */
const DIMENSION_OF: Partial<Record<Intent, string>> = { pressure: "pressure", capacity: "volume" };

/** How much each sign weighs. Set by the table of queries in tests/corpus. */
const WEIGHTS = {
  kindAsked: 20,
  dimensionAsked: 3,
  otherDimension: 0.3,
  withPartNumber: 3,
  torqueUnasked: 3,
  measureUnasked: 1.5,
  samePart: 2.5,
  noPartNamed: 0.6,
  toolOfSize: 2,
  otherFigure: 0.05,
  placeAsked: 4,
  unnamed: 0.4,
  narrower: 0.5,
  seenOnce: 0.5,
  waiting: 0.8,
};

const PLACES = new Set(OPPOSITES.flat(2));

/** Whether a mark holds the quantity that was searched: a tool's size exactly, the rest as rounded in either unit. */
export function holdsQuantity(mark: Mark, quantity: Quantity): boolean {
  return mark.values.some((row) => {
    const figure = quantityOfValue(row);
    if (!figure) return false;
    // "88 degrees" may be said of a thermostat.
    if (quantity.unit === "deg" && figure.dimension === "temperature") return figure.value === quantity.value;
    if (!sameKind(figure.unit, quantity.unit)) return false;
    return mark.kind === "tool"
      ? Math.abs(figure.si - quantity.si) <= 1e-9 * Math.abs(quantity.si)
      : sameFigure(figure, quantity);
  });
}

/** Whether a value says of itself, or its lesson of all its values, that it is for the opposite place. */
export function isElsewhere(query: Query, mark: Mark, lesson: { title: string; position: string }): boolean {
  const asked = new Set(searchWords(query.text));
  const own = new Set(searchWords(`${mark.component} ${mark.position} ${mark.side} ${mark.words}`));
  const around = new Set(searchWords(`${lesson.title} ${lesson.position}`));
  const excludes = (wanted: readonly string[], other: readonly string[]) => {
    const says = (words: ReadonlySet<string>, list: readonly string[]) =>
      list.some((word) => words.has(word));
    if (!says(asked, wanted) || says(asked, other)) return false;
    if (says(own, other)) return !says(own, wanted);
    return !says(own, wanted) && says(around, other) && !says(around, wanted);
  };
  return OPPOSITES.some(([one, two]) => excludes(one, two) || excludes(two, one));
}

/** The part that is asked for and the part that a mark is about: the same, none named, or another. */
function partOf(query: Query, mark: Mark): "same" | "open" | "other" {
  const wanted = componentsIn(query.text).map(({ key }) => key);
  const has = componentsIn(mark.component).map(({ key }) => key);
  if (wanted.length === 0) return "same";
  if (wanted.some((key) => has.includes(key))) return "same";
  if (has.length === 0) return "open";
  // "sway bar torque": the words stand in "sway bar link upper nut", though that is a part of its own.
  const own = searchWords(mark.component);
  const stands = (word: string) =>
    own.some((term) => term === word || (word === query.last && term.startsWith(word)));
  return query.must.every(stands) ? "open" : "other";
}

/** How well a found mark answers; 0 when it is no answer at all. */
export function rankValue(query: Query, found: LearnerMark, score: number): number {
  const { mark, showing } = found;
  const { intent, sure, quantity } = query;
  if (intent && sure && mark.kind !== KIND_OF[intent]) return 0;
  const part = partOf(query, mark);
  if (part === "other") return 0;
  let rank = score * (part === "same" ? WEIGHTS.samePart : WEIGHTS.noPartNamed);
  if (intent) {
    if (mark.kind === KIND_OF[intent]) rank *= WEIGHTS.kindAsked;
    if (intent === "part" && mark.partNumber !== "") rank *= WEIGHTS.withPartNumber;
    const dimension = DIMENSION_OF[intent];
    if (dimension)
      rank *= mark.values.some((row) => row.dimension === dimension)
        ? WEIGHTS.dimensionAsked
        : WEIGHTS.otherDimension;
  } else if (mark.kind === "torque") rank *= WEIGHTS.torqueUnasked;
  else if (mark.kind === "measure") rank *= WEIGHTS.measureUnasked;
  if (quantity) {
    if (!holdsQuantity(mark, quantity)) rank *= WEIGHTS.otherFigure;
    else if (quantity.dimension === "length" && mark.kind === "tool") rank *= WEIGHTS.toolOfSize;
  }
  const asked = new Set(searchWords(query.text));
  const name = searchWords(mark.component);
  // "What oil": the engine oil is nearer than the oil filter's gasket.
  const named = name.length === 0 ? 1 : name.filter((word) => asked.has(word)).length / name.length;
  rank *= WEIGHTS.unnamed + (1 - WEIGHTS.unnamed) * named;
  const own = [...name, ...searchWords(`${mark.position} ${mark.side}`)];
  if (own.some((word) => PLACES.has(word) && asked.has(word))) rank *= WEIGHTS.placeAsked;
  if (own.some((word) => NARROWER.has(word) && !asked.has(word))) rank *= WEIGHTS.narrower;
  // What was seen on one car answers less than what is specified.
  if (mark.values.some((row) => row.role === "measured")) rank *= WEIGHTS.seenOnce;
  if (!mayAnswer(showing)) rank *= WEIGHTS.waiting;
  return rank;
}

import type { FoundValue } from "./search-shop.server";

/** One answer, or all values of one component with the question that settles which is on the car. */
export type Answer =
  | Readonly<{ form: "one"; first: FoundValue }>
  | Readonly<{ form: "variants"; first: FoundValue; question: string; all: readonly FoundValue[] }>;

const sameGroup = (a: FoundValue, b: FoundValue) =>
  b.question !== "" &&
  a.question === b.question &&
  a.lessonId === b.lessonId &&
  a.found.mark.kind === b.found.mark.kind &&
  a.found.mark.componentKey === b.found.mark.componentKey &&
  a.found.mark.side === b.found.mark.side;

/** Puts the variants of one component, which stand side by side in a search result, into one answer. */
export function answersWithVariants(values: readonly FoundValue[]): Answer[] {
  const groups: FoundValue[][] = [];
  for (const value of values) {
    const group = groups.at(-1);
    if (group?.[0] && sameGroup(value, group[0])) group.push(value);
    else groups.push([value]);
  }
  return groups.flatMap((all): Answer[] => {
    const [first] = all;
    if (!first) return [];
    return first.question === ""
      ? [{ form: "one", first }]
      : [{ form: "variants", first, question: first.question, all }];
  });
}

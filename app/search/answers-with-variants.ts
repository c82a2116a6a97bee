import type { FoundValue } from "./search-shop.server";

/** One answer, or all values of one component with the question that settles which is on the car. */
export type Answer =
  | Readonly<{ form: "one"; first: FoundValue }>
  | Readonly<{ form: "variants"; first: FoundValue; question: string; all: readonly FoundValue[] }>;

const sameThing = (a: FoundValue, b: FoundValue) =>
  a.lessonId === b.lessonId &&
  a.found.mark.kind === b.found.mark.kind &&
  a.found.mark.componentKey === b.found.mark.componentKey &&
  a.found.mark.side === b.found.mark.side &&
  a.found.mark.applies.question !== "" &&
  a.found.mark.applies.question === b.found.mark.applies.question;

/** Groups variants of one component: they are shown together or not at all, in the place of the best of them. */
export function answersWithVariants(values: readonly FoundValue[]): Answer[] {
  const taken = new Set<FoundValue>();
  return values.flatMap((first): Answer[] => {
    if (taken.has(first)) return [];
    const all = values.filter((other) => other === first || sameThing(first, other));
    for (const value of all) taken.add(value);
    return all.length > 1
      ? [{ form: "variants", first, question: first.found.mark.applies.question, all }]
      : [{ form: "one", first }];
  });
}

import { isBushedJoint } from "./component-key";
import type { Mark } from "./mark";

/** What a pencilled mark lacks before it can be inked as it is; empty when nothing does. */
export function inkProblems(mark: Mark): string[] {
  const problems: string[] = [];
  const without = (text: string, sentence: string) => {
    if (text.trim() === "") problems.push(sentence);
  };
  switch (mark.kind) {
    case "torque":
      without(mark.component, "It names no fastener.");
      if (
        !mark.values.some(
          (value) => value.action === "seat" || value.dimension === "torque" || value.role === "angle",
        )
      )
        problems.push("It has no torque.");
      if (mark.tightenAt === "not-stated" && isBushedJoint(mark.component))
        problems.push("It does not say at which height this rubber-bushed joint is tightened.");
      break;
    case "measure":
      without(mark.component, "It does not say what is measured.");
      if (!mark.values.some((value) => value.number !== null)) problems.push("It has no value.");
      break;
    case "tool":
      without(mark.toolName, "It names no tool.");
      break;
    case "part":
      without(mark.component, "It names no part.");
      break;
    case "supply":
      without(mark.product, "It names no product.");
      break;
    case "caution":
      without(mark.words, "It has no words.");
      if (mark.signalWord === null) problems.push("It does not say who or what is hurt.");
      break;
    case "correction":
      without(mark.replaces, "It does not say what was wrong.");
      without(mark.words, "It does not say what is right.");
      break;
    default:
      return mark.kind satisfies never;
  }
  return problems;
}

import type { Outcome } from "./grade-answer";

/** How an answer's outcome stands on the result page. */
export const OUTCOME_WORDS: Readonly<Record<Outcome, string>> = {
  right: "Right",
  "right-other-unit": "Right, in another unit",
  "within-tolerance": "Right, within tolerance",
  "wrong-unit": "Right number, wrong unit",
  superseded: "A value that is replaced",
  "other-fastener": "The value of another part",
  "missing-angle": "The angle is missing",
  other: "Not right",
  "no-unit": "No unit",
  unreadable: "Not readable",
};

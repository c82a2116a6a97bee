import { holdsFigure, type Mark } from "./mark";

/**
 * How a learner sees a mark (trade-practice of the shop):
 * - "checked": figure in full, checked by a second person.
 * - "self-checked": figure in full, a one-person shop's own check, printed as such.
 * - "unchecked": words first, figure no larger than body text, hatched plate.
 * - "withheld": a safety-critical value before its check: no figure leaves the server.
 * - "in-doubt": stopped by an instructor; plate struck, search and quiz leave it out.
 * - "pencilled": never for learners.
 * - "plain": kinds without a figure (part, supply, caution, correction).
 */
export type Showing =
  "checked" | "self-checked" | "unchecked" | "withheld" | "in-doubt" | "pencilled" | "plain";

/** An open "This looks wrong" on a mark. `stops` is true when an instructor or owner raised it. */
export type OpenDoubt = Readonly<{
  doubtId: string;
  markId: string;
  stops: boolean;
  by: string;
  reason: string;
  at: number;
}>;

export function showingOf(mark: Mark, doubts: readonly OpenDoubt[] = []): Showing {
  if (mark.state === "pencilled") return "pencilled";
  if (doubts.some((doubt) => doubt.markId === mark.id && doubt.stops)) return "in-doubt";
  if (!holdsFigure(mark.kind)) return "plain";
  if (mark.state === "checked" && mark.check?.outcome === "confirmed")
    return mark.check.ownWork ? "self-checked" : "checked";
  // A tool size rests on fitting the hex, not on a document: it is safety-critical only where a person says so.
  return mark.safetyCritical ? "withheld" : "unchecked";
}

/** A figure may be relied on: search answers first with it and the quiz asks it. */
export function mayAnswer(showing: Showing): boolean {
  return (
    showing === "checked" || showing === "self-checked" || showing === "unchecked" || showing === "plain"
  );
}

/** The mark as it may leave the server for a learner: a withheld or doubted value goes without its figures and the words that say them. */
export function forLearner(mark: Mark, showing: Showing): Mark {
  if (showing !== "withheld" && showing !== "in-doubt") return mark;
  return { ...mark, values: [], said: "", sequence: "", note: "" };
}

import type { Step } from "~/lessons/steps";
import { stepAt } from "~/lessons/steps";
import { arrived } from "./arriving-plate";
import type { TimedMark } from "./mark-lane";
import { usePlayer } from "./player-context";

/** The index of the step that plays, -1 while nothing was asked to play. */
export function useCurrentStep(steps: readonly Step[], startMs: number): number {
  return usePlayer((state) => (state.phase === "idle" && startMs === 0 ? -1 : stepAt(steps, state.momentMs)));
}

/** The id of the mark whose moment it is, "" for none. */
export function useCurrentMark(marks: readonly TimedMark[]): string {
  return usePlayer((state) =>
    state.phase === "ready" ? (marks[arrived(marks, state.momentMs)]?.mark.mark.id ?? "") : "",
  );
}

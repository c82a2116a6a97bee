/** How far a lesson is, for the list. "changed" means that the draft differs from the newest revision. */
export type BenchState = Readonly<{ published: number | null; changed: boolean; withdrawn: boolean }>;

/** The state of a lesson in words. */
export function stateWords(state: BenchState): string {
  if (state.published === null) return "Draft, never published";
  if (state.withdrawn) return `Withdrawn; was revision ${state.published}`;
  return state.changed ? `Draft differs from revision ${state.published}` : `Revision ${state.published}`;
}

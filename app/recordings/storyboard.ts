/** A storyboard is one picture of tiles, 10 in a row, each 160 × 90, at equal distances over the recording. */
export const STORYBOARD = { columns: 10, most: 60, width: 160, height: 90 } as const;

/** How many tiles a recording has and how far apart they are, in ms: one every 5 seconds, at most 60. */
export function storyboardPlan(durationMs: number): { count: number; everyMs: number } {
  const count = Math.max(1, Math.min(STORYBOARD.most, Math.ceil(durationMs / 5000)));
  return { count, everyMs: durationMs / count };
}

/**
 * Tools that stand in on a hex of the other system, one way only: the larger tool on the smaller hex.
 * Source: nominal sizes from 1 in = 25.4 mm; "Width across flats" (Wikipedia) names 19 mm and 3/4 in, 8 mm and 5/16 in
 * as interchangeable for most purposes; ASME B18.2.2 wrench openings (engineersedge.com, table 15788) give 3/4 in
 * 0.755–0.763 in, a clearance of 0.177–0.380 mm on a full-size 19 mm hex. That a gap of at most 0.07 mm counts as
 * standing in is our own choice, not a published rule; 27 mm on 1-1/16 in follows from it.
 * 4 mm and 5/32 in are left out: those are mostly hex keys, where the direction is the other way round.
 */
export const STAND_INS = [
  { tool: "3/4 in", toolMm: 19.05, hex: "19 mm", hexMm: 19 },
  { tool: "8 mm", toolMm: 8, hex: "5/16 in", hexMm: 7.9375 },
  { tool: "27 mm", toolMm: 27, hex: "1-1/16 in", hexMm: 26.9875 },
] as const;

/** A tool that stands in for the right one. */
export type StandIn = (typeof STAND_INS)[number];

/** Sizes closer than this are the same size: half of the last place that sizes are marked to. */
export const SAME_SIZE_MM = 0.005;

const same = (a: number, b: number): boolean => Math.abs(a - b) <= SAME_SIZE_MM + 1e-9;

/** The stand-in for a hex, both given across flats in mm; null when the tool is not one, or only the other way. */
export function standIn(toolMm: number, hexMm: number): StandIn | null {
  return STAND_INS.find((row) => same(row.toolMm, toolMm) && same(row.hexMm, hexMm)) ?? null;
}

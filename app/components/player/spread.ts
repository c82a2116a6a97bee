/**
 * Places of marks along a lane, 0 to 1, moved apart so that no two are nearer than `gap` and all stay on the lane.
 * Order is kept. When they do not fit, they are spaced evenly.
 */
export function spread(places: readonly number[], gap: number): number[] {
  const count = places.length;
  if (count === 0) return [];
  if (gap * (count - 1) >= 1) return places.map((_, index) => (count === 1 ? 0.5 : index / (count - 1)));
  const order = places.map((place, index) => ({ place: Math.min(1, Math.max(0, place)), index }));
  order.sort((a, b) => a.place - b.place || a.index - b.index);
  for (let n = 1; n < count; n++) {
    const before = order[n - 1] as { place: number };
    const here = order[n] as { place: number };
    here.place = Math.max(here.place, before.place + gap);
  }
  const last = order[count - 1] as { place: number };
  last.place = Math.min(last.place, 1);
  for (let n = count - 2; n >= 0; n--) {
    const after = order[n + 1] as { place: number };
    const here = order[n] as { place: number };
    here.place = Math.min(here.place, after.place - gap);
  }
  const result = Array.from({ length: count }, () => 0);
  for (const { place, index } of order) result[index] = place;
  return result;
}

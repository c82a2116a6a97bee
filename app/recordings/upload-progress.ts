import { partsOf } from "./limits";

type Plan = Readonly<{ sizeBytes: number; partBytes: number }>;

/** The parts that are still to be sent, in order. `done`: numbers of parts that storage has. */
export function missingParts({ sizeBytes, partBytes }: Plan, done: ReadonlySet<number>) {
  return partsOf(sizeBytes, partBytes).filter(({ n }) => !done.has(n));
}

/** Bytes that are sent: whole parts, and what has left of those on their way. */
export function sentBytes(
  { sizeBytes, partBytes }: Plan,
  done: ReadonlySet<number>,
  moving: Iterable<number>,
): number {
  let sent = 0;
  for (const { n, from, to } of partsOf(sizeBytes, partBytes)) if (done.has(n)) sent += to - from;
  for (const bytes of moving) sent += bytes;
  return Math.min(sent, sizeBytes);
}

/** So many bytes were sent at a moment in ms. */
export type Moment = Readonly<{ at: number; bytes: number }>;

const LOOK_BACK_MS = 10_000;

/** The moments of the last ten seconds and this one. */
export function withMoment(moments: readonly Moment[], now: Moment): Moment[] {
  return [...moments.filter(({ at }) => now.at - at < LOOK_BACK_MS), now];
}

/** Seconds until everything is sent at the speed of these moments; null while nobody knows. */
export function secondsLeft(moments: readonly Moment[], sizeBytes: number): number | null {
  const [first, last] = [moments[0], moments.at(-1)];
  if (!first || !last || last.at - first.at < 1000 || last.bytes <= first.bytes) return null;
  const speed = (last.bytes - first.bytes) / (last.at - first.at);
  return Math.ceil((sizeBytes - last.bytes) / speed / 1000);
}

/** How long to wait before the next try, in ms: half a second, then twice as long each time, fifteen seconds at most. */
export function retryAfterMs(tries: number): number {
  return Math.min(15_000, 500 * 2 ** Math.min(tries, 10));
}

/** How many peaks a recording has, however long it is. */
export const PEAK_COUNT = 1800;

/**
 * The loudest sample of each of 1,800 equal stretches as a byte, 0 (silence) to 255 (full scale), base64.
 * `samples`: mono, signed 16 bit.
 */
export function soundPeaks(samples: Int16Array): string {
  const peaks = new Uint8Array(PEAK_COUNT);
  for (let n = 0; n < PEAK_COUNT; n += 1) {
    const from = Math.floor((n * samples.length) / PEAK_COUNT);
    const to = Math.floor(((n + 1) * samples.length) / PEAK_COUNT);
    let loudest = 0;
    for (let at = from; at < to; at += 1) loudest = Math.max(loudest, Math.abs(samples[at] ?? 0));
    peaks[n] = Math.min(255, Math.round((loudest / 32768) * 255));
  }
  return btoa(String.fromCharCode(...peaks));
}

/** The peaks of a stored text, 0 to 255; empty when it is none. */
export function readPeaks(text: string | null): number[] {
  if (!text) return [];
  return Array.from(atob(text), (letter) => letter.charCodeAt(0));
}

/** How many peaks a recording has, however long it is. */
export const PEAK_COUNT = 1800;

const asByte = (loudest: number) => Math.min(255, Math.round((loudest / 32768) * 255));
const asText = (peaks: Uint8Array) => btoa(String.fromCharCode(...peaks));

/** The loudest of each of 1,800 equal stretches of a list. */
function spread(levels: ArrayLike<number>): Uint8Array {
  const peaks = new Uint8Array(PEAK_COUNT);
  for (let n = 0; n < PEAK_COUNT; n += 1) {
    const from = Math.floor((n * levels.length) / PEAK_COUNT);
    // A list shorter than the peaks stands for several of them.
    const to = Math.min(
      levels.length,
      Math.max(from + 1, Math.floor(((n + 1) * levels.length) / PEAK_COUNT)),
    );
    let loudest = 0;
    for (let at = from; at < to; at += 1) loudest = Math.max(loudest, Math.abs(levels[at] ?? 0));
    peaks[n] = asByte(loudest);
  }
  return peaks;
}

/**
 * The loudest sample of each of 1,800 equal stretches as a byte, 0 (silence) to 255 (full scale), base64.
 * `samples`: mono, signed 16 bit.
 */
export function soundPeaks(samples: Int16Array): string {
  return asText(spread(samples));
}

/** The same for sound that comes sample by sample and is too long to be kept: only the loudest of each 10 ms is. */
export class PeakCollector {
  readonly #stretch: number;
  #levels: number[] = [];
  #count = 0;
  #loudest = 0;

  /** `rate`: samples a second. */
  constructor(rate: number) {
    this.#stretch = Math.max(1, Math.round(rate / 100));
  }

  /** One more sample, signed 16 bit. */
  add(sample: number): void {
    this.#loudest = Math.max(this.#loudest, Math.abs(sample));
    this.#count += 1;
    if (this.#count % this.#stretch !== 0) return;
    this.#levels.push(this.#loudest);
    this.#loudest = 0;
  }

  /** The peaks of everything so far, as `soundPeaks` writes them. */
  peaks(): string {
    const rest = this.#count % this.#stretch === 0 ? [] : [this.#loudest];
    return asText(spread([...this.#levels, ...rest]));
  }
}

/** The peaks of a stored text, 0 to 255; empty when it is none. */
export function readPeaks(text: string | null): number[] {
  if (!text) return [];
  return Array.from(atob(text), (letter) => letter.charCodeAt(0));
}

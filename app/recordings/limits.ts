/** What may be uploaded. */
export const MOST_BYTES = 8 * 1024 ** 3;
export const LONGEST_MS = 4 * 3_600_000;

/** Parts go to storage three at a time; storage takes at most 10,000 parts of one object. */
export const PART_BYTES = 16 * 1024 ** 2;
const MOST_PARTS = 10_000;

/** The size of a part for a file: 16 MiB, more only where that would make too many. */
export function partBytesOf(sizeBytes: number): number {
  return Math.max(PART_BYTES, Math.ceil(sizeBytes / MOST_PARTS));
}

/** The parts of a file, numbered from 1; the last one may be shorter. */
export function partsOf(sizeBytes: number, partBytes: number): { n: number; from: number; to: number }[] {
  const count = Math.max(1, Math.ceil(sizeBytes / partBytes));
  return Array.from({ length: count }, (_, at) => ({
    n: at + 1,
    from: at * partBytes,
    to: Math.min(sizeBytes, (at + 1) * partBytes),
  }));
}

/** "1.4 GB", "60 MB", "12 kB": as file managers print it, in powers of ten. */
export function sizeWords(bytes: number): string {
  if (bytes >= 1e9) return `${(bytes / 1e9).toFixed(1)} GB`;
  if (bytes >= 1e6) return `${Math.round(bytes / 1e6)} MB`;
  return bytes >= 1e3 ? `${Math.round(bytes / 1e3)} kB` : `${bytes} bytes`;
}

/** What is wrong with a file before a byte of it is sent; null when nothing is. */
export function fileProblem(file: { sizeBytes: number; durationMs?: number | null }): string | null {
  if (file.sizeBytes <= 0) return "This file is empty. Copy it from the camera again.";
  if (file.sizeBytes > MOST_BYTES)
    return `This file has ${sizeWords(file.sizeBytes)}; 8 GB is the most. Export it smaller, or in two recordings.`;
  if (file.durationMs && file.durationMs > LONGEST_MS)
    return "This recording is longer than four hours. Cut it into jobs and upload them one by one.";
  return null;
}

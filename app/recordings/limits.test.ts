import { expect, test } from "vitest";
import { fileProblem, partBytesOf, partsOf, PART_BYTES, sizeWords } from "./limits";

test("parts are 16 MiB and cover the file without gap or overlap", () => {
  for (const size of [1, PART_BYTES - 1, PART_BYTES, PART_BYTES + 1, 60_000_000, 8 * 1024 ** 3]) {
    const parts = partsOf(size, partBytesOf(size));
    expect(parts[0]?.from).toBe(0);
    expect(parts.at(-1)?.to).toBe(size);
    parts.forEach((part, n) => expect(part.from).toBe(n === 0 ? 0 : parts[n - 1]?.to));
    expect(parts.length).toBeLessThanOrEqual(10_000);
  }
  expect(partBytesOf(60_000_000)).toBe(16 * 1024 * 1024);
});

test("a file that cannot be taken is told why", () => {
  expect(fileProblem({ sizeBytes: 0 })).toContain("empty");
  expect(fileProblem({ sizeBytes: 9e9 })).toContain("8 GB is the most");
  expect(fileProblem({ sizeBytes: 1000, durationMs: 5 * 3_600_000 })).toContain("four hours");
  expect(fileProblem({ sizeBytes: 1000, durationMs: null })).toBeNull();
});

test("sizes read as a person says them", () => {
  expect(sizeWords(60_123_456)).toBe("60 MB");
  expect(sizeWords(1_440_000_000)).toBe("1.4 GB");
});

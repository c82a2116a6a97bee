// RFC 9110, section 14.1.2 (its examples are over a body of 10000 bytes) and 14.2.
import { expect, test } from "vitest";
import { readByteRange } from "./byte-range";

test.each([
  ["bytes=0-499", 0, 499],
  ["bytes=500-999", 500, 999],
  ["bytes=-500", 9500, 9999],
  ["bytes=9500-", 9500, 9999],
  ["bytes=0-0", 0, 0],
  ["bytes=-1", 9999, 9999],
  ["bytes=9999-20000", 9999, 9999],
  ["bytes=-20000", 0, 9999],
  ["bytes=0-", 0, 9999],
  ["BYTES=0-1", 0, 1],
])("%s of 10000 bytes", (header, start, end) => {
  expect(readByteRange(header, 10_000)).toEqual({ start, end });
});

test("without a header, malformed, of another unit or of several ranges: the whole body", () => {
  for (const header of [
    undefined,
    "",
    "bytes=",
    "bytes=-",
    "bytes=x-y",
    "bytes=5-2",
    "items=0-1",
    "bytes=0-1,4-5",
  ])
    expect(readByteRange(header, 10_000)).toBe("whole");
});

test("outside the body: unsatisfiable", () => {
  expect(readByteRange("bytes=10000-", 10_000)).toBe("unsatisfiable");
  expect(readByteRange("bytes=10000-10001", 10_000)).toBe("unsatisfiable");
  expect(readByteRange("bytes=-0", 10_000)).toBe("unsatisfiable");
  expect(readByteRange("bytes=0-", 0)).toBe("unsatisfiable");
  expect(readByteRange("bytes=-5", 0)).toBe("unsatisfiable");
});

import { expect, test } from "vitest";
import { checksumName, type ChecksumName, countChecksum, readChecksum } from "./checksum";
import { S3Error } from "./s3-error";

function hex(name: ChecksumName, ...pieces: Uint8Array[]): string {
  const counter = countChecksum(name);
  for (const piece of pieces) counter.update(piece);
  return counter.digest().toString("hex");
}

const DIGITS = Buffer.from("123456789");

// Check values over "123456789" as catalogues of CRC algorithms list them; crc32 and crc32c from memory, crc64nvme as
// published for S3 (CRC-64/NVME of the NVM Express NVM Command Set Specification).
test.each([
  ["crc32", "cbf43926"],
  ["crc32c", "e3069283"],
  ["crc64nvme", "ae8b14860a799888"],
] as const)("%s of the nine digits is %s, in one piece and in two", (name, value) => {
  expect(hex(name, DIGITS)).toBe(value);
  expect(hex(name, DIGITS.subarray(0, 4), DIGITS.subarray(4))).toBe(value);
});

// RFC 3720, appendix B.4; the appendix prints the bytes in the order of transmission, lowest first.
test.each([
  ["32 zeros", Buffer.alloc(32), "8a9136aa"],
  ["32 ones", Buffer.alloc(32, 0xff), "62a8ab43"],
  ["counting up", Buffer.from(Array.from({ length: 32 }, (_, n) => n)), "46dd794e"],
  ["counting down", Buffer.from(Array.from({ length: 32 }, (_, n) => 31 - n)), "113fdb5c"],
])("crc32c of %s", (_name, data, value) => {
  expect(hex("crc32c", data)).toBe(value);
});

// RFC 1321 (MD5), FIPS 180 (SHA) over "abc".
test.each([
  ["md5", "900150983cd24fb0d6963f7d28e17f72"],
  ["sha1", "a9993e364706816aba3e25717850c26c9cd0d89d"],
  ["sha256", "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"],
] as const)("%s of abc", (name, value) => {
  expect(hex(name, Buffer.from("abc"))).toBe(value);
});

test("nothing counts as zero for the checksums that start and end inverted", () => {
  expect(hex("crc32")).toBe("00000000");
  expect(hex("crc32c")).toBe("00000000");
  expect(hex("crc64nvme")).toBe("0000000000000000");
});

test("names are read in any writing, unknown ones are none", () => {
  expect(checksumName("CRC64NVME")).toBe("crc64nvme");
  expect(checksumName("x-amz-checksum-SHA256")).toBe("sha256");
  expect(checksumName("XXHASH64")).toBeNull();
});

function codeOf(...claims: [string, string][]): string {
  try {
    readChecksum(claims);
    return "accepted";
  } catch (error) {
    if (!(error instanceof S3Error)) throw error;
    return error.code;
  }
}

test("a claim is read, and one that cannot be checked is refused", () => {
  expect(
    readChecksum([
      ["host", "x"],
      ["x-amz-checksum-mode", "ENABLED"],
    ]),
  ).toBeNull();
  expect(readChecksum([["X-Amz-Checksum-CRC32", "AAAAAA=="]])).toEqual({ name: "crc32", value: "AAAAAA==" });
  expect(codeOf(["x-amz-checksum-crc32", "AAAA"])).toBe("InvalidRequest");
  expect(codeOf(["x-amz-checksum-crc32", "no base64"])).toBe("InvalidRequest");
  expect(codeOf(["x-amz-checksum-sha256", "AAAAAA=="])).toBe("InvalidRequest");
  expect(codeOf(["x-amz-checksum-crc32", "AAAAAA=="], ["x-amz-checksum-crc32c", "AAAAAA=="])).toBe(
    "InvalidRequest",
  );
  expect(codeOf(["x-amz-checksum-xxhash64", "AAAAAAAAAAA="])).toBe("NotImplemented");
});

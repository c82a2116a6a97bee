import { createHash } from "node:crypto";
import { crc32 } from "node:zlib";
import { S3Error } from "./s3-error";

/** The checksums that a client may send as `x-amz-checksum-<name>`. */
export const CHECKSUM_NAMES = ["crc32", "crc32c", "crc64nvme", "md5", "sha1", "sha256", "sha512"] as const;
export type ChecksumName = (typeof CHECKSUM_NAMES)[number];

/** A checksum as headers carry it: base64, big-endian. */
export type Checksum = Readonly<{ name: ChecksumName; value: string }>;

/** Counts a body while it streams by. */
export type Counter = { update(data: Uint8Array): void; digest(): Buffer };

// Castagnoli polynomial 0x1EDC6F41, reflected (RFC 3720, section 12.1).
const CRC32C = Uint32Array.from({ length: 256 }, (_, n) => {
  let value = n;
  for (let bit = 0; bit < 8; bit += 1) value = value & 1 ? (value >>> 1) ^ 0x82f63b78 : value >>> 1;
  return value;
});

// Polynomial 0xAD93D23594C93659, reflected (NVM Express NVM Command Set Specification), as two halves of 32 bits.
const CRC64_HIGH = new Uint32Array(256);
const CRC64_LOW = new Uint32Array(256);
for (let n = 0; n < 256; n += 1) {
  let value = BigInt(n);
  for (let bit = 0; bit < 8; bit += 1) value = value & 1n ? (value >> 1n) ^ 0x9a6c9329ac4bc9b5n : value >> 1n;
  CRC64_HIGH[n] = Number(value >> 32n);
  CRC64_LOW[n] = Number(value & 0xffffffffn);
}

function countCrc32(): Counter {
  let value = 0;
  return {
    update: (data) => (value = crc32(data, value)),
    digest: () => bytesOf(value),
  };
}

function countCrc32c(): Counter {
  let value = 0xffffffff;
  return {
    update(data) {
      for (const byte of data) value = (CRC32C[(value ^ byte) & 0xff] ?? 0) ^ (value >>> 8);
    },
    digest: () => bytesOf(~value),
  };
}

function countCrc64(): Counter {
  let [high, low] = [0xffffffff, 0xffffffff];
  return {
    update(data) {
      for (const byte of data) {
        const at = (low ^ byte) & 0xff;
        low = ((low >>> 8) | (high << 24)) ^ (CRC64_LOW[at] ?? 0);
        high = (high >>> 8) ^ (CRC64_HIGH[at] ?? 0);
      }
    },
    digest: () => Buffer.concat([bytesOf(~high), bytesOf(~low)]),
  };
}

function bytesOf(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32BE(value >>> 0);
  return bytes;
}

/** A counter for one checksum. */
export function countChecksum(name: ChecksumName): Counter {
  if (name === "crc32") return countCrc32();
  if (name === "crc32c") return countCrc32c();
  if (name === "crc64nvme") return countCrc64();
  return createHash(name);
}

/** The name behind "CRC32", "x-amz-checksum-crc32" or "crc32"; null for one that is not known. */
export function checksumName(text: string): ChecksumName | null {
  const bare = text.toLowerCase().replace("x-amz-checksum-", "");
  return CHECKSUM_NAMES.find((name) => name === bare) ?? null;
}

// They start like a checksum and are none.
const NO_CHECKSUMS = new Set(["x-amz-checksum-algorithm", "x-amz-checksum-mode", "x-amz-checksum-type"]);

/**
 * The checksum among headers, query or trailers; null when there is none. More than one, one that cannot be checked
 * and one that is no base64 of its length are refused: a claim is never passed over in silence.
 */
export function readChecksum(claims: Iterable<readonly [string, string]>): Checksum | null {
  const found = [...claims].filter(([name]) => {
    const lower = name.toLowerCase();
    return lower.startsWith("x-amz-checksum-") && !NO_CHECKSUMS.has(lower);
  });
  const [first] = found;
  if (!first) return null;
  if (found.length > 1)
    throw new S3Error(
      400,
      "InvalidRequest",
      "Expecting a single x-amz-checksum- header. Multiple checksum Types are not allowed.",
    );
  const name = checksumName(first[0]);
  if (!name) throw new S3Error(501, "NotImplemented", `${first[0].toLowerCase()} cannot be checked here.`);
  const value = first[1];
  if (Buffer.from(value, "base64").toString("base64") !== value || lengthOf(name) !== lengthIn(value))
    throw new S3Error(400, "InvalidRequest", `Value for x-amz-checksum-${name} header is invalid.`);
  return { name, value };
}

const lengthOf = (name: ChecksumName) => countChecksum(name).digest().length;
const lengthIn = (base64: string) => Buffer.from(base64, "base64").length;

import { createHash, type Hash } from "node:crypto";
import { crc32 } from "node:zlib";
import { S3Error } from "./s3-error";

// Castagnoli polynomial, reflected (RFC 3720, appendix B.4).
const CRC32C = Uint32Array.from({ length: 256 }, (_, n) => {
  let value = n;
  for (let bit = 0; bit < 8; bit += 1) value = value & 1 ? (value >>> 1) ^ 0x82f63b78 : value >>> 1;
  return value >>> 0;
});

function crc32c(data: Uint8Array, start: number): number {
  let value = ~start >>> 0;
  for (const byte of data) value = ((CRC32C[(value ^ byte) & 0xff] ?? 0) ^ (value >>> 8)) >>> 0;
  return ~value >>> 0;
}

function asBase64(value: number): string {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32BE(value >>> 0);
  return bytes.toString("base64");
}

/** What a client may claim about a body; all of them are counted while it streams by. */
export class BodyChecksums {
  #md5: Hash = createHash("md5");
  #sha1: Hash = createHash("sha1");
  #sha256: Hash = createHash("sha256");
  #crc32 = 0;
  #crc32c = 0;
  size = 0;

  update(chunk: Uint8Array): void {
    this.#md5.update(chunk);
    this.#sha1.update(chunk);
    this.#sha256.update(chunk);
    this.#crc32 = crc32(chunk, this.#crc32);
    this.#crc32c = crc32c(chunk, this.#crc32c);
    this.size += chunk.length;
  }

  /** Ends the counting. Hexadecimal for ETag and content hash, base64 for the headers. */
  finish(): Readonly<
    Record<
      | "md5Hex"
      | "sha256Hex"
      | "content-md5"
      | "x-amz-checksum-crc32"
      | "x-amz-checksum-crc32c"
      | "x-amz-checksum-sha1"
      | "x-amz-checksum-sha256",
      string
    >
  > {
    const [md5, sha1, sha256] = [this.#md5.digest(), this.#sha1.digest(), this.#sha256.digest()];
    return {
      md5Hex: md5.toString("hex"),
      sha256Hex: sha256.toString("hex"),
      "content-md5": md5.toString("base64"),
      "x-amz-checksum-crc32": asBase64(this.#crc32),
      "x-amz-checksum-crc32c": asBase64(this.#crc32c),
      "x-amz-checksum-sha1": sha1.toString("base64"),
      "x-amz-checksum-sha256": sha256.toString("base64"),
    };
  }
}

const CHECKED = [
  "content-md5",
  "x-amz-checksum-crc32",
  "x-amz-checksum-crc32c",
  "x-amz-checksum-sha1",
  "x-amz-checksum-sha256",
] as const;

/** Compares what was claimed, in headers or trailers, with what arrived. */
export function verifyChecksums(
  counted: ReturnType<BodyChecksums["finish"]>,
  claimed: Readonly<Record<string, string | string[] | undefined>>,
  payloadHash: string,
): void {
  if (/^[0-9a-f]{64}$/.test(payloadHash) && payloadHash !== counted.sha256Hex)
    throw new S3Error(400, "XAmzContentSHA256Mismatch");
  for (const name of CHECKED) {
    const claim = claimed[name];
    if (claim !== undefined && claim !== counted[name])
      throw new S3Error(400, "BadDigest", `The ${name} you specified did not match what we received.`);
  }
  if (claimed["x-amz-checksum-crc64nvme"] !== undefined)
    throw new S3Error(501, "NotImplemented", "CRC-64/NVME is not verified here, so it is not accepted.");
}

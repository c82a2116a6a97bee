import { createHash } from "node:crypto";
import { createWriteStream } from "node:fs";
import type { IncomingMessage } from "node:http";
import { Transform, Writable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { unchunk } from "./aws-chunked";
import { type Checksum, type ChecksumName, checksumName, countChecksum, readChecksum } from "./checksum";
import { S3Error } from "./s3-error";
import { readQuery, type Verified } from "./signature";

/** A body that arrived whole and matches what was claimed of it. The MD5 is in hexadecimal. */
export type Received = Readonly<{ size: number; md5: string; checksum: Checksum | null }>;

const LARGEST_BODY = 5 * 1024 ** 3;
const LARGEST_DOCUMENT = 2 * 1024 ** 2;

/** Query parameters count as claims too: a presigned link may have a checksum signed into it. */
function claimsOf(request: IncomingMessage): [string, string][] {
  const headers = Object.entries(request.headers).map(
    ([name, value]) => [name, String(value)] as [string, string],
  );
  return [...headers, ...readQuery(request.url ?? "/")];
}

function announcedTrailers(request: IncomingMessage): string[] {
  return String(request.headers["x-amz-trailer"] ?? "")
    .split(",")
    .map((name) => name.trim().toLowerCase())
    .filter((name) => name !== "");
}

/** The size that the body must have once its framing is off. */
function announcedSize(request: IncomingMessage, isStreamed: boolean): number {
  const header = request.headers[isStreamed ? "x-amz-decoded-content-length" : "content-length"];
  if (header === undefined) throw new S3Error(411, "MissingContentLength");
  const size = Number(header);
  if (!Number.isSafeInteger(size) || size < 0)
    throw new S3Error(400, "InvalidArgument", "The announced length is no number.");
  if (size > LARGEST_BODY) throw new S3Error(400, "EntityTooLarge");
  return size;
}

function announcedMd5(request: IncomingMessage): string | null {
  const header = request.headers["content-md5"];
  if (header === undefined) return null;
  const bytes = Buffer.from(String(header), "base64");
  if (bytes.length !== 16)
    throw new S3Error(400, "InvalidDigest", "The Content-MD5 you specified is not valid.");
  return bytes.toString("hex");
}

/**
 * Streams a request's body into `destination` and checks its length, content hash, MD5 and checksum (header, query or
 * trailer). A body that is cut or does not match rejects, with S3Error where the client is at fault; what the
 * destination has by then is to be thrown away.
 */
async function receive(
  request: IncomingMessage,
  verified: Verified,
  destination: Writable,
  { limit = LARGEST_BODY, hasBodyChecksum = true } = {},
): Promise<Received> {
  const isStreamed = verified.payloadHash.startsWith("STREAMING-");
  const size = announcedSize(request, isStreamed);
  if (size > limit) throw new S3Error(400, "EntityTooLarge");
  const announced = announcedTrailers(request);
  const trailing = new Map<string, string>();
  const md5Claim = announcedMd5(request);
  const before = hasBodyChecksum ? readChecksum(claimsOf(request)) : null;
  const trailingNames = announced.map(checksumName).filter((name) => name !== null);
  const counters = new Map(
    [...new Set<ChecksumName>([...(before ? [before.name] : []), ...trailingNames])].map((name) => [
      name,
      countChecksum(name),
    ]),
  );
  const md5 = createHash("md5");
  const sha256 = createHash("sha256");
  const hashed = /^[0-9a-f]{64}$/.test(verified.payloadHash);
  let arrived = 0;
  const count = new Transform({
    transform(data: Buffer, _encoding, done) {
      arrived += data.length;
      if (arrived > size) return done(new S3Error(400, "IncompleteBody"));
      md5.update(data);
      if (hashed) sha256.update(data);
      for (const counter of counters.values()) counter.update(data);
      done(null, data);
    },
  });
  // The request outlives a body that is refused, so that the refusal still reaches the client.
  const body = request.iterator({ destroyOnReturn: false });
  if (isStreamed)
    await pipeline(
      body,
      unchunk(verified, (name, value) => trailing.set(name, value)),
      count,
      destination,
    );
  else await pipeline(body, count, destination);

  if (arrived !== size) throw new S3Error(400, "IncompleteBody");
  if (hashed && sha256.digest("hex") !== verified.payloadHash)
    throw new S3Error(400, "XAmzContentSHA256Mismatch");
  const md5Hex = md5.digest("hex");
  if (md5Claim !== null && md5Claim !== md5Hex)
    throw new S3Error(400, "BadDigest", "The Content-MD5 you specified did not match what we received.");
  if (
    announced.some((name) => !trailing.has(name)) ||
    [...trailing.keys()].some((name) => !announced.includes(name))
  )
    throw new S3Error(
      400,
      "MalformedTrailerError",
      "The trailing headers are not the ones that x-amz-trailer announced.",
    );
  const checksum = readChecksum([
    ...(before ? [[`x-amz-checksum-${before.name}`, before.value] as const] : []),
    ...trailing,
  ]);
  if (checksum && counters.get(checksum.name)?.digest().toString("base64") !== checksum.value)
    throw new S3Error(
      400,
      "BadDigest",
      `The ${checksum.name.toUpperCase()} you specified did not match the calculated checksum.`,
    );
  return { size, md5: md5Hex, checksum };
}

/** Receives a body into a new file. */
export function receiveFile(request: IncomingMessage, verified: Verified, file: string): Promise<Received> {
  return receive(request, verified, createWriteStream(file, { flags: "wx" }));
}

/**
 * Receives a body as text, for the XML that some requests carry. Without `hasBodyChecksum` a checksum header is not
 * about this body.
 */
export async function receiveText(
  request: IncomingMessage,
  verified: Verified,
  { hasBodyChecksum = true } = {},
): Promise<string> {
  const chunks: Buffer[] = [];
  const memory = new Writable({
    write(data: Buffer, _encoding, done) {
      chunks.push(data);
      done();
    },
  });
  await receive(request, verified, memory, { limit: LARGEST_DOCUMENT, hasBodyChecksum });
  return Buffer.concat(chunks).toString("utf8");
}

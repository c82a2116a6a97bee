import { createHash, type Hash } from "node:crypto";
import { Transform } from "node:stream";
import { S3Error } from "./s3-error";
import type { Verified } from "./signature";

const LONGEST_LINE = 16 * 1024;

/**
 * Takes the aws-chunked framing off a body: `<hex size>[;chunk-signature=…]CRLF data CRLF … 0 CRLF trailers CRLF`.
 * Trailing headers are handed to `onTrailer` with lower-case names. In the signed forms every chunk, and the trailers,
 * must carry the signature that follows from the one before. Errors with S3Error.
 */
export function unchunk(verified: Verified, onTrailer: (name: string, value: string) => void): Transform {
  const { payloadHash, signChunk } = verified;
  const isSigned = payloadHash.startsWith("STREAMING-AWS4-HMAC-SHA256-");
  const hasTrailer = payloadHash.endsWith("-TRAILER");
  let previous = verified.signature;
  let held: Buffer = Buffer.alloc(0);
  let left = 0;
  let state: "size" | "data" | "after-data" | "trailers" = "size";
  let hash: Hash = createHash("sha256");
  let claimed = "";
  let trailers = "";
  let trailerSignature: string | null = null;

  function takeLine(): string | null {
    const at = held.indexOf("\r\n");
    if (at < 0) {
      if (held.length > LONGEST_LINE) throw new S3Error(400, "IncompleteBody");
      return null;
    }
    const line = held.subarray(0, at).toString("latin1");
    held = held.subarray(at + 2);
    return line;
  }

  function endChunk(): void {
    if (!isSigned) return;
    if (signChunk("PAYLOAD", previous, hash.digest("hex")) !== claimed)
      throw new S3Error(403, "SignatureDoesNotMatch", "The signature of a chunk is not the one of its data.");
    previous = claimed;
    hash = createHash("sha256");
  }

  function beginChunk(line: string): void {
    const found = /^([0-9a-f]{1,8})(?:;chunk-signature=([0-9a-f]{64}))?$/i.exec(line);
    if (!found) throw new S3Error(400, "IncompleteBody", "The size of a chunk cannot be read.");
    left = Number.parseInt(found[1] ?? "", 16);
    claimed = found[2] ?? "";
    if (left > 0) {
      state = "data";
      return;
    }
    endChunk();
    state = "trailers";
  }

  function takeTrailer(line: string): void {
    const colon = line.indexOf(":");
    if (line === "") return;
    if (!hasTrailer || colon < 1)
      throw new S3Error(
        400,
        "MalformedTrailerError",
        "The request contained trailing data that was not well-formed.",
      );
    const [name, value] = [line.slice(0, colon).trim().toLowerCase(), line.slice(colon + 1).trim()];
    if (name === "x-amz-trailer-signature") trailerSignature = value;
    else {
      trailers += `${name}:${value}\n`;
      onTrailer(name, value);
    }
  }

  /** Works off what is held; false when more must arrive first. */
  function step(push: (data: Buffer) => void): boolean {
    if (state === "data") {
      if (held.length === 0) return false;
      const data = held.subarray(0, left);
      held = held.subarray(data.length);
      left -= data.length;
      if (isSigned) hash.update(data);
      push(data);
      if (left === 0) state = "after-data";
      return true;
    }
    if (state === "after-data") {
      if (held.length < 2) return false;
      if (takeLine() !== "") throw new S3Error(400, "IncompleteBody", "A chunk is longer than its size.");
      endChunk();
      state = "size";
      return true;
    }
    const line = takeLine();
    if (line === null) return false;
    if (state === "size") beginChunk(line);
    else takeTrailer(line);
    return true;
  }

  return new Transform({
    transform(chunk: Buffer, _encoding, done) {
      held = held.length > 0 ? Buffer.concat([held, chunk]) : chunk;
      try {
        while (step((data) => this.push(data)));
        done();
      } catch (error) {
        done(error as Error);
      }
    },
    flush(done) {
      if (state !== "trailers" || held.length > 0) return done(new S3Error(400, "IncompleteBody"));
      if (
        isSigned &&
        hasTrailer &&
        signChunk("TRAILER", previous, createHash("sha256").update(trailers).digest("hex")) !==
          trailerSignature
      )
        return done(
          new S3Error(403, "SignatureDoesNotMatch", "The trailers are not signed with their signature."),
        );
      done();
    },
  });
}

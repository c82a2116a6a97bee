import { Transform, type TransformCallback } from "node:stream";
import { S3Error } from "./s3-error";

/**
 * Takes the aws-chunked framing off a body: `<hex size>[;signature]CRLF data CRLF … 0 CRLF trailers CRLF`.
 * Trailing headers are handed to `onTrailer`.
 */
export function unchunk(onTrailer: (name: string, value: string) => void): Transform {
  let held: Buffer = Buffer.alloc(0);
  let left = 0;
  let state: "size" | "data" | "after-data" | "trailers" = "size";
  const takeLine = (): string | null => {
    const at = held.indexOf("\r\n");
    if (at < 0) return null;
    const line = held.subarray(0, at).toString("latin1");
    held = held.subarray(at + 2);
    return line;
  };
  return new Transform({
    transform(chunk: Buffer, _encoding, done: TransformCallback) {
      held = held.length > 0 ? Buffer.concat([held, chunk]) : chunk;
      for (;;) {
        if (state === "data") {
          if (held.length === 0) break;
          const part = held.subarray(0, left);
          this.push(part);
          held = held.subarray(part.length);
          left -= part.length;
          if (left > 0) break;
          state = "after-data";
        } else if (state === "after-data") {
          if (held.length < 2) break;
          held = held.subarray(2);
          state = "size";
        } else {
          const line = takeLine();
          if (line === null) break;
          if (state === "trailers") {
            const colon = line.indexOf(":");
            if (colon > 0) onTrailer(line.slice(0, colon).trim().toLowerCase(), line.slice(colon + 1).trim());
          } else {
            left = Number.parseInt(line.split(";")[0] ?? "", 16);
            if (!Number.isFinite(left)) return done(new S3Error(400, "IncompleteBody"));
            state = left === 0 ? "trailers" : "data";
          }
        }
      }
      done();
    },
    flush(done) {
      done(state === "trailers" ? null : new S3Error(400, "IncompleteBody"));
    },
  });
}

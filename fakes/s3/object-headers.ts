import type { IncomingHttpHeaders } from "node:http";
import type { ObjectRecord } from "./object-files";
import { S3Error } from "./s3-error";

const KEPT = ["cache-control", "content-disposition", "content-language", "content-type", "expires"];

/** The headers of a write that are kept and given back with the object. */
export function keptHeaders(headers: IncomingHttpHeaders): Record<string, string> {
  const kept: Record<string, string> = { "content-type": "binary/octet-stream" };
  for (const [name, value] of Object.entries(headers))
    if (value !== undefined && (KEPT.includes(name) || name.startsWith("x-amz-meta-")))
      kept[name] = String(value);
  // "aws-chunked" is of the transfer, not of the object.
  const encoding = String(headers["content-encoding"] ?? "")
    .split(",")
    .map((one) => one.trim())
    .filter((one) => one !== "" && one !== "aws-chunked")
    .join(", ");
  if (encoding !== "") kept["content-encoding"] = encoding;
  return kept;
}

/** The headers of a reply about an object; a link may have others signed into it (`response-content-type` …). */
export function replyHeaders(
  record: ObjectRecord,
  query: ReadonlyMap<string, string>,
): Record<string, string> {
  const headers: Record<string, string> = {
    ...record.headers,
    "accept-ranges": "bytes",
    etag: record.etag,
    "last-modified": new Date(record.modified).toUTCString(),
  };
  for (const name of [...KEPT, "content-encoding"]) {
    const wanted = query.get(`response-${name}`);
    if (wanted === undefined) continue;
    if (!/^[\t\u0020-\u007e\u00a0-\u00ff]*$/.test(wanted))
      throw new S3Error(400, "InvalidArgument", "Header value cannot be represented using ISO-8859-1.");
    headers[name] = wanted;
  }
  return headers;
}

/** `x-amz-checksum-…` of an object or part, for the reply. */
export function checksumHeaders(checksum: { name: string; value: string; type?: string } | null) {
  return checksum
    ? {
        [`x-amz-checksum-${checksum.name}`]: checksum.value,
        ...(checksum.type ? { "x-amz-checksum-type": checksum.type } : {}),
      }
    : {};
}

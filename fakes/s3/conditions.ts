import type { IncomingHttpHeaders } from "node:http";
import type { Condition, ObjectRecord } from "./object-files";
import { S3Error } from "./s3-error";

/** What an entity tag condition is compared with. */
type Current = Pick<ObjectRecord, "etag" | "modified">;

const strong = (etag: string) => etag.trim().replace(/^W\//, "").replaceAll('"', "");

function names(header: string, { etag }: Current): boolean {
  return header.trim() === "*" || header.split(",").some((one) => strong(one) === strong(etag));
}

/** HTTP dates have whole seconds. */
function changedAfter(header: string, { modified }: Current): boolean {
  const date = Date.parse(header);
  return !Number.isNaN(date) && Math.floor(Date.parse(modified) / 1000) > Math.floor(date / 1000);
}

/** Whether a read goes ahead (RFC 9110, section 13.2.2); throws S3Error where it is to fail. */
export function readCondition(headers: IncomingHttpHeaders, current: Current): "send" | "not-modified" {
  const { "if-match": match, "if-none-match": noneMatch } = headers;
  const { "if-modified-since": modifiedSince, "if-unmodified-since": unmodifiedSince } = headers;
  const failed = (condition: string) =>
    new S3Error(412, "PreconditionFailed", undefined, { Condition: condition });
  if (match !== undefined) {
    if (!names(match, current)) throw failed("If-Match");
  } else if (unmodifiedSince !== undefined && changedAfter(unmodifiedSince, current))
    throw failed("If-Unmodified-Since");
  if (noneMatch !== undefined) return names(noneMatch, current) ? "not-modified" : "send";
  if (
    modifiedSince !== undefined &&
    !Number.isNaN(Date.parse(modifiedSince)) &&
    !changedAfter(modifiedSince, current)
  )
    return "not-modified";
  return "send";
}

/** Whether a range still belongs to this body; without If-Range it does. */
export function rangeHolds(header: string | string[] | undefined, current: Current): boolean {
  if (header === undefined) return true;
  const text = String(header);
  if (text.includes('"')) return text.trim() === current.etag;
  const date = Date.parse(text);
  return !Number.isNaN(date) && Math.floor(Date.parse(current.modified) / 1000) === Math.floor(date / 1000);
}

/** The condition of a write: `If-None-Match: *` for a new object only, `If-Match` for a known one only. */
export function writeCondition(headers: IncomingHttpHeaders): Condition {
  const { "if-match": match, "if-none-match": noneMatch } = headers;
  if (noneMatch !== undefined && noneMatch.trim() !== "*") throw new S3Error(501, "NotImplemented");
  return (existing) => {
    if (noneMatch !== undefined && existing)
      throw new S3Error(412, "PreconditionFailed", undefined, { Condition: "If-None-Match" });
    if (match === undefined) return;
    if (!existing) throw new S3Error(404, "NoSuchKey");
    if (!names(match, existing))
      throw new S3Error(412, "PreconditionFailed", undefined, { Condition: "If-Match" });
  };
}

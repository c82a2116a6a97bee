import { createHash, createHmac, timingSafeEqual } from "node:crypto";
import type { IncomingMessage } from "node:http";
import { S3Error } from "./s3-error";

/** What a request claims about its body: a SHA-256, "UNSIGNED-PAYLOAD" or one of the STREAMING- forms. */
export type Verified = Readonly<{ payloadHash: string }>;

const CLOCK_SKEW_MS = 15 * 60_000;
const LONGEST_EXPIRY_S = 7 * 24 * 3600;

const sha256 = (text: string) => createHash("sha256").update(text).digest("hex");
const hmac = (key: string | Buffer, text: string) => createHmac("sha256", key).update(text).digest();

/** RFC 3986, as Signature Version 4 wants it: everything but the unreserved characters is encoded. */
function encode(text: string): string {
  return encodeURIComponent(text).replace(
    /[!'()*]/g,
    (letter) => `%${letter.charCodeAt(0).toString(16).toUpperCase()}`,
  );
}

function decode(text: string): string {
  try {
    return decodeURIComponent(text.replace(/\+/g, "%20"));
  } catch {
    throw new S3Error(400, "InvalidURI");
  }
}

/** The query of a request in its order, decoded. */
export function readQuery(url: string): [string, string][] {
  const at = url.indexOf("?");
  if (at < 0 || at === url.length - 1) return [];
  return url
    .slice(at + 1)
    .split("&")
    .map((pair) => {
      const equals = pair.indexOf("=");
      return equals < 0
        ? [decode(pair), ""]
        : [decode(pair.slice(0, equals)), decode(pair.slice(equals + 1))];
    });
}

function readTime(text: string | undefined): number {
  const found = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(text ?? "");
  if (!found) throw new S3Error(403, "AccessDenied", "The request has no date.");
  const [, year, month, day, hour, minute, second] = found.map(Number);
  return Date.UTC(year ?? 0, (month ?? 1) - 1, day, hour, minute, second);
}

type Claim = {
  credential: string;
  signedHeaders: string;
  signature: string;
  date: string | undefined;
  payloadHash: string;
};

function readClaim(request: IncomingMessage, query: Map<string, string>): Claim & { expires: number | null } {
  if (query.has("X-Amz-Signature")) {
    if (query.get("X-Amz-Algorithm") !== "AWS4-HMAC-SHA256")
      throw new S3Error(400, "AuthorizationQueryParametersError");
    const expires = Number(query.get("X-Amz-Expires"));
    if (!(expires > 0 && expires <= LONGEST_EXPIRY_S))
      throw new S3Error(400, "AuthorizationQueryParametersError");
    return {
      credential: query.get("X-Amz-Credential") ?? "",
      signedHeaders: query.get("X-Amz-SignedHeaders") ?? "",
      signature: query.get("X-Amz-Signature") ?? "",
      date: query.get("X-Amz-Date"),
      payloadHash: query.get("X-Amz-Content-Sha256") ?? "UNSIGNED-PAYLOAD",
      expires,
    };
  }
  const header = request.headers.authorization;
  if (header === undefined) throw new S3Error(403, "AccessDenied");
  const found = /^AWS4-HMAC-SHA256 Credential=([^,]+), ?SignedHeaders=([^,]+), ?Signature=([0-9a-f]+)$/.exec(
    header,
  );
  if (!found) throw new S3Error(400, "AuthorizationHeaderMalformed");
  return {
    credential: found[1] ?? "",
    signedHeaders: found[2] ?? "",
    signature: found[3] ?? "",
    date: String(request.headers["x-amz-date"] ?? ""),
    payloadHash: String(request.headers["x-amz-content-sha256"] ?? ""),
    expires: null,
  };
}

/** Recomputes the signature of a request as it arrived (AWS Signature Version 4); throws S3Error when it does not fit. */
export function verifySignature(
  request: IncomingMessage,
  keys: Readonly<Record<string, string>>,
  now: number,
): Verified {
  const url = request.url ?? "/";
  const pairs = readQuery(url);
  const claim = readClaim(request, new Map(pairs));
  const [keyId = "", day = "", region = "", service = "", end = ""] = claim.credential.split("/");
  const secret = keys[keyId];
  if (secret === undefined) throw new S3Error(403, "InvalidAccessKeyId");
  if (service !== "s3" || end !== "aws4_request") throw new S3Error(403, "SignatureDoesNotMatch");
  const signedAt = readTime(claim.date);
  if (claim.expires !== null) {
    if (now > signedAt + claim.expires * 1000) throw new S3Error(403, "AccessDenied", "Request has expired");
    if (signedAt - now > CLOCK_SKEW_MS) throw new S3Error(403, "AccessDenied", "Request is not yet valid");
  } else if (Math.abs(now - signedAt) > CLOCK_SKEW_MS) throw new S3Error(403, "RequestTimeTooSkewed");

  const query = pairs
    .filter(([name]) => name !== "X-Amz-Signature")
    .map(([name, value]) => [encode(name), encode(value)] as const)
    .sort(([a, x], [b, y]) => (a < b ? -1 : a > b ? 1 : x < y ? -1 : x > y ? 1 : 0))
    .map((pair) => pair.join("="))
    .join("&");
  const names = claim.signedHeaders.split(";");
  if (!names.includes("host")) throw new S3Error(403, "SignatureDoesNotMatch", "The host must be signed.");
  const headers = names
    .map(
      (name) =>
        `${name}:${String(request.headers[name] ?? "")
          .trim()
          .replace(/ +/g, " ")}\n`,
    )
    .join("");
  const path = (url.split("?")[0] ?? "/")
    .split("/")
    .map((part) => encode(decode(part.replace(/\+/g, "%2B"))))
    .join("/");
  const canonical = [request.method, path, query, headers, claim.signedHeaders, claim.payloadHash].join("\n");
  const toSign = [
    "AWS4-HMAC-SHA256",
    claim.date,
    `${day}/${region}/${service}/${end}`,
    sha256(canonical),
  ].join("\n");
  const key = hmac(hmac(hmac(hmac(`AWS4${secret}`, day), region), service), end);
  const wanted = hmac(key, toSign);
  const given = Buffer.from(claim.signature, "hex");
  if (given.length !== wanted.length || !timingSafeEqual(given, wanted))
    throw new S3Error(403, "SignatureDoesNotMatch");
  return { payloadHash: claim.payloadHash };
}

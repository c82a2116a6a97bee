import { createHash, createHmac, timingSafeEqual } from "node:crypto";
import type { IncomingMessage } from "node:http";
import { S3Error } from "./s3-error";

/** Signs the chunks of a streamed body, each with the signature before it (`kind` "PAYLOAD" or "TRAILER"). */
export type ChunkSigner = (kind: "PAYLOAD" | "TRAILER", previous: string, hash: string) => string;

/** What a signed request claims about its body: a SHA-256, "UNSIGNED-PAYLOAD" or one of the STREAMING- forms. */
export type Verified = Readonly<{ payloadHash: string; signature: string; signChunk: ChunkSigner }>;

/** The part of a request that is signed. */
export type SignedRequest = Pick<IncomingMessage, "method" | "url" | "headers">;

const ALGORITHM = "AWS4-HMAC-SHA256";
const CLOCK_SKEW_MS = 15 * 60_000;
const LONGEST_EXPIRY_S = 7 * 24 * 3600;
const PAYLOAD_HASH =
  /^(?:[0-9a-f]{64}|UNSIGNED-PAYLOAD|STREAMING-UNSIGNED-PAYLOAD-TRAILER|STREAMING-AWS4-HMAC-SHA256-PAYLOAD(?:-TRAILER)?)$/;
const EMPTY_HASH = createHash("sha256").digest("hex");

const sha256 = (text: string) => createHash("sha256").update(text).digest("hex");
const hmac = (key: string | Buffer, text: string) => createHmac("sha256", key).update(text).digest();

/** RFC 3986, as Signature Version 4 wants it: everything but the unreserved characters is encoded. */
export function encodeUri(text: string): string {
  return encodeURIComponent(text).replace(
    /[!'()*]/g,
    (letter) => `%${letter.charCodeAt(0).toString(16).toUpperCase()}`,
  );
}

function decode(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch {
    throw new S3Error(400, "InvalidURI");
  }
}

/** The segments of a request's path, decoded; "/bucket/a/b" is ["bucket", "a", "b"]. */
export function readPath(url: string): string[] {
  return (url.split("?")[0] ?? "/").slice(1).split("/").map(decode);
}

/** The query of a request in its order, decoded. */
export function readQuery(url: string): [string, string][] {
  const at = url.indexOf("?");
  if (at < 0) return [];
  return url
    .slice(at + 1)
    .split("&")
    .filter((pair) => pair !== "")
    .map((pair) => {
      const equals = pair.indexOf("=");
      const read = (text: string) => decode(text.replace(/\+/g, "%20"));
      return equals < 0 ? [read(pair), ""] : [read(pair.slice(0, equals)), read(pair.slice(equals + 1))];
    });
}

/** "20130524T000000Z" in epoch milliseconds. */
function readTime(text: string): number {
  const found = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(text);
  if (!found)
    throw new S3Error(403, "AccessDenied", "AWS authentication requires a valid Date or x-amz-date header");
  const [year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0] = found.slice(1).map(Number);
  return Date.UTC(year, month - 1, day, hour, minute, second);
}

type Claim = {
  credential: string;
  signedHeaders: string;
  signature: string;
  date: string;
  payloadHash: string;
  /** Seconds that a link holds; null for a signature in the Authorization header. */
  expires: number | null;
};

function readLink(query: ReadonlyMap<string, string>, headers: IncomingMessage["headers"]): Claim {
  const malformed = (message: string) => new S3Error(400, "AuthorizationQueryParametersError", message);
  if (query.get("X-Amz-Algorithm") !== ALGORITHM)
    throw malformed(`X-Amz-Algorithm only supports "${ALGORITHM}"`);
  const needed = (name: string) => {
    const value = query.get(name);
    if (!value) throw malformed(`A signed link needs ${name}.`);
    return value;
  };
  const expires = Number(needed("X-Amz-Expires"));
  if (!Number.isInteger(expires) || expires < 1) throw malformed("X-Amz-Expires should be a number");
  if (expires > LONGEST_EXPIRY_S)
    throw malformed("X-Amz-Expires must be less than a week (in seconds); that is, at most 604800");
  const signedHeaders = needed("X-Amz-SignedHeaders");
  const hashHeader = headers["x-amz-content-sha256"];
  return {
    credential: needed("X-Amz-Credential"),
    signedHeaders,
    signature: needed("X-Amz-Signature"),
    date: needed("X-Amz-Date"),
    payloadHash:
      query.get("X-Amz-Content-Sha256") ??
      (typeof hashHeader === "string" && signedHeaders.split(";").includes("x-amz-content-sha256")
        ? hashHeader
        : "UNSIGNED-PAYLOAD"),
    expires,
  };
}

function readHeader(header: string, headers: IncomingMessage["headers"]): Claim {
  if (!header.startsWith(`${ALGORITHM} `))
    throw new S3Error(400, "InvalidArgument", `Only ${ALGORITHM} is understood.`);
  const found = /^Credential=([^,\s]+), *SignedHeaders=([^,\s]+), *Signature=([0-9a-f]{64})$/.exec(
    header.slice(ALGORITHM.length).trim(),
  );
  if (!found) throw new S3Error(400, "AuthorizationHeaderMalformed");
  const [, credential = "", signedHeaders = "", signature = ""] = found;
  const payloadHash = headers["x-amz-content-sha256"];
  if (typeof payloadHash !== "string")
    throw new S3Error(
      400,
      "InvalidRequest",
      "Missing required header for this request: x-amz-content-sha256",
    );
  return {
    credential,
    signedHeaders,
    signature,
    date: String(headers["x-amz-date"] ?? ""),
    payloadHash,
    expires: null,
  };
}

function readClaim(request: SignedRequest, query: ReadonlyMap<string, string>): Claim {
  const { authorization } = request.headers;
  const isLink = query.has("X-Amz-Signature") || query.has("X-Amz-Algorithm");
  if (isLink && authorization !== undefined)
    throw new S3Error(400, "InvalidArgument", "Only one auth mechanism allowed");
  if (isLink) return readLink(query, request.headers);
  if (authorization === undefined) throw new S3Error(403, "AccessDenied");
  return readHeader(authorization, request.headers);
}

/** Headers that change what a request does must be signed, or anybody who holds a link could add them. */
function refuseUnsignedHeaders(headers: IncomingMessage["headers"], signed: readonly string[]): void {
  if (!signed.includes("host")) throw new S3Error(403, "SignatureDoesNotMatch", "The host must be signed.");
  const unsigned = Object.keys(headers).filter(
    (name) => name.startsWith("x-amz-") && name !== "x-amz-content-sha256" && !signed.includes(name),
  );
  if (unsigned.length > 0)
    throw new S3Error(
      403,
      "AccessDenied",
      "There were headers present in the request which were not signed",
      {
        HeadersNotSigned: unsigned.join(", "),
      },
    );
}

/** The canonical form of a request, which is what its signature covers. */
function canonicalRequest(
  request: SignedRequest,
  pairs: readonly [string, string][],
  claim: Claim,
  signed: readonly string[],
): string {
  const query = pairs
    .filter(([name]) => name !== "X-Amz-Signature")
    .map(([name, value]) => [encodeUri(name), encodeUri(value)] as const)
    .toSorted(([a, x], [b, y]) => (a < b ? -1 : a > b ? 1 : x < y ? -1 : x > y ? 1 : 0))
    .map((pair) => pair.join("="))
    .join("&");
  const headers = signed.map((name) => {
    const value = request.headers[name] ?? "";
    return `${name}:${String(value).trim().replace(/ +/g, " ")}\n`;
  });
  const path = `/${readPath(request.url ?? "/")
    .map(encodeUri)
    .join("/")}`;
  return [request.method, path, query, headers.join(""), claim.signedHeaders, claim.payloadHash].join("\n");
}

/**
 * Recomputes the signature of a request as it arrived (AWS Signature Version 4, in the header or in a presigned link)
 * and throws S3Error when it is missing, not of this request and key, or out of its time.
 *
 * @param keys secret by access key id
 * @param now epoch milliseconds
 */
export function verifySignature(
  request: SignedRequest,
  keys: ReadonlyMap<string, string>,
  now: number,
): Verified {
  const pairs = readQuery(request.url ?? "/");
  const claim = readClaim(request, new Map(pairs));
  const parts = claim.credential.split("/");
  const [keyId = "", day = "", region = "", service = "", end = ""] = parts;
  if (
    parts.length !== 5 ||
    service !== "s3" ||
    end !== "aws4_request" ||
    region === "" ||
    day !== claim.date.slice(0, 8)
  )
    throw claim.expires === null
      ? new S3Error(400, "AuthorizationHeaderMalformed")
      : new S3Error(
          400,
          "AuthorizationQueryParametersError",
          "Error parsing the X-Amz-Credential parameter.",
        );
  const secret = keys.get(keyId);
  if (secret === undefined)
    throw new S3Error(403, "InvalidAccessKeyId", undefined, { AWSAccessKeyId: keyId });
  const signedAt = readTime(claim.date);
  if (claim.expires !== null) {
    const expiresAt = signedAt + claim.expires * 1000;
    if (now > expiresAt)
      throw new S3Error(403, "AccessDenied", "Request has expired", {
        "X-Amz-Expires": claim.expires,
        Expires: new Date(expiresAt).toISOString(),
        ServerTime: new Date(now).toISOString(),
      });
    if (signedAt - now > CLOCK_SKEW_MS) throw new S3Error(403, "AccessDenied", "Request is not yet valid");
  } else if (Math.abs(now - signedAt) > CLOCK_SKEW_MS) throw new S3Error(403, "RequestTimeTooSkewed");
  if (!PAYLOAD_HASH.test(claim.payloadHash))
    throw new S3Error(
      400,
      "InvalidArgument",
      "x-amz-content-sha256 must be UNSIGNED-PAYLOAD, a STREAMING- form or a SHA-256.",
    );

  const signed = claim.signedHeaders.split(";");
  const scope = `${day}/${region}/${service}/${end}`;
  const key = hmac(hmac(hmac(hmac(`AWS4${secret}`, day), region), service), end);
  const canonical = canonicalRequest(request, pairs, claim, signed);
  const wanted = hmac(key, [ALGORITHM, claim.date, scope, sha256(canonical)].join("\n"));
  const given = Buffer.from(claim.signature, "hex");
  if (given.length !== wanted.length || !timingSafeEqual(given, wanted))
    throw new S3Error(403, "SignatureDoesNotMatch");
  refuseUnsignedHeaders(request.headers, signed);
  return {
    payloadHash: claim.payloadHash,
    signature: claim.signature,
    signChunk: (kind, previous, hash) =>
      hmac(
        key,
        [
          `${ALGORITHM}-${kind}`,
          claim.date,
          scope,
          previous,
          ...(kind === "PAYLOAD" ? [EMPTY_HASH] : []),
          hash,
        ].join("\n"),
      ).toString("hex"),
  };
}

import type { IncomingMessage, ServerResponse } from "node:http";
import { S3Error } from "./s3-error";

// No more than a browser needs here: it uploads parts and reads objects.
const METHODS = ["GET", "HEAD", "PUT"];
const EXPOSED = [
  "ETag",
  "Content-Length",
  "Content-Range",
  "Content-Type",
  "Accept-Ranges",
  "Last-Modified",
  "x-amz-request-id",
];

/** Lets a page of one of the `origins` read the reply, refusals too; its scripts see the ETag of a part. */
export function allowOrigin(
  request: IncomingMessage,
  response: ServerResponse,
  origins: readonly string[],
): void {
  const { origin } = request.headers;
  if (origin === undefined || !(origins.includes("*") || origins.includes(origin))) return;
  const asked = request.headers["access-control-request-method"];
  const method = request.method === "OPTIONS" && asked !== undefined ? asked : (request.method ?? "");
  if (!METHODS.includes(method)) return;
  response.setHeader("access-control-allow-origin", origin);
  response.setHeader("access-control-allow-methods", METHODS.join(", "));
  response.setHeader("access-control-expose-headers", EXPOSED.join(", "));
  response.setHeader("vary", "Origin, Access-Control-Request-Headers, Access-Control-Request-Method");
}

/** Answers the question that a browser asks before it sends a request of another origin. */
export function answerPreflight(request: IncomingMessage, response: ServerResponse): void {
  const { origin, "access-control-request-method": method } = request.headers;
  if (origin === undefined || method === undefined)
    throw new S3Error(
      400,
      "BadRequest",
      `Insufficient information. ${origin === undefined ? "Origin" : "Access-Control-Request-Method"} request header needed.`,
    );
  if (!response.hasHeader("access-control-allow-origin")) throw new S3Error(403, "AccessForbidden");
  const headers = request.headers["access-control-request-headers"];
  if (headers !== undefined) response.setHeader("access-control-allow-headers", headers);
  response.setHeader("access-control-max-age", "600");
  response.writeHead(200, { "content-length": 0 }).end();
}

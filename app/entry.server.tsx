import { randomBytes } from "node:crypto";
import { PassThrough } from "node:stream";
import { createReadableStreamFromReadable } from "@react-router/node";
import { isbot } from "isbot";
import { renderToPipeableStream, type RenderToPipeableStreamOptions } from "react-dom/server";
import {
  isRouteErrorResponse,
  ServerRouter,
  type EntryContext,
  type HandleErrorFunction,
} from "react-router";
import { env } from "./env.server";

export const streamTimeout = 5_000;

function contentSecurityPolicy(nonce: string): string {
  const storage = new URL(env().S3_PUBLIC_ENDPOINT).origin;
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}'`,
    "style-src 'self'",
    // Widths of the rail and the plates' scales are style attributes.
    "style-src-attr 'unsafe-inline'",
    `img-src 'self' data: blob: ${storage}`,
    `media-src 'self' blob: ${storage}`,
    `connect-src 'self' ${storage}`,
    // The player's style sheet carries its icon font as data.
    "font-src 'self' data:",
    "object-src 'none'",
    "base-uri 'self'",
    "form-action 'self'",
    "frame-ancestors 'none'",
    "worker-src 'self' blob:",
  ].join("; ");
}

export default function handleRequest(
  request: Request,
  status: number,
  headers: Headers,
  context: EntryContext,
) {
  if (request.method === "HEAD") return new Response(null, { status, headers });
  // In development the bundler injects inline styles and scripts of its own.
  const nonce = import.meta.env.DEV ? undefined : randomBytes(16).toString("base64");
  headers.set("Content-Type", "text/html; charset=utf-8");
  if (nonce) headers.set("Content-Security-Policy", contentSecurityPolicy(nonce));
  let answerStatus = status;
  return new Promise<Response>((resolve, reject) => {
    let shellReady = false;
    const agent = request.headers.get("user-agent");
    const ready: keyof RenderToPipeableStreamOptions = agent && isbot(agent) ? "onAllReady" : "onShellReady";
    const nonceOption = nonce ? { nonce } : {};
    const { pipe, abort } = renderToPipeableStream(
      <ServerRouter context={context} url={request.url} {...nonceOption} />,
      {
        ...nonceOption,
        [ready]() {
          shellReady = true;
          const body = new PassThrough();
          resolve(new Response(createReadableStreamFromReadable(body), { headers, status: answerStatus }));
          pipe(body);
        },
        onShellError: reject,
        onError(error: unknown) {
          answerStatus = 500;
          if (shellReady) console.error(error);
        },
      },
    );
    setTimeout(abort, streamTimeout + 1000);
  });
}

/** Answered refusals and visitors who left are not faults of ours. */
export const handleError: HandleErrorFunction = (error, { request }) => {
  if (request.signal.aborted) return;
  if (isRouteErrorResponse(error) && error.status < 500) return;
  console.error(error);
};

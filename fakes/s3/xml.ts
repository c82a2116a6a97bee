import type { IncomingMessage, ServerResponse } from "node:http";
import { S3Error } from "./s3-error";

const NAMESPACE = "http://s3.amazonaws.com/doc/2006-03-01/";
const DECLARATION = '<?xml version="1.0" encoding="UTF-8"?>\n';

/** Markup, and the control characters that XML can only carry as references, written as references. */
export function escapeXml(text: string): string {
  return text.replace(/[<>&"']|\p{Cc}/gu, (letter) => `&#${letter.charCodeAt(0)};`);
}

const NAMED: Readonly<Record<string, string>> = { lt: "<", gt: ">", amp: "&", quot: '"', apos: "'" };

/** The text that stood before `escapeXml` or another writer. */
export function unescapeXml(text: string): string {
  return text.replace(
    /&(?:#x([0-9a-f]+)|#(\d+)|(\w+));/gi,
    (whole, hex?: string, decimal?: string, name?: string) => {
      const code = hex ? Number.parseInt(hex, 16) : decimal ? Number(decimal) : null;
      if (code !== null) return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
      return NAMED[name ?? ""] ?? whole;
    },
  );
}

/** `<Name>text</Name>` with the text escaped. */
export function element(name: string, text: string | number | boolean): string {
  return `<${name}>${escapeXml(String(text))}</${name}>`;
}

/** The contents of every `<name>` in a document, unread. Enough for the two flat documents that clients send. */
export function contentsOf(document: string, name: string): string[] {
  return [...document.matchAll(new RegExp(`<${name}(?:\\s[^>]*)?>([\\s\\S]*?)</${name}>`, "g"))].map(
    ([, content = ""]) => content,
  );
}

/** The text of the first `<name>`; null when there is none. */
export function textOf(document: string, name: string): string | null {
  const [content] = contentsOf(document, name);
  return content === undefined ? null : unescapeXml(content.trim());
}

/** Answers with a document; `body` is XML already. */
export function sendXml(response: ServerResponse, name: string, body: string): void {
  const document = `${DECLARATION}<${name} xmlns="${NAMESPACE}">${body}</${name}>`;
  response.writeHead(200, {
    "content-type": "application/xml",
    "content-length": Buffer.byteLength(document),
  });
  response.end(document);
}

/** Answers with a refusal. A reply to HEAD has no body. */
export function sendError(request: IncomingMessage, response: ServerResponse, error: S3Error): void {
  const details = Object.entries(error.details).map(([name, value]) => element(name, value));
  const document = `${DECLARATION}<Error>${element("Code", error.code)}${element("Message", error.message)}${details.join("")}${element("Resource", (request.url ?? "/").split("?")[0] ?? "/")}${element("RequestId", String(response.getHeader("x-amz-request-id") ?? ""))}</Error>`;
  response.writeHead(error.status, {
    "content-type": "application/xml",
    ...(request.method === "HEAD" ? {} : { "content-length": Buffer.byteLength(document) }),
  });
  response.end(request.method === "HEAD" ? undefined : document);
}

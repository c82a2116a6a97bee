import { createServer, type IncomingMessage, type Server, type ServerResponse } from "node:http";
import { inboxPage, messagePage, missingPage } from "./inbox-page";
import type { MailFiles } from "./mail-files";

const HTML = "text/html; charset=utf-8";

function send(response: ServerResponse, status: number, type: string, body: string | Buffer): void {
  response.writeHead(status, {
    "content-type": type,
    "cache-control": "no-store",
    "x-content-type-options": "nosniff",
    "referrer-policy": "no-referrer",
    // A mail is somebody else's text: nothing in it may run or load.
    "content-security-policy":
      "default-src 'none'; style-src 'unsafe-inline'; form-action 'self'; base-uri 'none'; frame-ancestors 'none'",
  });
  response.end(body);
}

function answer(mails: MailFiles, request: IncomingMessage, response: ServerResponse): void {
  const { pathname, searchParams } = new URL(request.url ?? "/", "http://inbox");
  const to = searchParams.get("to") ?? "";
  if (request.method === "POST" && pathname === "/empty") {
    mails.empty();
    return void response.writeHead(303, { location: "/" }).end();
  }
  if (request.method !== "GET" && request.method !== "HEAD")
    return send(response, 405, "text/plain; charset=utf-8", "This method is not allowed here.");
  if (pathname === "/") return send(response, 200, HTML, inboxPage(mails.list(to), to));
  if (pathname === "/messages.json")
    return send(response, 200, "application/json; charset=utf-8", JSON.stringify(mails.list(to)));
  const mail = mails.find(pathname.slice(1).replace(/\.eml$/, ""));
  if (!mail) return send(response, 404, HTML, missingPage());
  // As plain text, so that a browser shows it and does not open it with something else.
  if (pathname.endsWith(".eml")) return send(response, 200, "text/plain; charset=utf-8", mails.raw(mail));
  return send(response, 200, HTML, messagePage(mail));
}

/** The pages of an inbox: list, mail, `/messages.json?to=`, `POST /empty`. */
export function inboxServer(mails: MailFiles): Server {
  return createServer((request, response) => {
    try {
      answer(mails, request, response);
    } catch (error) {
      console.error(error);
      send(response, 500, "text/plain; charset=utf-8", "The inbox could not answer.");
    }
  });
}

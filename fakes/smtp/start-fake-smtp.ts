// A mail server that keeps what it is given, with a small inbox page: for development and tests.
import { randomUUID } from "node:crypto";
import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createServer, type ServerResponse } from "node:http";
import { join } from "node:path";
import { simpleParser } from "mailparser";
import { SMTPServer } from "smtp-server";
import { inboxPage, messagePage } from "./inbox-page";

/** One received mail. */
export type ReceivedMail = Readonly<{
  id: string;
  to: string;
  from: string;
  subject: string;
  text: string;
  html: string;
  date: string;
  messageId: string;
}>;

export type FakeSmtp = Readonly<{
  url: string;
  inboxUrl: string;
  messages: (to?: string) => ReceivedMail[];
  close: () => Promise<void>;
}>;

function send(response: ServerResponse, status: number, type: string, body: string): void {
  response
    .writeHead(status, { "content-type": `${type}; charset=utf-8`, "cache-control": "no-store" })
    .end(body);
}

/** Starts the mail server and its inbox page; port 0 takes a free one. Mails are kept as files in `directory`. */
export async function startFakeSmtp(options: {
  port: number;
  inboxPort: number;
  directory: string;
}): Promise<FakeSmtp> {
  const { directory } = options;
  mkdirSync(directory, { recursive: true });
  const kept = readdirSync(directory)
    .filter((name) => name.endsWith(".json"))
    .map((name) => JSON.parse(readFileSync(join(directory, name), "utf8")) as ReceivedMail)
    .toSorted((a, b) => (a.date < b.date ? -1 : 1));
  const messages = (to?: string) =>
    kept
      .filter((mail) => to === undefined || to === "" || mail.to.toLowerCase().includes(to.toLowerCase()))
      .toReversed();

  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS"],
    onAuth: (_auth, _session, done) => done(null, { user: "anybody" }),
    onData(stream, session, done) {
      simpleParser(stream)
        .then((mail) => {
          const received: ReceivedMail = {
            id: randomUUID(),
            to: session.envelope.rcptTo.map(({ address }) => address).join(", "),
            from: mail.from?.text ?? "",
            subject: mail.subject ?? "",
            text: mail.text ?? "",
            html: mail.html || "",
            date: new Date().toISOString(),
            messageId: mail.messageId ?? "",
          };
          writeFileSync(join(directory, `${received.id}.json`), JSON.stringify(received));
          kept.push(received);
          done();
        })
        .catch((error: unknown) => done(error instanceof Error ? error : new Error(String(error))));
    },
  });
  const smtpPort = await new Promise<number>((resolve, reject) => {
    server.once("error", reject);
    const listening = server.listen(options.port, "localhost", () => {
      const address = listening.address();
      resolve(typeof address === "object" && address ? address.port : options.port);
    });
  });

  const inbox = createServer((request, response) => {
    const url = new URL(request.url ?? "/", "http://inbox");
    const to = url.searchParams.get("to") ?? "";
    if (request.method === "POST" && url.pathname === "/empty") {
      for (const mail of kept.splice(0)) rmSync(join(directory, `${mail.id}.json`), { force: true });
      response.writeHead(303, { location: "/" }).end();
    } else if (url.pathname === "/messages.json")
      send(response, 200, "application/json", JSON.stringify(messages(to)));
    else if (url.pathname === "/") send(response, 200, "text/html", inboxPage(messages(to), to));
    else {
      const mail = kept.find(({ id }) => url.pathname === `/${id}`);
      if (mail) send(response, 200, "text/html", messagePage(mail));
      else send(response, 404, "text/plain", "There is no such mail.");
    }
  });
  const inboxPort = await new Promise<number>((resolve, reject) => {
    inbox.once("error", reject);
    inbox.listen(options.inboxPort, "localhost", () => {
      const address = inbox.address();
      resolve(typeof address === "object" && address ? address.port : options.inboxPort);
    });
  });
  return {
    url: `smtp://localhost:${smtpPort}`,
    inboxUrl: `http://localhost:${inboxPort}`,
    messages,
    close: async () => {
      await Promise.all([
        new Promise<void>((resolve) => server.close(() => resolve())),
        new Promise<void>((resolve) => {
          inbox.close(() => resolve());
          inbox.closeAllConnections();
        }),
      ]);
    },
  };
}

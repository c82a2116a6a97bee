// A mail server that keeps what it is given, with a small inbox page: for development and tests.
import type { Server } from "node:net";
import { SMTPServer } from "smtp-server";
import { inboxServer } from "./inbox-server";
import { MailFiles, type ReceivedMail } from "./mail-files";

export type { ReceivedMail } from "./mail-files";

export type FakeSmtpOptions = Readonly<{
  /** 0 takes a free one. */
  port: number;
  /** Of the inbox page; 0 takes a free one. */
  inboxPort: number;
  /** Folder that keeps the mails between starts. */
  directory: string;
}>;

export type FakeSmtp = Readonly<{
  /** "smtp://localhost:PORT". */
  url: string;
  /** "http://localhost:PORT". */
  inboxUrl: string;
  /** What arrived, newest first; `to` is part of a recipient's address. */
  messages: (to?: string) => ReceivedMail[];
  close: () => Promise<void>;
}>;

const LARGEST_MAIL = 25 * 1024 * 1024;

/** Collects a mail; rejects one that is too large with the reply code of SMTP for it. */
async function readMail(stream: NodeJS.ReadableStream & { sizeExceeded: boolean }): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of stream) if (!stream.sizeExceeded) chunks.push(Buffer.from(chunk));
  if (stream.sizeExceeded)
    throw Object.assign(new Error("The mail is larger than 25 MiB."), { responseCode: 552 });
  return Buffer.concat(chunks);
}

function listen(
  server: { once(event: "error", listener: (error: Error) => void): unknown },
  start: (ready: () => void) => Server,
  port: number,
) {
  return new Promise<number>((resolve, reject) => {
    server.once("error", reject);
    const listening = start(() => {
      const address = listening.address();
      resolve(typeof address === "object" && address ? address.port : port);
    });
  });
}

/** Starts the mail server, which takes any mail from anybody, and its inbox page. Rejects when a port is taken. */
export async function startFakeSmtp(options: FakeSmtpOptions): Promise<FakeSmtp> {
  const mails = new MailFiles(options.directory);
  const server = new SMTPServer({
    name: "localhost",
    banner: "This server keeps mail and sends none",
    size: LARGEST_MAIL,
    authOptional: true,
    disabledCommands: ["STARTTLS"],
    closeTimeout: 200,
    onAuth: ({ username = "" }, _session, done) => done(null, { user: username }),
    onData(stream, session, done) {
      readMail(stream)
        .then((raw) =>
          mails.keep(
            raw,
            session.envelope.rcptTo.map(({ address }) => address),
            Date.now(),
          ),
        )
        .then(
          ({ id }) => done(null, `Kept as ${id}`),
          (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
        );
    },
  });
  const inbox = inboxServer(mails);

  const port = await listen(server, (ready) => server.listen(options.port, "localhost", ready), options.port);
  // A sender that hangs up in the middle of a mail is no fault of the server.
  server.on("error", () => undefined);
  const closeServer = () => new Promise<void>((resolve) => server.close(() => resolve()));
  let inboxPort: number;
  try {
    inboxPort = await listen(
      inbox,
      (ready) => inbox.listen(options.inboxPort, "localhost", ready),
      options.inboxPort,
    );
  } catch (error) {
    await closeServer();
    throw error;
  }
  return {
    url: `smtp://localhost:${port}`,
    inboxUrl: `http://localhost:${inboxPort}`,
    messages: (to) => mails.list(to),
    close: async () => {
      await Promise.all([
        closeServer(),
        new Promise<void>((resolve) => {
          inbox.close(() => resolve());
          inbox.closeAllConnections();
        }),
      ]);
    },
  };
}

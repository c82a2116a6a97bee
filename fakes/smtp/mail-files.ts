import { randomBytes } from "node:crypto";
import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { simpleParser } from "mailparser";

/** One received mail. Two of the same content are two. */
export type ReceivedMail = Readonly<{
  /** Ids sort by arrival. */
  id: string;
  /** Everybody the sender named to the server, hidden recipients too: "a@x, b@x". */
  to: string;
  from: string;
  subject: string;
  /** The text part; empty when there is none. */
  text: string;
  /** The HTML part; empty when there is none. */
  html: string;
  /** ISO 8601: when it arrived. */
  date: string;
  messageId: string;
}>;

/** Mails in a folder: each as it came (`.eml`), and what the inbox shows of it (`.json`). */
export class MailFiles {
  #mails: ReceivedMail[];
  #arrived = 0;

  /** Reads what an earlier run kept. */
  constructor(private readonly directory: string) {
    mkdirSync(directory, { recursive: true });
    this.#mails = readdirSync(directory)
      .filter((name) => name.endsWith(".json"))
      .map((name) => JSON.parse(readFileSync(join(directory, name), "utf8")) as ReceivedMail)
      .toSorted((a, b) => compare(a.date, b.date) || compare(a.id, b.id));
  }

  /** Keeps a mail. The note is written last and moved whole, so a mail that the inbox knows is there. */
  async keep(raw: Buffer, recipients: readonly string[], now: number): Promise<ReceivedMail> {
    const parsed = await simpleParser(raw, { skipHtmlToText: true, skipTextToHtml: true });
    const date = new Date(now).toISOString();
    this.#arrived += 1;
    const mail: ReceivedMail = {
      id: `${date.replace(/\D/g, "")}-${String(this.#arrived).padStart(6, "0")}-${randomBytes(3).toString("hex")}`,
      to: recipients.join(", "),
      from: parsed.from?.text ?? "",
      subject: parsed.subject ?? "",
      text: parsed.text ?? "",
      html: parsed.html || "",
      date,
      messageId: parsed.messageId ?? "",
    };
    const place = join(this.directory, mail.id);
    writeFileSync(`${place}.eml`, raw);
    writeFileSync(`${place}.tmp`, JSON.stringify(mail));
    renameSync(`${place}.tmp`, `${place}.json`);
    this.#mails.push(mail);
    return mail;
  }

  /** Newest first; `to` is part of a recipient's address in any case, empty for all. */
  list(to = ""): ReceivedMail[] {
    return this.#mails.filter((mail) => mail.to.toLowerCase().includes(to.trim().toLowerCase())).toReversed();
  }

  find(id: string): ReceivedMail | null {
    return this.#mails.find((mail) => mail.id === id) ?? null;
  }

  /** The mail as it came. */
  raw(mail: ReceivedMail): Buffer {
    return readFileSync(join(this.directory, `${mail.id}.eml`));
  }

  empty(): void {
    for (const { id } of this.#mails.splice(0))
      for (const ending of ["json", "eml"]) rmSync(join(this.directory, `${id}.${ending}`), { force: true });
  }
}

function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

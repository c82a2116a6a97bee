import { mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createTransport } from "nodemailer";
import { afterAll, beforeAll, expect, test } from "vitest";
import { startFakeSmtp, type FakeSmtp, type ReceivedMail } from "./start-fake-smtp";

const directory = mkdtempSync(join(tmpdir(), "fake-smtp-"));
let fake: FakeSmtp;

beforeAll(async () => {
  fake = await startFakeSmtp({ port: 0, inboxPort: 0, directory });
});

afterAll(async () => {
  await fake.close();
  rmSync(directory, { recursive: true, force: true });
});

const send = (to: string, subject: string, text: string) =>
  createTransport(fake.url).sendMail({
    from: "Castlenut <training@shop.example>",
    to,
    subject,
    text,
    messageId: "<1@shop>",
  });
const json = async (query = "") =>
  (await (await fetch(`${fake.inboxUrl}/messages.json${query}`)).json()) as ReceivedMail[];

test("a mail arrives with every letter of it, newest first, found by its recipient", async () => {
  await send("tom@shop.example", "Fällig: ½ Tag", "Open http://localhost/lessons/1 today");
  await send("ines@shop.example", "Second", "Hello");
  expect((await json())[0]?.subject).toBe("Second");
  const [mail] = await json("?to=TOM@shop");
  expect(mail).toMatchObject({ subject: "Fällig: ½ Tag", to: "tom@shop.example", messageId: "<1@shop>" });
  expect(mail?.text).toContain("http://localhost/lessons/1");
});

test("the page shows a mail as text with its link, and nothing in it is markup", async () => {
  await send("kofi@shop.example", "<script>alert(1)</script>", "<b>see</b> http://localhost/x");
  const [mail] = await json("?to=kofi");
  const page = await (await fetch(`${fake.inboxUrl}/${mail?.id}`)).text();
  expect(page).toContain('<a href="http://localhost/x">');
  expect(page).not.toContain("<script>");
  expect(page).not.toContain("<b>see");
  expect((await fetch(`${fake.inboxUrl}/unknown`)).status).toBe(404);
});

test("the same mail twice is two mails, also after a restart; deleting empties it", async () => {
  await send("twice@shop.example", "Twice", "1");
  await send("twice@shop.example", "Twice", "1");
  const again = await startFakeSmtp({ port: 0, inboxPort: 0, directory });
  expect(again.messages("twice")).toHaveLength(2);
  await again.close();
  await fetch(`${fake.inboxUrl}/empty`, { method: "POST" });
  expect(fake.messages()).toEqual([]);
});

const get = async (path: string) => {
  const reply = await fetch(fake.inboxUrl + path);
  return { status: reply.status, headers: reply.headers, text: await reply.text() };
};

test("a mail with text, HTML and hidden recipients is kept with all of it, and as it came", async () => {
  const sent = await createTransport(fake.url).sendMail({
    from: "Castlenut <training@shop.example>",
    to: ["Ada <ada@shop.example>", "bo@shop.example"],
    bcc: "hidden@shop.example",
    subject: "Both parts",
    text: "Plain part",
    html: "<p>HTML <b>part</b></p>",
  });
  const [mail] = fake.messages("hidden@");
  expect(mail).toEqual({
    id: expect.stringMatching(/^[0-9a-f-]+$/),
    to: "ada@shop.example, bo@shop.example, hidden@shop.example",
    from: '"Castlenut" <training@shop.example>',
    subject: "Both parts",
    text: "Plain part",
    html: "<p>HTML <b>part</b></p>",
    date: expect.stringMatching(/^\d{4}-\d\d-\d\dT.*Z$/),
    messageId: sent.messageId,
  });
  const raw = readFileSync(join(directory, `${mail?.id}.eml`), "utf8");
  expect(raw).toContain("Subject: Both parts\r\n");
  expect(raw).toContain("Content-Type: multipart/alternative");
  expect(await get(`/${mail?.id}.eml`)).toMatchObject({ status: 200, text: raw });
  expect((await get("/messages.json?to=HIDDEN")).text).toBe(JSON.stringify([mail]));
  expect((await get(`/${mail?.id}`)).text).toContain("&#60;p&#62;HTML &#60;b&#62;part");
});

test("links of the text keep their whole address and leave the sentence its full stop", async () => {
  await send(
    "link@shop.example",
    "Link",
    "Go (http://localhost/a?b=1&c=2). Then https://x.example/y, and 2 < 3.",
  );
  const { text } = await get(`/${fake.messages("link@")[0]?.id}`);
  expect(text).toContain(
    '(<a href="http://localhost/a?b=1&#38;c=2">http://localhost/a?b=1&#38;c=2</a>). Then <a href="https://x.example/y">https://x.example/y</a>, and 2 &#60; 3.',
  );
});

test("the list is filtered by recipient, newest first, and keeps what was typed", async () => {
  await send("list@shop.example", "Older", "1");
  await send("list@shop.example", "Newer", "2");
  const { text, headers } = await get("/?to=list%40shop");
  expect([...text.matchAll(/>(Older|Newer)</g)].map(([, subject]) => subject)).toEqual(["Newer", "Older"]);
  expect(text).toContain('value="list@shop"');
  expect(headers.get("content-security-policy")).toContain("default-src 'none'");
  expect((await get('/?to="><script>')).text).toContain("No mail to “&#34;&#62;&#60;script&#62;”.");
});

test("unknown mails, paths out of the folder and other methods are refused", async () => {
  for (const path of ["/unknown", "/unknown.eml", "/%2e%2e%2fpackage.json", "/..%2fpackage.json.eml"])
    expect((await get(path)).status).toBe(404);
  expect((await fetch(fake.inboxUrl, { method: "DELETE" })).status).toBe(405);
});

test("any name and password is taken; none is needed", async () => {
  const log: unknown[] = [];
  const note = (_entry: unknown, line: unknown) => void log.push(line);
  const logger = {
    level: () => undefined,
    trace: note,
    debug: note,
    info: note,
    warn: note,
    error: note,
    fatal: note,
  };
  const transport = createTransport({
    host: "localhost",
    port: Number(new URL(fake.url).port),
    auth: { user: "shop", pass: "any" },
    logger,
    debug: true,
  });
  await transport.sendMail({ from: "a@x.example", to: "auth@shop.example", subject: "Signed in", text: "x" });
  expect(log.join("\n")).toMatch(/AUTH PLAIN[\s\S]*235 /);
  expect(fake.messages("auth@")).toHaveLength(1);
});

test("a mail that is too large is refused by the code of SMTP and not kept", async () => {
  const sending = createTransport(fake.url).sendMail({
    from: "a@x.example",
    to: "large@shop.example",
    subject: "Large",
    text: "x",
    attachments: [{ filename: "film.mp4", content: Buffer.alloc(20 * 1024 * 1024) }],
  });
  await expect(sending).rejects.toMatchObject({ responseCode: 552 });
  expect(fake.messages("large@")).toEqual([]);
});

test("deleting removes the files; closing does not wait for senders that stay connected", async () => {
  const folder = mkdtempSync(join(tmpdir(), "fake-smtp-"));
  const other = await startFakeSmtp({ port: 0, inboxPort: 0, directory: folder });
  const transport = createTransport(`${other.url}?pool=true`);
  await transport.sendMail({ from: "a@x.example", to: "b@x.example", subject: "1", text: "1" });
  expect(readdirSync(folder)).toHaveLength(2);
  const emptied = await fetch(`${other.inboxUrl}/empty`, { method: "POST", redirect: "manual" });
  expect([emptied.status, emptied.headers.get("location")]).toEqual([303, "/"]);
  expect(readdirSync(folder)).toEqual([]);
  const start = Date.now();
  await other.close();
  expect(Date.now() - start).toBeLessThan(5000);
  transport.close();
  rmSync(folder, { recursive: true, force: true });
});

test("a taken port is an error", async () => {
  const taken = (url: string) => Number(new URL(url).port);
  await expect(startFakeSmtp({ port: taken(fake.url), inboxPort: 0, directory })).rejects.toThrow(
    "EADDRINUSE",
  );
  await expect(startFakeSmtp({ port: 0, inboxPort: taken(fake.inboxUrl), directory })).rejects.toThrow(
    "EADDRINUSE",
  );
});

import { mkdtempSync, rmSync } from "node:fs";
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

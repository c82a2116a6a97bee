import { expect } from "@playwright/test";
import type { ReceivedMail } from "../../fakes/smtp/start-fake-smtp";
import { INBOX } from "./addresses";

async function mailsTo(address: string): Promise<ReceivedMail[]> {
  const answer = await fetch(`${INBOX}/messages.json?to=${encodeURIComponent(address)}`);
  return (await answer.json()) as ReceivedMail[];
}

/** Waits for the newest mail to an address whose subject fits. */
export async function mailTo(address: string, subject: RegExp): Promise<ReceivedMail> {
  let found: ReceivedMail | undefined;
  await expect
    .poll(
      async () => {
        found = (await mailsTo(address)).find((mail) => subject.test(mail.subject));
        return found !== undefined;
      },
      { message: `mail to ${address}: ${subject}`, timeout: 20_000 },
    )
    .toBe(true);
  return found as ReceivedMail;
}

export async function countMails(address: string, subject: RegExp): Promise<number> {
  return (await mailsTo(address)).filter((mail) => subject.test(mail.subject)).length;
}

/** The path of the first link in a mail. */
export function linkIn(mail: ReceivedMail): string {
  const link = /https?:\/\/\S+/.exec(mail.text)?.[0];
  if (!link) throw new Error(`no link in the mail "${mail.subject}"`);
  const { pathname, search } = new URL(link);
  return pathname + search;
}

import { and, eq } from "drizzle-orm";
import { createTransport, type Transporter } from "nodemailer";
import { z } from "zod";
import type { ShopScope } from "~/auth/scope.server";
import { env } from "~/env.server";
import { outbox } from "#drizzle/schema/index";

let transport: Transporter | undefined;

function mailServer(): Transporter {
  transport ??= createTransport(env().SMTP_URL);
  return transport;
}

const Payload = z.object({ mailId: z.string() });

/** Sends one mail of the outbox; already sent is done. */
export async function sendMail(scope: ShopScope, payload: unknown, now: number): Promise<void> {
  const { mailId } = Payload.parse(payload);
  const mail = scope.db
    .select()
    .from(outbox)
    .where(and(eq(outbox.shopId, scope.shopId), eq(outbox.id, mailId as typeof outbox.$inferSelect.id)))
    .get();
  if (!mail || mail.sentAt !== null) return;
  await mailServer().sendMail({
    from: env().MAIL_FROM,
    to: mail.recipient,
    subject: mail.subject,
    text: mail.text,
    messageId: mail.messageId,
  });
  scope.db.update(outbox).set({ sentAt: now }).where(eq(outbox.id, mail.id)).run();
}

import { randomUUID } from "node:crypto";
import type { Database } from "~/db.server";
import type { ShopId } from "#drizzle/schema/ids";
import { outbox } from "#drizzle/schema/index";
import { addTask } from "~/queue/add-task.server";
import type { Message } from "./message";

/** Writes a mail into the outbox in the caller's transaction; a task sends it afterwards. */
export function queueMail(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  message: Message,
  now: number,
): void {
  const mail = scope.db
    .insert(outbox)
    .values({
      shopId: scope.shopId,
      messageId: `<${randomUUID()}@castlenut>`,
      recipient: message.to,
      subject: message.subject,
      text: message.text,
      createdAt: now,
    })
    .returning({ id: outbox.id })
    .get();
  addTask(scope, { kind: "send-mail", payload: { mailId: mail.id }, dedupeKey: `send-mail:${mail.id}` }, now);
}

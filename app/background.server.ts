import type { TaskHandlers } from "~/queue/run-tasks.server";
import { sendMail } from "~/mail/send-mail.server";

/** What each kind of background task does: the one place that joins the queue with the rooms. */
export const taskHandlers: Partial<TaskHandlers> = {
  "send-mail": sendMail,
};

import { sendMail } from "~/mail/send-mail.server";
import type { TaskHandlers } from "~/queue/run-tasks.server";
import { checkRecording } from "~/recordings/check-recording.server";
import { convertRecording } from "~/recordings/convert-recording.server";
import { deleteRecordingFiles } from "~/recordings/delete-recording.server";
import { prepareRecording } from "~/recordings/prepare-recording.server";
import { abandonUpload } from "~/recordings/upload.server";

/** What each kind of background task does: the one place that joins the queue with the rooms. */
export const taskHandlers: TaskHandlers = {
  "send-mail": sendMail,
  "check-recording": checkRecording,
  "prepare-recording": prepareRecording,
  "convert-recording": convertRecording,
  "abandon-upload": abandonUpload,
  "delete-recording": deleteRecordingFiles,
};

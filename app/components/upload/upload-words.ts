import { sizeWords } from "~/recordings/limits";
import type { UploadProgress } from "./file-upload";

function leftWords(seconds: number | null): string {
  if (seconds === null) return "";
  if (seconds < 60) return `, ${seconds} s left`;
  return seconds < 3600 ? `, ${Math.ceil(seconds / 60)} min left` : `, ${(seconds / 3600).toFixed(1)} h left`;
}

/** How far an upload is, in words. */
export function uploadWords(progress: UploadProgress): string {
  const percent = progress.totalBytes > 0 ? Math.floor((progress.sentBytes / progress.totalBytes) * 100) : 0;
  switch (progress.status) {
    case "starting":
      return "Starting";
    case "sending":
      return `${percent} % of ${sizeWords(progress.totalBytes)}${leftWords(progress.secondsLeft)}`;
    case "paused":
      return `Paused at ${percent} %`;
    case "waiting":
      return `${percent} %. ${progress.sentence}`;
    case "closing":
      return "Everything is sent; closing the upload";
    case "done":
      return "Uploaded. It is being checked.";
    case "failed":
      return progress.sentence;
    case "cancelled":
      return "Cancelled";
    default:
      return progress.status satisfies never;
  }
}

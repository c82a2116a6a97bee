import { href, Link } from "react-router";
import { Button } from "~/components/ui/button";
import { sizeWords } from "~/recordings/limits";
import type { FileUpload, UploadProgress } from "./file-upload";
import type { Entry } from "./upload-queue";
import { uploadWords } from "./upload-words";

function Controls({
  name,
  upload,
  status,
}: {
  name: string;
  upload: FileUpload;
  status: UploadProgress["status"];
}) {
  if (status === "failed")
    return (
      <Button
        type="button"
        look="ghost"
        className="justify-self-start"
        onClick={() => void upload.run()}
        aria-label={`Try again ${name}`}
      >
        Try again
      </Button>
    );
  if (!["starting", "sending", "waiting", "paused"].includes(status)) return null;
  return (
    <div className="flex flex-wrap gap-3">
      {status === "paused" ? (
        <Button type="button" look="ghost" onClick={() => upload.resume()} aria-label={`Resume ${name}`}>
          Resume
        </Button>
      ) : status === "starting" ? null : (
        <Button type="button" look="ghost" onClick={() => upload.pause()} aria-label={`Pause ${name}`}>
          Pause
        </Button>
      )}
      <Button type="button" look="quiet" onClick={() => void upload.cancel()} aria-label={`Cancel ${name}`}>
        Cancel
      </Button>
    </div>
  );
}

/** One chosen file: what is wrong with it, how far it is, and what can be done about it. */
export function UploadRow({
  entry: { name, sizeBytes, refused, warning, upload, progress },
}: {
  entry: Entry;
}) {
  return (
    <li className="grid gap-2 border-b border-line px-5 py-4 last:border-b-0">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <p className="font-semibold break-all">{name}</p>
        <p className="text-sm text-ink-soft">{sizeWords(sizeBytes)}</p>
      </div>
      {refused ? (
        <p role="alert" className="font-semibold text-error">
          {refused}
        </p>
      ) : null}
      {warning ? <p className="text-sm">{warning}</p> : null}
      {!refused && !progress ? <p className="text-sm text-ink-soft">Looking into the file</p> : null}
      {progress ? (
        <>
          <progress
            max={progress.totalBytes}
            value={progress.sentBytes}
            aria-label={`Upload of ${name}`}
            className="h-3 w-full accent-enamel"
          />
          {/* Percentages are read when asked for; only what changes otherwise is announced. */}
          <p
            role="status"
            aria-live={progress.status === "sending" ? "off" : "polite"}
            className={progress.status === "failed" ? "text-sm font-semibold text-error" : "text-sm"}
          >
            {uploadWords(progress)}
          </p>
        </>
      ) : null}
      {upload && progress ? <Controls name={name} upload={upload} status={progress.status} /> : null}
      {progress?.status === "done" ? (
        <Link
          to={href("/bench/recordings")}
          className="inline-flex min-h-11 items-center justify-self-start font-semibold"
        >
          Go to the recordings
        </Link>
      ) : null}
    </li>
  );
}

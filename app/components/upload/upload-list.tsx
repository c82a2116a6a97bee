import { useRef, useState } from "react";
import { Link } from "react-router";
import { Button } from "~/components/ui/button";
import { judgeVideo } from "~/recordings/judge-video";
import { fileProblem, sizeWords } from "~/recordings/limits";
import { FileUpload, type UploadProgress } from "./file-upload";
import { PartSlots } from "./part-slots";
import { probeFile } from "./probe-file";

type Entry = {
  key: string;
  name: string;
  sizeBytes: number;
  /** Refused before a byte was sent. */
  refused: string | null;
  /** Taken, but with a word of warning. */
  warning: string | null;
  upload: FileUpload | null;
  progress: UploadProgress | null;
};

function leftWords(seconds: number | null): string {
  if (seconds === null) return "";
  if (seconds < 60) return `, ${seconds} s left`;
  return seconds < 3600 ? `, ${Math.ceil(seconds / 60)} min left` : `, ${(seconds / 3600).toFixed(1)} h left`;
}

function statusWords(progress: UploadProgress): string {
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

function UploadRow({ entry }: { entry: Entry }) {
  const { upload, progress } = entry;
  const moving = progress && ["sending", "waiting", "paused"].includes(progress.status);
  return (
    <li className="grid gap-2 border-b border-line px-5 py-4 last:border-b-0">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <p className="font-semibold break-all">{entry.name}</p>
        <p className="text-sm text-ink-soft">{sizeWords(entry.sizeBytes)}</p>
      </div>
      {entry.refused ? <p className="font-semibold text-error">{entry.refused}</p> : null}
      {entry.warning ? <p className="text-sm">{entry.warning}</p> : null}
      {progress ? (
        <>
          <progress
            max={progress.totalBytes}
            value={progress.sentBytes}
            aria-label={`Upload of ${entry.name}`}
            className="h-3 w-full accent-enamel"
          />
          <p className="text-sm" role="status">
            {statusWords(progress)}
          </p>
        </>
      ) : null}
      {upload && moving ? (
        <div className="flex gap-3">
          {progress.status === "paused" ? (
            <Button
              type="button"
              look="ghost"
              onClick={() => upload.resume()}
              aria-label={`Resume ${entry.name}`}
            >
              Resume
            </Button>
          ) : (
            <Button
              type="button"
              look="ghost"
              onClick={() => upload.pause()}
              aria-label={`Pause ${entry.name}`}
            >
              Pause
            </Button>
          )}
          <Button
            type="button"
            look="quiet"
            onClick={() => void upload.cancel()}
            aria-label={`Cancel ${entry.name}`}
          >
            Cancel
          </Button>
        </div>
      ) : null}
      {progress?.status === "done" && progress.recordingId ? (
        <Link
          to="/bench/recordings"
          className="inline-flex min-h-11 items-center justify-self-start font-semibold"
        >
          Go to the recordings
        </Link>
      ) : null}
    </li>
  );
}

/** Chooses or drops recordings and sends them, three parts at a time over all of them. */
export function UploadList() {
  const [entries, setEntries] = useState<readonly Entry[]>([]);
  const [over, setOver] = useState(false);
  const slots = useRef<PartSlots>(undefined);

  const change = (key: string, part: Partial<Entry>) =>
    setEntries((all) => all.map((entry) => (entry.key === key ? { ...entry, ...part } : entry)));

  const add = async (file: File) => {
    const key = `${file.name}-${file.size}-${file.lastModified}-${Math.random()}`;
    const problem = fileProblem({ sizeBytes: file.size });
    setEntries((all) => [
      ...all,
      {
        key,
        name: file.name,
        sizeBytes: file.size,
        refused: problem,
        warning: null,
        upload: null,
        progress: null,
      },
    ]);
    if (problem) return;
    const probe = await probeFile(file);
    if (!probe)
      return change(key, {
        refused: "This is not a video file that can be read. Choose an MP4, MOV or WebM file.",
      });
    const verdict = judgeVideo(probe);
    if (!verdict.plays && !verdict.convert) return change(key, { refused: verdict.sentence });
    slots.current ??= new PartSlots(3);
    const upload = new FileUpload(file, slots.current, (progress) => change(key, { progress }));
    change(key, {
      upload,
      warning: verdict.plays ? null : `${verdict.sentence} It will be converted after the upload.`,
    });
    await upload.run();
  };

  const addAll = (files: FileList | null) => {
    for (const file of files ?? []) void add(file);
  };

  return (
    <div className="grid gap-6">
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={(event) => {
          event.preventDefault();
          setOver(false);
          addAll(event.dataTransfer.files);
        }}
        className={`grid justify-items-center gap-3 rounded-md border-2 border-dashed px-6 py-10 text-center ${over ? "border-enamel bg-enamel-tint" : "border-line-strong"}`}
      >
        <label htmlFor="recordings" className="text-lg font-semibold">
          Choose recordings
        </label>
        <input
          id="recordings"
          type="file"
          multiple
          accept="video/*,.mp4,.mov,.webm,.mkv"
          aria-describedby="recordings-hint"
          onChange={(event) => {
            addAll(event.target.files);
            event.target.value = "";
          }}
          className="min-h-11 max-w-full file:mr-3 file:min-h-11 file:rounded file:border file:border-line-strong file:bg-sheet file:px-4 file:font-semibold file:text-enamel-text"
        />
        <p id="recordings-hint" className="max-w-md text-sm text-ink-soft">
          Or drop them here. Up to 8 GB and four hours each. A lost network or a closed tab loses nothing:
          choose the same file again and it goes on.
        </p>
      </div>
      {entries.length > 0 ? (
        <ul className="rounded-md border border-line bg-sheet" aria-label="Uploads">
          {entries.map((entry) => (
            <UploadRow key={entry.key} entry={entry} />
          ))}
        </ul>
      ) : null}
    </div>
  );
}

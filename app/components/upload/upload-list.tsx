import { useEffect, useState, useSyncExternalStore } from "react";
import { uploadQueue, type Entry } from "./upload-queue";
import { UploadRow } from "./upload-row";

const NONE: readonly Entry[] = [];

/** What is chosen and sent in this tab. */
export function useUploads(): readonly Entry[] {
  return useSyncExternalStore(uploadQueue.subscribe, uploadQueue.entries, () => NONE);
}

/**
 * Chooses or drops recordings and sends them, three parts at a time over all of them. `converter`: whether this server
 * converts what browsers do not play.
 */
export function UploadList({ userId, converter }: { userId: string; converter: boolean }) {
  const entries = useUploads();
  const [over, setOver] = useState(false);
  useEffect(() => uploadQueue.ownedBy(userId), [userId]);

  const addAll = (files: FileList | null) => {
    for (const file of files ?? []) void uploadQueue.add(file, converter);
  };

  return (
    <div className="grid grid-cols-1 gap-6">
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
        className={`grid grid-cols-1 justify-items-center gap-3 rounded-md border-2 border-dashed px-4 py-10 text-center ${over ? "border-enamel bg-enamel-tint" : "border-line-strong"}`}
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
          Or drop them here. Up to 8 GB and four hours each. Other pages may be opened meanwhile; keep this
          tab open. A lost network or a closed tab loses nothing: choose the same file again and it goes on.
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

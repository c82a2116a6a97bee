import { CONVERT_STEPS, judgeVideo } from "~/recordings/judge-video";
import { fileProblem } from "~/recordings/limits";
import { FileUpload, type UploadProgress } from "./file-upload";
import { PartSlots } from "./part-slots";
import { probeFile } from "./probe-file";

/** Parts on their way at one time, over all files. */
const AT_ONE_TIME = 3;

export type Entry = Readonly<{
  key: string;
  name: string;
  sizeBytes: number;
  /** Refused before a byte was sent. */
  refused: string | null;
  /** Taken, but with a word of warning. */
  warning: string | null;
  upload: FileUpload | null;
  progress: UploadProgress | null;
}>;

/** What is chosen and sent in this tab. It lives beside the pages, so that an upload goes on while another page is open. */
class UploadQueue {
  #entries: readonly Entry[] = [];
  #listeners = new Set<() => void>();
  #slots = new PartSlots(AT_ONE_TIME);
  #owner = "";

  readonly subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  readonly entries = (): readonly Entry[] => this.#entries;

  #set(entries: readonly Entry[]): void {
    this.#entries = entries;
    for (const listener of this.#listeners) listener();
  }

  #change(key: string, part: Partial<Entry>): void {
    this.#set(this.#entries.map((entry) => (entry.key === key ? { ...entry, ...part } : entry)));
  }

  /** Whose uploads these are. When somebody else has signed in, those of the one before stop and are forgotten here. */
  ownedBy(userId: string): void {
    if (this.#owner === userId) return;
    this.#owner = userId;
    const before = this.#entries;
    if (before.length === 0) return;
    this.#set([]);
    for (const { upload } of before) upload?.leave();
  }

  /** Looks into a file and sends it. A file that is on its way already is not taken twice. */
  async add(file: File, converter: boolean): Promise<void> {
    const key = `${file.name} ${file.size} ${file.lastModified}`;
    const before = this.#entries.find((entry) => entry.key === key);
    const over = ["done", "failed", "cancelled"];
    if (before && !before.refused && !over.includes(before.progress?.status ?? "")) return;
    const refused = fileProblem({ sizeBytes: file.size });
    this.#set([
      ...this.#entries.filter((entry) => entry.key !== key),
      { key, name: file.name, sizeBytes: file.size, refused, warning: null, upload: null, progress: null },
    ]);
    if (refused) return;
    const probe = await probeFile(file);
    if (!this.#entries.some((entry) => entry.key === key)) return;
    if (!probe)
      return this.#change(key, {
        refused: "This is not a video file that can be read. Choose an MP4, MOV or WebM file.",
      });
    const verdict = judgeVideo(probe);
    if (!verdict.plays && !verdict.convert) return this.#change(key, { refused: verdict.sentence });
    const upload = new FileUpload(file, this.#slots, (progress) => this.#change(key, { progress }));
    const next = converter ? "It will be converted after the upload." : CONVERT_STEPS;
    this.#change(key, { upload, warning: verdict.plays ? null : `${verdict.sentence} ${next}` });
    await upload.run();
  }
}

export const uploadQueue = new UploadQueue();

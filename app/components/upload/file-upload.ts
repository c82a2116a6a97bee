import { partsOf } from "~/recordings/limits";
import { makePictures } from "./make-pictures";
import type { PartSlots } from "./part-slots";

export type UploadStatus =
  "starting" | "sending" | "paused" | "waiting" | "closing" | "done" | "failed" | "cancelled";

export type UploadProgress = Readonly<{
  status: UploadStatus;
  sentBytes: number;
  totalBytes: number;
  /** Seconds until it is sent at the present speed; null while nobody knows. */
  secondsLeft: number | null;
  /** Why it failed, or what it waits for. */
  sentence: string;
  recordingId: string | null;
}>;

class Refused extends Error {}

const NO_NETWORK = "No network. It goes on by itself when the network is back.";

async function ask<T>(path: string, body: unknown): Promise<T> {
  const response = await fetch(path, {
    method: "POST",
    headers: { "Content-Type": "application/json" },
    body: JSON.stringify(body),
  });
  const answer = (await response.json().catch(() => null)) as (T & { error?: string }) | null;
  // 409 and below are words for the person; anything from 500 on is tried again.
  if (response.status >= 500 || !answer) throw new Error(`${path} answered ${response.status}`);
  if (!response.ok && response.status !== 409) throw new Refused(answer.error ?? "The upload was refused.");
  return answer;
}

/** Waits, and less when the network comes back in between. */
function wait(ms: number): Promise<void> {
  return new Promise((resolve) => {
    const end = () => {
      clearTimeout(timer);
      removeEventListener("online", end);
      resolve();
    };
    const timer = setTimeout(end, ms);
    addEventListener("online", end);
  });
}

/**
 * Sends one file to storage in parts. Parts that storage has are never sent again: not after a lost network, a pause, a
 * closed tab or a restarted server.
 */
export class FileUpload {
  #status: UploadStatus = "starting";
  #sentence = "";
  #recordingId: string | null = null;
  #partBytes = 1;
  #done = new Set<number>();
  #moving = new Map<number, { request: XMLHttpRequest; sent: number }>();
  #wake: (() => void)[] = [];
  #marks: { at: number; bytes: number }[] = [];

  constructor(
    readonly file: File,
    private readonly slots: PartSlots,
    private readonly onChange: (progress: UploadProgress) => void,
  ) {}

  get #stopped(): boolean {
    return this.#status === "cancelled" || this.#status === "failed";
  }

  #sentBytes(): number {
    let sent = 0;
    for (const { n, from, to } of partsOf(this.file.size, this.#partBytes))
      if (this.#done.has(n)) sent += to - from;
    for (const { sent: bytes } of this.#moving.values()) sent += bytes;
    return Math.min(sent, this.file.size);
  }

  #tell(status = this.#status, sentence = this.#sentence): void {
    this.#status = status;
    this.#sentence = sentence;
    const [now, sentBytes] = [Date.now(), this.#sentBytes()];
    this.#marks = [...this.#marks.filter(({ at }) => now - at < 10_000), { at: now, bytes: sentBytes }];
    const first = this.#marks[0];
    const speed = first && now > first.at ? (sentBytes - first.bytes) / (now - first.at) : 0;
    this.onChange({
      status,
      sentence,
      sentBytes,
      totalBytes: this.file.size,
      secondsLeft:
        status === "sending" && speed > 0 ? Math.ceil((this.file.size - sentBytes) / speed / 1000) : null,
      recordingId: this.#recordingId,
    });
  }

  /** No new part starts; those on their way arrive, so that nothing is sent twice. */
  pause(): void {
    if (this.#status === "sending" || this.#status === "waiting") this.#tell("paused", "");
  }

  resume(): void {
    if (this.#status !== "paused") return;
    this.#marks = [];
    this.#tell("sending", "");
    for (const wake of this.#wake.splice(0)) wake();
  }

  async cancel(): Promise<void> {
    this.#tell("cancelled", "");
    for (const { request } of this.#moving.values()) request.abort();
    for (const wake of this.#wake.splice(0)) wake();
    if (this.#recordingId)
      await ask(`/api/uploads/${this.#recordingId}`, { intent: "cancel" }).catch(() => undefined);
  }

  /** Sends what is missing until all of it is there. */
  async run(): Promise<void> {
    try {
      const { name: fileName, size: sizeBytes, lastModified } = this.file;
      const plan = await this.#insist(() =>
        ask<{ recordingId: string; partBytes: number; done: number[]; picturesBy: "server" | "browser" }>(
          "/api/uploads",
          {
            fileName,
            sizeBytes,
            lastModified,
          },
        ),
      );
      if (this.#stopped || !plan) return;
      this.#recordingId = plan.recordingId;
      this.#partBytes = plan.partBytes;
      this.#done = new Set(plan.done);
      this.#tell("sending", "");
      for (;;) {
        await this.#sendMissing();
        if (this.#stopped) return;
        this.#tell("closing", "");
        const closed = await this.#insist(() =>
          ask<{ ok: boolean; missing?: number[]; error?: string }>(`/api/uploads/${plan.recordingId}`, {
            intent: "complete",
          }),
        );
        if (!closed || this.#stopped) return;
        if (closed.ok) {
          if (plan.picturesBy === "browser") await this.#sendPictures();
          return this.#tell("done", "");
        }
        if (!closed.missing) throw new Refused(closed.error ?? "The upload was refused.");
        for (const n of closed.missing) this.#done.delete(n);
        this.#tell("sending", "");
      }
    } catch (error) {
      if (this.#status !== "cancelled")
        this.#tell(
          "failed",
          error instanceof Refused
            ? error.message
            : "The upload stopped. Choose the file again: it goes on where it was.",
        );
    }
  }

  /** Without them the recording plays all the same, so a fault here is none of the upload. */
  async #sendPictures(): Promise<void> {
    try {
      const body = await makePictures(this.file);
      await fetch(`/api/uploads/${this.#recordingId}/pictures`, { method: "POST", body });
    } catch {
      // No poster, then.
    }
  }

  async #sendMissing(): Promise<void> {
    const todo = partsOf(this.file.size, this.#partBytes).filter(({ n }) => !this.#done.has(n));
    await Promise.all(
      todo.map(async (part) => {
        const giveBack = await this.slots.take();
        try {
          await this.#sendPart(part);
        } finally {
          giveBack();
        }
      }),
    );
  }

  async #sendPart({ n, from, to }: { n: number; from: number; to: number }): Promise<void> {
    await this.#insist(async () => {
      const { urls } = await ask<{ urls: Record<number, string> }>(`/api/uploads/${this.#recordingId}`, {
        intent: "sign",
        parts: [n],
      });
      const url = urls[n];
      if (!url) throw new Error("no link for the part");
      await this.#put(n, url, this.file.slice(from, to));
      this.#done.add(n);
    });
  }

  /** Tries until it works, waits while paused or without network, gives up on a refusal or when cancelled. */
  async #insist<T>(work: () => Promise<T>): Promise<T | undefined> {
    for (let tries = 0; !this.#stopped; tries += 1) {
      if (this.#status === "paused") await new Promise<void>((resolve) => this.#wake.push(resolve));
      if (this.#stopped) return undefined;
      try {
        const result = await work();
        if (this.#status === "waiting") this.#tell("sending", "");
        return result;
      } catch (error) {
        if (error instanceof Refused) throw error;
        if (this.#stopped) return undefined;
        // Also while it begins and while it is closed: whoever looks is told what it waits for.
        if (["starting", "sending", "closing"].includes(this.#status)) this.#tell("waiting", NO_NETWORK);
        await wait(Math.min(15_000, 500 * 2 ** tries));
      }
    }
    return undefined;
  }

  #put(n: number, url: string, body: Blob): Promise<void> {
    return new Promise((resolve, reject) => {
      const request = new XMLHttpRequest();
      const moving = { request, sent: 0 };
      this.#moving.set(n, moving);
      request.open("PUT", url);
      request.upload.onprogress = (event) => {
        moving.sent = event.loaded;
        this.#tell();
      };
      request.onload = () =>
        request.status === 200 ? resolve() : reject(new Error(`part ${n} answered ${request.status}`));
      request.onerror = () => reject(new Error(`part ${n}: no network`));
      request.onabort = () => reject(new Error(`part ${n} was stopped`));
      request.onloadend = () => {
        this.#moving.delete(n);
        this.#tell();
      };
      request.send(body);
    });
  }
}

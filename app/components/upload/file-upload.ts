import {
  missingParts,
  retryAfterMs,
  secondsLeft,
  sentBytes,
  withMoment,
  type Moment,
} from "~/recordings/upload-progress";
import { makePictures } from "./make-pictures";
import type { PartSlots } from "./part-slots";
import { ask, FAULT, NO_NETWORK, NotNow, putPart, Refused, type Sending } from "./upload-requests";

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

type Plan = { recordingId: string; partBytes: number; done: number[]; picturesBy: "server" | "browser" };
type Part = ReturnType<typeof missingParts>[number];

const STOPPED = "The upload stopped. Choose the file again: it goes on where it was.";
const UNREADABLE = "The file cannot be read any more: it was moved, changed or deleted. Choose it again.";

/** A file that was moved or changed after it was chosen fails like a lost network; only reading it tells them apart. */
async function canBeRead(piece: Blob): Promise<boolean> {
  try {
    await piece.slice(0, 1).arrayBuffer();
    return true;
  } catch {
    return false;
  }
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
  #moving = new Map<number, { sending: Sending; sent: number }>();
  #wake = new Set<() => void>();
  #moments: Moment[] = [];

  constructor(
    readonly file: File,
    private readonly slots: PartSlots,
    private readonly onChange: (progress: UploadProgress) => void,
  ) {}

  get #over(): boolean {
    return this.#status === "cancelled" || this.#status === "failed";
  }

  get #held(): boolean {
    return this.#over || this.#status === "paused";
  }

  get #plan() {
    return { sizeBytes: this.file.size, partBytes: this.#partBytes };
  }

  #tell(status = this.#status, sentence = this.#sentence): void {
    this.#status = status;
    this.#sentence = sentence;
    const moving = Array.from(this.#moving.values(), ({ sent }) => sent);
    const bytes = this.#recordingId === null ? 0 : sentBytes(this.#plan, this.#done, moving);
    this.#moments = withMoment(this.#moments, { at: Date.now(), bytes });
    this.onChange({
      status,
      sentence,
      sentBytes: bytes,
      totalBytes: this.file.size,
      secondsLeft: status === "sending" ? secondsLeft(this.#moments, this.file.size) : null,
      recordingId: this.#recordingId,
    });
  }

  #wakeAll(): void {
    for (const wake of this.#wake) wake();
  }

  /** Rests until it is woken, at the latest after `ms`. */
  #rest(ms: number): Promise<void> {
    return new Promise((resolve) => {
      const end = () => {
        clearTimeout(timer);
        this.#wake.delete(end);
        resolve();
      };
      const timer = Number.isFinite(ms) ? setTimeout(end, ms) : undefined;
      this.#wake.add(end);
    });
  }

  /** No new part starts; those on their way arrive, so that nothing is sent twice. */
  pause(): void {
    if (this.#status !== "sending" && this.#status !== "waiting") return;
    this.#tell("paused", "");
    this.#wakeAll();
  }

  resume(): void {
    if (this.#status !== "paused") return;
    this.#moments = [];
    this.#tell("sending", "");
    this.#wakeAll();
  }

  /** Gives the upload up: what was sent of it leaves storage. */
  async cancel(): Promise<void> {
    this.leave();
    if (this.#recordingId)
      await ask(`/api/uploads/${this.#recordingId}`, { intent: "cancel" }).catch(() => undefined);
  }

  /** Stops sending; what was sent stays in storage, as after a closed tab. */
  leave(): void {
    this.#tell("cancelled", "");
    for (const { sending } of this.#moving.values()) sending.stop();
    this.#wakeAll();
  }

  /** Sends what is missing until all of it is there. After a failure it may be called again. */
  async run(): Promise<void> {
    const offline = () => {
      if (this.#status !== "sending" && this.#status !== "waiting") return;
      this.#tell("waiting", NO_NETWORK);
      // They are dead, but a browser may need minutes to notice.
      for (const { sending } of this.#moving.values()) sending.stop();
    };
    const online = () => this.#wakeAll();
    addEventListener("offline", offline);
    addEventListener("online", online);
    try {
      this.#tell("starting", "");
      await this.#send();
    } catch (error) {
      if (!this.#over) this.#tell("failed", error instanceof Refused ? error.message : STOPPED);
      for (const { sending } of this.#moving.values()) sending.stop();
      this.#wakeAll();
    } finally {
      removeEventListener("offline", offline);
      removeEventListener("online", online);
    }
  }

  async #send(): Promise<void> {
    const { name: fileName, size: sizeBytes, lastModified } = this.file;
    const plan = await this.#insist(() => ask<Plan>("/api/uploads", { fileName, sizeBytes, lastModified }));
    if (!plan) return;
    this.#recordingId = plan.recordingId;
    this.#partBytes = plan.partBytes;
    this.#done = new Set(plan.done);
    // Cancelled while it began.
    if (this.#over) return void (await this.cancel());
    if (this.#status !== "paused") this.#tell("sending", "");
    for (;;) {
      const parts = missingParts(this.#plan, this.#done);
      await Promise.all(parts.map((part) => this.#insist(() => this.#sendPart(part), this.slots)));
      if (this.#over) return;
      if (this.#status !== "paused") this.#tell("closing", "");
      const closed = await this.#insist(() =>
        ask<{ ok: boolean; missing?: number[]; error?: string }>(`/api/uploads/${plan.recordingId}`, {
          intent: "complete",
        }),
      );
      if (!closed || this.#over) return;
      if (closed.ok) {
        if (plan.picturesBy === "browser") await this.#sendPictures();
        return this.#tell("done", "");
      }
      if (!closed.missing) throw new Refused(closed.error ?? "The upload was refused.");
      for (const n of closed.missing) this.#done.delete(n);
      this.#tell("sending", "");
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

  async #sendPart({ n, from, to }: Part): Promise<void> {
    const { urls } = await ask<{ urls: Record<number, string> }>(`/api/uploads/${this.#recordingId}`, {
      intent: "sign",
      parts: [n],
    });
    if (this.#over) return;
    const url = urls[n];
    if (!url) throw new NotNow(FAULT);
    const piece = this.file.slice(from, to);
    const moving = {
      sent: 0,
      sending: putPart(url, piece, (bytes) => {
        moving.sent = Math.min(bytes, to - from);
        this.#tell();
      }),
    };
    this.#moving.set(n, moving);
    try {
      await moving.sending.arrived;
      this.#done.add(n);
    } catch (error) {
      if (!(await canBeRead(piece))) throw new Refused(UNREADABLE);
      throw error;
    } finally {
      this.#moving.delete(n);
      this.#tell();
    }
  }

  /**
   * Tries until it works; rests while paused and between tries, gives up on a refusal or when it is over. A slot is held
   * while it works and between tries, never during a pause, which may be long and is no reason for other files to wait.
   */
  async #insist<T>(work: () => Promise<T>, slots?: PartSlots): Promise<T | undefined> {
    let tries = 0;
    while (!this.#over) {
      while (this.#status === "paused") await this.#rest(Infinity);
      const giveBack = await slots?.take();
      try {
        while (!this.#held) {
          try {
            const result = await work();
            if (this.#status === "waiting") this.#tell("sending", "");
            return result;
          } catch (error) {
            if (!(error instanceof NotNow)) throw error;
            if (this.#over) return undefined;
            if (!this.#held) this.#tell("waiting", error.message);
            tries += 1;
            if (!this.#held) await this.#rest(retryAfterMs(tries - 1));
          }
        }
      } finally {
        giveBack?.();
      }
    }
    return undefined;
  }
}

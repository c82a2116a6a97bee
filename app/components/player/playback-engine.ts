import type Player from "video.js/dist/types/player";
import { type Piece, piecesOf } from "~/lessons/lesson-time";
import type { SnapshotClip } from "~/lessons/snapshot";
import { momentParam } from "~/lessons/timecode";
import { fileMsAt, follow, lessonMsAt, pieceAt } from "./follow-pieces";
import type { Jump, PlayerStore } from "./player-store";
import { StretchRecorder } from "./stretch-recorder";

export type PlayedLesson = Readonly<{
  lessonId: string;
  revisionId: string;
  clips: readonly SnapshotClip[];
  captionTracks: readonly Readonly<{ id: string; recordingId: string; language: string; label: string }>[];
}>;

type Link = Readonly<{ recordingId: string; url: string; expiresAt: number }>;

const REPORT_EVERY_MS = 15_000;
/** A link is renewed at this part of its life; while it plays the new one waits for a pause, at the latest until the second part. */
const RENEW_AT = 0.8;
const RENEW_AT_LATEST = 0.97;
const MOST_TRIES = 3;
const WATCHED = "/api/watched";

/**
 * Plays a lesson's clips one after the other in a video.js player: fetches links, keeps them fresh, skips cuts,
 * crosses to the next recording, tells the server what was played. Lives in the browser only.
 */
export class PlaybackEngine {
  readonly #pieces: readonly Piece[];
  readonly #recorder = new StretchRecorder();
  #index = 0;
  #link: Link | null = null;
  #fresh: Link | null = null;
  #loading = 0;
  /** The player stands where it was sent; before that its time says nothing. */
  #settled = false;
  #tries = 0;
  #seam: ReturnType<typeof setTimeout> | undefined;
  #renew: ReturnType<typeof setTimeout> | undefined;
  #renewLatest: ReturnType<typeof setTimeout> | undefined;
  readonly #reporting: ReturnType<typeof setInterval>;
  readonly #onHide = () => {
    if (document.visibilityState === "hidden") this.#report(true);
  };
  readonly #onLeave = () => this.#report(true);

  constructor(
    private readonly player: Player,
    private readonly lesson: PlayedLesson,
    private readonly store: PlayerStore,
  ) {
    this.#pieces = piecesOf(lesson.clips);
    const { captions, muted, rate } = store.get();
    player.muted(muted);
    player.defaultPlaybackRate(rate);
    player.on("timeupdate", () => this.#tick());
    player.on("play", () => store.set({ playing: true }));
    player.on("pause", () => this.#paused());
    player.on("ended", () => this.#tick());
    player.on("seeking", () => this.#recorder.stopped());
    player.on("error", () => void this.#recover());
    player.on("volumechange", () => store.set({ muted: player.muted() === true }));
    this.showCaptions(captions);
    this.#reporting = setInterval(() => this.#report(false), REPORT_EVERY_MS);
    document.addEventListener("visibilitychange", this.#onHide);
    window.addEventListener("pagehide", this.#onLeave);
    const waiting = store.connect((jump) => void this.jump(jump));
    void this.jump(waiting ?? { toMs: store.get().momentMs, play: false });
  }

  dispose(): void {
    this.#report(true);
    this.#loading += 1;
    clearInterval(this.#reporting);
    for (const timer of [this.#seam, this.#renew, this.#renewLatest]) clearTimeout(timer);
    document.removeEventListener("visibilitychange", this.#onHide);
    window.removeEventListener("pagehide", this.#onLeave);
    this.store.disconnect();
    this.store.set({ playing: false, phase: "idle" });
  }

  toggle(): void {
    if (!this.player.paused()) return void this.player.pause();
    const last = this.#pieces.at(-1);
    const atEnd = last && this.store.get().momentMs >= last.lessonStartMs + last.toMs - last.fromMs - 200;
    if (atEnd) void this.jump({ toMs: 0, play: true });
    else if (this.store.get().problem !== null) {
      this.#tries = 0;
      void this.jump({ toMs: this.store.get().momentMs, play: true });
    } else this.#play();
  }

  setRate(rate: number): void {
    this.player.defaultPlaybackRate(rate);
    this.player.playbackRate(rate);
    this.store.set({ rate });
  }

  setMuted(muted: boolean): void {
    this.player.muted(muted);
    this.store.set({ muted });
  }

  showCaptions(on: boolean): void {
    this.store.set({ captions: on });
    for (const track of Array.from(this.player.remoteTextTracks() as unknown as ArrayLike<TextTrack>))
      if (track.kind === "captions") track.mode = on ? "showing" : "hidden";
  }

  async jump({ toMs, play }: Jump): Promise<void> {
    const index = pieceAt(this.#pieces, toMs);
    const piece = this.#pieces[index];
    if (!piece) return this.store.set({ problem: "This lesson has no clip to play.", phase: "ready" });
    this.#recorder.stopped();
    this.#index = index;
    const fileMs = fileMsAt(piece, toMs);
    if (this.#link?.recordingId === piece.recordingId && !this.#fresh && this.player.error() === null)
      this.player.currentTime(fileMs / 1000);
    else if (!(await this.#load(piece.recordingId, fileMs))) return;
    this.store.set({ momentMs: lessonMsAt(piece, fileMs) });
    this.#writeMoment();
    if (play) this.#play();
  }

  #play(): void {
    this.player.play()?.catch(() => this.store.set({ playing: false }));
  }

  /** Puts a recording into the player at a moment; false when another load overtook it or it does not play. */
  async #load(recordingId: string, fileMs: number): Promise<boolean> {
    const mine = ++this.#loading;
    this.#settled = false;
    const { player, store } = this;
    if (store.get().phase === "idle") store.set({ phase: "loading" });
    const other = this.#link?.recordingId !== recordingId;
    const link = this.#fresh?.recordingId === recordingId ? this.#fresh : await this.#fetchLink(recordingId);
    if (mine !== this.#loading) return false;
    if (typeof link === "string") {
      store.set({ problem: link, phase: "ready", playing: false });
      return false;
    }
    this.#link = link;
    this.#fresh = null;
    this.#planRenewal(link);
    player.error(undefined);
    player.src({ src: link.url, type: "video/mp4" });
    if (other) this.#showTracks(recordingId);
    await new Promise<void>((resolve) => {
      player.one("loadedmetadata", () => resolve());
      player.one("error", () => resolve());
    });
    if (mine !== this.#loading) return false;
    if (player.error() !== null) return false;
    player.currentTime(fileMs / 1000);
    player.playbackRate(store.get().rate);
    this.#settled = true;
    store.set({ phase: "ready", problem: null });
    return true;
  }

  /** A link that plays a recording, or the sentence why there is none. */
  async #fetchLink(recordingId: string): Promise<Link | string> {
    try {
      const answer = await fetch(`/api/recordings/${recordingId}/link`, {
        headers: { Accept: "application/json" },
      });
      if (!answer.ok)
        return answer.status === 401
          ? "You are signed out. Sign in again, then play."
          : "This recording does not play now. The values beside it are complete without it.";
      const { url, expiresAt } = (await answer.json()) as { url: string; expiresAt: number };
      // The server's clock counts: the one of a shop's computer may be off by more than a link's life.
      const sent = Date.parse(answer.headers.get("Date") ?? "");
      const life = expiresAt - (Number.isNaN(sent) ? Date.now() : sent);
      return { recordingId, url, expiresAt: Date.now() + life };
    } catch {
      return "No network. The values beside it are complete without the recording.";
    }
  }

  #planRenewal(link: Link): void {
    const life = link.expiresAt - Date.now();
    clearTimeout(this.#renew);
    clearTimeout(this.#renewLatest);
    this.#renew = setTimeout(
      () => {
        void this.#fetchLink(link.recordingId).then((fresh) => {
          if (typeof fresh === "string" || this.#link !== link) return;
          this.#fresh = fresh;
          if (this.player.paused()) void this.#useFresh();
        });
      },
      Math.max(1000, life * RENEW_AT),
    );
    this.#renewLatest = setTimeout(() => void this.#useFresh(), Math.max(2000, life * RENEW_AT_LATEST));
  }

  /** Changes to the fresh link without losing the place. */
  async #useFresh(): Promise<void> {
    const piece = this.#pieces[this.#index];
    if (!this.#fresh || !piece || this.#fresh.recordingId !== piece.recordingId) return;
    const wasPlaying = !this.player.paused();
    const fileMs = (this.player.currentTime() ?? 0) * 1000;
    this.#recorder.stopped();
    if ((await this.#load(piece.recordingId, fileMs)) && wasPlaying) this.#play();
  }

  /** A link that ran out and a lost network look alike: a new link, the same place, a few times. */
  async #recover(): Promise<void> {
    const piece = this.#pieces[this.#index];
    if (!piece || this.player.error() === null) return;
    const wasPlaying = this.store.get().playing;
    const fileMs = fileMsAt(piece, this.store.get().momentMs);
    this.#recorder.stopped();
    this.#tries += 1;
    this.#link = null;
    if (this.#tries > MOST_TRIES) {
      this.store.set({
        problem: "This recording does not play here. Try again, or watch it on another device.",
        playing: false,
        phase: "ready",
      });
      return;
    }
    await new Promise((resolve) => setTimeout(resolve, 500 * (this.#tries - 1)));
    if ((await this.#load(piece.recordingId, fileMs)) && wasPlaying) this.#play();
  }

  #showTracks(recordingId: string): void {
    const { player, lesson } = this;
    for (const track of Array.from(player.remoteTextTracks() as unknown as ArrayLike<TextTrack>))
      player.removeRemoteTextTrack(track as never);
    for (const track of lesson.captionTracks)
      if (track.recordingId === recordingId)
        player.addRemoteTextTrack(
          {
            kind: "captions",
            src: `/api/lessons/${lesson.lessonId}/captions/${track.id}.vtt`,
            srclang: track.language,
            label: track.label,
          },
          false,
        );
    player.addRemoteTextTrack(
      {
        kind: "chapters",
        src: `/api/lessons/${lesson.lessonId}/chapters.vtt?recording=${recordingId}`,
        srclang: "en",
        label: "Chapters",
      },
      false,
    );
    this.showCaptions(this.store.get().captions);
  }

  #tick(): void {
    const { player, store } = this;
    const piece = this.#pieces[this.#index];
    if (!piece || !this.#settled || this.#link?.recordingId !== piece.recordingId) return;
    const fileMs = (player.currentTime() ?? 0) * 1000;
    if (player.seeking()) return;
    const playing = !player.paused();
    if (playing) {
      this.#recorder.playing(piece.recordingId, Math.min(fileMs, piece.toMs));
      this.#tries = 0;
    }
    store.set({ momentMs: lessonMsAt(piece, fileMs) });
    const next = follow(this.#pieces, this.#index, player.ended() ? piece.toMs : fileMs);
    clearTimeout(this.#seam);
    if (next.do === "play-on") {
      // Reports come four times a second; the end of a piece is met more exactly.
      const wait = next.leftMs / (player.playbackRate() ?? 1);
      if (playing && wait < 400) this.#seam = setTimeout(() => this.#tick(), wait);
    } else if (next.do === "stop") {
      if (playing && !player.ended()) player.pause();
      else if (player.ended()) this.#paused();
    } else if (playing || player.ended()) {
      const following = this.#pieces[next.piece];
      if (following) void this.jump({ toMs: following.lessonStartMs, play: true });
    }
  }

  #paused(): void {
    this.store.set({ playing: false });
    this.#report(false);
    this.#writeMoment();
    if (this.#fresh && !this.player.seeking()) void this.#useFresh();
  }

  /** Tells what was played. While the page goes away only a beacon arrives. */
  #report(leaving: boolean): void {
    const stretches = this.#recorder.take();
    if (stretches.length === 0) return;
    const body = JSON.stringify({
      lessonId: this.lesson.lessonId,
      revisionId: this.lesson.revisionId,
      stretches,
    });
    if (leaving) {
      // Same-origin, so the browser adds Origin and the session cookie by itself.
      if (!navigator.sendBeacon(WATCHED, new Blob([body], { type: "application/json" })))
        this.#recorder.putBack(stretches);
      return;
    }
    fetch(WATCHED, { method: "POST", headers: { "Content-Type": "application/json" }, body, keepalive: true })
      .then((answer) => {
        if (answer.status >= 500) this.#recorder.putBack(stretches);
      })
      .catch(() => this.#recorder.putBack(stretches));
  }

  /** The moment in the address, for a link to a colleague and for coming back; no navigation. */
  #writeMoment(): void {
    const url = new URL(window.location.href);
    const seconds = momentParam(Math.floor(this.store.get().momentMs / 1000) * 1000);
    if (url.searchParams.get("t") === seconds) return;
    if (seconds === "0" && !url.searchParams.has("t")) return;
    url.searchParams.set("t", seconds);
    window.history.replaceState(window.history.state, "", url);
  }
}

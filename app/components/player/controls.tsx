import { useEffect, useState } from "react";
import { formatTimecode } from "~/lessons/timecode";
import { useJump, usePlayer, usePlayerStore } from "./player-context";
import type { PlaybackEngine } from "./playback-engine";

const RATES = [0.5, 0.75, 1, 1.25, 1.5, 2] as const;
const BUTTON =
  "inline-flex min-h-11 min-w-11 items-center justify-center gap-2 rounded px-2.5 text-sm font-semibold text-on-graphite hover:bg-graphite-soft aria-pressed:underline aria-pressed:underline-offset-4";

function Shape({ path }: { path: string }) {
  return (
    <svg viewBox="0 0 20 20" className="size-5 fill-current" aria-hidden="true">
      <path d={path} />
    </svg>
  );
}

/** The whole screen, or back. Some phones give it to the video element alone. */
function useFullScreen(frame: React.RefObject<HTMLElement | null>) {
  const [full, setFull] = useState(false);
  useEffect(() => {
    const onChange = () => setFull(document.fullscreenElement !== null);
    document.addEventListener("fullscreenchange", onChange);
    return () => document.removeEventListener("fullscreenchange", onChange);
  }, []);
  const change = () => {
    if (document.fullscreenElement) return void document.exitFullscreen();
    const element = frame.current;
    if (element?.requestFullscreen) return void element.requestFullscreen().catch(() => undefined);
    const video = element?.querySelector("video") as
      (HTMLVideoElement & { webkitEnterFullscreen?: () => void }) | null;
    video?.webkitEnterFullscreen?.();
  };
  return { full, change };
}

/** Play, moment, speed, captions, sound, whole screen: all in lesson time, all by keyboard. */
export function Controls({
  engineRef,
  frame,
  durationMs,
  hasCaptions,
}: {
  engineRef: React.RefObject<PlaybackEngine | null>;
  frame: React.RefObject<HTMLElement | null>;
  durationMs: number;
  hasCaptions: boolean;
}) {
  const store = usePlayerStore();
  const jump = useJump();
  const playing = usePlayer((state) => state.playing);
  const second = usePlayer((state) => Math.floor(state.momentMs / 1000));
  const captions = usePlayer((state) => state.captions);
  const muted = usePlayer((state) => state.muted);
  const rate = usePlayer((state) => state.rate);
  const { full, change } = useFullScreen(frame);
  const now = formatTimecode(second * 1000);
  const all = formatTimecode(durationMs);
  return (
    <div className="bg-graphite px-2 text-on-graphite">
      <div className="flex items-center gap-3 pt-1 pl-1">
        <input
          type="range"
          aria-label="Moment in the lesson"
          aria-valuetext={`${now} of ${all}`}
          min={0}
          max={Math.ceil(durationMs / 1000)}
          step={1}
          value={second}
          onChange={(event) => jump({ toMs: Number(event.target.value) * 1000, play: store.get().playing })}
          className="moment-slider block h-8 min-w-0 flex-1"
        />
        <span className="text-sm tabular-nums">
          {now} / {all}
        </span>
        <button type="button" className={`${BUTTON} lg:hidden`} onClick={() => store.close()}>
          <Shape path="M4.500 3 10 8.500 15.500 3 17 4.500 11.500 10 17 15.500 15.500 17 10 11.500 4.500 17 3 15.500 8.500 10 3 4.500z" />
          <span className="sr-only">Put the picture away</span>
        </button>
      </div>
      <div className="flex flex-wrap items-center gap-x-0.5">
        <button type="button" className={BUTTON} onClick={() => engineRef.current?.toggle()}>
          <Shape path={playing ? "M4 3h4v14H4zM12 3h4v14h-4z" : "M4 2.500 17 10 4 17.500z"} />
          <span className="sr-only">{playing ? "Pause" : "Play"}</span>
        </button>
        <button
          type="button"
          className={BUTTON}
          onClick={() =>
            jump({ toMs: Math.max(0, store.get().momentMs - 10_000), play: store.get().playing })
          }
        >
          <span aria-hidden="true">−10 s</span>
          <span className="sr-only">Back ten seconds</span>
        </button>
        <span className="ml-auto flex items-center">
          <label className="inline-flex min-h-11 items-center text-sm">
            <span className="sr-only">Speed</span>
            <select
              value={rate}
              onChange={(event) => engineRef.current?.setRate(Number(event.target.value))}
              className="min-h-11 rounded bg-graphite px-1 font-semibold text-on-graphite"
            >
              {RATES.map((value) => (
                <option key={value} value={value}>
                  {value}×
                </option>
              ))}
            </select>
          </label>
          {hasCaptions ? (
            <button
              type="button"
              aria-pressed={captions}
              className={BUTTON}
              onClick={() => engineRef.current?.showCaptions(!captions)}
            >
              Captions
            </button>
          ) : null}
          <button
            type="button"
            aria-pressed={muted}
            className={BUTTON}
            onClick={() => engineRef.current?.setMuted(!muted)}
          >
            <Shape
              path={
                muted
                  ? "M2 7h4l5-4v14l-5-4H2zM13.200 7.600l1.400-1.400L19 10.600l-1.400 1.400zM17.600 6.200 19 7.600 14.600 12l-1.400-1.400z"
                  : "M2 7h4l5-4v14l-5-4H2zM13 6.500a4.500 4.500 0 0 1 0 7zM13 3a8 8 0 0 1 0 14v-1.800a6.300 6.300 0 0 0 0-10.400z"
              }
            />
            <span className="sr-only">Sound off</span>
          </button>
          <button type="button" aria-pressed={full} className={BUTTON} onClick={change}>
            <Shape path="M2 2h6v2H4v4H2zM12 2h6v6h-2V4h-4zM2 12h2v4h4v2H2zM16 12h2v6h-6v-2h4z" />
            <span className="sr-only">Whole screen</span>
          </button>
        </span>
      </div>
    </div>
  );
}

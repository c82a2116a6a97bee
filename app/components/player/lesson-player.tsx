import { useEffect, useRef } from "react";
import type { PlateView } from "~/components/plates/plate-words";
import { type Step, stepAt } from "~/lessons/steps";
import { formatTimecode } from "~/lessons/timecode";
import { ArrivingPlate } from "./arriving-plate";
import { ChapterRail } from "./chapter-rail";
import { Controls } from "./controls";
import { MarkLane, type TimedMark } from "./mark-lane";
import { Picture } from "./picture";
import { playHref } from "./play-href";
import type { PlaybackEngine, PlayedLesson } from "./playback-engine";
import { useJump, usePlayer, usePlayerStore } from "./player-context";

const STEP_MS = 5_000;

/** Before anything is loaded: a still, and the buttons that start. Without JavaScript they are plain links. */
function Start({
  lesson,
  poster,
  continueMs,
  length,
}: {
  lesson: PlayedLesson;
  poster: string | null;
  continueMs: number | null;
  length: string;
}) {
  const jump = useJump();
  const momentMs = usePlayer((state) => state.momentMs);
  const start = (toMs: number, words: string, look: string) => (
    <a
      href={playHref(lesson.clips, toMs)}
      onClick={(event) => {
        event.preventDefault();
        jump({ toMs, play: true });
      }}
      className={`inline-flex min-h-11 items-center gap-2 rounded px-3 font-semibold no-underline sm:px-4 ${look}`}
    >
      <svg viewBox="0 0 20 20" className="size-4 fill-current" aria-hidden="true">
        <path d="M4 2.500 17 10 4 17.500z" />
      </svg>
      {words}
    </a>
  );
  const first = "bg-on-graphite text-graphite";
  return (
    <div className="flex items-center gap-3 max-sm:pl-4 lg:absolute lg:inset-0 lg:justify-center">
      {poster === null ? null : (
        <img
          src={poster}
          alt=""
          className="aspect-video h-14 shrink-0 object-cover max-sm:hidden lg:absolute lg:inset-0 lg:h-full lg:w-full lg:opacity-60"
        />
      )}
      <div className="relative flex flex-wrap items-center gap-2 py-1.5 pr-2 lg:justify-center">
        {momentMs === 0 && continueMs !== null ? (
          <>
            {start(continueMs, `Continue from ${formatTimecode(continueMs)}`, first)}
            {start(0, "From 0:00", "border border-on-graphite-soft bg-graphite text-on-graphite")}
          </>
        ) : momentMs > 0 ? (
          <>
            {start(momentMs, `Play from ${formatTimecode(momentMs)}`, first)}
            {start(0, "From 0:00", "border border-on-graphite-soft bg-graphite text-on-graphite")}
          </>
        ) : (
          start(0, `Play, ${length}`, first)
        )}
      </div>
    </div>
  );
}

function Problem() {
  const problem = usePlayer((state) => state.problem);
  const moment = usePlayer((state) => state.momentMs);
  const jump = useJump();
  if (problem === null) return null;
  return (
    <div
      role="alert"
      className="absolute inset-0 z-20 grid place-content-center gap-3 bg-graphite p-4 text-center text-on-graphite"
    >
      <p>{problem}</p>
      <p>
        <button
          type="button"
          onClick={() => jump({ toMs: moment, play: true })}
          className="min-h-11 rounded border border-on-graphite-soft px-4 font-semibold"
        >
          Try again
        </button>
      </p>
    </div>
  );
}

/** Which step plays, as a way to it: the sheet marks it, the page never scrolls by itself. */
function NowPlaying({ steps }: { steps: readonly Step[] }) {
  const current = usePlayer((state) => (state.phase === "idle" ? -1 : stepAt(steps, state.momentMs)));
  const step = steps[current];
  if (!step) return null;
  return (
    <p className="px-1">
      <a href={`#step-${step.n}`} className="inline-flex min-h-11 items-center">
        Step {step.n}: {step.chapter.title}
      </a>
    </p>
  );
}

/** The recording of a lesson: picture, plates at their moment, controls, chapters. */
export function LessonPlayer({
  lesson,
  steps,
  marks,
  view,
  poster,
  continueMs,
  durationMs,
  length,
}: {
  lesson: PlayedLesson;
  steps: readonly Step[];
  marks: readonly TimedMark[];
  view: PlateView;
  poster: string | null;
  continueMs: number | null;
  durationMs: number;
  length: string;
}) {
  const store = usePlayerStore();
  const jump = useJump();
  const phase = usePlayer((state) => state.phase);
  const engineRef = useRef<PlaybackEngine | null>(null);
  const frame = useRef<HTMLElement>(null);
  const shown = phase !== "idle";

  // Keys count wherever the focus is inside the player.
  useEffect(() => {
    const element = frame.current;
    if (!element || !shown) return;
    const onKeyDown = (event: KeyboardEvent) => {
      if (event.altKey || event.ctrlKey || event.metaKey || !(event.target instanceof HTMLElement)) return;
      // The slider and the list of speeds have arrows of their own, and a button its space bar.
      if (event.target.closest("input, select")) return;
      const { momentMs, playing } = store.get();
      const to = (toMs: number) => jump({ toMs: Math.min(Math.max(0, toMs), durationMs), play: playing });
      if (event.key === "ArrowLeft") to(momentMs - STEP_MS);
      else if (event.key === "ArrowRight") to(momentMs + STEP_MS);
      else return;
      event.preventDefault();
    };
    element.addEventListener("keydown", onKeyDown);
    return () => element.removeEventListener("keydown", onKeyDown);
  }, [shown, durationMs, store, jump]);

  return (
    <>
      <section
        ref={frame}
        aria-label="Recording"
        className="player no-print z-20 min-w-0 bg-graphite text-on-graphite max-lg:sticky max-lg:bottom-0 max-lg:-mx-4 lg:overflow-hidden lg:rounded-md"
      >
        <MarkLane marks={marks} durationMs={durationMs} />
        <div className={`relative ${shown ? "player-screen" : "lg:aspect-video"}`}>
          {shown ? (
            <>
              <Picture lesson={lesson} engineRef={engineRef} />
              <button
                type="button"
                className="absolute inset-0 cursor-pointer -outline-offset-4"
                onClick={() => engineRef.current?.toggle()}
              >
                <span className="sr-only">Picture: play or pause; arrow keys move five seconds</span>
              </button>
              {phase === "loading" ? (
                <output className="absolute inset-0 grid place-items-center">Loading the recording</output>
              ) : null}
            </>
          ) : (
            <Start lesson={lesson} poster={poster} continueMs={continueMs} length={length} />
          )}
          {shown ? <ArrivingPlate marks={marks} view={view} /> : null}
          <Problem />
        </div>
        {shown ? (
          <Controls
            engineRef={engineRef}
            frame={frame}
            durationMs={durationMs}
            hasCaptions={lesson.captionTracks.length > 0}
          />
        ) : null}
        <div className="player-rail">
          <ChapterRail steps={steps} durationMs={durationMs} />
        </div>
      </section>
      {/* On a phone the docked picture leaves its place to the values; the rail stands below the sheet. */}
      <div className="no-print min-w-0 overflow-hidden rounded-md lg:hidden">
        <ChapterRail steps={steps} durationMs={durationMs} />
      </div>
      <NowPlaying steps={steps} />
    </>
  );
}

import { useCallback, useEffect, useRef, useState } from "react";
import { Button } from "~/components/ui/button";
import { fileTime, lessonTime } from "~/lessons/lesson-time";
import type { SnapshotClip } from "~/lessons/snapshot";
import { formatExactTimecode } from "~/lessons/timecode";
import { usePlayhead, useScripts } from "./moment";
import { playHref } from "./play-href";

export type BenchClip = SnapshotClip & Readonly<{ id: string; title: string }>;
/** A link to a recording's file for a few minutes; `expiresAt` in ms since 1970. */
type PlaybackLink = Readonly<{ url: string; expiresAt: number }>;

/** A key that does something while the player has the focus; `run` gets the moment in lesson time. */
export type PlayerKey = Readonly<{ key: string; words: string; run: (ms: number) => void }>;

const NO_KEYS: readonly PlayerKey[] = [];

const STEPS = [-5000, -1000, -100, 100, 1000, 5000] as const;

/** A fresh link to a recording; null when it cannot be had now. */
async function fetchLink(recordingId: string): Promise<PlaybackLink | null> {
  const answer = await fetch(`/api/recordings/${recordingId}/link`, {
    headers: { Accept: "application/json" },
  });
  if (!answer.ok) return null;
  return (await answer.json()) as PlaybackLink;
}

/**
 * The player of the bench: one clip at a time, shown as it is, with the lesson's time under it.
 * Links to the files are renewed at four fifths of their life and on error, and the place is kept.
 */
export function BenchPlayer({
  clips,
  startMs = 0,
  keys = NO_KEYS,
}: {
  clips: readonly BenchClip[];
  startMs?: number;
  keys?: readonly PlayerKey[];
}) {
  const start = fileTime(clips, startMs);
  const [recordingId, setRecordingId] = useState<string>(start?.recordingId ?? clips[0]?.recordingId ?? "");
  const [links, setLinks] = useState<Readonly<Record<string, PlaybackLink>>>({});
  const [problem, setProblem] = useState("");
  const [shownMs, setShownMs] = useState(startMs);
  const video = useRef<HTMLVideoElement>(null);
  const place = useRef({ seconds: (start?.fileMs ?? 0) / 1000, play: false });
  const playhead = usePlayhead();
  const scripts = useScripts();
  const link = links[recordingId];

  const now = () => {
    const seconds = video.current?.currentTime;
    return seconds === undefined ? null : lessonTime(clips, recordingId, Math.round(seconds * 1000));
  };

  const seek = (ms: number) => {
    const target = fileTime(clips, Math.max(0, ms));
    if (!target) return;
    setShownMs(ms);
    place.current = { seconds: target.fileMs / 1000, play: !(video.current?.paused ?? true) };
    if (target.recordingId === recordingId && video.current) video.current.currentTime = target.fileMs / 1000;
    else setRecordingId(target.recordingId);
  };

  useEffect(() => {
    playhead?.hold({ now, seek });
    return () => playhead?.hold(null);
  });

  const renew = useCallback(async () => {
    const playing = video.current;
    if (playing && playing.currentTime > 0)
      place.current = { seconds: playing.currentTime, play: !playing.paused };
    const got = await fetchLink(recordingId).catch(() => null);
    if (got) setLinks((links) => ({ ...links, [recordingId]: got }));
    setProblem(got ? "" : "The recording cannot be reached. Look at the connection and press “Try again”.");
  }, [recordingId]);

  useEffect(() => {
    if (!recordingId) return;
    const wait = link ? Math.max(5000, (link.expiresAt - Date.now()) * 0.8) : 0;
    const timer = setTimeout(() => void renew(), wait);
    return () => clearTimeout(timer);
  }, [recordingId, link, renew]);

  // Single keys act only while the player has the focus, so that they never meet somebody who types.
  const press = (event: React.KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const ms = now() ?? shownMs;
    const nudge = event.key === "[" ? -100 : event.key === "]" ? 100 : 0;
    const found = keys.find(({ key }) => key === event.key.toLowerCase());
    if (nudge !== 0) seek(ms + nudge);
    else if (found) found.run(ms);
    else return;
    event.preventDefault();
  };

  const failed = useRef(0);
  return (
    <section aria-label="Recording" className="overflow-hidden rounded-md bg-graphite text-on-graphite">
      <video
        key={recordingId}
        ref={video}
        // Without scripts the address checks the rights and leads on to the file.
        src={link?.url ?? (scripts ? undefined : playHref(clips, startMs))}
        controls
        playsInline
        preload="metadata"
        onKeyDown={press}
        className="aspect-video max-h-[70dvh] w-full bg-graphite"
        onLoadedMetadata={(event) => {
          failed.current = 0;
          event.currentTarget.currentTime = place.current.seconds;
          if (place.current.play) void event.currentTarget.play().catch(() => undefined);
        }}
        onTimeUpdate={() => setShownMs((before) => now() ?? before)}
        onSeeked={() => setShownMs((before) => now() ?? before)}
        onError={() => {
          failed.current += 1;
          if (failed.current <= 1) void renew();
          else setProblem("The recording does not play. Press “Try again”.");
        }}
      >
        {/* Captions are on the captions page; the bench shows the picture that values are read from. */}
        <track kind="captions" />
      </video>
      <div className="grid gap-2 px-3 py-3">
        {problem ? (
          <p role="alert" className="flex flex-wrap items-center gap-3 text-sm">
            {problem}
            <Button
              look="ghost"
              type="button"
              className="border-on-graphite-soft text-on-graphite"
              onClick={() => void renew()}
            >
              Try again
            </Button>
          </p>
        ) : null}
        {scripts ? (
          <div className="flex flex-wrap items-center gap-1">
            <output aria-label="Moment in the lesson" className="mr-2 font-figure text-2xl tabular-nums">
              {formatExactTimecode(Math.round(shownMs / 10) * 10)}
            </output>
            {STEPS.map((step) => (
              <button
                key={step}
                type="button"
                onKeyDown={press}
                className="min-h-11 min-w-11 rounded border border-on-graphite-soft px-2 text-sm"
                aria-label={`${step < 0 ? "Back" : "Forward"} ${Math.abs(step) / 1000} seconds`}
                onClick={() => seek((now() ?? shownMs) + step)}
              >
                {step < 0 ? "−" : "+"}
                {Math.abs(step) / 1000} s
              </button>
            ))}
          </div>
        ) : null}
        {keys.length > 0 && scripts ? (
          <p className="hidden flex-wrap gap-x-4 gap-y-1 text-sm text-on-graphite-soft lg:flex">
            <span>With the focus in the player:</span>
            {[...keys, { key: "[ ]", words: "nudge 0.1 s" }].map(({ key, words }) => (
              <span key={key}>
                <kbd className="rounded border border-on-graphite-soft px-1.5 uppercase">{key}</kbd> {words}
              </span>
            ))}
          </p>
        ) : null}
        {clips.length > 1 && scripts ? (
          <fieldset className="flex flex-wrap gap-1" aria-label="Clips">
            {clips.map((clip, n) => (
              <button
                key={clip.id}
                type="button"
                aria-pressed={clip.recordingId === recordingId}
                className="min-h-11 rounded border border-on-graphite-soft px-3 text-sm aria-pressed:bg-on-graphite aria-pressed:text-graphite"
                onClick={() => seek(lessonTime(clips, clip.recordingId, clip.inMs) ?? 0)}
              >
                {n + 1}. {clip.title}
              </button>
            ))}
          </fieldset>
        ) : null}
      </div>
    </section>
  );
}

import { usePlayhead } from "~/components/player/moment";
import type { Draft } from "~/lessons/draft";
import { lessonDuration, nearestLessonTime } from "~/lessons/lesson-time";
import { KIND_WORDS, markTitle, STATE_WORDS } from "~/lessons/mark-words";
import { formatTimecode, momentParam } from "~/lessons/timecode";
import { valuesText } from "~/lessons/values-text";

/** Rows that keep neighbouring marks from covering each other: each takes the first row that is free at its place. */
function inRows<T extends Readonly<{ from: number }>>(
  items: readonly T[],
  width: number,
): (T & { row: number })[] {
  const ends: number[] = [];
  return items.map((item) => {
    const found = ends.findIndex((end) => end <= item.from);
    const row = found === -1 ? ends.length : found;
    ends[row] = item.from + width;
    return { ...item, row };
  });
}

const MOST_ROWS = 4;

/** The whole lesson on one strip: chapters above, marks below; dashed in pencil, solid in ink. */
export function Lanes({ draft }: { draft: Draft }) {
  const { clips, chapters, marks } = draft;
  const playhead = usePlayhead();
  const total = lessonDuration(clips);
  if (total === 0) return null;
  const place = (recordingId: string, ms: number) =>
    (nearestLessonTime(clips, recordingId, ms) / total) * 100;
  const placed = inRows(
    marks
      .map((mark) => ({ mark, from: Math.min(place(mark.recordingId, mark.atMs), 91) }))
      .toSorted((a, b) => a.from - b.from),
    9.4,
  );
  const rows = Math.min(MOST_ROWS, Math.max(1, ...placed.map(({ row }) => row + 1)));
  const go = (ms: number) => (event: React.MouseEvent) => {
    if (!playhead || event.ctrlKey || event.metaKey) return;
    playhead.seek(ms);
  };
  return (
    <nav
      aria-label="Chapters and marks on the recording"
      className="overflow-x-auto rounded-md bg-graphite p-3 text-on-graphite"
    >
      <div className="grid min-w-[44rem] gap-2">
        <p className="text-sm text-on-graphite-soft">Chapters</p>
        <ol className="relative h-11">
          {chapters.map((chapter, n) => {
            const from = place(chapter.recordingId, chapter.startMs);
            const to = place(chapter.recordingId, chapter.endMs);
            const ms = nearestLessonTime(clips, chapter.recordingId, chapter.startMs);
            return (
              <li
                key={chapter.id}
                className="absolute inset-y-0 px-px"
                style={{ left: `${from}%`, width: `${to - from}%` }}
              >
                <a
                  href={`?t=${momentParam(ms)}#chapter-${chapter.id}`}
                  onClick={go(ms)}
                  className={`flex h-full items-center overflow-hidden rounded-sm border px-2 text-sm whitespace-nowrap no-underline ${chapter.state === "pencilled" || chapter.phase === null ? "border-dashed border-on-graphite-soft text-on-graphite" : "border-enamel bg-enamel text-on-enamel"}`}
                  title={`${n + 1}. ${chapter.title}, from ${formatTimecode(ms)}`}
                >
                  <span className="truncate">{chapter.title}</span>
                </a>
              </li>
            );
          })}
        </ol>
        <p className="text-sm text-on-graphite-soft">
          Marks <span className="ml-2">dashed: in pencil, solid: in ink</span>
        </p>
        <ol className="relative" style={{ height: `${rows * 2.9}rem` }}>
          {placed.map(({ mark, from, row }) => {
            const ms = nearestLessonTime(clips, mark.recordingId, mark.atMs);
            const words = valuesText(mark.values) || markTitle(mark);
            return (
              <li
                key={mark.id}
                className="absolute w-[9.2%]"
                style={{ left: `${from}%`, top: `${Math.min(row, MOST_ROWS - 1) * 2.9}rem` }}
              >
                <a
                  href={`#mark-${mark.id}`}
                  onClick={go(ms)}
                  aria-label={`${KIND_WORDS[mark.kind]} at ${formatTimecode(ms)}: ${words}. ${STATE_WORDS[mark.state]}`}
                  className={`flex min-h-11 items-center rounded-sm border px-1.5 text-sm no-underline ${mark.state === "pencilled" ? "border-dashed border-on-graphite-soft text-on-graphite" : "border-brass bg-brass-tint text-ink"}`}
                >
                  <span className="truncate">{words}</span>
                </a>
              </li>
            );
          })}
        </ol>
      </div>
    </nav>
  );
}

import type { LearnerMark } from "~/lessons/learner-lesson.server";
import type { MarkKind } from "~/lessons/mark";
import { KIND_WORDS, markTitle } from "~/lessons/mark-words";
import { formatTimecode } from "~/lessons/timecode";
import { useJump } from "./player-context";
import { spread } from "./spread";

export type TimedMark = Readonly<{ mark: LearnerMark; lessonMs: number }>;

// Each kind by its shape: plate, hexagon, rule, tag, bottle, triangle, struck bar. All of one colour.
const SHAPES: Readonly<Record<MarkKind, string>> = {
  torque: "M1 4h14v8H1z",
  tool: "M4.500 2h7L15 8l-3.500 6h-7L1 8z",
  measure: "M1 5h14v6h-2V8h-1v3h-2V8H9v3H7V8H6v3H4V8H3v3H1z",
  part: "M1 8l4-5h10v10H5z",
  supply: "M6 1h4v4l2 2v8H4V7l2-2z",
  caution: "M8 1 15.500 14.500H.5z",
  correction: "M1 6.500h14v3H1zM3 14 11 1l2 1.200-8 13z",
};

/** The marks of the lesson above the picture, each at its moment. */
export function MarkLane({ marks, durationMs }: { marks: readonly TimedMark[]; durationMs: number }) {
  const jump = useJump();
  // Where they do not all fit, what can be set on a tool or can hurt comes first.
  const shown =
    marks.length <= 20
      ? marks
      : marks.filter(({ mark: { mark } }) =>
          ["torque", "measure", "caution", "correction"].includes(mark.kind),
        );
  const fitting = shown.slice(0, 20);
  const places = spread(
    fitting.map(({ lessonMs }) => lessonMs / Math.max(1, durationMs)),
    1 / 20,
  );
  if (fitting.length === 0) return null;
  return (
    <ul aria-label="Values by moment" className="relative mx-4 h-9 max-lg:hidden">
      {fitting.map(({ mark: { mark }, lessonMs }, index) => (
        <li
          key={mark.id}
          className="absolute top-0 -translate-x-1/2"
          style={{ left: `${((places[index] ?? 0) * 100).toFixed(2)}%` }}
        >
          <button
            type="button"
            title={`${markTitle(mark)}, ${formatTimecode(lessonMs)}`}
            onClick={() => jump({ toMs: lessonMs, play: true })}
            className="grid size-7 place-items-center rounded hover:bg-graphite-soft"
          >
            <svg viewBox="0 0 16 16" className="size-4 fill-brand" aria-hidden="true">
              <path d={SHAPES[mark.kind]} fillRule="evenodd" />
            </svg>
            <span className="sr-only">
              {KIND_WORDS[mark.kind]}: {markTitle(mark)}, at {formatTimecode(lessonMs)}
            </span>
          </button>
        </li>
      ))}
    </ul>
  );
}

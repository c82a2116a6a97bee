import type { LearnerMark } from "~/lessons/learner-lesson.server";
import { valueLine } from "./figures";
import { momentDay, type PlateView } from "./plate-words";

/** A value that nobody has checked: the words first, the figure as plain text. */
export function UncheckedFigure({ of: { mark }, view }: { of: LearnerMark; view: PlateView }) {
  return (
    <p>
      <strong>Not yet checked.</strong> As written down: {valueLine(mark.values, view.units)}
    </p>
  );
}

/** A safety-critical value before its check: no figure reaches the page. */
export function WithheldFigure({ of: { mark } }: { of: LearnerMark }) {
  const who = mark.inkedBy === "" ? "your instructor" : mark.inkedBy;
  return <p className="text-lg font-semibold">Value waiting for check: ask {who}</p>;
}

/** A value that an instructor stopped: the place of the figure is crossed out, with who and why. */
export function StoppedFigure({ of: { mark, doubts }, view }: { of: LearnerMark; view: PlateView }) {
  const stops = doubts.filter((doubt) => doubt.stops);
  return (
    <div className="grid gap-2">
      <div className="flex items-center gap-4">
        <svg
          viewBox="0 0 96 40"
          className="h-10 w-24 shrink-0 stroke-ink"
          fill="none"
          strokeWidth={2}
          aria-hidden="true"
        >
          <rect x={1} y={1} width={94} height={38} strokeDasharray="5 4" />
          <path d="M2 38 94 2M2 2l92 36" />
        </svg>
        <p className="text-lg font-semibold">
          In doubt: do not use. Ask {mark.inkedBy === "" ? "your instructor" : mark.inkedBy}
        </p>
      </div>
      {stops.map((doubt) => (
        <p key={doubt.doubtId} className="text-sm">
          Stopped {momentDay(doubt.at, view.timeZone)} by {doubt.by}: {doubt.reason}
        </p>
      ))}
    </div>
  );
}

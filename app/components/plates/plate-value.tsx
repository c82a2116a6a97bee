import type { LearnerMark } from "~/lessons/learner-lesson.server";
import { Figures, type FigureSize } from "./figure";
import { figureGroups, valueLine } from "./figures";
import type { Metal } from "./plate-frame";
import { momentDay, type PlateView } from "./plate-words";

/** A value that nobody has checked: the words first, the figure as plain text. */
function UncheckedFigure({ of: { mark }, view }: { of: LearnerMark; view: PlateView }) {
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

/** The value of a mark as far as a learner may see it. */
export function PlateValue({ of, view, size }: { of: LearnerMark; view: PlateView; size: FigureSize }) {
  switch (of.showing) {
    case "in-doubt":
      return <StoppedFigure of={of} view={view} />;
    case "withheld":
      return <WithheldFigure of={of} />;
    case "unchecked":
      return <UncheckedFigure of={of} view={view} />;
    case "checked":
    case "self-checked":
      return <Figures groups={figureGroups(of.mark.values, view.units)} size={size} />;
    case "plain":
    case "pencilled":
      return null;
    default:
      return of.showing satisfies never;
  }
}

/** How the metal of a plate with a figure looks. */
export function metalOf(showing: LearnerMark["showing"]): Metal {
  return showing === "in-doubt" ? "struck" : showing === "unchecked" ? "hatched" : "solid";
}

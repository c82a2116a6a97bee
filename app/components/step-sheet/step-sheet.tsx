import { useCurrentMark, useCurrentStep } from "~/components/player/current-step";
import { PHASE_LETTERS } from "~/components/player/chapter-rail";
import { MomentLink } from "~/components/player/moment-link";
import type { TimedMark } from "~/components/player/mark-lane";
import { Plate, VariantPlates } from "~/components/plates/plate";
import type { PlateView } from "~/components/plates/plate-words";
import { holdsFigure } from "~/lessons/mark";
import { markTitle, PHASE_WORDS } from "~/lessons/mark-words";
import type { LearnerMark } from "~/lessons/learner-lesson.server";
import type { SnapshotClip } from "~/lessons/snapshot";
import type { Step, StepItem } from "~/lessons/steps";
import { formatTimecode } from "~/lessons/timecode";

function keyOf(item: StepItem): string {
  return item.form === "variants" ? (item.variants.marks[0]?.mark.id ?? "") : item.mark.mark.id;
}

/** Wide kinds take the whole width of a step; tools, parts and supplies stand side by side. */
function isNarrow(item: StepItem): boolean {
  return item.form === "plate" && ["tool", "part", "supply"].includes(item.mark.mark.kind);
}

/** Neighbouring narrow plates share a row; order is kept. */
function inRows(items: readonly StepItem[]): StepItem[][] {
  const rows: StepItem[][] = [];
  for (const item of items) {
    const row = rows.at(-1);
    if (row && isNarrow(item) && row[0] && isNarrow(row[0])) row.push(item);
    else rows.push([item]);
  }
  return rows;
}

function counted(count: number, one: string, many: string): string {
  return `${count} ${count === 1 ? one : many}`;
}

/** "6 steps, 9 values, 3 cautions". */
export function sheetWords(steps: readonly Step[], marks: readonly LearnerMark[]): string {
  const values = marks.filter(({ mark }) => holdsFigure(mark.kind)).length;
  const cautions = marks.filter(({ mark }) => mark.kind === "caution").length;
  return [
    counted(steps.length, "step", "steps"),
    counted(values, "value", "values"),
    counted(cautions, "caution", "cautions"),
  ].join(", ");
}

/** The lesson as a list of steps with their plates. Reads in full without JavaScript and without the recording. */
export function StepSheet({
  steps,
  marks,
  clips,
  view,
  startMs,
}: {
  steps: readonly Step[];
  marks: readonly TimedMark[];
  clips: readonly SnapshotClip[];
  view: PlateView;
  startMs: number;
}) {
  const currentStep = useCurrentStep(steps, startMs);
  const currentMark = useCurrentMark(marks);
  const times = new Map(marks.map(({ mark, lessonMs }) => [mark.mark.id, lessonMs]));
  const footOf = (mark: LearnerMark) => {
    const lessonMs = times.get(mark.mark.id);
    return lessonMs === undefined ? null : (
      <MomentLink clips={clips} lessonMs={lessonMs} about={markTitle(mark.mark)} />
    );
  };
  const draw = (item: StepItem) =>
    item.form === "variants" ? (
      <VariantPlates
        key={keyOf(item)}
        variants={item.variants}
        view={view}
        isCurrent={({ mark }) => mark.id === currentMark}
        footOf={footOf}
      />
    ) : (
      <Plate
        key={keyOf(item)}
        of={item.mark}
        view={view}
        current={item.mark.mark.id === currentMark}
        foot={footOf(item.mark)}
      />
    );
  return (
    <ol className="grid">
      {steps.map((step, index) => (
        <li
          key={step.chapter.id}
          id={`step-${step.n}`}
          aria-current={index === currentStep ? "step" : undefined}
          className="grid gap-3 border-t border-line px-4 py-4 aria-[current=step]:bg-enamel-tint/50 aria-[current=step]:shadow-[inset_5px_0_0_var(--enamel)] sm:grid-cols-[2.25rem_1fr] sm:px-6"
        >
          <p
            className="font-figure text-2xl leading-none font-semibold text-ink-soft max-sm:hidden"
            aria-hidden="true"
          >
            {step.n}
          </p>
          <div className="grid min-w-0 gap-3">
            <div className="flex flex-wrap items-baseline justify-between gap-x-4">
              <div>
                <h3 className="text-2xl">
                  <span className="text-ink-soft sm:sr-only">{step.n}. </span>
                  {step.chapter.title}
                </h3>
                <p className="mt-0.5 text-sm text-ink-soft">
                  {formatTimecode(step.startMs)} – {formatTimecode(step.endMs)}{" "}
                  <span aria-hidden="true" className="ml-1 rounded-sm border border-line-strong px-1">
                    {PHASE_LETTERS[step.chapter.phase]}
                  </span>{" "}
                  {PHASE_WORDS[step.chapter.phase]}
                </p>
              </div>
              <MomentLink clips={clips} lessonMs={step.startMs} about={step.chapter.title} />
            </div>
            {step.lead === null ? null : <Plate of={step.lead} view={view} foot={footOf(step.lead)} />}
            {inRows(step.items).map((row) =>
              row.length === 1 && row[0] ? (
                draw(row[0])
              ) : (
                <div key={row[0] ? keyOf(row[0]) : ""} className="grid gap-3 xl:grid-cols-2">
                  {row.map(draw)}
                </div>
              ),
            )}
          </div>
        </li>
      ))}
    </ol>
  );
}

import type { LearnerMark } from "~/lessons/learner-lesson.server";
import type { Variants } from "~/lessons/steps";
import { CorrectionPlate } from "./correction-plate";
import type { FigureSize } from "./figure";
import { MeasurePlate } from "./measure-plate";
import { PartPlate } from "./part-plate";
import { LooksWrong } from "./plate-frame";
import type { PlateView } from "./plate-words";
import { SignalPanel } from "./signal-panel";
import { SupplyPlate } from "./supply-plate";
import { ToolPlate } from "./tool-plate";
import { TorquePlate } from "./torque-plate";

export type PlateProps = Readonly<{
  of: LearnerMark;
  view: PlateView;
  size?: FigureSize;
  /** It plays now. */
  current?: boolean;
  /** Links beside "This looks wrong": the moment in the recording. */
  foot?: React.ReactNode;
}>;

/** How one mark is shown to a learner, by its kind. Pencilled marks show nothing. */
export function Plate(props: PlateProps) {
  const { mark, showing } = props.of;
  if (showing === "pencilled") return null;
  switch (mark.kind) {
    case "torque":
      return <TorquePlate {...props} />;
    case "measure":
      return <MeasurePlate {...props} />;
    case "tool":
      return <ToolPlate {...props} />;
    case "part":
      return <PartPlate {...props} />;
    case "supply":
      return <SupplyPlate {...props} />;
    case "correction":
      return <CorrectionPlate {...props} />;
    case "caution":
      return (
        <SignalPanel
          word={mark.signalWord ?? "NOTICE"}
          words={mark.words}
          reason={mark.reason}
          foot={
            <>
              {props.foot}
              <LooksWrong of={props.of} name={mark.words} />
            </>
          }
        />
      );
    default:
      return mark.kind satisfies never;
  }
}

/** Values of one component that the vehicle has not settled: all of them, under the question that settles it. */
export function VariantPlates({
  variants,
  view,
  size,
  isCurrent,
  footOf,
}: {
  variants: Variants;
  view: PlateView;
  size?: FigureSize;
  isCurrent?: (mark: LearnerMark) => boolean;
  footOf?: (mark: LearnerMark) => React.ReactNode;
}) {
  return (
    <section aria-label={variants.question} className="grid gap-3 border-l-4 border-ink pl-3">
      <p>
        <strong className="text-lg">{variants.question}</strong>{" "}
        <span className="block text-sm">
          {variants.marks.length} values. Look at the car first, then take the one that fits.
        </span>
      </p>
      {variants.marks.map((mark) => (
        <Plate
          key={mark.mark.id}
          of={mark}
          view={view}
          {...(size ? { size } : {})}
          current={isCurrent?.(mark) ?? false}
          foot={footOf?.(mark)}
        />
      ))}
    </section>
  );
}

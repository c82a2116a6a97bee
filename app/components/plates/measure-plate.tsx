import { StoppedFigure, UncheckedFigure, WithheldFigure } from "./before-check";
import { Figures } from "./figure";
import { figureGroups } from "./figures";
import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import type { PlateProps } from "./plate";

/** What the number is: a limit to hold, a reading of this one car, or a dimension. */
function roleWords(of: PlateProps["of"]): string {
  const { values } = of.mark;
  if (values.some(({ role }) => role === "measured")) return "Measured on this car, not a specification";
  if (values.some(({ role }) => role === "limit" || role === "min" || role === "max"))
    return "Limit, without tolerance";
  return "";
}

/** A length, pressure, volume or other measure: a ruled edge tells it from a torque. */
export function MeasurePlate({ of, view, size = "normal", current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.component || "Measure";
  const role = roleWords(of);
  const shown = showing === "checked" || showing === "self-checked";
  return (
    <PlateFrame
      of={of}
      view={view}
      name={name}
      current={current}
      foot={foot}
      metal={showing === "in-doubt" ? "struck" : showing === "unchecked" ? "hatched" : "solid"}
    >
      <div className="plate-ruler" aria-hidden="true" />
      <PlateHead mark={mark} name={name} />
      {showing === "in-doubt" ? (
        <StoppedFigure of={of} view={view} />
      ) : showing === "withheld" ? (
        <WithheldFigure of={of} />
      ) : showing === "unchecked" ? (
        <UncheckedFigure of={of} view={view} />
      ) : (
        <Figures groups={figureGroups(mark.values, view.units)} size={size} />
      )}
      {role === "" || !(shown || showing === "unchecked") ? null : <p className="text-sm">{role}</p>}
      {mark.tightenedState === "" ? null : <p className="text-sm">When: {mark.tightenedState}</p>}
      <MoreFacts mark={mark} />
    </PlateFrame>
  );
}

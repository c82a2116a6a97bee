import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import { metalOf, PlateValue } from "./plate-value";
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
  return (
    <PlateFrame
      of={of}
      view={view}
      name={name}
      current={current}
      foot={foot}
      metal={metalOf(showing)}
      ruled
      lead={
        <>
          <PlateHead mark={mark} name={name} />
          <PlateValue of={of} view={view} size={size} />
        </>
      }
    >
      {role === "" ? null : <p className="text-[0.95rem] leading-snug">{role}</p>}
      {mark.tightenedState === "" ? null : <p className="text-sm">When: {mark.tightenedState}</p>}
      <MoreFacts mark={mark} />
    </PlateFrame>
  );
}

import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import { metalOf, StoppedFigure } from "./plate-value";
import type { PlateProps } from "./plate";

/** Grease, thread locker, cleaner: what it is, how much, on what. */
export function SupplyPlate({ of, view, current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.product || "Supply";
  return (
    <PlateFrame
      of={of}
      view={view}
      name={name}
      current={current}
      foot={foot}
      metal={metalOf(showing)}
      lead={
        <>
          <div className="flex items-start gap-3">
            <svg
              viewBox="0 0 20 20"
              className="mt-0.5 size-5 shrink-0 fill-none stroke-ink"
              aria-hidden="true"
            >
              <path d="M8 1h4v4l3 3v11H5V8l3-3zM5 12h10" strokeWidth={1.5} />
            </svg>
            <PlateHead mark={mark} name={name} />
          </div>
          {showing === "in-doubt" ? (
            <StoppedFigure of={of} view={view} />
          ) : (
            <>
              {mark.quantity === "" ? null : (
                <p className="font-figure text-2xl font-semibold">{mark.quantity}</p>
              )}
              {mark.component === "" ? null : <p className="text-sm">For: {mark.component}</p>}
            </>
          )}
        </>
      }
    >
      <MoreFacts mark={mark} />
    </PlateFrame>
  );
}

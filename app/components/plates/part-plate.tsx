import { NewFastener } from "./new-fastener";
import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import { metalOf, StoppedFigure } from "./plate-value";
import type { PlateProps } from "./plate";

/** A part, as the tag on its box: name, number, how many, whether the old one goes back in. */
export function PartPlate({ of, view, current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.component || mark.product || "Part";
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
            {/* The tag's eyelet. */}
            <svg
              viewBox="0 0 20 20"
              className="mt-0.5 size-5 shrink-0 fill-none stroke-ink"
              aria-hidden="true"
            >
              <path d="M1 10 7 3h12v14H7z" strokeWidth={1.5} />
              <circle cx={8} cy={10} r={2} strokeWidth={1.5} />
            </svg>
            <PlateHead mark={mark} name={name} />
          </div>
          {showing === "in-doubt" ? (
            <StoppedFigure of={of} view={view} />
          ) : (
            <>
              <p className="flex flex-wrap items-baseline gap-x-4 font-figure text-2xl leading-tight font-semibold">
                {mark.partNumber === "" ? (
                  <span className="font-sans text-sm font-normal text-ink-soft">
                    Part number not recorded
                  </span>
                ) : (
                  <span className="break-all">{mark.partNumber}</span>
                )}
                {mark.quantity === "" ? null : <span>× {mark.quantity}</span>}
              </p>
              {mark.partRule === "replace" ? <NewFastener words="ALWAYS NEW" /> : null}
              {mark.partRule === "reuse" ? <p>The old part may be reused</p> : null}
            </>
          )}
        </>
      }
    >
      <MoreFacts mark={mark} />
    </PlateFrame>
  );
}

import { PlateFrame } from "./plate-frame";
import { PlateHead } from "./plate-head";
import { metalOf, StoppedFigure } from "./plate-value";
import type { PlateProps } from "./plate";

/** What the recording says or shows is wrong; this is right. */
export function CorrectionPlate({ of, view, current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.component === "" ? "Correction" : `Correction: ${mark.component}`;
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
          <PlateHead mark={mark} name={name} />
          {showing === "in-doubt" ? (
            <StoppedFigure of={of} view={view} />
          ) : (
            <>
              {mark.replaces === "" ? null : (
                <p className="text-sm">
                  Wrong in the recording: <s>{mark.replaces}</s>
                </p>
              )}
              <p className="text-lg leading-snug font-semibold">Right: {mark.words}</p>
              {mark.reason === "" ? null : <p className="text-sm">{mark.reason}</p>}
            </>
          )}
        </>
      }
    />
  );
}

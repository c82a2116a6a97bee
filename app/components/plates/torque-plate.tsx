import { LeftHandThread, NewFastener } from "./new-fastener";
import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import { metalOf, PlateValue } from "./plate-value";
import { notStatedWords, torqueFacts } from "./plate-words";
import type { PlateProps } from "./plate";

/** A torque with everything that has to be known before the wrench is set. */
export function TorquePlate({ of, view, size = "normal", current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.component || "Torque";
  const open = notStatedWords(mark);
  const stopped = showing === "in-doubt";
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
          <PlateValue of={of} view={view} size={size} />
          {mark.reuse === "replace-always" ? <NewFastener /> : null}
          {mark.threadDirection === "left" ? <LeftHandThread /> : null}
        </>
      }
    >
      {stopped ? null : (
        <ul className="grid gap-0.5 text-[0.95rem] leading-snug">
          {torqueFacts(mark).map((fact) => (
            <li key={fact}>{fact}</li>
          ))}
        </ul>
      )}
      <MoreFacts mark={mark} />
      {open === "" || stopped ? null : <p className="text-sm text-ink-soft">{open}</p>}
    </PlateFrame>
  );
}

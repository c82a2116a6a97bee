import { StoppedFigure, UncheckedFigure, WithheldFigure } from "./before-check";
import { Figures } from "./figure";
import { figureGroups } from "./figures";
import { LeftHandThread, NewFastener } from "./new-fastener";
import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import { notStatedWords, torqueFacts } from "./plate-words";
import type { PlateProps } from "./plate";

/** A torque with everything that has to be known before the wrench is set. */
export function TorquePlate({ of, view, size = "normal", current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.component || "Torque";
  const open = notStatedWords(mark);
  const facts = torqueFacts(mark);
  return (
    <PlateFrame
      of={of}
      view={view}
      name={name}
      current={current}
      foot={foot}
      metal={showing === "in-doubt" ? "struck" : showing === "unchecked" ? "hatched" : "solid"}
    >
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
      {mark.reuse === "replace-always" || mark.threadDirection === "left" ? (
        <div className="flex flex-wrap gap-x-5 gap-y-1">
          {mark.reuse === "replace-always" ? <NewFastener /> : null}
          {mark.threadDirection === "left" ? <LeftHandThread /> : null}
        </div>
      ) : null}
      {showing === "in-doubt" ? null : (
        <ul className="grid gap-0.5 text-[0.95rem] leading-snug">
          {facts.map((fact) => (
            <li key={fact}>{fact}</li>
          ))}
        </ul>
      )}
      <MoreFacts mark={mark} />
      {open === "" || showing === "in-doubt" ? null : <p className="text-sm text-ink-soft">{open}</p>}
    </PlateFrame>
  );
}

import { Figures } from "~/components/plates/figure";
import { figureGroups, valueLine } from "~/components/plates/figures";
import { NewFastener } from "~/components/plates/new-fastener";
import { checkWords, placeWords, sourceWords, type PlateView } from "~/components/plates/plate-words";
import { SignalPanel } from "~/components/plates/signal-panel";
import { markTitle } from "~/lessons/mark-words";
import { usePlayer } from "./player-context";
import type { TimedMark } from "./mark-lane";

/** A plate stays so long, or until the next one arrives. */
const STAYS_MS = 9_000;
const ARRIVING = ["torque", "measure", "tool", "caution", "correction"];

/** The mark whose moment it is: the newest one that has begun. Index in `marks`, -1 for none. */
export function arrived(marks: readonly TimedMark[], momentMs: number): number {
  let found = -1;
  marks.forEach(({ lessonMs, mark: { mark } }, index) => {
    if (ARRIVING.includes(mark.kind) && lessonMs <= momentMs && momentMs < lessonMs + STAYS_MS) found = index;
  });
  return found;
}

/** A value arriving at its moment over the picture, clear of the captions at its foot. The step sheet has it in full. */
export function ArrivingPlate({ marks, view }: { marks: readonly TimedMark[]; view: PlateView }) {
  const index = usePlayer((state) => (state.phase === "ready" ? arrived(marks, state.momentMs) : -1));
  const timed = marks[index];
  if (!timed) return null;
  const { mark, showing } = timed.mark;
  const place = "plate-arrives arriving";
  if (mark.kind === "caution")
    return (
      <div key={mark.id} className={place}>
        <SignalPanel word={mark.signalWord ?? "NOTICE"} words={mark.words} small />
      </div>
    );
  const shown = showing === "checked" || showing === "self-checked";
  const where = placeWords(mark);
  return (
    <div key={mark.id} className={place}>
      <div
        className={
          showing === "in-doubt"
            ? "plate plate-struck"
            : shown || mark.kind === "correction"
              ? "plate"
              : "plate plate-hatched"
        }
      >
        <div className="plate-in plate-in-small">
          <p className="text-sm leading-tight font-semibold">
            {mark.kind === "correction" ? `Correction: ${mark.component}` : markTitle(mark)}
            {where === "" ? "" : `, ${where.toLowerCase()}`}
          </p>
          {showing === "in-doubt" ? (
            <p className="font-semibold">In doubt: do not use</p>
          ) : showing === "withheld" ? (
            <p className="font-semibold">Value waiting for check</p>
          ) : mark.kind === "correction" ? (
            <p className="leading-tight font-semibold">
              {mark.replaces === "" ? null : <s className="block font-normal">{mark.replaces}</s>}
              {mark.words}
            </p>
          ) : shown ? (
            <Figures groups={figureGroups(mark.values, view.units)} size="overlay" />
          ) : (
            <p className="text-sm">Not yet checked: {valueLine(mark.values, view.units)}</p>
          )}
          {mark.reuse === "replace-always" && mark.kind === "torque" ? <NewFastener /> : null}
          <p className="text-xs leading-tight text-ink-soft">
            {mark.kind === "tool" && mark.source === null ? "" : `${sourceWords(mark.source)}. `}
            {showing === "plain" ? "" : checkWords(mark, showing)}
          </p>
        </div>
      </div>
    </div>
  );
}

import { quantityOfValue } from "~/lessons/quantity-of-value";
import type { Mark, MarkValue } from "~/lessons/mark";
import { formatQuantity, unitLabel } from "~/quantities/format";
import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
import { metalOf, PlateValue } from "./plate-value";
import type { PlateProps } from "./plate";

function sizeWords(value: MarkValue): { figure: string; unit: string } {
  const quantity = quantityOfValue(value);
  if (!quantity) return { figure: value.text, unit: "" };
  const { figure, unit } = formatQuantity(quantity);
  return { figure, unit: unitLabel(unit) };
}

/** A male key is drawn as an outline, a socket or wrench as a solid hexagon. */
function isKey(mark: Mark): boolean {
  return /\bkey\b|\ballen\b|\bhex bit\b/i.test(mark.toolName);
}

function Hexagon({ figure, solid }: { figure: string; solid: boolean }) {
  return (
    <svg viewBox="0 0 64 56" className="h-14 w-16 shrink-0" aria-hidden="true">
      <polygon
        points="63,28 47.5,54.8 16.5,54.8 1,28 16.5,1.2 47.5,1.2"
        strokeWidth={2}
        className={solid ? "fill-ink stroke-ink" : "fill-enamel-tint stroke-ink"}
      />
      <text
        x={32}
        y={28}
        dy="0.36em"
        textAnchor="middle"
        fontSize={figure.length > 3 ? 20 : 29}
        className={`font-figure font-semibold ${solid ? "fill-sheet" : "fill-ink"}`}
      >
        {figure}
      </text>
    </svg>
  );
}

/** A tool: its size stands in the hexagon, always in the unit that is marked on it. */
export function ToolPlate({ of, view, size = "normal", current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.toolName || "Tool";
  const own =
    mark.values.find(({ role }) => role === "size") ?? mark.values.find(({ role }) => role !== "drive");
  const drive = mark.values.find(({ role }) => role === "drive");
  const words = own ? sizeWords(own) : null;
  const driveWords = drive ? sizeWords(drive) : null;
  const inFull = showing === "checked" || showing === "self-checked";
  const stopped = showing === "in-doubt" || showing === "withheld";
  return (
    <PlateFrame
      of={of}
      view={view}
      name={name}
      current={current}
      foot={foot}
      metal={words === null && !stopped ? "solid" : metalOf(showing)}
      lead={
        <>
          <div className="flex items-center gap-4">
            {words && inFull ? <Hexagon figure={words.figure} solid={!isKey(mark)} /> : null}
            <div className="min-w-0">
              <p className="leading-snug font-semibold">
                {words && inFull ? (
                  <span className="font-figure text-2xl leading-none">
                    <span className="sr-only">{words.figure}</span> {words.unit}{" "}
                  </span>
                ) : null}
                {name}
              </p>
              {driveWords ? (
                <p className="text-sm">
                  Drive {driveWords.figure} {driveWords.unit}
                </p>
              ) : null}
              {mark.component === "" ? null : <p className="text-sm">For: {mark.component}</p>}
              <PlateHead mark={mark} name="" />
            </div>
          </div>
          {stopped || (words && !inFull) ? <PlateValue of={of} view={view} size={size} /> : null}
        </>
      }
    >
      <MoreFacts mark={mark} />
    </PlateFrame>
  );
}

import { quantityOfValue } from "~/lessons/quantity-of-value";
import type { Mark, MarkValue } from "~/lessons/mark";
import { formatQuantity, unitLabel } from "~/quantities/format";
import { StoppedFigure, WithheldFigure } from "./before-check";
import { PlateFrame } from "./plate-frame";
import { MoreFacts, PlateHead } from "./plate-head";
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
        points="63,28 47.500,54.800 16.500,54.800 1,28 16.500,1.200 47.500,1.200"
        strokeWidth={2}
        className={solid ? "fill-ink stroke-ink" : "fill-enamel-tint stroke-ink"}
      />
      <text
        x={32}
        y={28}
        dy="0.36em"
        textAnchor="middle"
        fontSize={figure.length > 3 ? 19 : 27}
        className={`font-figure font-semibold ${solid ? "fill-sheet" : "fill-ink"}`}
      >
        {figure}
      </text>
    </svg>
  );
}

/** A tool: its size stands in the hexagon, always in the unit that is marked on it. */
export function ToolPlate({ of, view, current = false, foot }: PlateProps) {
  const { mark, showing } = of;
  const name = mark.toolName || "Tool";
  const size =
    mark.values.find(({ role }) => role === "size") ?? mark.values.find(({ role }) => role !== "drive");
  const drive = mark.values.find(({ role }) => role === "drive");
  const words = size ? sizeWords(size) : null;
  const driveWords = drive ? sizeWords(drive) : null;
  const solid = showing === "checked" || showing === "self-checked";
  return (
    <PlateFrame
      of={of}
      view={view}
      name={name}
      current={current}
      foot={foot}
      metal={showing === "in-doubt" ? "struck" : showing === "unchecked" && words ? "hatched" : "solid"}
    >
      {showing === "in-doubt" || showing === "withheld" ? (
        <>
          <PlateHead mark={mark} name={name} />
          {showing === "withheld" ? <WithheldFigure of={of} /> : <StoppedFigure of={of} view={view} />}
        </>
      ) : (
        <div className="flex items-center gap-4">
          {words && solid ? <Hexagon figure={words.figure} solid={!isKey(mark)} /> : null}
          <div className="min-w-0">
            <p className="font-semibold">
              {words === null ? null : solid ? (
                <span className="font-figure text-3xl leading-none">
                  <span className="sr-only">{words.figure}</span> {words.unit}{" "}
                </span>
              ) : (
                <span>
                  Not yet checked:{" "}
                  <span className="font-normal">
                    {words.figure} {words.unit}{" "}
                  </span>
                </span>
              )}
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
      )}
      <MoreFacts mark={mark} />
    </PlateFrame>
  );
}

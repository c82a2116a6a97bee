import type { Hardware } from "~/lessons/mark";
import { splitFigure, type FigureGroup, type FigureRow } from "./figures";

export type FigureSize = "normal" | "large" | "overlay";

// The unit is never smaller than half its figure: at arm's length a figure without its unit is twelve times wrong.
const SIZES: Readonly<Record<FigureSize, { figure: string; unit: string; second: string }>> = {
  normal: { figure: "text-5xl", unit: "text-3xl", second: "text-2xl" },
  large: { figure: "text-7xl", unit: "text-4xl", second: "text-3xl" },
  overlay: { figure: "text-4xl", unit: "text-2xl", second: "text-xl" },
};
const SMALLER: Readonly<Record<FigureSize, FigureSize>> = {
  normal: "overlay",
  large: "normal",
  overlay: "overlay",
};

const HARDWARE_WORDS: Readonly<Record<Hardware, string>> = {
  either: "",
  new: "With a new fastener",
  reused: "With a reused fastener",
};

function Row({ row, size }: { row: FigureRow; size: FigureSize }) {
  const { figure, unit, second } = SIZES[size];
  if (row.words) return <span className="font-figure text-2xl font-semibold">{row.first.figure}</span>;
  const other = row.second === null ? null : splitFigure(row.second);
  // A value with its band in brackets is long; it wraps after the unit.
  const [unitText, band] = row.first.unit.split(/ (?=\()/);
  return (
    <span className="flex flex-wrap items-baseline gap-x-5 gap-y-0">
      <span className={`font-figure leading-none font-semibold ${figure}`}>
        {row.first.before === "" ? null : <span className={`${unit} mr-2`}>{row.first.before}</span>}
        {row.angle ? "+ " : ""}
        {row.first.figure}
        {unitText === "" ? null : <span className={`${unit} ml-1.5`}>{unitText}</span>}
      </span>
      {band === undefined ? null : (
        <span className={`font-figure leading-tight font-semibold ${second}`}>{band}</span>
      )}
      {other === null ? null : (
        <span className={`font-figure leading-tight font-semibold ${second}`}>
          {other.before === "" ? "" : `${other.before} `}
          {other.figure}
          {other.unit === "" ? "" : ` ${other.unit}`}
        </span>
      )}
    </span>
  );
}

/** A value in full: one stage large, several as a numbered list in working order. */
export function Figures({ groups, size = "normal" }: { groups: readonly FigureGroup[]; size?: FigureSize }) {
  return groups.map(({ hardware, rows }) => (
    <div key={hardware} className="grid gap-1">
      {HARDWARE_WORDS[hardware] === "" ? null : <p className="font-semibold">{HARDWARE_WORDS[hardware]}</p>}
      {rows.length === 1 ? (
        <p>{rows[0] ? <Row row={rows[0]} size={size} /> : null}</p>
      ) : (
        <ol className="grid gap-1.5">
          {rows.map((row, index) => (
            <li key={index} className="flex items-baseline gap-3">
              <span className="w-4 shrink-0 text-sm font-semibold text-ink-soft">{index + 1}</span>
              <Row row={row} size={SMALLER[size]} />
            </li>
          ))}
        </ol>
      )}
    </div>
  ));
}

import type { AnswerScale } from "~/quizzes/answer-scale";

const WIDTH = 340;
const x = (at: number) => 16 + at * (WIDTH - 32);
/** A label near an edge grows inwards. */
const anchor = (at: number) => (at < 0.2 ? "start" : at > 0.8 ? "end" : "middle");

/** The typed answer as a disc, the asked value as a block, on a logarithmic line. Shape and words carry it, not colour. */
export function ScaleDrawing({ scale }: { scale: AnswerScale }) {
  const from = x(scale.asked.from);
  const width = Math.max(14, x(scale.asked.to) - from);
  const middle = (scale.asked.from + scale.asked.to) / 2;
  return (
    <svg
      viewBox={`0 0 ${WIDTH} 92`}
      className="w-full max-w-md"
      role="img"
      aria-label={`You: ${scale.you.text}. Asked: ${scale.asked.text}.`}
    >
      <line x1={8} x2={WIDTH - 8} y1={48} y2={48} className="stroke-ink-soft" strokeWidth={1.5} />
      {scale.ticks.map((tick) => (
        <g key={tick.figure}>
          <line x1={x(tick.at)} x2={x(tick.at)} y1={44} y2={52} className="stroke-ink-soft" />
          <text x={x(tick.at)} y={84} textAnchor="middle" className="fill-ink-soft text-[11px]">
            {tick.figure}
          </text>
        </g>
      ))}
      <rect x={x(middle) - width / 2} y={39} width={width} height={18} className="fill-enamel stroke-ink" />
      <text
        x={x(middle)}
        y={32}
        textAnchor={anchor(middle)}
        className="fill-enamel-text text-[13px] font-semibold"
      >
        {scale.asked.text}
      </text>
      <circle cx={x(scale.you.at)} cy={48} r={7} className="fill-ink stroke-sheet" strokeWidth={2} />
      <text x={x(scale.you.at)} y={14} textAnchor={anchor(scale.you.at)} className="fill-ink text-[13px]">
        You: {scale.you.text}
      </text>
      <line
        x1={x(scale.you.at)}
        x2={x(scale.you.at)}
        y1={18}
        y2={40}
        className="stroke-ink"
        strokeDasharray="2 3"
      />
    </svg>
  );
}

/** How far a person is with a lesson. */
export type NutState = Readonly<{ seen: boolean; answered: boolean; shown: boolean; changedSince?: boolean }>;

// A castle nut from above: a hexagon with six slots cut into the rim; three of them carry the progress.
const RADIUS = 15;
const CORNERS = [0, 1, 2, 3, 4, 5].map((n) => {
  const angle = (Math.PI / 3) * n;
  return [18 + RADIUS * Math.cos(angle), 18 + RADIUS * Math.sin(angle)] as const;
});
const OUTLINE = CORNERS.map(([x, y]) => `${x.toFixed(2)},${y.toFixed(2)}`).join(" ");

function Slot({ turn, filled }: { turn: number; filled: boolean }) {
  return (
    <rect
      x={15.6}
      y={4.2}
      width={4.8}
      height={6.2}
      transform={`rotate(${turn} 18 18)`}
      className={filled ? "fill-enamel stroke-enamel" : "fill-paper stroke-line-strong"}
      strokeWidth={1}
    />
  );
}

/** The words for a state, for people who do not see the drawing. */
export function nutWords(state: NutState): string {
  const reached = [state.seen && "seen", state.answered && "answered", state.shown && "shown"].filter(
    Boolean,
  );
  const words = reached.length === 0 ? "not started" : reached.join(", ");
  return state.changedSince ? `${words}; changed since` : words;
}

/** The progress glyph: the slots fill in turn, seen, answered, shown; dashed when the lesson changed since. */
export function CastleNut({ state, size = 36 }: { state: NutState; size?: number }) {
  return (
    <svg viewBox="0 0 36 36" width={size} height={size} role="img" aria-label={nutWords(state)}>
      <polygon
        points={OUTLINE}
        className="fill-sheet stroke-ink"
        strokeWidth={1.5}
        {...(state.changedSince ? { strokeDasharray: "3 2" } : {})}
      />
      <circle cx={18} cy={18} r={5} className="fill-none stroke-ink" strokeWidth={1.2} />
      <Slot turn={0} filled={state.seen} />
      <Slot turn={120} filled={state.answered} />
      <Slot turn={240} filled={state.shown} />
    </svg>
  );
}

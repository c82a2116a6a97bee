/** How far a person is with a lesson. */
export type NutState = Readonly<{ seen: boolean; answered: boolean; shown: boolean; changedSince?: boolean }>;

// A castle nut from above: a hexagon with slots cut into the rim, one in the middle of every second flat.
// Drawn once, in a square of 36 with the nut's middle at 18, 18; logo and progress glyph share it.
const RADIUS = 16;
const FLAT = RADIUS * Math.cos(Math.PI / 6);
const SLOT = { width: 4.4, depth: 4.4 } as const;
/** The slots, clockwise from the top, in degrees; they fill in this order. */
const SLOTS = [0, 120, 240] as const;
export const HOLE_RADIUS = 5.6;

function turned(turn: number, x: number, y: number): string {
  const angle = (turn * Math.PI) / 180;
  const [sin, cos] = [Math.sin(angle), Math.cos(angle)];
  return `${(18 + x * cos - y * sin).toFixed(2)} ${(18 + x * sin + y * cos).toFixed(2)}`;
}

/** The outline with its slots cut in, as an SVG path. */
export const NUT_PATH = [0, 60, 120, 180, 240, 300]
  .map((turn, n) => {
    const half = SLOT.width / 2;
    const corner = `${n === 0 ? "M" : "L"}${turned(turn, -RADIUS / 2, -FLAT)}`;
    if (turn % 120 !== 0) return corner;
    const cut = [
      turned(turn, -half, -FLAT),
      turned(turn, -half, -FLAT + SLOT.depth),
      turned(turn, half, -FLAT + SLOT.depth),
      turned(turn, half, -FLAT),
    ];
    return `${corner}L${cut.join("L")}`;
  })
  .join("")
  .concat("Z");

function Key({ turn }: { turn: number }) {
  return (
    <rect
      x={18 - SLOT.width / 2}
      y={18 - FLAT - 1.6}
      width={SLOT.width}
      height={SLOT.depth + 1.6}
      transform={`rotate(${turn} 18 18)`}
      className="fill-enamel-text"
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

/**
 * The progress glyph: the open slots fill in turn, clockwise from the top: seen, answered, shown. Filled body when all
 * three are; a dashed outline when the lesson changed since.
 */
export function CastleNut({ state, size = 36 }: { state: NutState; size?: number }) {
  const all = state.seen && state.answered && state.shown;
  return (
    <svg viewBox="0 0 36 36" width={size} height={size} role="img" aria-label={nutWords(state)}>
      <path
        d={NUT_PATH}
        className={`stroke-ink ${all ? "fill-enamel-tint" : "fill-sheet"}`}
        strokeWidth={1.4}
        strokeLinejoin="round"
        {...(state.changedSince ? { strokeDasharray: "3 2.2" } : {})}
      />
      <circle cx={18} cy={18} r={HOLE_RADIUS} className="fill-paper stroke-ink" strokeWidth={1.2} />
      {state.seen ? <Key turn={SLOTS[0]} /> : null}
      {state.answered ? <Key turn={SLOTS[1]} /> : null}
      {state.shown ? <Key turn={SLOTS[2]} /> : null}
    </svg>
  );
}

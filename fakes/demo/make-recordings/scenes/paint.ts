/** A drawn, moving picture: how long one turn lasts, and the SVG at a moment of it (t from 0 up to 1). */
export type Scene = { seconds: number; draw: (t: number) => string };

/** The colours of a dim bay: graphite, enamel, brass and paper. Signal colours are never drawn. */
export const TONE = {
  ground: "#1c211f",
  panel: "#262d2a",
  faint: "#39433e",
  soft: "#8b968f",
  enamel: "#2d5a4c",
  line: "#7fa493",
  brass: "#c9b37a",
  dark: "#8a6d24",
  paper: "#edf0ec",
} as const;
type Tone = keyof typeof TONE;

export type Pen = { c?: Tone; w?: number; fill?: Tone | "none"; dash?: string; o?: number };

/** A number as it stands in the drawing, to a tenth of a pixel, so that equal frames are equal text. */
export const n = (x: number): string => String(Math.round(x * 10) / 10);
export const clamp = (x: number): number => Math.min(1, Math.max(0, x));
/** From 0 to 1 between two moments, starting and ending gently. */
export const ramp = (t: number, from: number, to: number): number => {
  const x = clamp((t - from) / (to - from));
  return x * x * (3 - 2 * x);
};
/** Up and back down: 0 to 1 between a and b, back between c and d. */
export const upDown = (t: number, a: number, b: number, c: number, d: number): number =>
  ramp(t, a, b) - ramp(t, c, d);
export const wave = (t: number, turns = 1): number => Math.sin(t * turns * 2 * Math.PI);
export const polar = (cx: number, cy: number, r: number, degrees: number): [number, number] => {
  const a = ((degrees - 90) * Math.PI) / 180;
  return [cx + r * Math.cos(a), cy + r * Math.sin(a)];
};

const pen = ({ c = "line", w = 4, fill = "none", dash, o }: Pen): string =>
  `fill="${fill === "none" ? "none" : TONE[fill]}" stroke="${TONE[c]}" stroke-width="${w}" stroke-linecap="round" stroke-linejoin="round"` +
  (dash ? ` stroke-dasharray="${dash}"` : "") +
  (o === undefined ? "" : ` opacity="${n(o)}"`);

export const path = (d: string, p: Pen = {}): string => `<path d="${d}" ${pen(p)}/>`;
export const line = (x1: number, y1: number, x2: number, y2: number, p: Pen = {}): string =>
  path(`M${n(x1)} ${n(y1)}L${n(x2)} ${n(y2)}`, p);
export const poly = (points: readonly (readonly [number, number])[], p: Pen = {}): string =>
  path(`M${points.map(([x, y]) => `${n(x)} ${n(y)}`).join("L")}Z`, p);
export const circle = (cx: number, cy: number, r: number, p: Pen = {}): string =>
  `<circle cx="${n(cx)}" cy="${n(cy)}" r="${n(r)}" ${pen(p)}/>`;
export const box = (x: number, y: number, w: number, h: number, p: Pen = {}, r = 6): string =>
  `<rect x="${n(x)}" y="${n(y)}" width="${n(Math.max(0, w))}" height="${n(Math.max(0, h))}" rx="${r}" ${pen(p)}/>`;
export const words = (
  x: number,
  y: number,
  text: string,
  { size = 26, c = "paper" as Tone, anchor = "middle", heavy = false } = {},
): string =>
  `<text x="${n(x)}" y="${n(y)}" font-size="${size}" text-anchor="${anchor}" fill="${TONE[c]}" class="${heavy ? "figure" : "text"}">${text
    .replace(/&/g, "&amp;")
    .replace(/</g, "&lt;")}</text>`;
export const turned = (cx: number, cy: number, degrees: number, inner: string): string =>
  `<g transform="rotate(${n(degrees)} ${n(cx)} ${n(cy)})">${inner}</g>`;
export const moved = (x: number, y: number, inner: string, scale = 1): string =>
  `<g transform="translate(${n(x)} ${n(y)})${scale === 1 ? "" : ` scale(${scale})`}">${inner}</g>`;

/** An arc on a circle, degrees clockwise from the top. */
export function arc(cx: number, cy: number, r: number, from: number, to: number, p: Pen = {}): string {
  if (Math.abs(to - from) < 0.5) return "";
  const [x1, y1] = polar(cx, cy, r, from);
  const [x2, y2] = polar(cx, cy, r, to);
  const large = Math.abs(to - from) > 180 ? 1 : 0;
  return path(`M${n(x1)} ${n(y1)}A${n(r)} ${n(r)} 0 ${large} ${to > from ? 1 : 0} ${n(x2)} ${n(y2)}`, p);
}
export const hexagon = (cx: number, cy: number, r: number, degrees: number, p: Pen = {}): string =>
  poly(
    [0, 60, 120, 180, 240, 300].map((a) => polar(cx, cy, r, a + degrees)),
    p,
  );

/** A riveted plate with a figure, drawn only while the figure is said. */
export function plate(what: string, figure: string, also = "", x = 860, y = 150): string {
  const width = 350;
  return (
    box(x, y, width, also ? 128 : 100, { c: "soft", w: 2, fill: "paper" }) +
    [14, width - 14].map((dx) => circle(x + dx, y + (also ? 64 : 50), 5, { c: "ground", w: 2 })).join("") +
    `<g fill="${TONE.ground}"><text x="${x + 34}" y="${y + 32}" font-size="21" class="text">${what}</text>` +
    `<text x="${x + 34}" y="${y + 80}" font-size="50" class="figure">${figure}</text>` +
    (also ? `<text x="${x + 34}" y="${y + 113}" font-size="25" class="text">${also}</text>` : "") +
    `</g>`
  );
}

/** A scene with a plate over it. */
export const withPlate = (scene: Scene, what: string, figure: string, also = ""): Scene => ({
  seconds: scene.seconds,
  draw: (t) => scene.draw(t) + plate(what, figure, also),
});

/** The floor of the bay. */
export const floor = (y = 560): string => line(60, y, 1220, y, { c: "faint", w: 3 });

/** A car or a truck from the side; its tires stand on y. */
export function car(x: number, y: number, kind: "car" | "truck" = "car", spin = 0, wheels = true): string {
  const body =
    kind === "car"
      ? "M-225 -34C-228 -66 -208 -78 -160 -86L-112 -92C-72 -140 -40 -148 18 -148C76 -148 104 -136 142 -96C190 -90 222 -82 226 -48L224 -34L186 -34A48 48 0 0 0 90 -34L-92 -34A48 48 0 0 0 -188 -34Z"
      : "M-250 -44L-250 -112L-150 -118L-110 -182L30 -182L36 -112L250 -112L252 -44L196 -44A52 52 0 0 0 92 -44L-96 -44A52 52 0 0 0 -200 -44Z";
  const glass =
    kind === "car"
      ? "M-92 -92C-62 -126 -44 -132 -4 -133L-4 -92ZM14 -133C62 -132 84 -124 112 -94L14 -92Z"
      : "M-126 -118L-98 -168L14 -168L18 -118Z";
  const r = kind === "car" ? 36 : 40;
  const at = kind === "car" ? [-140, 138] : [-148, 144];
  return moved(
    x,
    y,
    path(body, { c: "line", w: 4, fill: "panel" }) +
      path(glass, { c: "faint", w: 3 }) +
      (wheels
        ? at
            .map(
              (wx) =>
                circle(wx, -r, r, { c: "paper", w: 5, fill: "ground" }) +
                [0, 72, 144, 216, 288]
                  .map((a) => line(wx, -r, ...polar(wx, -r, r - 13, a + spin), { c: "soft", w: 3 }))
                  .join(""),
            )
            .join("")
        : at.map((wx) => circle(wx, -r, 15, { c: "soft", w: 3 })).join("")),
  );
}

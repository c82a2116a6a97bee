import {
  arc,
  box,
  circle,
  hexagon,
  line,
  n,
  path,
  polar,
  poly,
  ramp,
  turned,
  upDown,
  words,
  wave,
  moved,
  type Scene,
} from "./paint";

/** An open wrench whose jaw sits on the origin's hexagon and whose handle points along the angle (degrees from the top). */
const wrench = (cx: number, cy: number, r: number, degrees: number, length = 340): string =>
  turned(
    cx,
    cy,
    degrees,
    path(
      `M${n(cx - r * 1.02)} ${n(cy + r * 0.9)}L${n(cx - r * 1.02)} ${n(cy - r * 0.4)}Q${n(cx - r * 1.1)} ${n(cy - r * 1.7)} ${n(cx - 26)} ${n(cy - r * 1.9)}L${n(cx - 22)} ${n(cy - length)}A22 22 0 0 1 ${n(cx + 22)} ${n(cy - length)}L${n(cx + 26)} ${n(cy - r * 1.9)}Q${n(cx + r * 1.1)} ${n(cy - r * 1.7)} ${n(cx + r * 1.02)} ${n(cy - r * 0.4)}L${n(cx + r * 1.02)} ${n(cy + r * 0.9)}`,
      { c: "soft", w: 5 },
    ),
  );

/** A wrench turning a nut by one flat and coming back; the stud is held by a hex key or spins with the nut. */
export function nutAndWrench(o: {
  size: string;
  key?: string;
  way: "on" | "off";
  spins?: boolean;
  /** No wrench: run down with the fingers. */
  hand?: boolean;
  /** Crossed out: what must not be done. */
  never?: boolean;
  caption?: string;
}): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const [cx, cy, r] = [520, 380, 92];
      const sign = o.way === "on" ? 1 : -1;
      const pull = ramp(t, 0.1, 0.6);
      const back = ramp(t, 0.7, 1);
      const nut = sign * 60 * pull;
      const handle = 60 + sign * 60 * (pull - back) - (o.way === "on" ? 0 : -30);
      const stud = o.spins ? nut : 0;
      const jaw = r * (back > 0 && back < 1 ? 1.14 : 1);
      return (
        circle(cx, cy, 150, { c: "faint", w: 3 }) +
        arc(cx, cy, 178, sign > 0 ? -50 : 50, sign > 0 ? -10 : 10, { c: "brass", w: 5 }) +
        hexagon(cx, cy, r, nut, { c: "brass", w: 7, fill: "panel" }) +
        circle(cx, cy, 50, { c: "line", w: 5, fill: "ground" }) +
        (o.key ? hexagon(cx, cy, 22, stud, { c: "paper", w: 4 }) : "") +
        line(...polar(cx, cy, 34, stud + 20), ...polar(cx, cy, 48, stud + 20), { c: "line", w: 4 }) +
        (o.key ? turned(cx, cy, stud, line(cx, cy, cx - 250, cy + 90, { c: "paper", w: 9 })) : "") +
        (o.hand ? "" : wrench(cx, cy, jaw, handle)) +
        (o.never
          ? line(390, 230, 680, 520, { c: "paper", w: 12 }) + line(680, 230, 390, 520, { c: "paper", w: 12 })
          : "") +
        (o.size
          ? tag(1040, 400, o.size, o.caption ?? "wrench, nut")
          : words(1010, 410, o.caption ?? "", { size: 28, c: "soft" })) +
        (o.key ? tag(220, 500, o.key, "hex key, stud") : "")
      );
    },
  };
}

/** A hexagon with its size, as on the tool plates. */
export function tag(x: number, y: number, size: string, what: string): string {
  return (
    hexagon(x, y, 46, 30, { c: "line", w: 4, fill: "panel" }) +
    words(x, y + 13, size, { size: size.length > 3 ? 28 : 38, heavy: true }) +
    words(x, y + 84, what, { size: 24, c: "soft" })
  );
}

/** A click wrench on a fastener: one smooth pull, and the head gives at the click. The figure is drawn only when given. */
export function clickPull(
  o: { set?: string; crowfoot?: "square" | "straight"; second?: boolean } = {},
): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const [cx, cy] = [330, 400];
      const pull = ramp(t, 0.08, 0.55);
      const click = t > 0.55 && t < 0.74;
      const back = ramp(t, 0.8, 1);
      const angle = 66 + 30 * (pull - back);
      const nut = 30 * pull + 30 * back;
      const give = click ? 5 : 0;
      const shaft =
        box(cx - 13, cy - 520, 26, 400, { c: "line", w: 4, fill: "panel" }, 8) +
        box(cx - 22, cy - 700, 44, 190, { c: "brass", w: 4, fill: "panel" }, 12) +
        [0, 1, 2, 3, 4, 5]
          .map((i) => line(cx - 20, cy - 680 + i * 26, cx + 20, cy - 672 + i * 26, { c: "dark", w: 3 }))
          .join("") +
        [0, 1, 2, 3]
          .map((i) => line(cx - 8, cy - 470 + i * 18, cx + 8, cy - 470 + i * 18, { c: "soft", w: 2 }))
          .join("");
      const head = path(
        `M${cx - 30} ${cy - 60}L${cx - 16} ${cy - 130}L${cx + 16} ${cy - 130}L${cx + 30} ${cy - 60}`,
        { c: "line", w: 5, fill: "panel" },
      );
      const crow =
        o.crowfoot === "square"
          ? box(cx - 60, cy - 90, 160, 40, { c: "brass", w: 4 }, 8)
          : o.crowfoot
            ? box(cx - 16, cy - 190, 32, 120, { c: "brass", w: 4 }, 8)
            : "";
      return (
        arc(cx, cy, 480, 66, 96, { c: "faint", w: 3, dash: "4 14" }) +
        turned(cx, cy, angle, head + crow + turned(cx, cy - 60, give, shaft)) +
        circle(cx, cy, 76, { c: "line", w: 5, fill: "ground" }) +
        hexagon(cx, cy, 58, nut, { c: "brass", w: 6, fill: "panel" }) +
        (click
          ? [0, 1, 2].map((i) => arc(cx, cy, 104 + i * 22, 190, 260, { c: "brass", w: 6 - i })).join("") +
            words(150, 560, o.second ? "first click: stop" : "click", { size: 34, heavy: true, c: "brass" })
          : "") +
        (o.set
          ? words(970, 250, "set on wrench", { size: 24, c: "soft" }) +
            words(970, 310, o.set, { size: 56, heavy: true })
          : "")
      );
    },
  };
}

/** Torque and then an angle: a paint dot walks round, with the arc that it has gone. */
export function angleTurn(o: { degrees: number; hand?: boolean; label?: string }): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const [cx, cy] = [560, 370];
      const gone = o.degrees * ramp(t, 0.15, 0.75);
      return (
        circle(cx, cy, 190, { c: "faint", w: 3 }) +
        [0, 90, 180, 270]
          .map((a) => line(...polar(cx, cy, 196, a), ...polar(cx, cy, 216, a), { c: "soft", w: 4 }))
          .join("") +
        arc(cx, cy, 190, 0, gone, { c: "brass", w: 10 }) +
        (o.hand
          ? circle(cx, cy, 150, { c: "line", w: 6, fill: "panel" }) +
            [...Array(18).keys()]
              .map((i) =>
                line(...polar(cx, cy, 132, i * 20 + gone), ...polar(cx, cy, 148, i * 20 + gone), {
                  c: "line",
                  w: 4,
                }),
              )
              .join("")
          : hexagon(cx, cy, 118, gone, { c: "line", w: 6, fill: "panel" })) +
        circle(...polar(cx, cy, 96, gone), 13, { c: "brass", w: 3, fill: "brass" }) +
        line(cx, cy - 230, cx, cy - 262, { c: "paper", w: 5 }) +
        (o.label ? words(990, 385, o.label, { size: 50, heavy: true }) : "")
      );
    },
  };
}

/** The scale in the grip: it turns, a row of lines wanders past the edge, and the lock closes. */
export function wrenchScale(o: { unit?: string; down?: boolean } = {}): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const move = o.down ? 1 - ramp(t, 0.1, 0.75) : ramp(t, 0.1, 0.75);
      const x = 520 - 190 * (o.down ? 1 - move : 0) + (o.down ? 190 : 190 * move);
      const edge = 470 + 300 * move;
      const lock = ramp(t, 0.78, 0.88);
      return (
        box(110, 300, 860, 120, { c: "line", w: 5, fill: "panel" }, 14) +
        [...Array(11).keys()]
          .map((i) =>
            line(460 + i * 32, 320, 460 + i * 32, i % 5 === 0 ? 362 : 345, {
              c: i % 5 === 0 ? "paper" : "soft",
              w: 4,
            }),
          )
          .join("") +
        words(460, 400, "low", { size: 24, c: "soft" }) +
        words(780, 400, "full", { size: 24, c: "soft" }) +
        box(edge, 280, 1130 - edge, 160, { c: "brass", w: 5, fill: "ground" }, 18) +
        [...Array(7).keys()]
          .map((i) =>
            line(edge + 40 + i * 44 + ((x * 3) % 44), 292, edge + 40 + i * 44 + ((x * 3) % 44), 428, {
              c: "dark",
              w: 3,
            }),
          )
          .join("") +
        box(
          1110,
          310 + 24 * (1 - lock),
          60,
          100,
          { c: lock > 0.5 ? "paper" : "soft", w: 4, fill: "panel" },
          8,
        ) +
        words(620, 230, o.unit ?? "unit first, then the figure", { size: 36, heavy: true, c: "soft" })
      );
    },
  };
}

/** A screw with a six-lobed recess, and the bit turning in it. */
export function starScrew(o: { size: string; way: "on" | "off"; caption: string }): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const [cx, cy] = [520, 370];
      const a = (o.way === "on" ? 1 : -1) * 60 * ramp(t, 0.1, 0.75);
      const lobes = [...Array(72).keys()].map((i) =>
        polar(cx, cy, 74 + 14 * Math.cos((i * 6 * 5 * Math.PI) / 180), i * 5 + a),
      );
      return (
        circle(cx, cy, 170, { c: "line", w: 7, fill: "panel" }) +
        arc(cx, cy, 200, o.way === "on" ? -50 : 50, o.way === "on" ? -10 : 10, { c: "brass", w: 5 }) +
        poly(lobes, { c: "brass", w: 7, fill: "ground" }) +
        line(...polar(cx, cy, 120, a), ...polar(cx, cy, 156, a), { c: "paper", w: 6 }) +
        tag(1040, 400, o.size, o.caption)
      );
    },
  };
}

/** Three bolts of a housing, in the order in which they are tightened. */
export function threeBolts(o: { order?: readonly number[]; note?: string; twist?: number } = {}): Scene {
  const order = o.order ?? [0, 1, 2];
  const at: readonly (readonly [number, number])[] = [
    [440, 230],
    [640, 520],
    [810, 270],
  ];
  return {
    seconds: 4,
    draw: (t) => {
      const now = Math.min(2, Math.floor(t * 3.6));
      const within = t * 3.6 - now;
      return moved(
        -130,
        0,
        path(
          "M380 200Q420 150 500 180L640 190L780 200Q880 210 870 290L740 560Q640 620 570 540L390 320Q350 250 380 200Z",
          { c: "line", w: 5, fill: "panel" },
        ) +
          circle(630, 350, 106, { c: "line", w: 5, fill: "ground" }) +
          circle(630, 350, 82, { c: "faint", w: 5 }) +
          order
            .map((bolt, i) => {
              const [x, y] = at[bolt]!;
              const done = i < now || t > 0.86;
              const turn = i === now ? (o.twist ?? 60) * ramp(within, 0.15, 0.8) : 0;
              return (
                hexagon(x, y, 34, turn, { c: done || i === now ? "brass" : "soft", w: 5, fill: "ground" }) +
                words(
                  x + (bolt === 1 ? 62 : bolt === 0 ? 10 : -16),
                  y + (bolt === 1 ? 10 : 76),
                  String(i + 1),
                  {
                    size: 36,
                    heavy: true,
                    c: done || i === now ? "paper" : "soft",
                  },
                )
              );
            })
            .join("") +
          (o.note ? words(1010, 420, o.note, { size: 28, c: "soft" }) : ""),
      );
    },
  };
}

/** A cut-off wheel going through a nut, with sparks. */
export const cutWheel: Scene = {
  seconds: 2,
  draw: (t) => {
    const x = 560 + 26 * upDown(t, 0, 0.5, 0.5, 1);
    return (
      box(690, 250, 60, 260, { c: "line", w: 5, fill: "panel" }) +
      box(750, 350, 240, 54, { c: "line", w: 4 }) +
      box(628, 318, 64, 118, { c: "brass", w: 6, fill: "panel" }) +
      turned(
        x - 60,
        320,
        t * 720,
        circle(x - 60, 320, 120, { c: "paper", w: 5 }) +
          [0, 40, 80, 120, 160, 200, 240, 280, 320]
            .map((a) =>
              line(...polar(x - 60, 320, 60, a), ...polar(x - 60, 320, 108, a + 10), { c: "faint", w: 4 }),
            )
            .join(""),
      ) +
      circle(x - 60, 320, 34, { c: "soft", w: 5, fill: "ground" }) +
      box(x - 340, 292, 250, 56, { c: "soft", w: 5, fill: "panel" }, 20) +
      [...Array(9).keys()]
        .map((i) => {
          const p = (t * 3 + i / 9) % 1;
          return line(628 - p * 190, 400 + p * (70 + i * 16), 612 - p * 200, 408 + p * (80 + i * 17), {
            c: "brass",
            w: 4,
            o: 1 - p,
          });
        })
        .join("") +
      words(900, 560, "through the nut, not the bracket", { size: 26, c: "soft" })
    );
  },
};

/** Pliers or a hand working to and fro at a seized part. */
export function workLoose(o: { drop?: boolean; label?: string } = {}): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const a = 9 * wave(t, 2);
      const drip = ramp(t, 0.1, 0.6);
      return (
        box(420, 300, 420, 60, { c: "line", w: 5, fill: "panel" }) +
        turned(
          640,
          330,
          a,
          hexagon(640, 330, 74, 0, { c: "brass", w: 6, fill: "panel" }) +
            poly(
              [
                [570, 250],
                [710, 250],
                [690, 410],
                [590, 410],
              ],
              { c: "soft", w: 5 },
            ) +
            line(600, 250, 560, 150, { c: "soft", w: 14 }) +
            line(680, 250, 720, 150, { c: "soft", w: 14 }),
        ) +
        arc(640, 330, 150, -30, 30, { c: "faint", w: 4, dash: "4 12" }) +
        (o.drop
          ? moved(
              780,
              170 + 110 * drip,
              path("M0 0C-16 24 -10 36 0 36C10 36 16 24 0 0Z", { c: "brass", w: 4, fill: "brass" }),
            )
          : "") +
        (o.label ? words(640, 520, o.label, { size: 28, c: "soft" }) : "")
      );
    },
  };
}

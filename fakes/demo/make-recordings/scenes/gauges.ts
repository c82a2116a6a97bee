import {
  arc,
  box,
  circle,
  line,
  n,
  path,
  polar,
  ramp,
  turned,
  upDown,
  wave,
  words,
  type Scene,
} from "./paint";

/** A round gauge: the needle goes to a value and rests. A limit is a notch on the rim. */
export function dial(o: {
  from: number;
  to: number;
  value: number;
  unit: string;
  step: number;
  limit?: number;
  what: string;
  start?: number;
  shake?: boolean;
  readout?: string;
}): Scene {
  const angle = (v: number) => -130 + (260 * (v - o.from)) / (o.to - o.from);
  const decimals = o.step < 1 ? 1 : 0;
  return {
    seconds: 4,
    draw: (t) => {
      const start = o.start ?? o.from;
      const v =
        start +
        (o.value - start) * upDown(t, 0.08, 0.45, 0.9, 1) +
        (o.shake ? (o.to - o.from) * 0.012 * wave(t, 6) : 0);
      const [cx, cy, r] = [520, 360, 205];
      const ticks: string[] = [];
      for (let at = o.from; at <= o.to + 1e-9; at += o.step) {
        ticks.push(
          line(...polar(cx, cy, r - 34, angle(at)), ...polar(cx, cy, r - 12, angle(at)), {
            c: "paper",
            w: 4,
          }),
        );
        const [x, y] = polar(cx, cy, r - 62, angle(at));
        ticks.push(words(x, y + 9, at.toFixed(decimals), { size: 25, heavy: true, c: "soft" }));
      }
      return (
        circle(cx, cy, r + 16, { c: "line", w: 6, fill: "panel" }) +
        circle(cx, cy, r, { c: "faint", w: 3, fill: "ground" }) +
        arc(cx, cy, r - 6, -130, 130, { c: "soft", w: 3 }) +
        ticks.join("") +
        (o.limit === undefined
          ? ""
          : line(...polar(cx, cy, r - 44, angle(o.limit)), ...polar(cx, cy, r + 26, angle(o.limit)), {
              c: "brass",
              w: 8,
            })) +
        turned(
          cx,
          cy,
          angle(v),
          path(`M${cx - 7} ${cy + 34}L${cx} ${cy - r + 52}L${cx + 7} ${cy + 34}Z`, {
            c: "paper",
            w: 2,
            fill: "paper",
          }),
        ) +
        circle(cx, cy, 15, { c: "line", w: 4, fill: "panel" }) +
        words(cx, cy + 112, o.unit, { size: 28, c: "soft" }) +
        words(960, 330, o.what, { size: 28, c: "soft" }) +
        (o.readout && t > 0.45 && t < 0.92 ? words(960, 396, o.readout, { size: 58, heavy: true }) : "") +
        (o.limit === undefined
          ? ""
          : line(880, 440, 916, 440, { c: "brass", w: 8 }) +
            words(930, 449, "limit", { size: 24, c: "soft", anchor: "start" }))
      );
    },
  };
}

/** A caliper whose jaws close on a section; the reading shows when they touch. */
export function caliper(o: { shape: "bar" | "disc" | "pad"; readout?: string; what: string }): Scene {
  const width = { bar: 150, disc: 120, pad: 70 }[o.shape];
  return {
    seconds: 4,
    draw: (t) => {
      const open = 150 * (1 - upDown(t, 0.08, 0.42, 0.92, 1));
      const left = 470;
      const right = left + width + open;
      const part =
        o.shape === "bar"
          ? circle(left + 75, 430, 75, { c: "line", w: 6, fill: "panel" }) +
            circle(left + 75, 430, 52, { c: "faint", w: 3 })
          : o.shape === "disc"
            ? box(left, 340, 36, 240, { c: "line", w: 5, fill: "panel" }) +
              box(left + 84, 340, 36, 240, { c: "line", w: 5, fill: "panel" }) +
              [0, 1, 2, 3].map((i) => box(left + 36, 362 + i * 54, 48, 18, { c: "faint", w: 4 })).join("")
            : box(left, 350, 70, 200, { c: "line", w: 5, fill: "panel" }) +
              box(left - 34, 330, 30, 240, { c: "soft", w: 4 });
      return (
        part +
        box(380, 190, 700, 54, { c: "soft", w: 4, fill: "panel" }, 8) +
        [...Array(34).keys()]
          .map((i) => line(400 + i * 20, 244, 400 + i * 20, i % 5 ? 232 : 222, { c: "soft", w: 2 }))
          .join("") +
        path(`M${left - 74} 190L${left - 74} 400L${left} 500L${left} 300L${left - 20} 244`, {
          c: "paper",
          w: 5,
        }) +
        path(`M${n(right + 90)} 178L${n(right + 90)} 400L${n(right)} 500L${n(right)} 300L${n(right)} 178Z`, {
          c: "paper",
          w: 5,
        }) +
        box(right, 172, 170, 90, { c: "brass", w: 4, fill: "ground" }, 8) +
        (o.readout && open < 2 ? words(right + 85, 232, o.readout, { size: 38, heavy: true }) : "") +
        words(1030, 450, o.what, { size: 28, c: "soft" })
      );
    },
  };
}

/** A meter with two leads; the figure settles. */
export function meter(o: {
  readout: string;
  what: string;
  icon?: "battery" | "sensor" | "scan" | "plug";
}): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const on = t > 0.22;
      const touch = ramp(t, 0.02, 0.2);
      const y = 470 - 30 * touch;
      return (
        box(250, 170, 320, 400, { c: "line", w: 6, fill: "panel" }, 24) +
        box(286, 206, 248, 120, { c: "soft", w: 3, fill: "ground" }, 8) +
        words(410, 286, on ? o.readout : "- - -", { size: 56, heavy: true, c: on ? "paper" : "faint" }) +
        circle(410, 440, 66, { c: "soft", w: 5 }) +
        turned(410, 440, 40, line(410, 440, 410, 388, { c: "brass", w: 7 })) +
        (o.icon === "scan"
          ? path("M570 480C700 560 720 380 820 400", { c: "soft", w: 6 }) +
            path("M820 350L980 350L950 450L850 450Z", { c: "line", w: 5, fill: "panel" })
          : path(`M520 570C640 640 760 560 790 ${n(y)}`, { c: "brass", w: 5 }) +
            path(`M480 570C560 690 880 640 940 ${n(y)}`, { c: "soft", w: 5 }) +
            line(790, y, 800, y - 60, { c: "paper", w: 7 }) +
            line(940, y, 930, y - 60, { c: "paper", w: 7 }) +
            (o.icon === "battery"
              ? box(740, 210, 260, 170, { c: "line", w: 5 }, 8) +
                box(780, 186, 44, 24, { c: "line", w: 5 }) +
                box(910, 186, 44, 24, { c: "line", w: 5 }) +
                line(800, 250, 800, 290, { c: "paper" }) +
                line(780, 270, 820, 270, { c: "paper" }) +
                line(912, 270, 952, 270, { c: "paper" })
              : box(770, 260, 200, 110, { c: "line", w: 5, fill: "panel" }, 16) +
                circle(820, 315, 22, { c: "brass", w: 5 }) +
                circle(920, 315, 22, { c: "brass", w: 5 }))) +
        words(870, 160, o.what, { size: 28, c: "soft" })
      );
    },
  };
}

/** A straight edge over two faces and a feeler that does not go in. */
export function straightEdge(o: { pulleys?: boolean; readout?: string } = {}): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const x = 980 - 110 * upDown(t, 0.1, 0.45, 0.55, 0.95);
      return (
        box(200, 300, 720, 34, { c: "paper", w: 5, fill: "panel" }, 3) +
        (o.pulleys
          ? [300, 760]
              .map(
                (px) =>
                  box(px, 338, 110, 190, { c: "line", w: 5, fill: "panel" }) +
                  [0, 1, 2, 3, 4]
                    .map((i) => line(px + 14 + i * 20, 338, px + 14 + i * 20, 528, { c: "faint", w: 4 }))
                    .join(""),
              )
              .join("")
          : box(220, 338, 680, 130, { c: "line", w: 5, fill: "panel" }, 4) +
            circle(560, 403, 42, { c: "faint", w: 4 })) +
        box(x, 326, 190, 12, { c: "brass", w: 3, fill: "brass" }, 2) +
        words(560, 250, o.readout ?? "", { size: 30, c: "soft" })
      );
    },
  };
}

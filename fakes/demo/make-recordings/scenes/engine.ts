import {
  arc,
  box,
  circle,
  hexagon,
  line,
  moved,
  n,
  path,
  polar,
  poly,
  ramp,
  turned,
  upDown,
  wave,
  words,
  type Scene,
} from "./paint";

type Pulley = { x: number; y: number; r: number; name: string };
const PULLEYS: readonly Pulley[] = [
  { x: 480, y: 470, r: 92, name: "crank" },
  { x: 285, y: 330, r: 46, name: "tensioner" },
  { x: 360, y: 195, r: 46, name: "alternator" },
  { x: 600, y: 215, r: 66, name: "pump" },
  { x: 800, y: 300, r: 58, name: "A/C" },
  { x: 720, y: 470, r: 42, name: "idler" },
];

/** The convex run of a belt round the pulleys: outside tangents joined by arcs. */
function beltPath(pulleys: readonly Pulley[]): string {
  const parts: string[] = [];
  const touch = pulleys.map((a, i) => {
    const b = pulleys[(i + 1) % pulleys.length]!;
    const [dx, dy] = [b.x - a.x, b.y - a.y];
    const d = Math.hypot(dx, dy);
    const along = Math.atan2(dy, dx);
    const off = along - Math.acos((a.r - b.r) / d);
    const at = (p: Pulley): [number, number] => [p.x + p.r * Math.cos(off), p.y + p.r * Math.sin(off)];
    return { leave: at(a), arrive: at(b), r: b.r };
  });
  for (const [i, { leave, arrive, r }] of touch.entries()) {
    if (i === 0) parts.push(`M${n(leave[0])} ${n(leave[1])}`);
    const next = touch[(i + 1) % touch.length]!.leave;
    parts.push(`L${n(arrive[0])} ${n(arrive[1])}A${r} ${r} 0 0 1 ${n(next[0])} ${n(next[1])}`);
  }
  return parts.join("");
}

/** Belt and pulleys: running, shaking, being fitted, or the way of the belt pulley by pulley. */
export function beltDrive(
  o: { run?: boolean; shake?: number; off?: boolean; fit?: boolean; route?: boolean; only?: string } = {},
): Scene {
  return {
    seconds: o.route ? 5 : 2,
    draw: (t) => {
      const arm = (o.shake ?? 0) * wave(t, 3) + (o.off || o.fit ? -26 * upDown(t, 0.1, 0.4, 0.6, 0.95) : 0);
      const pulleys = PULLEYS.map((p) => (p.name === "tensioner" ? { ...p, x: p.x - arm } : p));
      const lit = o.route ? Math.floor(t * 6.4) : -1;
      const turn = o.run || o.shake ? t * 360 : 0;
      const d = beltPath(pulleys);
      const fade = o.off ? 1 - ramp(t, 0.4, 0.8) : o.fit ? ramp(t, 0.15, 0.5) : 1;
      return (
        path("M180 560L150 160Q150 120 200 120L900 120Q960 130 950 190L930 560", { c: "faint", w: 4 }) +
        path(d, { c: "line", w: 12, o: fade }) +
        (o.run || o.shake
          ? path(d, { c: "ground", w: 6, dash: "26 26", o: 1 }).replace(
              "/>",
              ` stroke-dashoffset="${n(-t * 52 * 4)}"/>`,
            )
          : "") +
        pulleys
          .map(({ x, y, r, name }, i) => {
            const on = i <= lit || o.only === name;
            return (
              circle(x, y, r, { c: on ? "brass" : "soft", w: on ? 7 : 5, fill: "panel" }) +
              [0, 120, 240]
                .map((a) =>
                  line(...polar(x, y, 12, a + (turn * 92) / r), ...polar(x, y, r - 12, a + (turn * 92) / r), {
                    c: "faint",
                    w: 5,
                  }),
                )
                .join("") +
              (o.route || o.only === name ? words(x, y + 6, name, { size: r > 50 ? 22 : 17 }) : "")
            );
          })
          .join("") +
        line(285 - arm, 330, 250, 450, { c: "soft", w: 10 }) +
        circle(250, 450, 16, { c: "soft", w: 5, fill: "ground" })
      );
    },
  };
}

/** The tensioner's pointer between or past the two marks on its case. */
export function tensionerMarks(where: "past" | "middle"): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const a = (where === "past" ? 56 : 8) * ramp(t, 0.05, 0.5) + 1.5 * wave(t, 3);
      const [cx, cy] = [560, 500];
      return (
        arc(cx, cy, 300, -80, 80, { c: "line", w: 7 }) +
        circle(cx, cy, 120, { c: "line", w: 6, fill: "panel" }) +
        circle(cx, cy, 30, { c: "soft", w: 5 }) +
        [-26, 36]
          .map((m) => line(...polar(cx, cy, 262, m), ...polar(cx, cy, 330, m), { c: "brass", w: 9 }))
          .join("") +
        turned(
          cx,
          cy,
          a,
          path(`M${cx - 22} ${cy - 120}L${cx} ${cy - 278}L${cx + 22} ${cy - 120}Z`, {
            c: "paper",
            w: 5,
            fill: "panel",
          }),
        ) +
        words(960, 260, where === "past" ? "past the second mark" : "between the marks", {
          size: 30,
          c: "soft",
        })
      );
    },
  };
}

/** The wear gauge in the grooves of a ribbed belt, cut across. */
export function beltRibs(o: { sits: "flush" | "high"; cracks?: boolean }): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const down = ramp(t, 0.1, 0.6);
      const depth = o.sits === "flush" ? 60 : 96;
      const ribs = [...Array(6).keys()]
        .map(
          (i) =>
            `L${260 + i * 120} 420L${290 + i * 120} ${420 - depth}L${330 + i * 120} ${420 - depth}L${360 + i * 120} 420`,
        )
        .join("");
      return (
        path(`M240 520L240 420${ribs}L1000 420L1000 520Z`, { c: "line", w: 6, fill: "panel" }) +
        [0, 1, 2, 3, 4].map((i) => circle(320 + i * 140, 480, 10, { c: "faint", w: 4 })).join("") +
        (o.cracks
          ? [...Array(8).keys()]
              .slice(0, 1 + Math.floor(t * 9))
              .map((i) => path(`M${300 + i * 84} ${430 - depth}l8 22l-10 16l6 18`, { c: "paper", w: 4 }))
              .join("")
          : moved(
              605,
              150 + (o.sits === "flush" ? 174 : 120) * down,
              path("M-120 0L120 0L120 40L46 40L36 92L-36 92L-46 40L-120 40Z", {
                c: "brass",
                w: 6,
                fill: "ground",
              }),
            ))
      );
    },
  };
}

/** An oil pan: the plug comes out and oil runs, or drips, or the pan stands dry with its plug in. */
export function oilPan(o: { flow: "run" | "drip" | "dry"; plug?: "in"; radiator?: boolean }): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const drop = (phase: number, fast: number) => {
        const p = (t * fast + phase) % 1;
        return moved(
          640,
          332 + 170 * p * p,
          path("M0 0C-12 20 -8 30 0 30C8 30 12 20 0 0Z", { c: tint, w: 3, fill: tint }),
        );
      };
      const tint = o.radiator ? "line" : "brass";
      const ripple = 6 * wave(t, 2);
      return moved(
        -110,
        0,
        (o.radiator
          ? box(330, 110, 620, 200, { c: "line", w: 6, fill: "panel" }) +
            [...Array(20).keys()]
              .map((i) => line(360 + i * 30, 140, 360 + i * 30, 280, { c: "faint", w: 4 }))
              .join("") +
            box(622, 306, 36, 16, { c: "soft", w: 4, fill: "ground" })
          : path("M330 130L950 130L920 250L760 300L520 300L360 250Z", { c: "line", w: 6, fill: "panel" }) +
            [0, 1, 2, 3, 4].map((i) => hexagon(390 + i * 125, 150, 13, 0, { c: "faint", w: 4 })).join("")) +
          (o.flow === "run"
            ? path(
                `M632 308C${n(628 + ripple)} 400 ${n(650 - ripple)} 460 ${n(640 + ripple / 2)} 520L${n(656 + ripple / 2)} 520C${n(664 - ripple)} 450 ${n(644 + ripple)} 400 650 308Z`,
                { c: tint, w: 3, fill: tint },
              )
            : "") +
          (o.flow === "drip" ? drop(0, 2) + drop(0.5, 2) : "") +
          (o.flow === "dry"
            ? hexagon(640, 318, 26, o.plug === "in" ? 120 * t : 0, { c: "brass", w: 6, fill: "panel" }) +
              box(606, 296, 68, 10, { c: "paper", w: 3 }, 2)
            : moved(
                800,
                360 + 6 * wave(t),
                hexagon(0, 0, 26, 20, { c: "soft", w: 5, fill: "panel" }) +
                  box(-14, -64, 28, 40, { c: "soft", w: 4 }, 2),
              )) +
          path("M420 500L450 570L850 570L880 500", { c: "soft", w: 6 }) +
          (o.flow === "dry" ? "" : line(446, 545, 854, 545, { c: tint, w: 5 })),
      );
    },
  };
}

/** A filter coming off or being spun on by hand. */
export function filter(way: "on" | "off" | "gasket"): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const go = ramp(t, 0.1, 0.8);
      const y = way === "on" ? 60 * (1 - go) : way === "off" ? 60 * go : 70;
      const ribs = (t * (way === "off" ? -1 : 1) * (way === "gasket" ? 0 : 2) * 40) % 40;
      return (
        path("M440 120L840 120L840 210L760 240L520 240L440 210Z", { c: "faint", w: 5 }) +
        box(600, 232, 80, 40, { c: "soft", w: 5 }) +
        box(500, 266 + y, 280, 26, { c: "brass", w: 5, fill: "panel" }) +
        box(486, 290 + y, 308, 220, { c: "line", w: 6, fill: "panel" }, 18) +
        [...Array(8).keys()]
          .map((i) =>
            line(500 + ((i * 40 + ribs + 320) % 290), 440 + y, 500 + ((i * 40 + ribs + 320) % 290), 496 + y, {
              c: "faint",
              w: 5,
            }),
          )
          .join("") +
        (way === "gasket"
          ? moved(
              500 + 280 * ramp(t, 0.1, 0.8),
              262 + y,
              path("M0 0C-10 -22 10 -22 0 0Z", { c: "paper", w: 4, fill: "paper" }) +
                line(0, -16, 40, -90, { c: "soft", w: 12 }),
            )
          : "") +
        circle(540, 340 + y, 8, { c: "brass", w: 3, fill: "brass" })
      );
    },
  };
}

/** Liquid going in through a funnel, the level rising between two marks. */
export function fill(o: {
  vessel: "engine" | "tank";
  coolant?: boolean;
  bubbles?: boolean;
  still?: boolean;
}): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const level = o.still ? 415 : 520 - 150 * ramp(t, 0.1, 0.8);
      const flow = !o.still && t > 0.08 && t < 0.84;
      const tint = o.coolant ? "line" : "brass";
      return moved(
        40,
        34,
        (flow
          ? path(
              `M655 210C${n(650 + 3 * wave(t, 4))} 260 658 300 655 ${n(level)}L667 ${n(level)}C664 300 672 260 667 210Z`,
              { c: tint, w: 2, fill: tint },
            )
          : "") +
          box(480, level, 360, 540 - level, { c: tint, w: 0, fill: o.coolant ? "enamel" : "dark" }, 8) +
          path(
            o.vessel === "tank"
              ? "M470 290L470 520Q470 550 500 550L820 550Q850 550 850 520L850 290Q850 260 820 260L720 260M600 260L500 260Q470 260 470 290"
              : "M450 240L450 550L870 550L870 240L740 240M580 240L450 240",
            { c: "line", w: 6 },
          ) +
          (o.still
            ? box(590, 232, 140, 40, { c: "paper", w: 5, fill: "ground" }) +
              [0, 1, 2, 3, 4]
                .map((i) =>
                  line(608 + i * 26 + 6 * wave(t), 240, 608 + i * 26 + 6 * wave(t), 264, { c: "soft", w: 3 }),
                )
                .join("")
            : path("M560 130L760 130L690 200L690 230L632 230L632 200Z", {
                c: "paper",
                w: 5,
                fill: "ground",
              }) +
              turned(
                470,
                130,
                flow ? 12 : 0,
                path("M300 90L470 90L520 130L560 130L560 160L500 160L460 190L300 190Z", {
                  c: "soft",
                  w: 5,
                  fill: "panel",
                }),
              )) +
          [370, 460].map((y) => line(850, y, 900, y, { c: "paper", w: 5 })).join("") +
          words(920, 378, "full", { size: 26, c: "soft", anchor: "start" }) +
          words(920, 468, "low", { size: 26, c: "soft", anchor: "start" }) +
          (o.bubbles
            ? [0, 1, 2, 3]
                .map((i) =>
                  circle(540 + i * 70, 540 - ((t + i / 4) % 1) * 120, 9, {
                    c: "paper",
                    w: 3,
                    o: 1 - ((t + i / 4) % 1),
                  }),
                )
                .join("")
            : ""),
      );
    },
  };
}

/** A dipstick is drawn out; the film stands between or on its marks. */
export function dipstick(at: "under" | "full"): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const x = 220 * (1 - upDown(t, 0.05, 0.4, 0.9, 1));
      const wet = at === "full" ? 640 : 662;
      return moved(
        -x,
        0,
        circle(200, 350, 44, { c: "brass", w: 10 }) +
          line(244, 350, 560, 350, { c: "soft", w: 14 }) +
          box(560, 326, 480, 48, { c: "line", w: 5, fill: "panel" }, 10) +
          box(wet, 332, 1034 - wet, 36, { c: "dark", w: 0, fill: "dark" }, 8) +
          [640, 900].map((h) => circle(h, 350, 12, { c: "paper", w: 5, fill: "ground" })).join("") +
          words(640, 430, "full", { size: 26, c: "soft" }) +
          words(900, 430, "low", { size: 26, c: "soft" }),
      );
    },
  };
}

/** A thermostat hung in a beaker over heat; the thermometer rises and the valve opens. */
export function beaker(
  o: { degrees?: string; closed?: boolean; stuck?: boolean; lift?: string } = {},
): Scene {
  return {
    seconds: 5,
    draw: (t) => {
      const hot = o.closed || o.stuck ? 0.1 : upDown(t, 0.05, 0.6, 0.94, 1);
      const lift = o.stuck ? 12 : o.closed ? 0 : 44 * ramp(hot, 0.7, 1);
      const column = 300 * (0.25 + 0.65 * hot);
      return (
        path("M330 200L350 200L350 530Q350 552 372 552L748 552Q770 552 770 530L770 200L790 200", {
          c: "line",
          w: 6,
        }) +
        line(352, 260 + 2 * wave(t, 3), 768, 260 - 2 * wave(t, 3), { c: "soft", w: 3 }) +
        line(560, 120, 560, 320, { c: "faint", w: 3 }) +
        box(450, 340, 220, 20, { c: "paper", w: 5, fill: "panel" }) +
        path("M490 340C490 300 630 300 630 340", { c: "paper", w: 5 }) +
        box(500, 362 + lift, 120, 16, { c: "brass", w: 5, fill: "brass" }) +
        [0, 1, 2, 3]
          .map((i) =>
            line(520, 384 + lift + i * (26 - lift / 4), 600, 392 + lift + i * (26 - lift / 4), {
              c: "soft",
              w: 5,
            }),
          )
          .join("") +
        box(540, 480, 40, 30, { c: "paper", w: 5, fill: "panel" }) +
        (o.closed || o.stuck
          ? ""
          : [0, 1, 2, 3, 4]
              .map((i) => circle(400 + i * 80, 540 - ((t * 2 + i / 5) % 1) * 240, 6, { c: "faint", w: 3 }))
              .join("")) +
        box(920, 150, 36, 350, { c: "line", w: 5 }, 18) +
        circle(938, 516, 34, { c: "line", w: 5, fill: "brass" }) +
        line(938, 510, 938, 500 - column, { c: "brass", w: 14 }) +
        [0, 1, 2, 3, 4, 5, 6]
          .map((i) => line(966, 180 + i * 46, 990, 180 + i * 46, { c: "soft", w: 3 }))
          .join("") +
        (o.degrees && hot > 0.85 ? words(1080, 240, o.degrees, { size: 56, heavy: true }) : "") +
        (o.lift && (o.stuck || hot > 0.9)
          ? words(1080, 320, o.lift, { size: 40, heavy: true, c: "brass" })
          : "")
      );
    },
  };
}

/** A hose, its clip squeezed and slid back, the hose twisted off or pushed on. */
export function hose(way: "off" | "on"): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const go = way === "off" ? ramp(t, 0.1, 0.5) : 1 - ramp(t, 0.5, 0.9);
      const hoseOff = way === "off" ? ramp(t, 0.55, 0.95) : 1 - ramp(t, 0.05, 0.45);
      const x = 520 - 150 * hoseOff;
      return moved(
        -70,
        0,
        box(640, 220, 260, 280, { c: "line", w: 6, fill: "panel" }, 16) +
          path("M640 310L560 310L550 300L520 310L520 410L550 420L560 410L640 410", { c: "line", w: 6 }) +
          path(`M60 290L${n(x + 90)} 290L${n(x + 90)} 430L60 430`, { c: "soft", w: 6, fill: "ground" }) +
          box(x + 30 - 150 * go, 276, 34, 168, { c: "brass", w: 6 }, 4) +
          path(`M${n(x + 40 - 150 * go)} 276l-14 -34M${n(x + 54 - 150 * go)} 276l14 -34`, {
            c: "brass",
            w: 6,
          }),
      );
    },
  };
}

/** A plug with two pins: pulled, cleaned, pushed home. */
export function connector(o: { bad?: boolean; home?: boolean } = {}): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const x = 130 * (o.home ? 1 - ramp(t, 0.15, 0.6) : ramp(t, 0.15, 0.6));
      return (
        box(640, 250, 230, 200, { c: "line", w: 6, fill: "panel" }, 14) +
        [310, 390]
          .map(
            (y, i) =>
              line(640, y, o.bad && i ? 590 : 540, y, { c: "paper", w: 12 }) +
              (o.bad && i
                ? [0, 1, 2, 3, 4]
                    .map((k) =>
                      line(592 + k * 9, y - 8, 586 + k * 9, y - 22 - (k % 2) * 8, { c: "line", w: 4 }),
                    )
                    .join("")
                : ""),
          )
          .join("") +
        moved(
          -x,
          0,
          path("M380 240L600 240L600 290L560 290L560 410L600 410L600 460L380 460Z", {
            c: "brass",
            w: 6,
            fill: "ground",
          }) + path("M380 310C300 310 260 290 130 300M380 390C300 390 260 420 130 410", { c: "soft", w: 8 }),
        )
      );
    },
  };
}

/** A joint being soldered and sleeved: two tails, one after the other. */
export const solder: Scene = {
  seconds: 4,
  draw: (t) => {
    const slide = 180 * ramp(t, 0.6, 0.9);
    return (
      [300, 430]
        .map(
          (y, i) =>
            line(160, y, 1080, y, { c: i ? "line" : "soft", w: 12 }) +
            box(560, y - 16, 120, 32, { c: "brass", w: 4, fill: "panel" }, 14) +
            box(330 + slide + (i ? 0 : 30), y - 22, 150, 44, { c: "faint", w: 5, fill: "panel" }, 12),
        )
        .join("") +
      turned(
        620,
        290,
        -30 + 4 * wave(t, 2),
        path("M620 290L634 230L646 120L594 120L606 230Z", { c: "paper", w: 5, fill: "panel" }),
      ) +
      [0, 1, 2]
        .map((i) =>
          path(`M${n(640 + i * 22)} ${n(250 - 60 * ((t * 2 + i / 3) % 1))}q8 -14 0 -28`, {
            c: "soft",
            w: 3,
            o: 1 - ((t * 2 + i / 3) % 1),
          }),
        )
        .join("")
    );
  },
};

/** An engine bay seen whole: engine idles, the fan turns. */
export function idling(o: { kind?: "lamp" } = {}): Scene {
  return {
    seconds: 2,
    draw: (t) => {
      const y = 3 * wave(t, 4);
      const blade = (a: number) =>
        poly([[300, 360], polar(300, 360, 100, a + t * 360), polar(300, 360, 100, a + 30 + t * 360)], {
          c: "soft",
          w: 4,
        });
      return (
        circle(300, 360, 126, { c: "line", w: 5 }) +
        [0, 72, 144, 216, 288].map(blade).join("") +
        circle(300, 360, 18, { c: "line", w: 5, fill: "ground" }) +
        moved(
          0,
          y,
          box(520, 240, 360, 260, { c: "line", w: 6, fill: "panel" }, 12) +
            box(560, 180, 280, 60, { c: "brass", w: 5 }, 20) +
            [0, 1, 2, 3]
              .map((i) => line(590 + i * 74, 240, 590 + i * 74, 320, { c: "faint", w: 6 }))
              .join("") +
            circle(610, 430, 42, { c: "soft", w: 5 }) +
            circle(770, 430, 34, { c: "soft", w: 5 }),
        ) +
        (o.kind === "lamp"
          ? circle(1050, 340, 60, { c: t < 0.5 ? "brass" : "faint", w: 6 }) +
            path("M1010 345L1030 330L1064 330L1092 318M1030 330L1036 362L1072 362L1082 334", {
              c: t < 0.5 ? "brass" : "faint",
              w: 5,
            })
          : "")
      );
    },
  };
}

import {
  box,
  car,
  circle,
  floor,
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

/** Arms of a two-post lift raise a car and the locks catch. */
export function postLift(kind: "car" | "truck", o: { lower?: boolean } = {}): Scene {
  return {
    seconds: 5,
    draw: (t) => {
      const up = o.lower ? 1 - ramp(t, 0.1, 0.75) : ramp(t, 0.1, 0.75);
      const y = 556 - 230 * up;
      const lock = o.lower ? 0 : ramp(t, 0.78, 0.88);
      return (
        floor() +
        [260, 980]
          .map(
            (x) =>
              box(x, 130, 44, 430, { c: "soft", w: 4, fill: "panel" }) +
              [...Array(9).keys()]
                .map((i) => line(x + 12, 170 + i * 42, x + 32, 170 + i * 42, { c: "faint", w: 4 }))
                .join(""),
          )
          .join("") +
        car(642, y, kind) +
        [
          [304, 520],
          [980, 764],
        ]
          .map(([a, b]) => line(a!, y - 22, b!, y - 22, { c: "brass", w: 9 }))
          .join("") +
        [304, 980]
          .map((x, i) =>
            box(
              x - (i ? 34 - 16 * lock : -34 + 34 - 16 * (1 - lock)),
              y - 40,
              34,
              34,
              { c: lock > 0.5 ? "paper" : "soft", w: 4, fill: "ground" },
              4,
            ),
          )
          .join("") +
        (lock > 0.5 ? words(640, 160, "on the locks", { size: 30, heavy: true, c: "brass" }) : "")
      );
    },
  };
}

/** Chocks first, a jack lifts, stands go under, the car comes down on them. */
export function jackAndStands(o: { from?: "chock" | "stands" | "push" | "down" } = {}): Scene {
  const part = o.from ?? "stands";
  return {
    seconds: 5,
    draw: (t) => {
      const chock = part === "chock" ? ramp(t, 0.1, 0.5) : 1;
      const up =
        part === "chock"
          ? 0
          : part === "down"
            ? 1 - ramp(t, 0.15, 0.7)
            : part === "push"
              ? 0.78
              : 1 * ramp(t, 0.05, 0.4) - 0.22 * ramp(t, 0.72, 0.9);
      const stand = part === "chock" || part === "down" ? 0 : part === "push" ? 1 : ramp(t, 0.42, 0.66);
      const tilt = 7 * up;
      const nudge = part === "push" ? 1.5 * wave(t, 2) : 0;
      const cx = 640 + nudge;
      const pivot = cx + 138;
      const jackTop = 524 - 62 * up;
      return (
        floor() +
        turned(pivot, 556, tilt, car(cx, 558)) +
        [pivot + 62 - (1 - chock) * -120, pivot - 62 + (1 - chock) * -120]
          .map((x, i) =>
            path(`M${n(x - 22)} 558L${n(x + 22)} 558L${n(x + (i ? 18 : -18))} 520Z`, {
              c: "brass",
              w: 4,
              fill: "panel",
            }),
          )
          .join("") +
        (part === "chock" || part === "push"
          ? ""
          : box(cx - 218, 536, 120, 18, { c: "soft", w: 4, fill: "panel" }) +
            line(cx - 206, 536, cx - 158, jackTop, { c: "soft", w: 8 }) +
            line(cx - 320, 480, cx - 212, 540, { c: "soft", w: 6 })) +
        (stand > 0
          ? moved(
              cx - 48,
              560 + 60 * (1 - stand),
              path(`M-34 0L-12 -64L12 -64L34 0M-24 -26L24 -26M-14 -64L-14 -76M14 -64L14 -76`, {
                c: "paper",
                w: 6,
                o: Number(n(stand)),
              }),
            )
          : "") +
        (part === "push"
          ? line(220 + nudge * 4, 440, 320 + nudge * 4, 440, { c: "brass", w: 7 }) +
            path(`M${n(300 + nudge * 4)} 422L${n(326 + nudge * 4)} 440L${n(300 + nudge * 4)} 458`, {
              c: "brass",
              w: 7,
            })
          : "")
      );
    },
  };
}

/** The bar, its link and the strut bracket; the joint may have play, the link may come out, one nut may be shown. */
export function linkAndBar(
  o: {
    play?: number;
    out?: boolean;
    in?: boolean;
    nut?: "upper" | "lower" | "both";
    still?: boolean;
    paint?: boolean;
  } = {},
): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const y = o.still || o.nut || o.out || o.in ? 0 : 26 * wave(t);
      const play = (o.play ?? 0) * wave(t, 2);
      const away = o.out ? 190 * ramp(t, 0.25, 0.8) : o.in ? 190 * (1 - ramp(t, 0.15, 0.7)) : 0;
      const pulse = 1 + 0.09 * wave(t, 2);
      const joint = (jy: number, which: "upper" | "lower") => {
        const on = o.nut === which || o.nut === "both";
        return (
          circle(0, jy, 40, { c: "line", w: 6, fill: "ground" }) +
          hexagon(0, jy, on ? 24 * pulse : 22, 0, {
            c: on ? "brass" : "soft",
            w: on ? 7 : 4,
            fill: "panel",
          }) +
          (o.paint ? line(-6, jy - 26, 22, jy + 34, { c: "paper", w: 7 }) : "")
        );
      };
      return (
        box(470, 120, 120, 120, { c: "faint", w: 5 }, 4) +
        path(`M500 240L490 320L620 320L600 200`, { c: "faint", w: 5 }) +
        [0, 1, 2, 3].map((i) => line(476, 140 + i * 26, 584, 152 + i * 26, { c: "faint", w: 5 })).join("") +
        path(
          `M110 ${n(548 - y / 3)}C260 ${n(510 - y / 3)} 380 ${n(500 + y)} 470 ${n(500 + y)}L660 ${n(496 + y)}C800 ${n(490 + y)} 860 380 1170 400`,
          { c: "line", w: 22 },
        ) +
        path(
          `M110 ${n(548 - y / 3)}C260 ${n(510 - y / 3)} 380 ${n(500 + y)} 470 ${n(500 + y)}L660 ${n(496 + y)}C800 ${n(490 + y)} 860 380 1170 400`,
          { c: "ground", w: 13 },
        ) +
        box(880, 380, 84, 72, { c: "soft", w: 5, fill: "panel" }, 20) +
        moved(
          650 + away,
          y + play,
          line(0, 250, 0, 490, { c: "brass", w: 16 }) + joint(250, "upper") + joint(496, "lower"),
        )
      );
    },
  };
}

/** Old and new part side by side, with the length between centres. */
export function sideBySide(o: {
  left?: string;
  right?: string;
  shorter?: boolean;
  /** Belts hung over one finger instead of links. */
  belts?: boolean;
  names?: readonly [string, string];
}): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const grow = ramp(t, 0.05, 0.45);
      const link = (x: number, length: number, name: string, size?: string) =>
        (o.belts
          ? box(x - 34, 176, 68, length + 28, { c: "brass", w: 14 }, 34) +
            circle(x, 196, 16, { c: "soft", w: 5 })
          : line(x, 190, x, 190 + length, { c: "brass", w: 14 }) +
            [190, 190 + length]
              .map(
                (y) =>
                  circle(x, y, 34, { c: "line", w: 6, fill: "ground" }) +
                  circle(x, y, 12, { c: "soft", w: 4 }),
              )
              .join("")) +
        line(x + 76, 190, x + 76, 190 + length * grow, { c: "soft", w: 3 }) +
        line(x + 60, 190, x + 92, 190, { c: "soft", w: 3 }) +
        (grow > 0.98
          ? line(x + 60, 190 + length, x + 92, 190 + length, { c: "soft", w: 3 }) +
            (size ? words(x + 100, 200 + length / 2, size, { size: 44, heavy: true, anchor: "start" }) : "")
          : "") +
        words(x, 140, name, { size: 26, c: "soft" });
      return (
        link(360, 340, o.names?.[0] ?? "old", o.left) +
        link(760, o.shorter ? 290 : 340, o.names?.[1] ?? "new", o.right) +
        (o.shorter ? line(240, 530, 900, 530, { c: "faint", w: 3, dash: "6 12" }) : "")
      );
    },
  };
}

/** A car on the road, over patches or smooth. */
export function road(o: { bumps?: boolean; kind?: "car" | "truck" } = {}): Scene {
  return {
    seconds: 2,
    draw: (t) => {
      const hop = o.bumps ? 7 * Math.abs(wave(t, 2)) : 1.5 * wave(t, 2);
      const shift = t * 320;
      return (
        car(600, 512 - hop, o.kind ?? "car", t * 360 * 2) +
        line(60, 516, 1220, 516, { c: "soft", w: 4 }) +
        [...Array(6).keys()]
          .map((i) => {
            const x = 60 + ((i * 320 - shift + 960) % 960) * 1.2;
            return o.bumps
              ? path(`M${n(x)} 516Q${n(x + 30)} 494 ${n(x + 60)} 516`, { c: "brass", w: 4 })
              : line(x, 545, x + 90, 545, { c: "faint", w: 5 });
          })
          .join("") +
        [0, 1, 2]
          .map((i) =>
            line(190 - i * 24 - (shift % 40), 300 + i * 50, 290 - i * 24 - (shift % 40), 300 + i * 50, {
              c: "faint",
              w: 4,
            }),
          )
          .join("")
      );
    },
  };
}

/** A wheel on its hub: nuts light up in star order, or run in by hand. */
export function wheelStar(
  o: { stage?: string; hand?: boolean; numbers?: boolean; loosen?: boolean } = {},
): Scene {
  const order = [0, 2, 4, 1, 3];
  return {
    seconds: 5,
    draw: (t) => {
      const [cx, cy] = [500, 350];
      const step = t * 5.6;
      const now = Math.min(5, Math.floor(step));
      const at = (stud: number) => polar(cx, cy, 112, stud * 72);
      const trace = order.slice(0, now + 1).map(at);
      return (
        circle(cx, cy, 226, { c: "soft", w: 18 }) +
        circle(cx, cy, 190, { c: "line", w: 5, fill: "panel" }) +
        circle(cx, cy, 46, { c: "faint", w: 5, fill: "ground" }) +
        (trace.length > 1 && !o.hand
          ? path(
              `M${trace
                .slice(0, 5)
                .map(([x, y]) => `${n(x)} ${n(y)}`)
                .join("L")}`,
              { c: "dark", w: 4, dash: "6 10" },
            )
          : "") +
        order
          .map((stud, i) => {
            const [x, y] = at(stud);
            const lit = i <= now;
            const turn = i === now ? (o.loosen ? -1 : 1) * 60 * ramp(step - now, 0.1, 0.9) : 0;
            return (
              hexagon(x, y, 30, turn, { c: lit ? "brass" : "soft", w: lit ? 7 : 4, fill: "ground" }) +
              (o.numbers
                ? words(...polar(cx, cy + 12, 160, stud * 72), String(stud + 1), {
                    size: 34,
                    heavy: true,
                    c: lit ? "paper" : "soft",
                  })
                : "")
            );
          })
          .join("") +
        (o.numbers
          ? words(960, 300, "order", { size: 28, c: "soft" }) +
            order
              .map((stud, i) =>
                words(880 + i * 42, 364, String(stud + 1), {
                  size: 56,
                  heavy: true,
                  c: i <= now ? "brass" : "faint",
                }),
              )
              .join("")
          : "") +
        (o.stage ? words(970, 450, o.stage, { size: 34, heavy: true, c: "soft" }) : "")
      );
    },
  };
}

/** Nut and seat: cone, ball and flat, each going home in its own. */
export const nutSeats: Scene = {
  seconds: 4,
  draw: (t) => {
    const drop = 70 * (1 - upDown(t, 0.1, 0.45, 0.85, 1));
    const seat = (x: number, shape: string, hole: string, name: string) =>
      moved(x, 400, path(hole, { c: "line", w: 6 })) +
      moved(x, 400 - drop, path(shape, { c: "brass", w: 6, fill: "panel" })) +
      words(x, 540, name, { size: 28, c: "soft" });
    return (
      seat(
        320,
        "M-60 -140L60 -140L60 -40L30 20L-30 20L-60 -40Z",
        "M-130 -40L-60 -40L-30 20L-30 70M130 -40L60 -40L30 20L30 70",
        "cone",
      ) +
      seat(
        640,
        "M-60 -140L60 -140L60 -40C56 0 40 16 30 20L-30 20C-40 16 -56 0 -60 -40Z",
        "M-130 -40L-60 -40C-56 0 -40 16 -30 20L-30 70M130 -40L60 -40C56 0 40 16 30 20L30 70",
        "ball",
      ) +
      seat(
        960,
        "M-50 -140L50 -140L50 -20L84 -20L84 0L-84 0L-84 -20L-50 -20Z",
        "M-130 4L-30 4L-30 70M130 4L30 4L30 70",
        "flat",
      )
    );
  },
};

/** Brake: pads on a disc. They slide out, or the piston goes back, or the pedal is pumped. */
export function brake(move: "out" | "hang" | "piston" | "fit" | "pump"): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const go = ramp(t, 0.15, 0.75);
      const gap =
        move === "out"
          ? 80 * go
          : move === "fit"
            ? 80 * (1 - go)
            : move === "pump"
              ? 14 * upDown(t, 0.05, 0.25, 0.3, 0.5) * -1 + 14
              : move === "hang"
                ? 90
                : 60;
      const lift = move === "hang" ? -20 - 10 * wave(t) : move === "out" ? -20 : 0;
      const piston = move === "piston" ? 60 * (1 - go) : 30;
      const pedal =
        move === "pump" ? 20 * upDown(t, 0.05, 0.25, 0.3, 0.5) + 9 * upDown(t, 0.55, 0.7, 0.75, 0.95) : 0;
      return (
        box(560, 190, 40, 380, { c: "line", w: 5, fill: "panel" }, 4) +
        [0, 1, 2, 3, 4]
          .map((i) => line(572, 230 + i * 76, 588, 230 + i * 76, { c: "faint", w: 4 }))
          .join("") +
        box(546 - gap - 46, 240, 40, 170, { c: "brass", w: 5, fill: "panel" }) +
        box(614 + gap, 240, 40, 170, { c: "brass", w: 5, fill: "panel" }) +
        moved(
          0,
          lift,
          path("M400 210L400 160Q400 130 430 130L760 130Q800 130 800 160L800 420L700 420", {
            c: "line",
            w: 7,
          }) +
            box(700, 270, 100, 110, { c: "line", w: 5, fill: "ground" }) +
            box(700 - piston, 282, piston + 60, 86, { c: "soft", w: 5, fill: "panel" }),
        ) +
        (move === "hang"
          ? path(`M640 84L640 ${n(112 + lift)}Q640 ${n(146 + lift)} 612 ${n(146 + lift)}`, {
              c: "paper",
              w: 7,
            })
          : "") +
        (move === "pump"
          ? turned(
              1030,
              190,
              pedal,
              line(1030, 190, 1000, 430, { c: "soft", w: 14 }) +
                box(950, 420, 100, 34, { c: "paper", w: 5, fill: "panel" }),
            )
          : "")
      );
    },
  };
}

/** Parts and chassis points as a plain list of hexagons is in bench.ts; this is a jack under an arm at ride height. */
export const rideHeight: Scene = {
  seconds: 4,
  draw: (t) => {
    const up = 60 * upDown(t, 0.1, 0.5, 0.92, 1);
    return (
      floor() +
      line(300, 250, 300, 480, { c: "faint", w: 6 }) +
      turned(
        330,
        440,
        -0.09 * up * 2,
        line(330, 440, 780, 470, { c: "line", w: 20 }) +
          circle(780, 470, 30, { c: "line", w: 5, fill: "ground" }),
      ) +
      circle(330, 440, 26, { c: "line", w: 5, fill: "ground" }) +
      [0, 1, 2, 3, 4, 5]
        .map((i) => line(560, 180 + i * (38 - up / 8), 660, 196 + i * (38 - up / 8), { c: "brass", w: 7 }))
        .join("") +
      box(690, 520 - up, 70, 40 + up, { c: "soft", w: 5, fill: "panel" }) +
      poly(
        [
          [640, 560],
          [810, 560],
          [790, 536],
          [660, 536],
        ],
        { c: "soft", w: 5, fill: "panel" },
      ) +
      line(860, 300, 1140, 300, { c: "soft", w: 3, dash: "10 12" }) +
      words(1000, 280, "ride height", { size: 28, c: "soft" }) +
      line(1000, 380 - up, 1000, 312, { c: "brass", w: 6 }) +
      path(`M985 ${n(334)}L1000 308L1015 334`, { c: "brass", w: 6 })
    );
  },
};

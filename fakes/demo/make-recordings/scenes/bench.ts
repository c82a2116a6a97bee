import { box, circle, hexagon, line, moved, n, path, ramp, turned, upDown, words, type Scene } from "./paint";

/** Tools or parts laid out in a row, one after the other; a size stands in its hexagon. */
export function layOut(items: readonly { size?: string; name: string }[]): Scene {
  return {
    seconds: 5,
    draw: (t) => {
      const gap = 1100 / items.length;
      return (
        line(80, 500, 1200, 500, { c: "faint", w: 4 }) +
        items
          .map(({ size, name }, i) => {
            const x = 90 + gap * (i + 0.5);
            const on = ramp(t, 0.04 + (i * 0.55) / items.length, 0.14 + (i * 0.55) / items.length);
            const y = 350 - 40 * (1 - on);
            const lines = name.split("|");
            return `<g opacity="${n(0.25 + 0.75 * on)}">${
              size
                ? hexagon(x, y, 76, 30, { c: "brass", w: 6, fill: "panel" }) +
                  words(x, y + 20, size, { size: size.length > 4 ? 40 : 56, heavy: true })
                : circle(x, y, 68, { c: "line", w: 6, fill: "panel" }) + circle(x, y, 30, { c: "soft", w: 5 })
            }${lines.map((l, k) => words(x, 545 + k * 32, l, { size: 25, c: "paper" })).join("")}</g>`;
          })
          .join("")
      );
    },
  };
}

/** The shop card: lines are read one after the other; one figure may be struck and put right. */
export function shopCard(o: { lines: readonly string[]; struck?: string; right?: string }): Scene {
  return {
    seconds: 4,
    draw: (t) => {
      const at = Math.min(o.lines.length - 1, Math.floor(t * o.lines.length * 1.1));
      const strike = ramp(t, 0.15, 0.4);
      const write = t > 0.5;
      return (
        turned(
          600,
          340,
          -2,
          box(300, 130, 620, 440, { c: "soft", w: 4, fill: "panel" }, 8) +
            box(520, 112, 180, 40, { c: "brass", w: 5, fill: "ground" }, 8) +
            o.lines
              .map(
                (text, i) =>
                  words(350, 230 + i * 70, text, {
                    size: 34,
                    anchor: "start",
                    c: i === at && !o.struck ? "paper" : "soft",
                  }) + line(350, 246 + i * 70, 870, 246 + i * 70, { c: "faint", w: 2 }),
              )
              .join("") +
            (o.struck
              ? words(400, 470, o.struck, { size: 84, heavy: true, anchor: "start", c: "soft" }) +
                line(390, 445, 390 + 130 * strike, 445 - 10 * strike, { c: "paper", w: 8 }) +
                (write && o.right
                  ? words(590, 470, o.right, { size: 84, heavy: true, anchor: "start", c: "brass" })
                  : "")
              : ""),
        ) +
        (o.struck
          ? ""
          : moved(0, at * 70, path("M250 205L285 220L250 235Z", { c: "brass", w: 4, fill: "brass" })))
      );
    },
  };
}

/** Key out of the ignition and away before a hand goes near the belt. */
export const keyOut: Scene = {
  seconds: 4,
  draw: (t) => {
    const x = 240 * upDown(t, 0.15, 0.55, 0.92, 1);
    return (
      circle(460, 340, 120, { c: "line", w: 7, fill: "panel" }) +
      box(448, 290, 24, 100, { c: "paper", w: 5, fill: "ground" }) +
      moved(
        x,
        0,
        turned(
          540,
          340,
          0,
          circle(740, 340, 66, { c: "brass", w: 10 }) +
            circle(756, 340, 18, { c: "brass", w: 6 }) +
            path(
              "M674 332L480 332L480 348L500 348L500 362L520 362L520 348L550 348L550 366L572 366L572 348L674 348Z",
              { c: "brass", w: 5, fill: "ground" },
            ),
        ),
      )
    );
  },
};

/** A scraper or a cloth going over a face. */
export function wipe(o: { tool: "scraper" | "cloth" | "brush"; face?: string }): Scene {
  return {
    seconds: 3,
    draw: (t) => {
      const x = 280 + 500 * upDown(t, 0, 0.5, 0.5, 1);
      return (
        box(260, 380, 760, 120, { c: "line", w: 6, fill: "panel" }) +
        circle(480, 440, 36, { c: "faint", w: 5 }) +
        circle(780, 440, 36, { c: "faint", w: 5 }) +
        (o.tool === "cloth"
          ? path(`M${n(x - 60)} 372Q${n(x)} 300 ${n(x + 70)} 340Q${n(x + 110)} 374 ${n(x + 40)} 374Z`, {
              c: "paper",
              w: 5,
              fill: "ground",
            })
          : o.tool === "brush"
            ? box(x - 40, 290, 120, 40, { c: "brass", w: 5 }) +
              [0, 1, 2, 3, 4, 5]
                .map((i) => line(x - 30 + i * 20, 332, x - 34 + i * 20, 374, { c: "soft", w: 5 }))
                .join("")
            : path(
                `M${n(x - 20)} 376L${n(x + 60)} 310L${n(x + 220)} 200L${n(x + 250)} 230L${n(x + 90)} 346Z`,
                { c: "brass", w: 5, fill: "ground" },
              )) +
        (o.face ? words(640, 560, o.face, { size: 26, c: "soft" }) : "")
      );
    },
  };
}

/** A bolt laid against another: lengths differ. */
export const boltLengths: Scene = {
  seconds: 4,
  draw: (t) => {
    const grow = ramp(t, 0.1, 0.5);
    const bolt = (y: number, length: number, text: string) =>
      box(260, y - 44, 60, 88, { c: "brass", w: 6, fill: "panel" }) +
      box(320, y - 22, length, 44, { c: "line", w: 5, fill: "panel" }, 3) +
      [...Array(Math.floor(length / 24)).keys()]
        .map((i) => line(332 + i * 24, y - 20, 342 + i * 24, y + 20, { c: "faint", w: 4 }))
        .join("") +
      line(320, y + 56, 320 + length * grow, y + 56, { c: "soft", w: 4 }) +
      words(320 + length + 40, y + 16, grow > 0.95 ? text : "", { size: 46, heavy: true, anchor: "start" });
    return bolt(220, 330, "30 mm") + bolt(350, 330, "30 mm") + bolt(480, 495, "45 mm");
  },
};

/** A housing with the jiggle pin at the top. */
export const jigglePin: Scene = {
  seconds: 3,
  draw: (t) => {
    const a = 40 * (1 - ramp(t, 0.1, 0.6));
    return (
      circle(560, 350, 190, { c: "line", w: 7, fill: "panel" }) +
      circle(560, 350, 150, { c: "brass", w: 7 }) +
      turned(
        560,
        350,
        a,
        circle(560, 350, 86, { c: "soft", w: 6, fill: "ground" }) +
          circle(560, 232, 15, { c: "paper", w: 5, fill: "paper" }),
      ) +
      line(560, 130, 560, 100, { c: "paper", w: 6 }) +
      words(900, 250, "pin at the top", { size: 32, c: "soft" })
    );
  },
};

import { exact, plus, ratio, type Rational } from "./exact";
import { refuse, type Refusal } from "./refusal";

/** A number found in normal text, from `start` up to `end`. */
export type NumberFound = Readonly<{
  ok: true;
  number: Rational;
  places: number;
  significant: number;
  fraction: boolean;
  leadingPoint: boolean;
  whole: boolean;
  start: number;
  end: number;
}>;

const VULGAR: Readonly<Record<string, readonly [number, number]>> = {
  "½": [1, 2],
  "⅓": [1, 3],
  "⅔": [2, 3],
  "¼": [1, 4],
  "¾": [3, 4],
  "⅕": [1, 5],
  "⅖": [2, 5],
  "⅗": [3, 5],
  "⅘": [4, 5],
  "⅙": [1, 6],
  "⅚": [5, 6],
  "⅛": [1, 8],
  "⅜": [3, 8],
  "⅝": [5, 8],
  "⅞": [7, 8],
  "⅒": [1, 10],
};

// What rulers, drills, spanners and turns are divided into.
const DENOMINATORS: ReadonlySet<number> = new Set([2, 3, 4, 5, 6, 8, 10, 12, 16, 32, 64, 128]);
const MOST_DIGITS = 15;

const isDigit = (c: string | undefined): boolean => c !== undefined && c >= "0" && c <= "9";

function digitsFrom(s: string, i: number): number {
  let end = i;
  while (isDigit(s[end])) end++;
  return end;
}

function fractionFigures(n: number, d: number, whole: number): { places: number; significant: number } {
  let [rest, twos, fives] = [d, 0, 0];
  while (rest % 2 === 0) [rest, twos] = [rest / 2, twos + 1];
  while (rest % 5 === 0) [rest, fives] = [rest / 5, fives + 1];
  const places = rest === 1 ? Math.max(twos, fives) : 4;
  const figure = (whole + n / d).toFixed(places).replace(".", "").replace(/^0+/, "");
  return { places, significant: Math.max(1, figure.length) };
}

type Fraction = { n: number; d: number; end: number };

/** Reads "3/16" or "½" at i; null when there is none. A fraction that no tool is divided into is refused. */
function readFraction(s: string, i: number): Fraction | Refusal | null {
  const vulgar = VULGAR[s[i] ?? ""];
  if (vulgar) return { n: vulgar[0], d: vulgar[1], end: i + 1 };
  const top = digitsFrom(s, i);
  if (top === i) return null;
  let bar = top;
  if (s[bar] === " " && s[bar + 1] === "/") bar++;
  if (s[bar] !== "/") return null;
  let bottom = bar + 1;
  if (s[bottom] === " ") bottom++;
  const end = digitsFrom(s, bottom);
  if (end === bottom) return null;
  const [n, d] = [Number(s.slice(i, top)), Number(s.slice(bottom, end))];
  const next = s[end];
  const runsOn = next === "/" || ((next === "." || next === ",") && isDigit(s[end + 1]));
  if (top - i > 3 || !DENOMINATORS.has(d) || runsOn)
    return refuse(
      "bad-number",
      i,
      `${s.slice(i, end)} is not a fraction used on tools or rulers. For a range write ${s.slice(i, top)}-${s.slice(bottom, end)}.`,
    );
  return { n, d, end };
}

function thousands(groups: readonly string[]): boolean {
  return /^[1-9]\d{0,2}$/.test(groups[0] ?? "") && groups.slice(1).every((group) => /^\d{3}$/.test(group));
}

function readDecimal(s: string, i: number): NumberFound | Refusal {
  let end = i;
  while (isDigit(s[end]) || ((s[end] === "." || s[end] === ",") && isDigit(s[end + 1]))) end++;
  const typed = s.slice(i, end);
  const commas = typed.split(",");
  const points = typed.split(".");
  let plain: string;
  if (commas.length === 1 && points.length <= 2) plain = typed;
  else if (commas.length === 2 && points.length === 1) {
    if (thousands(commas)) {
      const joined = commas.join("");
      return refuse(
        "ambiguous",
        i,
        `${typed}: thousands, or a decimal comma? Type ${joined} or ${commas.join(".")}.`,
      );
    }
    plain = commas.join(".");
  } else if (points.length === 1 && thousands(commas)) plain = commas.join("");
  else if (commas.length === 1 && thousands(points)) plain = points.join("");
  else if (points.length === 2 && thousands((points[0] ?? "").split(",")) && !points[1]?.includes(","))
    plain = typed.replaceAll(",", "");
  else if (commas.length === 2 && thousands((commas[0] ?? "").split(".")) && !commas[1]?.includes("."))
    plain = typed.replaceAll(".", "").replace(",", ".");
  else
    return refuse(
      "bad-number",
      i,
      `${typed} can be read in more than one way. Type one number with a point.`,
    );

  if (plain.replace(".", "").length > MOST_DIGITS)
    return refuse("bad-number", i, "That number has more digits than any gauge shows. Type it shorter.");
  const point = plain.indexOf(".");
  const places = point < 0 ? 0 : plain.length - point - 1;
  const significant = plain.replace(".", "").replace(/^0+/, "").length || 1;
  return {
    ok: true,
    number: exact(plain),
    places,
    significant,
    fraction: false,
    leadingPoint: plain.startsWith("."),
    whole: places === 0,
    start: i,
    end,
  };
}

/** Reads the unsigned number that starts at i of normal text; null when none starts there. */
export function readNumberAt(s: string, i: number): NumberFound | Refusal | null {
  const asFraction = (whole: number, fraction: Fraction): NumberFound => ({
    ok: true,
    number: plus(ratio(BigInt(whole), 1n), ratio(BigInt(fraction.n), BigInt(fraction.d))),
    ...fractionFigures(fraction.n, fraction.d, whole),
    fraction: true,
    leadingPoint: false,
    whole: false,
    start: i,
    end: fraction.end,
  });

  const alone = readFraction(s, i);
  if (alone) return "ok" in alone ? alone : asFraction(0, alone);
  const startsDecimal =
    isDigit(s[i]) || ((s[i] === "." || (s[i] === "," && s.slice(0, i).trim() === "")) && isDigit(s[i + 1]));
  if (!startsDecimal) return null;
  const decimal = readDecimal(s, i);
  if (!decimal.ok) return decimal;

  if (decimal.whole && digitsFrom(s, i) === decimal.end) {
    let next = decimal.end;
    // In 1-3/16 the hyphen holds the number together; it is never a minus.
    if (s[next] === "-") next++;
    else while (s[next] === " ") next++;
    const part = readFraction(s, next);
    if (part && "ok" in part) return part;
    if (part) {
      if (part.n >= part.d)
        return refuse(
          "bad-number",
          next,
          `${s.slice(next, part.end)} is a whole or more. Type the number as one.`,
        );
      return asFraction(Number(s.slice(i, decimal.end)), part);
    }
    if (s[decimal.end] === " " && isDigit(s[decimal.end + 1]) && digitsFrom(s, next) - next === 3)
      return refuse(
        "ambiguous",
        i,
        `${s.slice(i, digitsFrom(s, next))}: one number or two? Type a large number without a space.`,
      );
  }
  return decimal;
}

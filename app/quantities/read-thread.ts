import { exact, exactOf, over, times, toNumber } from "./exact";
import { LONGEST, normalText } from "./normal-text";
import { refuse, type Refusal } from "./refusal";

/**
 * A screw thread as typed. `pitchStated` is false when a metric thread was typed without its pitch:
 * by ISO 965-1 that names the coarse pitch.
 */
export type Thread = Readonly<{
  text: string;
  system: "metric" | "unified";
  diameterMm: number;
  pitchMm: number;
  pitchStated: boolean;
  leftHand: boolean;
}>;

// ISO 261 coarse pitches as printed with the stress areas at tribology-abc.com; M3 and M4 from memory.
const COARSE: Readonly<Record<string, number>> = {
  "3": 0.5,
  "4": 0.7,
  "5": 0.8,
  "6": 1,
  "7": 1,
  "8": 1.25,
  "10": 1.5,
  "12": 1.75,
  "14": 2,
  "16": 2,
  "18": 2.5,
  "20": 2.5,
  "22": 2.5,
  "24": 3,
};

const METRIC =
  /^m ?(\d{1,3}(?:[.,]\d{1,2})?)(?: ?[x×*-] ?(\d{1,2}(?:[.,]\d{1,3})?))?(?: ?-? ?[3-9][a-h](?:[3-9][a-h])?)?( ?-? ?lh| left-hand| left hand)?$/i;
const UNIFIED =
  /^(?:(\d{1,2})[ -])?(\d{1,2})\/(\d{1,2}) ?"? ?(?:-|x| ) ?(\d{1,2}) ?(?:tpi)? ?(?:un|unc|unf|unef|uns|nc|nf|unr|unrc|unrf)?(?: ?-? ?[1-3][ab])?( ?-? ?lh| left-hand| left hand)?$/i;
const WHOLE_INCH =
  /^(\d{1,2}) ?" ?(?:-|x) ?(\d{1,2}) ?(?:tpi)? ?(?:un|unc|unf|unef|uns|nc|nf)?(?: ?-? ?[1-3][ab])?( ?-? ?lh)?$/i;
const NUMBERED =
  /^(?:#|no\.? ?)(\d{1,2}) ?(?:-|x) ?(\d{1,2}) ?(?:tpi)? ?(?:un|unc|unf|unef|uns|nc|nf)?(?: ?-? ?[1-3][ab])?( ?-? ?lh)?$/i;

const INCH_MM = exact("25.4");

/** Reads a thread: "M10x1.25", "M10", "1/2-20 UNF", "1/4-20", "#10-32". Sizes come back in mm. Never throws. */
export function readThread(text: string): { ok: true; thread: Thread } | Refusal {
  if (text.length > LONGEST)
    return refuse("too-long", LONGEST, `That is over ${LONGEST} characters. Type the thread alone.`);
  const s = normalText(text).trim().replace(/ +/g, " ");
  if (s === "") return refuse("empty", 0, "Nothing typed. Type a thread, like M10x1.25 or 1/2-20.");
  const typed = text.trim();

  const metric = METRIC.exec(s);
  if (metric) {
    const size = (metric[1] ?? "").replace(",", ".");
    const pitch = metric[2] ? Number(metric[2].replace(",", ".")) : COARSE[String(Number(size))];
    const diameterMm = Number(size);
    if (pitch === undefined)
      return refuse("no-unit", text.length, `${typed} has no pitch. Type it, like M10x1.25.`);
    if (!(diameterMm > 0) || !(pitch > 0) || pitch >= diameterMm)
      return refuse("bad-number", 0, `${typed} is no thread: the pitch must be smaller than the diameter.`);
    const thread: Thread = {
      text: typed,
      system: "metric",
      diameterMm,
      pitchMm: pitch,
      pitchStated: metric[2] !== undefined,
      leftHand: metric[3] !== undefined,
    };
    return { ok: true, thread };
  }

  const inches = (diameterIn: number, perInch: number, leftHand: boolean) => {
    if (!(diameterIn > 0) || !(perInch > 0) || 1 / perInch >= diameterIn)
      return refuse("bad-number", 0, `${typed} is no thread: check the size and the threads per inch.`);
    const thread: Thread = {
      text: typed,
      system: "unified",
      diameterMm: toNumber(times(exactOf(diameterIn), INCH_MM)),
      pitchMm: toNumber(over(INCH_MM, exactOf(perInch))),
      pitchStated: true,
      leftHand,
    };
    return { ok: true, thread } as const;
  };
  const unified = UNIFIED.exec(s);
  if (unified && Number(unified[3]) > 0)
    return inches(
      Number(unified[1] ?? 0) + Number(unified[2]) / Number(unified[3]),
      Number(unified[4]),
      unified[5] !== undefined,
    );
  const whole = WHOLE_INCH.exec(s);
  if (whole) return inches(Number(whole[1]), Number(whole[2]), whole[3] !== undefined);
  // ASME B1.1: number sizes are 0.060 in + 0.013 in a number.
  const numbered = NUMBERED.exec(s);
  if (numbered)
    return inches((60 + 13 * Number(numbered[1])) / 1000, Number(numbered[2]), numbered[3] !== undefined);
  return refuse(
    "no-number",
    0,
    `“${typed.slice(0, 24)}” is not a thread known here. Type it like M10x1.25 or 1/2-20.`,
  );
}

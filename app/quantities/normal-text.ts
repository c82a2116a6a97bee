/** Longest text that is read as a value. */
export const LONGEST = 200;

const ONE_FOR_ONE: Readonly<Record<string, string>> = {
  "\u2010": "-",
  "\u2011": "-",
  "\u2012": "-",
  "\u2013": "-",
  "\u2014": "-",
  "\u2015": "-",
  "\u2212": "-",
  "\uFE63": "-",
  "\u22C5": "·",
  "\u2022": "·",
  "\u2219": "·",
  "\u30FB": "·",
  "\u2027": "·",
  "\u2715": "×",
  "\u2A2F": "×",
  "\u201C": '"',
  "\u201D": '"',
  "\u2033": '"',
  "\u02DD": '"',
  "\u2018": "'",
  "\u2019": "'",
  "\u2032": "'",
  "\u00B4": "'",
  "\u0060": "'",
  "\u00BA": "°",
  "\u02DA": "°",
  "\u03BC": "µ",
  "\u2126": "Ω",
  "\u2206": "Δ",
  "\u2044": "/",
  "\u2215": "/",
  "\u2264": "≤",
  "\u2A7D": "≤",
  "\u2A7E": "≥",
};

/**
 * The same text with one spelling for each dash, dot, quote, space and full-width character.
 * Every character keeps its place, so a position in the result is a position in what was typed.
 */
export function normalText(text: string): string {
  let out = "";
  for (let i = 0; i < text.length; i++) {
    const c = text[i] ?? "";
    const code = text.charCodeAt(i);
    const mapped = ONE_FOR_ONE[c];
    if (mapped !== undefined) out += mapped;
    else if (code >= 0xff01 && code <= 0xff5e) out += String.fromCharCode(code - 0xfee0);
    else if (code === 0x200b || code === 0xfeff || /\s/.test(c)) out += " ";
    else out += c;
  }
  return out;
}

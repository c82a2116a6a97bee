/**
 * Cue markup: a tag that is closed, or a timestamp. A "<" that starts neither is a sign of the speaker's
 * ("runout < 0.05 mm") and stays, although a browser would drop all that follows it.
 */
const MARKUP = /<\/?[a-z][^<>]*>|<\/>|<\d[\d:.]*\s*>/giu;

/** Character references that captions of the trade use; the first six are those of the WebVTT text. */
const REFERENCES: Readonly<Record<string, string>> = {
  amp: "&",
  lt: "<",
  gt: ">",
  lrm: "\u200e",
  rlm: "\u200f",
  nbsp: "\u00a0",
  quot: '"',
  apos: "'",
  deg: "°",
  plusmn: "±",
  micro: "µ",
  times: "×",
  middot: "·",
  divide: "÷",
  frac12: "½",
  frac14: "¼",
  frac34: "¾",
  ndash: "–",
  mdash: "—",
  hellip: "…",
  lsquo: "‘",
  rsquo: "’",
  ldquo: "“",
  rdquo: "”",
  le: "≤",
  ge: "≥",
  ohm: "Ω",
};

const REFERENCE = /&(?:#(\d{1,7})|#x([0-9a-f]{1,6})|([a-z][a-z\d]{1,9}));/giu;

function character(code: number): string {
  return code > 0 && code <= 0x10ffff && !(code >= 0xd800 && code <= 0xdfff)
    ? String.fromCodePoint(code)
    : "\ufffd";
}

/** What a cue says, without markup; nothing that was said is lost. Line breaks stay. */
export function plainText(cueText: string): string {
  return cueText
    .replace(MARKUP, "")
    .replace(REFERENCE, (whole, decimal?: string, hex?: string, name?: string) => {
      if (decimal !== undefined) return character(Number.parseInt(decimal, 10));
      if (hex !== undefined) return character(Number.parseInt(hex, 16));
      return REFERENCES[name ?? ""] ?? whole;
    });
}

/** Plain words as cue text: what could be read as markup is written out. */
export function escapeCueText(words: string): string {
  return words.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;");
}

/** Raw cue text as it may stand in a file: markup stays, everything else that would break the file is written out. */
export function fileCueText(cueText: string): string {
  let done = "";
  let from = 0;
  for (const found of cueText.matchAll(MARKUP)) {
    done += withoutBareSigns(cueText.slice(from, found.index)) + found[0];
    from = found.index + found[0].length;
  }
  return (done + withoutBareSigns(cueText.slice(from)))
    .replaceAll("\0", "\ufffd")
    .replaceAll("-->", "--&gt;")
    .split(/\r\n|\r|\n/)
    .filter((line) => line !== "")
    .join("\n");
}

function withoutBareSigns(text: string): string {
  return text
    .replace(/&(?!#\d{1,7};|#x[0-9a-f]{1,6};|[a-z][a-z\d]{1,9};)/giu, "&amp;")
    .replaceAll("<", "&lt;");
}

/** True when a browser would drop words of this cue, because a bare "<" stands in it. */
export function losesWordsInBrowser(cueText: string): boolean {
  return cueText.replace(MARKUP, "").includes("<");
}

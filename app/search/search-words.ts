import { SPELLINGS } from "./trade-words";

const KEEP_S = /(?:ss|us|is|abs|gas|chassis)$/;

function singular(word: string): string {
  if (word.length < 4 || KEEP_S.test(word)) return word;
  if (word.endsWith("ies")) return `${word.slice(0, -3)}y`;
  if (/(?:ch|sh|x)es$/.test(word)) return word.slice(0, -2);
  return word.endsWith("s") ? word.slice(0, -1) : word;
}

/** A word as it is written, without accents, capitals and plural. */
export function plainWord(word: string): string {
  return singular(word.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase());
}

/** A word as the index and the query both see it. */
export function searchWord(word: string): string {
  const plain = plainWord(word);
  return Object.hasOwn(SPELLINGS, plain) ? (SPELLINGS[plain] as string) : plain;
}

/** The words of a text: letters and digits, nothing else. At most 60, so that a hostile text costs nothing. */
export function searchWords(text: string): string[] {
  const found = text.slice(0, 2000).match(/[\p{L}\p{N}]+(?:[.,][0-9]+)?/gu) ?? [];
  return found.slice(0, 60).map(searchWord);
}

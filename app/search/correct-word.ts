/**
 * How many slips of the finger are between two words: a letter too many, too few, another one, or two neighbours
 * swapped. Stops counting above `most` and returns `most + 1`. Optimal string alignment distance (restricted
 * Damerau–Levenshtein).
 */
export function slips(a: string, b: string, most: number): number {
  if (Math.abs(a.length - b.length) > most) return most + 1;
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, n) => n);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const other = a[i - 1] === b[j - 1] ? 0 : 1;
      let least = Math.min((last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (last[j - 1] ?? 0) + other);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        least = Math.min(least, (before[j - 2] ?? 0) + 1);
      row.push(least);
    }
    if (Math.min(...row) > most) return most + 1;
    before = last;
    last = row;
  }
  return last[b.length] ?? most + 1;
}

/** Short words are too near each other to be guessed; the first letter is seldom the slip. */
const mostSlips = (word: string) => (word.length < 4 ? 0 : word.length < 8 ? 1 : 2);

/** The word of the list that was most likely meant, or null. Of equally near ones the more frequent. */
export function correctWord(word: string, known: ReadonlyMap<string, number>): string | null {
  const most = /\d/.test(word) ? 0 : mostSlips(word);
  if (most === 0) return null;
  let best: { word: string; slips: number; count: number } | null = null;
  for (const [candidate, count] of known) {
    if (candidate[0] !== word[0] || candidate.length < 3) continue;
    const found = slips(word, candidate, most);
    if (found > most) continue;
    if (!best || found < best.slips || (found === best.slips && count > best.count))
      best = { word: candidate, slips: found, count };
  }
  return best?.word ?? null;
}

/** A word that was run together out of two known ones: "drainplug". Null where it was not. */
export function splitWord(word: string, known: (part: string) => boolean): [string, string] | null {
  for (let at = 3; at <= word.length - 3; at += 1) {
    const [head, tail] = [word.slice(0, at), word.slice(at)];
    if (known(head) && known(tail)) return [head, tail];
  }
  return null;
}

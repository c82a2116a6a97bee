function pad(n: number): string {
  return String(n).padStart(2, "0");
}

/** Milliseconds as a shop says them: 83500 → "1:23", 3_723_000 → "1:02:03". */
export function formatTimecode(ms: number): string {
  const seconds = Math.max(0, Math.floor(ms / 1000));
  const h = Math.floor(seconds / 3600);
  const m = Math.floor(seconds / 60) % 60;
  return h > 0 ? `${h}:${pad(m)}:${pad(seconds % 60)}` : `${m}:${pad(seconds % 60)}`;
}

/** Reads "1:23", "1:02:03", "83", "83.5" or "1:23.5" to ms; null for anything else. */
export function readTimecode(text: string): number | null {
  const found = /^(?:(?:(\d{1,2}):)?(\d{1,3}):)?(\d{1,6})(?:[.,](\d{1,3}))?$/.exec(text.trim());
  if (!found) return null;
  const [, h, m, s, f] = found;
  if (m !== undefined && Number(s) > 59) return null;
  if (h !== undefined && Number(m) > 59) return null;
  return (Number(h ?? 0) * 3600 + Number(m ?? 0) * 60 + Number(s)) * 1000 + Number((f ?? "0").padEnd(3, "0"));
}

/** The moment in an address: ?t=83.5 (seconds) → 83500; 0 when absent or not a number. */
export function readMoment(search: URLSearchParams): number {
  const t = Number(search.get("t"));
  return Number.isFinite(t) && t > 0 ? Math.round(t * 1000) : 0;
}

/** ms as the number of seconds for ?t=, without needless decimals. */
export function momentParam(ms: number): string {
  return String(Math.round(ms / 100) / 10);
}

/** Like `formatTimecode`, with as many decimals as the moment needs, so that it reads back exactly: 764350 → "12:44.35". */
export function formatExactTimecode(ms: number): string {
  const whole = Math.max(0, Math.round(ms));
  const rest = whole % 1000;
  return formatTimecode(whole) + (rest === 0 ? "" : `.${String(rest).padStart(3, "0").replace(/0+$/, "")}`);
}

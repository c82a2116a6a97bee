/** A moment as the shop reads it: "12 Nov 2026, 14:05". The same on server and phone. */
export function localTime(at: number, timeZone: string): string {
  const parts = new Intl.DateTimeFormat("en-GB", {
    timeZone,
    day: "numeric",
    month: "short",
    year: "numeric",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  }).formatToParts(at);
  const part = (type: string) => parts.find((found) => found.type === type)?.value ?? "";
  return `${part("day")} ${part("month").slice(0, 3)} ${part("year")}, ${part("hour")}:${part("minute")}`;
}

/** Its day alone: "12 Nov 2026". */
export function localDay(at: number, timeZone: string): string {
  return localTime(at, timeZone).split(",")[0] ?? "";
}

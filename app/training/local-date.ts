/** A local date of a shop, "2026-11-12": compares as text, knows no hours. */
export type LocalDate = string;

const SHAPE = /^(\d{4})-(\d{2})-(\d{2})$/;

/** The date on the wall calendar of a time zone at a moment (ms since 1970 UTC). */
export function localDateAt(now: number, timeZone: string): LocalDate {
  const parts = new Intl.DateTimeFormat("en-US", {
    timeZone,
    year: "numeric",
    month: "2-digit",
    day: "2-digit",
  }).formatToParts(now);
  const part = (type: string) => parts.find((found) => found.type === type)?.value ?? "";
  return `${part("year")}-${part("month")}-${part("day")}`;
}

/** Reads a date as an input of type date sends it; null when there is no such day. */
export function readLocalDate(text: string): LocalDate | null {
  const found = SHAPE.exec(text.trim());
  if (!found) return null;
  const day = new Date(`${found[0]}T00:00:00Z`);
  return !Number.isNaN(day.getTime()) && day.toISOString().startsWith(found[0]) ? found[0] : null;
}

/** The date so many days later (or earlier, for a negative number). */
export function daysLater(date: LocalDate, days: number): LocalDate {
  return new Date(Date.parse(`${date}T00:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);
}

/** Whole days from one date to another. */
export function daysBetween(from: LocalDate, to: LocalDate): number {
  return Math.round((Date.parse(`${to}T00:00:00Z`) - Date.parse(`${from}T00:00:00Z`)) / 86_400_000);
}

const MONTHS = ["Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"];
const DAYS = ["Sun", "Mon", "Tue", "Wed", "Thu", "Fri", "Sat"];

/** "Thu 12 Nov 2026": unambiguous in every country, the same on server and phone. */
export function formatLocalDate(date: LocalDate, weekday = true): string {
  const found = SHAPE.exec(date);
  if (!found) return date;
  const [, year, month, day] = found;
  const name = DAYS[new Date(`${date}T00:00:00Z`).getUTCDay()];
  return `${weekday ? `${name} ` : ""}${Number(day)} ${MONTHS[Number(month) - 1]} ${year}`;
}

/** How a due date reads today: "due today", "overdue by 3 days", "due Thu 12 Nov 2026". */
export function dueWords(dueOn: LocalDate, today: LocalDate): string {
  const days = daysBetween(today, dueOn);
  if (days < 0) return `overdue by ${-days} ${days === -1 ? "day" : "days"}`;
  if (days === 0) return "due today";
  return days === 1 ? "due tomorrow" : `due ${formatLocalDate(dueOn)}`;
}

import { expect, test } from "vitest";
import { daysBetween, daysLater, dueWords, formatLocalDate, localDateAt, readLocalDate } from "./local-date";

test("one moment is two dates on either side of the date line", () => {
  const moment = Date.UTC(2026, 10, 12, 11, 30);
  expect(localDateAt(moment, "Pacific/Auckland")).toBe("2026-11-13");
  expect(localDateAt(moment, "America/Chicago")).toBe("2026-11-12");
});

test("midnight belongs to the new day, also when the clocks change", () => {
  // Chicago left daylight saving time on 1 November 2026 at 02:00 (US rule: first Sunday of November).
  expect(localDateAt(Date.UTC(2026, 10, 1, 4, 59), "America/Chicago")).toBe("2026-10-31");
  expect(localDateAt(Date.UTC(2026, 10, 1, 5, 0), "America/Chicago")).toBe("2026-11-01");
  expect(localDateAt(Date.UTC(2026, 10, 2, 5, 59), "America/Chicago")).toBe("2026-11-01");
  expect(localDateAt(Date.UTC(2026, 10, 2, 6, 0), "America/Chicago")).toBe("2026-11-02");
});

test("a day that is not in the calendar is no date", () => {
  expect(readLocalDate("2026-02-29")).toBeNull();
  expect(readLocalDate("2028-02-29")).toBe("2028-02-29");
  expect(readLocalDate("12/11/2026")).toBeNull();
  expect(readLocalDate("")).toBeNull();
});

test("days are counted over months and years", () => {
  expect(daysLater("2026-12-31", 1)).toBe("2027-01-01");
  expect(daysBetween("2026-11-01", "2026-10-31")).toBe(-1);
  expect(daysBetween("2026-02-28", "2026-03-01")).toBe(1);
});

test("a due date reads as a person says it", () => {
  expect(dueWords("2026-11-12", "2026-11-12")).toBe("due today");
  expect(dueWords("2026-11-12", "2026-11-13")).toBe("overdue by 1 day");
  expect(dueWords("2026-11-20", "2026-11-12")).toBe("due Fri 20 Nov 2026");
  expect(formatLocalDate("2026-11-12")).toBe("Thu 12 Nov 2026");
});

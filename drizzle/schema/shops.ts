import { integer, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { at, id } from "./columns";

/** A repair shop: everything else belongs to exactly one. */
export const shops = sqliteTable("shops", {
  id: id<"shop">(),
  name: text().notNull(),
  country: text({ enum: ["US", "GB", "IE", "AU", "NZ", "CA", "ZA", "IN", "EU"] })
    .notNull()
    .default("US"),
  timeZone: text().notNull().default("America/Chicago"),
  /** Which unit comes first for people who have not chosen. */
  preferredUnits: text({ enum: ["metric", "inch"] })
    .notNull()
    .default("inch"),
  /** Fraction of questions that must be right. */
  passMark: real().notNull().default(0.8),
  /** Fraction of a lesson that counts as seen. */
  watchThreshold: real().notNull().default(0.9),
  /** How many jobs shown on different days fill the third slot. */
  shownJobs: integer().notNull().default(2),
  createdAt: at().notNull(),
});

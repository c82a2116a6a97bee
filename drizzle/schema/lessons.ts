import { foreignKey, index, integer, primaryKey, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { shops } from "./shops";
import { users } from "./users";
import { vehicles } from "./vehicles";

export const SYSTEMS = [
  "steering",
  "suspension",
  "brakes",
  "wheels",
  "engine",
  "cooling",
  "fuel",
  "electrical",
  "high-voltage",
  "restraint",
  "air-conditioning",
  "driveline",
  "body",
  "workshop",
] as const;

/** The training unit. These rows are the draft; learners read revisions. */
export const lessons = sqliteTable(
  "lessons",
  {
    id: id<"lesson">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    title: text().notNull(),
    summary: text().notNull().default(""),
    system: text({ enum: SYSTEMS }).notNull(),
    /** Front, rear, upper, lower … as words; empty when it does not matter. */
    position: text().notNull().default(""),
    /** Optimistic lock: every change of the draft adds one. */
    version: integer().notNull().default(1),
    /** Number of the newest revision; null while never published. */
    newestRevision: integer(),
    createdBy: idOf<"user">().notNull(),
    createdAt: at().notNull(),
    changedAt: at().notNull(),
    withdrawnAt: at(),
  },
  (t) => [
    unique("lessons_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.createdBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("lessons_shop").on(t.shopId, t.system),
  ],
);

/** Which vehicles a lesson applies to; none means any vehicle (a general technique). */
export const lessonVehicles = sqliteTable(
  "lesson_vehicles",
  {
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    vehicleId: idOf<"vehicle">().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.lessonId, t.vehicleId] }),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "cascade",
    ),
    foreignKey({ columns: [t.shopId, t.vehicleId], foreignColumns: [vehicles.shopId, vehicles.id] }).onDelete(
      "restrict",
    ),
    index("lesson_vehicles_vehicle").on(t.vehicleId),
  ],
);

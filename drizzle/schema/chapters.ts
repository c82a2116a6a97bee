import { check, foreignKey, index, integer, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { sql } from "drizzle-orm";
import { id, idOf, shopId } from "./columns";
import { lessons } from "./lessons";
import { recordings } from "./recordings";

export const PHASES = ["prepare", "remove", "inspect", "install", "verify"] as const;

/** A stretch of a recording with a title and a phase. Ids live on through revisions. */
export const chapters = sqliteTable(
  "chapters",
  {
    id: id<"chapter">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    recordingId: idOf<"recording">().notNull(),
    startMs: integer().notNull(),
    endMs: integer().notNull(),
    title: text().notNull(),
    /** Null until a person names it; the publish gate stops on a chapter without one. */
    phase: text({ enum: PHASES }),
    state: text({ enum: ["pencilled", "inked"] })
      .notNull()
      .default("inked"),
  },
  (t) => [
    unique("chapters_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "cascade",
    ),
    foreignKey({
      columns: [t.shopId, t.recordingId],
      foreignColumns: [recordings.shopId, recordings.id],
    }).onDelete("restrict"),
    index("chapters_lesson").on(t.lessonId, t.startMs),
    check("chapters_forward", sql`${t.endMs} > ${t.startMs}`),
  ],
);

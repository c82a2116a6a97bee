import { foreignKey, index, integer, sqliteTable, unique } from "drizzle-orm/sqlite-core";
import { id, idOf, shopId } from "./columns";
import { lessons } from "./lessons";
import { recordings } from "./recordings";

/** A stretch of one recording in a lesson's order. Times are in the file; the file itself is never cut. */
export const clips = sqliteTable(
  "clips",
  {
    id: id<"clip">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    recordingId: idOf<"recording">().notNull(),
    n: integer().notNull(),
    inMs: integer().notNull(),
    outMs: integer().notNull(),
  },
  (t) => [
    unique("clips_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "cascade",
    ),
    foreignKey({
      columns: [t.shopId, t.recordingId],
      foreignColumns: [recordings.shopId, recordings.id],
    }).onDelete("restrict"),
    index("clips_lesson").on(t.lessonId, t.n),
    index("clips_recording").on(t.recordingId),
  ],
);

/** A stretch inside a clip that the player skips. */
export const clipCuts = sqliteTable(
  "clip_cuts",
  {
    id: id<"clipCut">(),
    shopId: shopId(),
    clipId: idOf<"clip">().notNull(),
    fromMs: integer().notNull(),
    toMs: integer().notNull(),
  },
  (t) => [
    foreignKey({ columns: [t.shopId, t.clipId], foreignColumns: [clips.shopId, clips.id] }).onDelete(
      "cascade",
    ),
    index("clip_cuts_clip").on(t.clipId),
  ],
);

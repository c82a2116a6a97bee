import { check, foreignKey, index, integer, sqliteTable } from "drizzle-orm/sqlite-core";
import { sql } from "drizzle-orm";
import { at, id, idOf, shopId } from "./columns";
import { lessons } from "./lessons";
import { recordings } from "./recordings";
import { revisions } from "./revisions";
import { users } from "./users";

/** A stretch of a recording that a person played, in the file's time. Append-only. */
export const watchedStretches = sqliteTable(
  "watched_stretches",
  {
    id: id<"watchedStretch">(),
    shopId: shopId(),
    userId: idOf<"user">().notNull(),
    lessonId: idOf<"lesson">().notNull(),
    revisionId: idOf<"revision">().notNull(),
    recordingId: idOf<"recording">().notNull(),
    fromMs: integer().notNull(),
    toMs: integer().notNull(),
    at: at().notNull(),
  },
  (t) => [
    foreignKey({ columns: [t.shopId, t.userId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({
      columns: [t.shopId, t.revisionId],
      foreignColumns: [revisions.shopId, revisions.id],
    }).onDelete("restrict"),
    foreignKey({
      columns: [t.shopId, t.recordingId],
      foreignColumns: [recordings.shopId, recordings.id],
    }).onDelete("restrict"),
    index("watched_stretches_user").on(t.userId, t.lessonId, t.at),
    index("watched_stretches_lesson").on(t.lessonId),
    check("watched_stretches_forward", sql`${t.toMs} > ${t.fromMs}`),
  ],
);

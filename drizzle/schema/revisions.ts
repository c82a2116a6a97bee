import { foreignKey, index, integer, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { lessons } from "./lessons";
import { users } from "./users";

/** An immutable published state of a lesson. Append-only. */
export const revisions = sqliteTable(
  "revisions",
  {
    id: id<"revision">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    n: integer().notNull(),
    /** Number of the snapshot's format, so old ones stay readable. */
    format: integer().notNull(),
    snapshot: text().notNull(),
    note: text().notNull().default(""),
    publishedBy: idOf<"user">().notNull(),
    publishedAt: at().notNull(),
  },
  (t) => [
    unique("revisions_shop_and_id").on(t.shopId, t.id),
    unique("revisions_lesson_and_n").on(t.lessonId, t.n),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.publishedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("revisions_shop").on(t.shopId, t.publishedAt),
  ],
);

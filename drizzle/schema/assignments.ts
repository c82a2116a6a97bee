import { sql } from "drizzle-orm";
import { foreignKey, index, sqliteTable, text, unique, uniqueIndex } from "drizzle-orm/sqlite-core";
import { at, id, idOf, localDate, shopId } from "./columns";
import { lessons } from "./lessons";
import { users } from "./users";

export const assignments = sqliteTable(
  "assignments",
  {
    id: id<"assignment">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    userId: idOf<"user">().notNull(),
    assignedBy: idOf<"user">().notNull(),
    dueOn: localDate().notNull(),
    note: text().notNull().default(""),
    createdAt: at().notNull(),
    withdrawnAt: at(),
  },
  (t) => [
    unique("assignments_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.userId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.assignedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    uniqueIndex("assignments_open")
      .on(t.lessonId, t.userId)
      .where(sql`withdrawn_at is null`),
    index("assignments_user").on(t.userId),
    index("assignments_shop").on(t.shopId, t.dueOn),
  ],
);

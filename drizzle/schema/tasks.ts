import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { at, id, shopId } from "./columns";
import { shops } from "./shops";

/** Background work, written in the transaction that causes it. */
export const tasks = sqliteTable(
  "tasks",
  {
    id: id<"task">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    kind: text().notNull(),
    payload: text({ mode: "json" }).notNull(),
    /** The same work asked for twice is one row. */
    dedupeKey: text().unique(),
    runAt: at().notNull(),
    attempts: integer().notNull().default(0),
    leaseUntil: at(),
    lastError: text(),
    createdAt: at().notNull(),
    doneAt: at(),
    /** Given up after too many tries; the owner sees it. */
    failedAt: at(),
  },
  (t) => [index("tasks_due").on(t.doneAt, t.failedAt, t.runAt), index("tasks_shop").on(t.shopId, t.failedAt)],
);

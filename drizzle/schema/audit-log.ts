import { index, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { shops } from "./shops";

/** Who did what, when. Append-only. */
export const auditLog = sqliteTable(
  "audit_log",
  {
    id: id<"auditRow">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    /** Null: done by the program itself, named in `actor`. */
    userId: idOf<"user">(),
    actor: text().notNull(),
    action: text().notNull(),
    noun: text().notNull(),
    nounId: text().notNull().default(""),
    detail: text().notNull().default(""),
    at: at().notNull(),
  },
  (t) => [index("audit_log_shop").on(t.shopId, t.at)],
);

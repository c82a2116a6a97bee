import { foreignKey, index, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { users } from "./users";

/** One signed-in device. Only a hash of the cookie's secret is kept. */
export const sessions = sqliteTable(
  "sessions",
  {
    id: id<"session">(),
    shopId: shopId(),
    userId: idOf<"user">().notNull(),
    tokenHash: text().notNull().unique(),
    device: text().notNull().default(""),
    createdAt: at().notNull(),
    lastSeenAt: at().notNull(),
    expiresAt: at().notNull(),
  },
  (t) => [
    foreignKey({ columns: [t.shopId, t.userId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "cascade",
    ),
    index("sessions_user").on(t.userId),
  ],
);

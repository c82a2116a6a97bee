import { foreignKey, index, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { users } from "./users";

export const passwordResets = sqliteTable(
  "password_resets",
  {
    id: id<"passwordReset">(),
    shopId: shopId(),
    userId: idOf<"user">().notNull(),
    tokenHash: text().notNull().unique(),
    createdAt: at().notNull(),
    expiresAt: at().notNull(),
    usedAt: at(),
  },
  (t) => [
    foreignKey({ columns: [t.shopId, t.userId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "cascade",
    ),
    index("password_resets_user").on(t.userId),
  ],
);

import { foreignKey, index, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { users } from "./users";

export const invitations = sqliteTable(
  "invitations",
  {
    id: id<"invitation">(),
    shopId: shopId(),
    email: text().notNull(),
    name: text().notNull(),
    role: text({ enum: ["trainee", "instructor", "owner"] }).notNull(),
    tokenHash: text().notNull().unique(),
    invitedBy: idOf<"user">().notNull(),
    createdAt: at().notNull(),
    sentAt: at().notNull(),
    expiresAt: at().notNull(),
    acceptedAt: at(),
    withdrawnAt: at(),
  },
  (t) => [
    unique("invitations_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.invitedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("invitations_email").on(t.shopId, t.email),
  ],
);

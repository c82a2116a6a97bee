import { sql } from "drizzle-orm";
import { index, sqliteTable, text, unique, uniqueIndex } from "drizzle-orm/sqlite-core";
import { at, flag, id, shopId } from "./columns";
import { shops } from "./shops";

export const users = sqliteTable(
  "users",
  {
    id: id<"user">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    /** Lower case; unique over all shops among those who have not left. */
    email: text().notNull(),
    name: text().notNull(),
    role: text({ enum: ["trainee", "instructor", "owner"] }).notNull(),
    passwordHash: text().notNull(),
    /** Null: the shop's preference. */
    preferredUnits: text({ enum: ["metric", "inch"] }),
    mailAssignments: flag().notNull().default(true),
    mailQuestions: flag().notNull().default(true),
    createdAt: at().notNull(),
    /** Kept here because a session that ended is gone. */
    lastSeenAt: at(),
    /** A person who leaves keeps a row: records point to it. */
    leftAt: at(),
    pseudonymisedAt: at(),
  },
  (t) => [
    unique("users_shop_and_id").on(t.shopId, t.id),
    index("users_shop").on(t.shopId, t.leftAt),
    // Who leaves a shop takes the address along: it may join or found another.
    uniqueIndex("users_email")
      .on(t.email)
      .where(sql`${t.leftAt} is null`),
  ],
);

import { index, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { at, id, shopId } from "./columns";
import { shops } from "./shops";

/** A mail, written before it is sent; its Message-ID never changes, so a repeat is recognised. */
export const outbox = sqliteTable(
  "outbox",
  {
    id: id<"mail">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    messageId: text().notNull().unique(),
    recipient: text().notNull(),
    subject: text().notNull(),
    text: text().notNull(),
    createdAt: at().notNull(),
    sentAt: at(),
  },
  (t) => [index("outbox_shop").on(t.shopId, t.createdAt)],
);

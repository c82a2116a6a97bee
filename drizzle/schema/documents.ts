import { foreignKey, index, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, localDate, shopId } from "./columns";
import { shops } from "./shops";
import { users } from "./users";

export const SOURCE_KINDS = ["maker", "part-maker", "standard", "bulletin", "shop-practice"] as const;

/** A document of the shop that values are read from. The pages themselves are never stored. */
export const documents = sqliteTable(
  "documents",
  {
    id: id<"document">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    kind: text({ enum: SOURCE_KINDS }).notNull(),
    title: text().notNull(),
    edition: text().notNull().default(""),
    dated: text().notNull().default(""),
    createdAt: at().notNull(),
  },
  (t) => [unique("documents_shop_and_id").on(t.shopId, t.id), index("documents_shop").on(t.shopId, t.title)],
);

/** One place in a document, read on a day by a person. */
export const citations = sqliteTable(
  "citations",
  {
    id: id<"citation">(),
    shopId: shopId(),
    documentId: idOf<"document">().notNull(),
    /** Page or section, as printed. */
    place: text().notNull().default(""),
    readOn: localDate().notNull(),
    readBy: idOf<"user">(),
    createdAt: at().notNull(),
  },
  (t) => [
    unique("citations_shop_and_id").on(t.shopId, t.id),
    foreignKey({
      columns: [t.shopId, t.documentId],
      foreignColumns: [documents.shopId, documents.id],
    }).onDelete("restrict"),
    foreignKey({ columns: [t.shopId, t.readBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("citations_document").on(t.documentId),
  ],
);

import { index, integer, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, shopId } from "./columns";
import { shops } from "./shops";

export const vehicles = sqliteTable(
  "vehicles",
  {
    id: id<"vehicle">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    make: text().notNull(),
    model: text().notNull(),
    yearFrom: integer(),
    yearTo: integer(),
    engine: text().notNull().default(""),
    drive: text().notNull().default(""),
    createdAt: at().notNull(),
  },
  (t) => [
    unique("vehicles_shop_and_id").on(t.shopId, t.id),
    index("vehicles_shop").on(t.shopId, t.make, t.model),
  ],
);

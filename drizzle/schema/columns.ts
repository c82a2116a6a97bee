import { integer, text } from "drizzle-orm/sqlite-core";
import { ulid } from "ulid";
import type { Id, ShopId } from "./ids";

// Functions, because .notNull() and friends change the very builder they are called on.

export const id = <Noun extends string>() =>
  text()
    .primaryKey()
    .$type<Id<Noun>>()
    .$defaultFn(() => ulid() as Id<Noun>);

export const shopId = () => text().notNull().$type<ShopId>();

/** A reference to a parent of the same shop; the table adds the foreign key over (shop_id, this column). */
export const idOf = <Noun extends string>() => text().$type<Id<Noun>>();

/** Milliseconds since 1970 UTC. */
export const at = () => integer({ mode: "number" });

/** A local date of the shop, "2026-11-12". */
export const localDate = () => text();

export const flag = () => integer({ mode: "boolean" });

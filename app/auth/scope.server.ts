import type { Database } from "~/db.server";
import type { ShopId, UserId } from "#drizzle/schema/ids";
import type { Role } from "./permissions";

/** What a signed-in request may touch. Rooms take a Scope, so no query can forget its shop. */
export type Scope = Readonly<{ db: Database; shopId: ShopId; userId: UserId; role: Role }>;

/** A background task: a shop, no person; `by` is its name in the audit log. */
export type ShopScope = Readonly<{ db: Database; shopId: ShopId; by: string }>;

/** Nobody signed in: sign-up, sign-in, reset, invitation. */
export type Anonymous = Readonly<{ db: Database }>;

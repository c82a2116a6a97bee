import { and, eq } from "drizzle-orm";
import { users } from "#drizzle/schema/index";
import type { Scope } from "./scope.server";

export function setUnits(scope: Scope, units: "metric" | "inch"): void {
  scope.db
    .update(users)
    .set({ preferredUnits: units })
    .where(and(eq(users.shopId, scope.shopId), eq(users.id, scope.userId)))
    .run();
}

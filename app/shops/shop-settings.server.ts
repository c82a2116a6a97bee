import { eq } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction } from "~/db.server";
import { shops } from "#drizzle/schema/index";

export type ShopSettings = Pick<
  typeof shops.$inferSelect,
  "name" | "country" | "timeZone" | "preferredUnits" | "passMark" | "watchThreshold" | "shownJobs"
>;

export function loadShop(scope: Scope): ShopSettings {
  const shop = scope.db.select().from(shops).where(eq(shops.id, scope.shopId)).get();
  if (!shop) throw new Error("a scope needs its shop");
  const { name, country, timeZone, preferredUnits, passMark, watchThreshold, shownJobs } = shop;
  return { name, country, timeZone, preferredUnits, passMark, watchThreshold, shownJobs };
}

export function saveShop(scope: Scope, settings: ShopSettings, now: number): void {
  inTransaction(scope, (scope) => {
    const before = loadShop(scope);
    const changed = (Object.keys(settings) as (keyof ShopSettings)[]).filter(
      (name) => settings[name] !== before[name],
    );
    if (changed.length === 0) return;
    scope.db.update(shops).set(settings).where(eq(shops.id, scope.shopId)).run();
    writeAudit(
      scope,
      {
        action: "changed settings of",
        noun: "shop",
        nounId: scope.shopId,
        detail: changed.map((name) => `${name}: ${before[name]} → ${settings[name]}`).join("; "),
      },
      now,
    );
  });
}

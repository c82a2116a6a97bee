import { eq } from "drizzle-orm";
import { inTransaction } from "~/db.server";
import type { UserId } from "#drizzle/schema/ids";
import { shops, users } from "#drizzle/schema/index";
import { COUNTRIES, type ShopCountry } from "~/shops/country";
import { hashPassword, PASSWORD_COST } from "./password.server";
import type { Anonymous } from "./scope.server";
import { writeAudit } from "./write-audit.server";

export type SignUp = {
  shopName: string;
  country: ShopCountry;
  timeZone: string;
  name: string;
  email: string;
  password: string;
};

/** Creates a shop and its owner, or says that the address is taken. Nothing is half-written. */
export async function signUp(
  from: Anonymous,
  order: SignUp,
  now: number,
  cost = PASSWORD_COST,
): Promise<{ ok: true; userId: UserId } | { ok: false; sentence: string }> {
  const passwordHash = await hashPassword(order.password, cost);
  return inTransaction(from, (from) => {
    if (from.db.select({ id: users.id }).from(users).where(eq(users.email, order.email)).get())
      return { ok: false as const, sentence: "That e-mail already has an account. Sign in, or use another." };
    const { id: shopId } = from.db
      .insert(shops)
      .values({
        name: order.shopName,
        country: order.country,
        timeZone: order.timeZone,
        preferredUnits: COUNTRIES[order.country].units,
        createdAt: now,
      })
      .returning({ id: shops.id })
      .get();
    const { id: userId } = from.db
      .insert(users)
      .values({ shopId, email: order.email, name: order.name, role: "owner", passwordHash, createdAt: now })
      .returning({ id: users.id })
      .get();
    writeAudit(
      { db: from.db, shopId, userId, role: "owner" },
      { action: "created", noun: "shop", nounId: shopId },
      now,
    );
    return { ok: true as const, userId };
  });
}

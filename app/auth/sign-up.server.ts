import { and, eq, isNull } from "drizzle-orm";
import { inTransaction, type Database } from "~/db.server";
import type { UserId } from "#drizzle/schema/ids";
import { shops, users } from "#drizzle/schema/index";
import { COUNTRIES, type ShopCountry } from "~/shops/country";
import { hashPassword, PASSWORD_COST, passwordFits } from "./password.server";
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

const TAKEN = "That e-mail already has an account. Sign in, or use another.";
const SAME_FORM_MS = 60_000;

function holderOf(db: Database, email: string) {
  return db
    .select({ user: users, shopName: shops.name })
    .from(users)
    .innerJoin(shops, eq(shops.id, users.shopId))
    .where(and(eq(users.email, email), isNull(users.leftAt)))
    .get();
}

/** The same form sent twice (a double press, a lost answer) is one shop; any other order for a taken address is refused. */
async function whenTaken(
  { user, shopName }: NonNullable<ReturnType<typeof holderOf>>,
  order: SignUp,
  now: number,
): Promise<{ ok: true; userId: UserId } | { ok: false; sentence: string }> {
  const repeated =
    now - user.createdAt < SAME_FORM_MS &&
    user.role === "owner" &&
    user.name === order.name &&
    shopName === order.shopName &&
    (await passwordFits(order.password, user.passwordHash));
  return repeated ? { ok: true, userId: user.id } : { ok: false, sentence: TAKEN };
}

/** Creates a shop and its owner, or says that the address is taken. Nothing is half-written. */
export async function signUp(
  from: Anonymous,
  order: SignUp,
  now: number,
  cost = PASSWORD_COST,
): Promise<{ ok: true; userId: UserId } | { ok: false; sentence: string }> {
  const before = holderOf(from.db, order.email);
  if (before) return whenTaken(before, order, now);
  const passwordHash = await hashPassword(order.password, cost);
  const made = inTransaction(from, (from) => {
    const meanwhile = holderOf(from.db, order.email);
    if (meanwhile) return { ok: false as const, meanwhile };
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
  return made.ok ? made : whenTaken(made.meanwhile, order, now);
}

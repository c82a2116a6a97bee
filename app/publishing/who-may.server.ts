import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import { can, ROLES, type Permission } from "~/auth/permissions";
import type { Scope } from "~/auth/scope.server";
import type { UserId } from "#drizzle/schema/ids";
import { users } from "#drizzle/schema/index";

export type ShopPerson = Readonly<{ id: UserId; name: string; email: string }>;

/** Everybody on the team who has this right, by name. */
export function whoMay(scope: Pick<Scope, "db" | "shopId">, permission: Permission): ShopPerson[] {
  return scope.db
    .select({ id: users.id, name: users.name, email: users.email })
    .from(users)
    .where(
      and(
        eq(users.shopId, scope.shopId),
        isNull(users.leftAt),
        inArray(
          users.role,
          ROLES.filter((role) => can(role, permission)),
        ),
      ),
    )
    .orderBy(asc(users.name))
    .all();
}

/** One person of the team; undefined when gone or of another shop. */
export function teamMember(scope: Pick<Scope, "db" | "shopId">, userId: UserId): ShopPerson | undefined {
  return scope.db
    .select({ id: users.id, name: users.name, email: users.email })
    .from(users)
    .where(and(eq(users.shopId, scope.shopId), eq(users.id, userId), isNull(users.leftAt)))
    .get();
}

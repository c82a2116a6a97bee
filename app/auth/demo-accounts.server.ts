import { inArray } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { Env } from "~/env.server";
import { users } from "#drizzle/schema/index";

/** Accounts whose password stands in the documentation. */
const DEMO_ACCOUNTS = [
  "owner@harrowlane.example",
  "instructor@harrowlane.example",
  "trainee@harrowlane.example",
  "owner@northgate.example",
];

/** Production with well-known passwords in it would be an open door: throws with what to do. */
export function refuseDemoAccounts(
  db: Database,
  { NODE_ENV, ALLOW_DEMO_ACCOUNTS }: Pick<Env, "NODE_ENV" | "ALLOW_DEMO_ACCOUNTS">,
): void {
  if (ALLOW_DEMO_ACCOUNTS === "yes" || NODE_ENV !== "production") return;
  if (db.select({ id: users.id }).from(users).where(inArray(users.email, DEMO_ACCOUNTS)).get())
    throw new Error(
      "This database holds the demo accounts, whose password everybody knows. Start with a database of your own.",
    );
}

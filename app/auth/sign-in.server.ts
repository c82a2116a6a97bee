import { and, eq, isNull } from "drizzle-orm";
import { RateLimiterMemory } from "rate-limiter-flexible";
import { Authenticator } from "remix-auth";
import { FormStrategy } from "remix-auth-form";
import { users } from "#drizzle/schema/index";
import type { UserId } from "#drizzle/schema/ids";
import { passwordFits } from "./password.server";
import type { Anonymous } from "./scope.server";

// Per address tried, forgotten when the right password comes: guessing is slowed, a forgotten password is not punished for long.
const tries = new RateLimiterMemory({ points: 10, duration: 15 * 60 });

/** Opens the door again for an address, after its password was reset. */
export async function forgetTries(email: string): Promise<void> {
  await tries.delete(email);
}

export class SignInRefused extends Error {}

const REFUSED = "That e-mail and password do not fit together. Check both, or reset the password.";
const TOO_MANY = "Too many tries for this e-mail. Wait 15 minutes, or reset the password.";

/** The form strategy over our users; it throws SignInRefused with a sentence. */
export function signInAuthenticator(from: Anonymous): Authenticator<UserId> {
  const authenticator = new Authenticator<UserId>();
  authenticator.use(
    new FormStrategy(async ({ form }) => {
      const email = String(form.get("email") ?? "")
        .trim()
        .toLowerCase();
      const password = String(form.get("password") ?? "");
      // Counted before the password is looked at, so that many tries at the same moment count too.
      await tries.consume(email).catch(() => {
        throw new SignInRefused(TOO_MANY);
      });
      const user = from.db
        .select({ id: users.id, passwordHash: users.passwordHash })
        .from(users)
        .where(and(eq(users.email, email), isNull(users.leftAt)))
        .get();
      if (!(await passwordFits(password, user?.passwordHash)) || !user) throw new SignInRefused(REFUSED);
      await forgetTries(email);
      return user.id;
    }),
    "form",
  );
  return authenticator;
}

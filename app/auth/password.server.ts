import bcrypt from "bcryptjs";

export const PASSWORD_COST = 11;

/** Hashes a password; `cost` is lower in tests only. */
export function hashPassword(password: string, cost = PASSWORD_COST): Promise<string> {
  return bcrypt.hash(password, cost);
}

// Compared when no such account exists, so that a wrong address takes as long as a wrong password.
const NOBODY = "$2b$11$CwTycUXWue0Thq9StjUM0uJ8.t2zYkeHnNqDHwNMdBOlGIyyUy1bS";

/** Whether a password is the one behind a hash. One of more than 72 bytes never is, though its beginning may be. */
export async function passwordFits(password: string, hash: string | undefined): Promise<boolean> {
  const fits = await bcrypt.compare(password, hash ?? NOBODY);
  return hash !== undefined && fits && !bcrypt.truncates(password);
}

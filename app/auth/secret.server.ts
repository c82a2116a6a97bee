import { createHash, randomBytes } from "node:crypto";

/** A secret for a link or a cookie, 256 bits. */
export function newSecret(): string {
  return randomBytes(32).toString("base64url");
}

/** What is kept of a secret: the database alone opens no door. */
export function hashSecret(secret: string): string {
  return createHash("sha256").update(secret).digest("base64url");
}

import { z } from "zod";

/** bcrypt reads 72 bytes and silently ignores the rest; a longer password would be weaker than it looks. */
export const newPassword = z
  .string()
  .min(10, "Use at least 10 characters.")
  .refine((text) => new TextEncoder().encode(text).length <= 72, {
    message:
      "This password is longer than 72 bytes. Use a shorter one: letters outside English count for two or more.",
  });

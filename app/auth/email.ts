import { z } from "zod";

/** An e-mail as typed, in the spelling we keep. */
export const emailField = z
  .string("Type an e-mail address.")
  .trim()
  .toLowerCase()
  .max(254, "This e-mail address is too long.")
  .pipe(z.email("This is not an e-mail address. It looks like name@shop.example."));

export const nameField = z
  .string("Type a name.")
  .trim()
  .min(1, "Type a name.")
  .max(80, "Keep the name under 80 characters.");

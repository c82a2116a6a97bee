import { z } from "zod";
import { oneLine } from "~/forms/one-line";

/** An e-mail as typed, in the spelling we keep. */
export const emailField = z
  .string("Type an e-mail address.")
  .trim()
  .toLowerCase()
  .max(254, "This e-mail address is too long.")
  .pipe(z.email("This is not an e-mail address. It looks like name@shop.example."));

export const nameField = oneLine("Type a name.");

import { z } from "zod";

/** A name of one line: line breaks and control characters become spaces, so that it cannot write lines into a mail. */
export const oneLine = (missing: string) =>
  z
    .string(missing)
    .transform((text) => text.replace(/[\s\p{Cc}]+/gu, " ").trim())
    .pipe(z.string().min(1, missing).max(80, "Keep the name under 80 characters."));

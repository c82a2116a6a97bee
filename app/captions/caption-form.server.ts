import { z } from "zod";
import type { RecordingId } from "#drizzle/schema/ids";
import { LANGUAGE_TAGS } from "./languages";
import { MOST_BYTES } from "./read-webvtt";

/** The form of one import: a chosen file or pasted text, never both. */
export const CaptionForm = z
  .object({
    recordingId: z
      .string()
      .regex(/^[0-9A-HJKMNP-TV-Z]{26}$/)
      .transform((id) => id as RecordingId),
    language: z.enum(LANGUAGE_TAGS, "Choose the language of the captions."),
    file: z.instanceof(File).optional(),
    pasted: z.string().max(MOST_BYTES, "Pasted captions may be 2 MB at most.").default(""),
  })
  .transform(({ file, ...rest }, context) => {
    const chosen = file && file.size > 0 ? file : undefined;
    const pasted = rest.pasted.trim() !== "";
    if (!chosen && !pasted)
      context.addIssue({ code: "custom", path: ["file"], message: "Choose a .vtt file or paste its text." });
    if (chosen && pasted)
      context.addIssue({
        code: "custom",
        path: ["pasted"],
        message: "There is a file and pasted text. Keep one of the two.",
      });
    if (chosen && chosen.size > MOST_BYTES)
      context.addIssue({
        code: "custom",
        path: ["file"],
        message:
          "The file is larger than 2 MB. Captions of one recording are far smaller: choose the .vtt file itself.",
      });
    return { ...rest, file: chosen };
  });

import { z } from "zod";
import type { MarkId } from "#drizzle/schema/ids";
import { formId, line, requiredLine } from "./form-parts";
import { blankContent, type MarkContent } from "./mark-content";

/** The form of a correction: what the recording says or shows and is wrong, and what is right. */
export function correctionForm() {
  return z
    .object({
      replaces: requiredLine("Write what was said or shown, like “sixty-five inch-pounds”.", 300),
      words: requiredLine("Write what is right.", 300),
      reason: line(300),
      corrects: z.union([z.literal(""), formId], "Choose a value of this lesson.").default(""),
      note: line(500),
    })
    .transform((form) => {
      const content: MarkContent = {
        ...blankContent("correction"),
        replaces: form.replaces,
        words: form.words,
        reason: form.reason,
        note: form.note,
      };
      return {
        content,
        source: { kind: "none" } as const,
        corrects: form.corrects === "" ? null : (form.corrects as MarkId),
      };
    });
}

import { z } from "zod";
import type { ChapterId, MarkId } from "#drizzle/schema/ids";
import { draftVersion, formId, moment, requiredLine } from "./form-parts";
import { LessonForm } from "./lesson-form";
import type { Phase } from "./mark";
import type { ChapterRequest } from "./save-chapters.server";

const chapterFields = {
  version: draftVersion,
  chapterId: formId,
  title: requiredLine("Name the chapter, like “Remove links”.", 120),
  phase: z
    .enum(["", "prepare", "remove", "inspect", "install", "verify"], "Choose a phase of the list.")
    .transform((phase): Phase | null => (phase === "" ? null : phase)),
  start: moment,
};

const markFields = { version: draftVersion, markId: formId };

const Chapter = z.object({ intent: z.enum(["add-chapter", "change-chapter"]), ...chapterFields });
const Remove = z.object({ intent: z.literal("remove-chapter"), version: draftVersion, chapterId: formId });
const MarkButton = z.object({ intent: z.enum(["ink", "erase", "put-back"]), ...markFields });

/** What one button of the bench page asks for. */
export type BenchRequest =
  | Readonly<{ do: "details"; version: number; details: z.output<typeof LessonForm> }>
  | Readonly<{ do: "chapters"; version: number; request: ChapterRequest }>
  | Readonly<{ do: "ink" | "erase" | "put-back"; version: number; markId: MarkId }>;

/** Every button of the bench page, as one form. */
export const BenchForm = z.discriminatedUnion("intent", [
  Chapter.transform(({ intent, version, chapterId, title, phase, start }): BenchRequest => {
    const edit = intent === "add-chapter" ? ("add" as const) : ("change" as const);
    return {
      do: "chapters",
      version,
      request: { edit, id: chapterId as ChapterId, atMs: start, title, phase },
    };
  }),
  Remove.transform(({ version, chapterId }): BenchRequest => ({
    do: "chapters",
    version,
    request: { edit: "remove", id: chapterId as ChapterId },
  })),
  MarkButton.transform(({ intent, version, markId }): BenchRequest => ({
    do: intent,
    version,
    markId: markId as MarkId,
  })),
  LessonForm.transform((details): BenchRequest => ({ do: "details", version: details.version, details })),
]);

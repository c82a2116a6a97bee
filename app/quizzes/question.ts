import type { MarkId, RecordingId } from "#drizzle/schema/ids";
import type { Asked } from "./asked";

/** One choice of a choice question; `why` tells what is wrong with it, null for the right one. */
export type Choice = Readonly<{ text: string; why: string | null }>;

/** A question made out of one mark. `asked` is what the grading reads. */
export type QuestionDraft = Readonly<{
  markId: MarkId;
  kind: "numeric" | "choice";
  prompt: string;
  safetyCritical: boolean;
  recordingId: RecordingId;
  atMs: number;
  asked: Asked;
  choices: readonly Choice[] | null;
}>;

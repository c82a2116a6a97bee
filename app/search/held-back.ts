import type { LearnerLesson } from "~/lessons/learner-lesson.server";

/** How long before its mark a value may be said, and how long after it is said again or in another unit. */
const BEFORE_MS = 8_000;
const AFTER_MS = 10_000;

/**
 * Whether a value that waits for its check or is in doubt is said at a moment. Its words are left out of the results, so
 * that they are not read as an answer; the recording itself is not cut.
 */
export function isHeldBack(
  { marks }: Pick<LearnerLesson, "marks">,
  moment: Readonly<{ recordingId: string; startMs: number }>,
): boolean {
  return marks.some(({ mark, showing }) => {
    if (mark.recordingId !== moment.recordingId) return false;
    const late = moment.startMs - mark.atMs;
    return (showing === "withheld" || showing === "in-doubt") && late >= -BEFORE_MS && late <= AFTER_MS;
  });
}

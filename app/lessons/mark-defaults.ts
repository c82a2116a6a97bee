import { inPlayingOrder, type Draft } from "./draft";
import { chapterAt } from "./chapter-edits";
import { fileTime, nearestLessonTime } from "./lesson-time";
import type { Mark } from "./mark";
import { markFields } from "./mark-fields";
import { formatExactTimecode } from "./timecode";
import type { RecordingId } from "#drizzle/schema/ids";

/** What the form of a new mark starts with: the moment, its chapter and today as the day of reading. */
export function newMarkFields(
  draft: Draft,
  asked: Readonly<{ atMs: number; chapterId: string | null }>,
  today: string,
): Record<string, string> {
  const at = fileTime(draft.clips, asked.atMs);
  const covering = at && chapterAt(draft.chapters, at.recordingId as RecordingId, at.fileMs);
  const chosen = draft.chapters.find((chapter) => chapter.id === asked.chapterId);
  const chapter = chosen ?? covering ?? inPlayingOrder(draft.chapters, draft.clips)[0];
  // An address rounds to tenths: a moment just before the chosen chapter means its start.
  const atMs =
    chosen && chosen !== covering
      ? nearestLessonTime(draft.clips, chosen.recordingId, chosen.startMs)
      : asked.atMs;
  return { at: formatExactTimecode(atMs), chapterId: chapter?.id ?? "", readOn: today, newKind: "maker" };
}

/** What the form of a mark starts with: the mark as it is. */
export function editMarkFields(
  draft: Draft,
  mark: Mark,
  cited: Readonly<{ documentId: string; place: string; readOn: string }> | undefined,
  today: string,
): Record<string, string> {
  const corrected =
    mark.kind === "correction" && mark.componentKey !== ""
      ? draft.marks.find(
          (other) =>
            other.kind !== "correction" &&
            other.componentKey === mark.componentKey &&
            other.side === mark.side &&
            other.position === mark.position,
        )
      : undefined;
  return {
    ...markFields(mark),
    ...(corrected ? { corrects: corrected.id } : {}),
    at: formatExactTimecode(nearestLessonTime(draft.clips, mark.recordingId, mark.atMs)),
    chapterId: mark.chapterId,
    newKind: "maker",
    ...(cited ?? { readOn: today }),
  };
}

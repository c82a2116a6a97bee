import type { ChapterId, RecordingId } from "#drizzle/schema/ids";
import type { DraftChapter } from "./draft";
import type { Phase } from "./mark";
import { formatExactTimecode } from "./timecode";

/** What a person may do to the chapters of one lesson. Times in ms of the recording's file. */
export type ChapterEdit =
  | Readonly<{
      edit: "add";
      id: ChapterId;
      recordingId: RecordingId;
      startMs: number;
      title: string;
      phase: Phase | null;
    }>
  | Readonly<{ edit: "change"; id: ChapterId; startMs: number; title: string; phase: Phase | null }>
  | Readonly<{ edit: "remove"; id: ChapterId }>;

/** The field that is at fault and a sentence for it. */
export type EditRefusal = Readonly<{ ok: false; field: "start" | ""; error: string }>;
export type Edited = Readonly<{ ok: true; chapters: DraftChapter[] }> | EditRefusal;

function refused(error: string, field: "start" | "" = "start"): EditRefusal {
  return { ok: false, field, error };
}

/** Two moments within one second on the clock that people read. */
function sameSecond(a: number, b: number): boolean {
  return Math.floor(a / 1000) === Math.floor(b / 1000);
}

/**
 * Applies one edit to chapters that lie end to end in each recording; they lie end to end afterwards, over the same
 * stretch. `say` turns a moment of a recording into what the person reads, for the sentences.
 */
export function editChapters(
  chapters: readonly DraftChapter[],
  edit: ChapterEdit,
  say: (recordingId: RecordingId, ms: number) => string = (_, ms) => formatExactTimecode(ms),
): Edited {
  const target = edit.edit === "add" ? undefined : chapters.find((chapter) => chapter.id === edit.id);
  if (edit.edit !== "add" && !target) return refused("That chapter is not in this lesson.", "");
  const recordingId = edit.edit === "add" ? edit.recordingId : (target as DraftChapter).recordingId;
  const own = chapters
    .filter((chapter) => chapter.recordingId === recordingId)
    .toSorted((a, b) => a.startMs - b.startMs);
  const others = chapters.filter((chapter) => chapter.recordingId !== recordingId);
  const first = own[0];
  const last = own.at(-1);
  if (!first || !last) return refused("That recording is not in this lesson.", "");
  const at = (ms: number) => say(recordingId, ms);
  const done = (changed: DraftChapter[]): Edited => ({ ok: true, chapters: [...others, ...changed] });

  switch (edit.edit) {
    case "add": {
      if (edit.startMs < first.startMs || edit.startMs >= last.endMs)
        return refused(
          `That is outside the recording, which plays from ${at(first.startMs)} to ${at(last.endMs)}.`,
        );
      const taken = own.find((chapter) => sameSecond(chapter.startMs, edit.startMs));
      if (taken)
        return refused(`“${taken.title}” already starts in that second. Give the new one another time.`);
      return done(
        own.flatMap((chapter) => {
          if (edit.startMs <= chapter.startMs || edit.startMs >= chapter.endMs) return [chapter];
          const { id, startMs, title, phase } = edit;
          return [
            { ...chapter, endMs: startMs },
            { id, recordingId, startMs, endMs: chapter.endMs, title, phase, state: "inked" as const },
          ];
        }),
      );
    }
    case "change": {
      const n = own.findIndex((chapter) => chapter.id === edit.id);
      const before = own[n - 1];
      const after = own[n + 1];
      const chapter = own[n] as DraftChapter;
      const moved = edit.startMs !== chapter.startMs;
      if (moved && !before)
        return refused(`The first chapter starts where the recording starts, at ${at(chapter.startMs)}.`);
      if (moved && (edit.startMs < first.startMs || edit.startMs >= last.endMs))
        return refused(
          `That is outside the recording, which plays from ${at(first.startMs)} to ${at(last.endMs)}.`,
        );
      const taken = own.find((other) => other !== chapter && sameSecond(other.startMs, edit.startMs));
      if (moved && taken)
        return refused(`“${taken.title}” already starts in that second. Choose another time.`);
      if (moved && before && edit.startMs <= before.startMs)
        return refused(`It cannot start before “${before.title}”, which starts at ${at(before.startMs)}.`);
      if (moved && edit.startMs >= chapter.endMs)
        return refused(
          after
            ? `It cannot start after “${after.title}”, which starts at ${at(after.startMs)}.`
            : `It has to start before the recording ends, at ${at(chapter.endMs)}.`,
        );
      return done(
        own.map((other) => {
          if (other === before) return { ...other, endMs: edit.startMs };
          if (other !== chapter) return other;
          return {
            ...chapter,
            startMs: edit.startMs,
            title: edit.title,
            phase: edit.phase,
            state: "inked" as const,
          };
        }),
      );
    }
    case "remove": {
      const n = own.findIndex((chapter) => chapter.id === edit.id);
      if (own.length === 1) return refused("A recording keeps at least one chapter. Rename it instead.", "");
      const chapter = own[n] as DraftChapter;
      return done(
        own.flatMap((other, at) => {
          if (at === n) return [];
          if (at === n - 1) return [{ ...other, endMs: chapter.endMs }];
          // Nothing before the first one: the next takes its place.
          if (n === 0 && at === 1) return [{ ...other, startMs: chapter.startMs }];
          return [other];
        }),
      );
    }
    default:
      return edit satisfies never;
  }
}

/** The chapter that covers a moment of a recording; the very end belongs to the last one. */
export function chapterAt<C extends Pick<DraftChapter, "recordingId" | "startMs" | "endMs">>(
  chapters: readonly C[],
  recordingId: RecordingId,
  ms: number,
): C | undefined {
  const own = chapters.filter((chapter) => chapter.recordingId === recordingId);
  return (
    own.find((chapter) => ms >= chapter.startMs && ms < chapter.endMs) ??
    own.find((chapter) => ms === chapter.endMs)
  );
}

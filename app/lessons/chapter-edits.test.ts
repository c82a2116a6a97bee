import { expect, test } from "vitest";
import type { ChapterId, RecordingId } from "#drizzle/schema/ids";
import { chapterAt, editChapters, type ChapterEdit } from "./chapter-edits";
import type { DraftChapter } from "./draft";

const FILM = "film" as RecordingId;
const OTHER = "other" as RecordingId;

function chapter(id: string, startS: number, endS: number, recordingId = FILM): DraftChapter {
  return {
    id: id as ChapterId,
    recordingId,
    startMs: startS * 1000,
    endMs: endS * 1000,
    title: `Step ${id}`,
    phase: null,
    state: "inked",
  };
}

const THREE = [
  chapter("a", 0, 60),
  chapter("b", 60, 120),
  chapter("c", 120, 200),
  chapter("z", 0, 30, OTHER),
];

function spans(edit: ChapterEdit, from: readonly DraftChapter[] = THREE) {
  const edited = editChapters(from, edit);
  if (!edited.ok) return edited.error;
  return edited.chapters
    .filter((chapter) => chapter.recordingId === FILM)
    .map((chapter) => `${chapter.id} ${chapter.startMs / 1000}-${chapter.endMs / 1000}`)
    .join(", ");
}

const add = (startS: number, recordingId = FILM): ChapterEdit => ({
  edit: "add",
  id: "n" as ChapterId,
  recordingId,
  startMs: startS * 1000,
  title: "New",
  phase: "install",
});
const move = (id: string, startS: number): ChapterEdit => ({
  edit: "change",
  id: id as ChapterId,
  startMs: startS * 1000,
  title: "Moved",
  phase: "remove",
});
const remove = (id: string): ChapterEdit => ({ edit: "remove", id: id as ChapterId });

test("a new chapter splits the one that it falls in", () => {
  expect(spans(add(90))).toBe("a 0-60, b 60-90, n 90-120, c 120-200");
});

test("moving a start moves the end of the chapter before", () => {
  expect(spans(move("b", 45))).toBe("a 0-45, b 45-120, c 120-200");
});

test("a removed chapter goes to the one before; the first one goes to the next", () => {
  expect(spans(remove("b"))).toBe("a 0-120, c 120-200");
  expect(spans(remove("c"))).toBe("a 0-60, b 60-200");
  expect(spans(remove("a"))).toBe("b 0-120, c 120-200");
});

test("each impossible edit has its own sentence", () => {
  expect(spans(add(200))).toBe("That is outside the recording, which plays from 0:00 to 3:20.");
  expect(spans(add(60.4))).toBe("“Step b” already starts in that second. Give the new one another time.");
  expect(spans(move("b", 0.5))).toBe("“Step a” already starts in that second. Choose another time.");
  expect(spans(move("c", 30))).toBe("It cannot start before “Step b”, which starts at 1:00.");
  expect(spans(move("b", 130))).toBe("It cannot start after “Step c”, which starts at 2:00.");
  expect(spans(move("b", 500))).toBe("That is outside the recording, which plays from 0:00 to 3:20.");
  expect(spans(move("a", 5))).toBe("The first chapter starts where the recording starts, at 0:00.");
  expect(spans(remove("z"))).toBe("A recording keeps at least one chapter. Rename it instead.");
  expect(spans(remove("elsewhere"))).toBe("That chapter is not in this lesson.");
  expect(spans(add(1, "unknown" as RecordingId))).toBe("That recording is not in this lesson.");
});

test("an edited chapter is inked, and one that stays where it is may be renamed in its own second", () => {
  const edited = editChapters([{ ...chapter("a", 0, 60), state: "pencilled" }], move("a", 0));
  expect(edited).toEqual({
    ok: true,
    chapters: [{ ...chapter("a", 0, 60), title: "Moved", phase: "remove", state: "inked" }],
  });
});

// A small linear congruential generator: the same edits in every run.
function randomNumbers(seed: number) {
  let state = seed;
  return (below: number) => {
    state = (state * 1_664_525 + 1_013_904_223) % 4_294_967_296;
    return Math.floor((state / 4_294_967_296) * below);
  };
}

test("after 4000 random edits the chapters still lie end to end over the same stretch", () => {
  const random = randomNumbers(20_261_112);
  let chapters: readonly DraftChapter[] = [chapter("first", 2, 602), chapter("z", 0, 30, OTHER)];
  let accepted = 0;
  let most = 0;
  for (let n = 0; n < 4000; n++) {
    const any = () => chapters[random(chapters.length)]?.id ?? ("?" as ChapterId);
    const startMs = random(620_000);
    const recordingId = random(5) === 0 ? OTHER : FILM;
    const edit: ChapterEdit = [
      { edit: "add", id: `n${n}` as ChapterId, recordingId, startMs, title: "New", phase: null } as const,
      { edit: "change", id: any(), startMs, title: "Moved", phase: null } as const,
      { edit: "remove", id: any() } as const,
    ][random(3)] as ChapterEdit;
    const edited = editChapters(chapters, edit);
    if (!edited.ok) continue;
    accepted += 1;
    chapters = edited.chapters;
    most = Math.max(most, chapters.length);
    for (const [recording, from, to] of [
      [FILM, 2_000, 602_000],
      [OTHER, 0, 30_000],
    ] as const) {
      const own = chapters
        .filter((chapter) => chapter.recordingId === recording)
        .toSorted((a, b) => a.startMs - b.startMs);
      expect(own[0]?.startMs).toBe(from);
      expect(own.at(-1)?.endMs).toBe(to);
      own.forEach((chapter, at) => {
        expect(chapter.endMs).toBeGreaterThan(chapter.startMs);
        if (at > 0) expect(chapter.startMs).toBe(own[at - 1]?.endMs);
      });
      expect(new Set(own.map((chapter) => Math.floor(chapter.startMs / 1000))).size).toBe(own.length);
    }
  }
  expect(accepted).toBeGreaterThan(500);
  expect(most).toBeGreaterThan(5);
});

test("a moment belongs to one chapter; the very end to the last", () => {
  expect(chapterAt(THREE, FILM, 60_000)?.id).toBe("b");
  expect(chapterAt(THREE, FILM, 59_999)?.id).toBe("a");
  expect(chapterAt(THREE, FILM, 200_000)?.id).toBe("c");
  expect(chapterAt(THREE, FILM, 200_001)).toBeUndefined();
  expect(chapterAt(THREE, OTHER, 60_000)).toBeUndefined();
});

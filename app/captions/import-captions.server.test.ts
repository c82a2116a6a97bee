import { asc, eq } from "drizzle-orm";
import { beforeEach, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { auditLog, captionTracks, cues } from "#drizzle/schema/index";
import { aDatabase, aRecording, aScope, aShop, NOON } from "../../tests/support/factories";
import { importCaptions } from "./import-captions.server";
import { currentTracks, trackCues } from "./load-tracks.server";

let instructor: Scope;
beforeEach(() => {
  const db = aDatabase();
  instructor = aScope(db, aShop(db), "instructor", { name: "Marta" });
});

const file = (words: string) => `WEBVTT\n\n00:01.000 --> 00:02.000\n${words}\n`;
const given = (text: string) => ({ fileName: "job.vtt", language: "en" as const, file: text });

test("a file becomes a track with its cues; warnings are kept with it", () => {
  const recordingId = aRecording(instructor, { durationMs: 60_000 });
  const text =
    "WEBVTT\n\nlower\n00:01.000 --> 00:02.000\n<v Marta>88\n\n00:05.000 --> 00:04.000\nbackwards\n\n00:59.000 --> 01:01.000\nlate\n";
  const imported = importCaptions(instructor, recordingId, given(text), NOON);
  expect(imported).toMatchObject({ ok: true, cueCount: 2 });
  const [track] = currentTracks(instructor, [recordingId]);
  expect(track).toMatchObject({
    label: "English",
    fileName: "job.vtt",
    cueCount: 2,
    createdBy: "Marta",
    publishedAt: null,
  });
  expect(track?.warnings).toEqual([
    expect.stringMatching(/^Line 7: /),
    "The cue at 00:00:05.000 ends before it starts, so it is never shown.",
    "One cue ends after the recording does (00:01:00.000), the first at 00:00:59.000. Are these the captions of this recording?",
  ]);
  expect(track && trackCues(instructor, track.id)).toMatchObject([
    { startMs: 1000, endMs: 2000, text: "<v Marta>88", identifier: "lower" },
    { startMs: 59_000, endMs: 61_000, text: "late", identifier: "" },
  ]);
});

test("a new file replaces the track of its language and keeps the old one; the same file again changes nothing", () => {
  const { db } = instructor;
  const recordingId = aRecording(instructor);
  const first = importCaptions(instructor, recordingId, given(file("one")), NOON);
  importCaptions(instructor, recordingId, { ...given(file("uno")), language: "es" }, NOON + 1);
  const second = importCaptions(instructor, recordingId, given(file("two")), NOON + 2);
  const again = importCaptions(instructor, recordingId, given(file("two")), NOON + 3);
  expect(again).toEqual(second);
  expect(
    db
      .select({ language: captionTracks.language, replacedAt: captionTracks.replacedAt })
      .from(captionTracks)
      .orderBy(asc(captionTracks.createdAt))
      .all(),
  ).toEqual([
    { language: "en", replacedAt: NOON + 2 },
    { language: "es", replacedAt: null },
    { language: "en", replacedAt: null },
  ]);
  expect(first.ok && trackCues(instructor, first.trackId).map((cue) => cue.text)).toEqual(["one"]);
  expect(db.select().from(auditLog).all()).toHaveLength(3);
});

test("a published track never changes, and an import beside it works", () => {
  const { db } = instructor;
  const recordingId = aRecording(instructor);
  const first = importCaptions(instructor, recordingId, given(file("one")), NOON);
  if (!first.ok) throw new Error("not imported");
  db.update(captionTracks).set({ publishedAt: NOON }).where(eq(captionTracks.id, first.trackId)).run();
  expect(() => db.update(cues).set({ text: "x" }).where(eq(cues.trackId, first.trackId)).run()).toThrow(
    /published caption track never changes/,
  );
  expect(() => db.delete(cues).where(eq(cues.trackId, first.trackId)).run()).toThrow(/never changes/);
  expect(importCaptions(instructor, recordingId, given(file("two")), NOON + 1).ok).toBe(true);
  expect(trackCues(instructor, first.trackId).map((cue) => cue.text)).toEqual(["one"]);
});

test("a refused file writes nothing and replaces nothing", () => {
  const recordingId = aRecording(instructor);
  importCaptions(instructor, recordingId, given(file("one")), NOON);
  expect(importCaptions(instructor, recordingId, given("1\n00:00:01,000"), NOON)).toMatchObject({
    ok: false,
    reason: "file",
  });
  expect(importCaptions(instructor, recordingId, given("WEBVTT\n\nNOTE nothing\n"), NOON)).toEqual({
    ok: false,
    reason: "file",
    error: "The file has no captions in it. Choose the file with the spoken words.",
  });
  expect(currentTracks(instructor, [recordingId])).toHaveLength(1);
});

test("another shop's recording is missing, and its tracks are not seen", () => {
  const { db } = instructor;
  const recordingId = aRecording(instructor);
  const imported = importCaptions(instructor, recordingId, given(file("one")), NOON);
  const other = aScope(db, aShop(db), "owner");
  expect(importCaptions(other, recordingId, given(file("two")), NOON)).toEqual({
    ok: false,
    reason: "missing",
  });
  expect(currentTracks(other, [recordingId])).toEqual([]);
  expect(imported.ok && trackCues(other, imported.trackId)).toEqual([]);
  const deleted = aRecording(instructor, { deletedAt: NOON });
  expect(importCaptions(instructor, deleted, given(file("two")), NOON)).toEqual({
    ok: false,
    reason: "missing",
  });
});

test("ten thousand cues are stored", () => {
  const recordingId = aRecording(instructor);
  const blocks = Array.from({ length: 10_000 }, (_, n) => `00:01.000 --> 00:02.000\n${n}\n`);
  expect(
    importCaptions(instructor, recordingId, given(`WEBVTT\n\n${blocks.join("\n")}`), NOON),
  ).toMatchObject({
    ok: true,
    cueCount: 10_000,
  });
});

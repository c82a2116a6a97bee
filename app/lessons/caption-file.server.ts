import { can } from "~/auth/permissions";
import type { Scope } from "~/auth/scope.server";
import { findTrack, trackCues } from "~/captions/load-tracks.server";
import { writeWebVtt } from "~/captions/write-webvtt";
import type { CaptionTrackId, LessonId } from "#drizzle/schema/ids";
import { chapterCues } from "./chapter-cues";
import { findLearnerLesson } from "./learner-lesson.server";
import { loadDraft } from "./load-draft.server";

/**
 * One caption track of a lesson as a file: for everybody a track of the newest revision, for who works on the bench
 * any track of the lesson's recordings. Undefined: not there for this person.
 */
export function captionFile(scope: Scope, lessonId: LessonId, trackId: CaptionTrackId): string | undefined {
  const published = findLearnerLesson(scope, lessonId)?.snapshot.captionTracks.some(
    ({ id }) => id === trackId,
  );
  if (!published && findOriginal(scope, lessonId, trackId) === undefined) return undefined;
  return writeWebVtt(trackCues(scope, trackId));
}

/** The caption file as it was uploaded, for who works on the bench; undefined for others and for other lessons. */
export function findOriginal(
  scope: Scope,
  lessonId: LessonId,
  trackId: CaptionTrackId,
): { fileName: string; original: string } | undefined {
  if (!can(scope.role, "lesson:edit")) return undefined;
  const track = findTrack(scope, trackId);
  const own =
    track && loadDraft(scope, lessonId)?.clips.some((clip) => clip.recordingId === track.recordingId);
  return own ? track : undefined;
}

/** The chapters of the newest revision as a file; see `chapterCues` for the times. Undefined: no such lesson. */
export function chapterFile(scope: Scope, lessonId: LessonId, recordingId?: string): string | undefined {
  const lesson = findLearnerLesson(scope, lessonId);
  return lesson && writeWebVtt(chapterCues(lesson.snapshot.chapters, lesson.snapshot.clips, recordingId));
}

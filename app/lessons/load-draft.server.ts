import { and, asc, eq, inArray } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, ShopId } from "#drizzle/schema/ids";
import {
  chapters,
  clipCuts,
  clips,
  lessons,
  lessonVehicles,
  recordings,
  users,
  vehicles,
} from "#drizzle/schema/index";
import { inPlayingOrder, type Draft, type DraftClip } from "./draft";
import { loadMarks } from "./load-marks.server";
import type { SnapshotVehicle } from "./snapshot";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

/** The vehicles that a lesson's draft applies to, by name; none means any vehicle. */
function loadVehicles(scope: InShop, lessonId: LessonId): SnapshotVehicle[] {
  return scope.db
    .select({
      id: vehicles.id,
      make: vehicles.make,
      model: vehicles.model,
      yearFrom: vehicles.yearFrom,
      yearTo: vehicles.yearTo,
      engine: vehicles.engine,
      drive: vehicles.drive,
    })
    .from(lessonVehicles)
    .innerJoin(vehicles, eq(vehicles.id, lessonVehicles.vehicleId))
    .where(and(eq(lessonVehicles.shopId, scope.shopId), eq(lessonVehicles.lessonId, lessonId)))
    .orderBy(asc(vehicles.make), asc(vehicles.model), asc(vehicles.yearFrom), asc(vehicles.id))
    .all();
}

function loadClips(scope: InShop, lessonId: LessonId): DraftClip[] {
  const rows = scope.db
    .select({ clip: clips, recording: recordings, by: users.name })
    .from(clips)
    .innerJoin(recordings, eq(recordings.id, clips.recordingId))
    .innerJoin(users, eq(users.id, recordings.uploadedBy))
    .where(and(eq(clips.shopId, scope.shopId), eq(clips.lessonId, lessonId)))
    .orderBy(asc(clips.n), asc(clips.id))
    .all();
  if (rows.length === 0) return [];
  const cuts = scope.db
    .select()
    .from(clipCuts)
    .where(
      and(
        eq(clipCuts.shopId, scope.shopId),
        inArray(
          clipCuts.clipId,
          rows.map(({ clip }) => clip.id),
        ),
      ),
    )
    .orderBy(asc(clipCuts.fromMs))
    .all();
  return rows.map(({ clip, recording, by }) => ({
    id: clip.id,
    recordingId: clip.recordingId,
    inMs: clip.inMs,
    outMs: clip.outMs,
    cuts: cuts.filter((cut) => cut.clipId === clip.id).map(({ fromMs, toMs }) => ({ fromMs, toMs })),
    title: recording.title,
    durationMs: recording.durationMs,
    state: recording.state,
    stateReason: recording.stateReason,
    recordedBy: by,
    deleted: recording.deletedAt !== null,
  }));
}

/** A lesson as it stands on the bench; undefined when it is missing or another shop's. */
export function loadDraft(scope: InShop, lessonId: LessonId): Draft | undefined {
  const lesson = scope.db
    .select({
      id: lessons.id,
      title: lessons.title,
      summary: lessons.summary,
      system: lessons.system,
      position: lessons.position,
      version: lessons.version,
      newestRevision: lessons.newestRevision,
      createdAt: lessons.createdAt,
      changedAt: lessons.changedAt,
      withdrawnAt: lessons.withdrawnAt,
    })
    .from(lessons)
    .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
    .get();
  if (!lesson) return undefined;
  const loadedClips = loadClips(scope, lessonId);
  const loadedChapters = scope.db
    .select({
      id: chapters.id,
      recordingId: chapters.recordingId,
      startMs: chapters.startMs,
      endMs: chapters.endMs,
      title: chapters.title,
      phase: chapters.phase,
      state: chapters.state,
    })
    .from(chapters)
    .where(and(eq(chapters.shopId, scope.shopId), eq(chapters.lessonId, lessonId)))
    .all();
  return {
    lesson,
    vehicles: loadVehicles(scope, lessonId),
    clips: loadedClips,
    chapters: inPlayingOrder(loadedChapters, loadedClips),
    marks: loadMarks(scope, lessonId),
  };
}

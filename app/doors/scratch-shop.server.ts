import { sql } from "drizzle-orm";
import { ulid } from "ulid";
import type { Scope } from "~/auth/scope.server";
import { plainText } from "~/captions/cue-text";
import { readWebVtt } from "~/captions/read-webvtt";
import { openDatabase } from "~/db.server";
import { SNAPSHOT_FORMAT, type Snapshot } from "~/lessons/snapshot";
import type { ChapterId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import {
  chapters,
  lessons,
  marks,
  recordings,
  revisions,
  shops,
  users,
  vehicles,
} from "#drizzle/schema/index";
import { markOf, readVehicle, type AnnotatedJob } from "./annotated-lesson";

/** A shop in a database of its own in memory, with one owner. */
export function scratchShop(): Scope {
  const { db } = openDatabase(":memory:");
  const now = Date.now();
  const { id: shopId } = db
    .insert(shops)
    .values({ name: "Scratch", createdAt: now })
    .returning({ id: shops.id })
    .get();
  const { id: userId } = db
    .insert(users)
    .values({
      shopId,
      email: "scratch@shop.example",
      name: "Scratch",
      role: "owner",
      passwordHash: "-",
      createdAt: now,
    })
    .returning({ id: users.id })
    .get();
  return { db, shopId, userId, role: "owner" };
}

/** Publishes one narration with its annotations. Drafts, checks and questions are not needed to answer queries. */
export function publishJob(scope: Scope, job: AnnotatedJob, captions: Uint8Array, file: string): void {
  const { db, shopId, userId } = scope;
  const now = Date.now();
  const [lessonId, recordingId] = [ulid() as LessonId, ulid() as RecordingId];
  const vehicle = readVehicle(job.vehicle);
  const { id: vehicleId } = db
    .insert(vehicles)
    .values({
      shopId,
      make: vehicle.make,
      model: vehicle.model,
      engine: vehicle.engine,
      yearFrom: vehicle.year,
      yearTo: vehicle.year,
      createdAt: now,
    })
    .returning({ id: vehicles.id })
    .get();
  db.insert(recordings)
    .values({
      id: recordingId,
      shopId,
      title: job.title,
      fileName: file,
      sizeBytes: 1,
      state: "ready",
      objectKey: file,
      partBytes: 1,
      durationMs: job.durationMs,
      uploadedBy: userId,
      createdAt: now,
    })
    .run();
  db.insert(lessons)
    .values({
      id: lessonId,
      shopId,
      title: job.title,
      system: "workshop",
      newestRevision: 1,
      createdBy: userId,
      createdAt: now,
      changedAt: now,
    })
    .run();
  const placed = job.chapters.map((chapter) => ({ ...chapter, id: ulid() as ChapterId, recordingId }));
  for (const { id, startMs, endMs, title, phase } of placed)
    db.insert(chapters).values({ id, shopId, lessonId, recordingId, startMs, endMs, title, phase }).run();
  const inked = job.facts.flatMap((fact) => {
    const chapter =
      placed.find(({ startMs, endMs }) => fact.atMs >= startMs && fact.atMs < endMs) ?? placed.at(-1);
    const mark =
      chapter && markOf(fact, { markId: ulid() as MarkId, lessonId, chapterId: chapter.id, recordingId });
    return mark ? [mark] : [];
  });
  for (const mark of inked)
    db.insert(marks)
      .values({
        id: mark.id,
        shopId,
        lessonId,
        chapterId: mark.chapterId,
        recordingId,
        atMs: mark.atMs,
        kind: mark.kind,
        state: "inked",
        component: mark.component,
        createdAt: now,
        changedAt: now,
      })
      .run();
  const snapshot: Snapshot = {
    format: SNAPSHOT_FORMAT,
    lessonId,
    title: job.title,
    summary: "",
    system: "workshop",
    position: "",
    vehicles: [
      {
        id: vehicleId,
        make: vehicle.make,
        model: vehicle.model,
        yearFrom: vehicle.year,
        yearTo: vehicle.year,
        engine: vehicle.engine,
        drive: "",
      },
    ],
    recordedBy: "",
    clips: [{ recordingId, inMs: 0, outMs: job.durationMs, cuts: [] }],
    chapters: placed,
    marks: inked,
    captionTracks: [],
  };
  db.insert(revisions)
    .values({
      shopId,
      lessonId,
      n: 1,
      format: SNAPSHOT_FORMAT,
      snapshot: JSON.stringify(snapshot),
      publishedBy: userId,
      publishedAt: now,
    })
    .run();
  const read = readWebVtt(captions);
  if (!read.ok) throw new Error(read.error);
  for (const cue of read.cues)
    db.run(sql`insert into caption_words (words, shop_id, lesson_id, recording_id, cue_id, start_ms)
      values (${plainText(cue.text).replace(/\s+/g, " ").trim()}, ${shopId}, ${lessonId}, ${recordingId}, ${cue.identifier}, ${cue.startMs})`);
}

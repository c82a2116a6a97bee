import { eq } from "drizzle-orm";
import type { Role } from "~/auth/permissions";
import type { Scope } from "~/auth/scope.server";
import { openDatabase, type Database } from "~/db.server";
import type {
  ChapterId,
  CitationId,
  LessonId,
  MarkId,
  RecordingId,
  ShopId,
  UserId,
} from "#drizzle/schema/ids";
import {
  chapters,
  citations,
  clips,
  documents,
  lessons,
  marks,
  markValues,
  recordings,
  shops,
  users,
} from "#drizzle/schema/index";

/** 12 November 2026, 15:00 UTC: the day on which tests take place. */
export const NOON = Date.UTC(2026, 10, 12, 15);

let count = 0;

/** A fresh migrated database in memory. */
export function aDatabase(): Database {
  return openDatabase(":memory:").db;
}

export function aShop(db: Database, given: Partial<typeof shops.$inferInsert> = {}): ShopId {
  count += 1;
  return db
    .insert(shops)
    .values({ name: `Shop ${count}`, createdAt: NOON, ...given })
    .returning({ id: shops.id })
    .get().id;
}

export function aPerson(
  db: Database,
  shopId: ShopId,
  role: Role,
  given: Partial<typeof users.$inferInsert> = {},
): UserId {
  count += 1;
  return db
    .insert(users)
    .values({
      shopId,
      role,
      name: `Person ${count}`,
      email: `person${count}@shop.example`,
      passwordHash: "-",
      createdAt: NOON,
      ...given,
    })
    .returning({ id: users.id })
    .get().id;
}

/** What a signed-in person of a shop may touch. */
export function aScope(
  db: Database,
  shopId: ShopId,
  role: Role,
  given: Partial<typeof users.$inferInsert> = {},
): Scope {
  return { db, shopId, role, userId: aPerson(db, shopId, role, given) };
}

/** A recording that plays, ten minutes long. */
export function aRecording(scope: Scope, given: Partial<typeof recordings.$inferInsert> = {}): RecordingId {
  count += 1;
  return scope.db
    .insert(recordings)
    .values({
      shopId: scope.shopId,
      title: `Recording ${count}`,
      fileName: `recording${count}.mp4`,
      sizeBytes: 1_000_000,
      state: "ready",
      objectKey: `recordings/${count}`,
      playKey: `recordings/${count}`,
      partBytes: 8_388_608,
      durationMs: 600_000,
      uploadedBy: scope.userId,
      createdAt: NOON,
      readyAt: NOON,
      ...given,
    })
    .returning({ id: recordings.id })
    .get().id;
}

/** A lesson with one clip over the whole of one recording. */
export function aLesson(
  scope: Scope,
  given: Partial<typeof lessons.$inferInsert> = {},
  recordingId: RecordingId = aRecording(scope),
): { lessonId: LessonId; recordingId: RecordingId } {
  count += 1;
  const { id: lessonId } = scope.db
    .insert(lessons)
    .values({
      shopId: scope.shopId,
      title: `Lesson ${count}`,
      system: "engine",
      createdBy: scope.userId,
      createdAt: NOON,
      changedAt: NOON,
      ...given,
    })
    .returning({ id: lessons.id })
    .get();
  const recording = scope.db.select().from(recordings).where(eq(recordings.id, recordingId)).get();
  scope.db
    .insert(clips)
    .values({
      shopId: scope.shopId,
      lessonId,
      recordingId,
      n: 0,
      inMs: 0,
      outMs: recording?.durationMs ?? 600_000,
    })
    .run();
  return { lessonId, recordingId };
}

/** A chapter of a lesson, in phase install. */
export function aChapter(
  scope: Scope,
  of: { lessonId: LessonId; recordingId: RecordingId },
  given: Partial<typeof chapters.$inferInsert> = {},
): ChapterId {
  count += 1;
  return scope.db
    .insert(chapters)
    .values({
      shopId: scope.shopId,
      ...of,
      startMs: 0,
      endMs: 600_000,
      title: `Chapter ${count}`,
      phase: "install",
      ...given,
    })
    .returning({ id: chapters.id })
    .get().id;
}

/** A place in a document, read by this person. */
export function aCitation(scope: Scope, given: Partial<typeof documents.$inferInsert> = {}): CitationId {
  count += 1;
  const { id: documentId } = scope.db
    .insert(documents)
    .values({
      shopId: scope.shopId,
      kind: "maker",
      title: `Workshop manual ${count}`,
      createdAt: NOON,
      ...given,
    })
    .returning({ id: documents.id })
    .get();
  return scope.db
    .insert(citations)
    .values({
      shopId: scope.shopId,
      documentId,
      place: "page 31",
      readOn: "2026-11-09",
      readBy: scope.userId,
      createdAt: NOON,
    })
    .returning({ id: citations.id })
    .get().id;
}

type ValueRow = Partial<typeof markValues.$inferInsert>;

/** 88 N·m, as one row. */
export const EIGHTY_EIGHT: ValueRow = {
  role: "value",
  text: "88 Nm",
  dimension: "torque",
  unit: "N·m",
  value: 88,
  number: 88,
};

/** An inked torque mark of 88 N·m, unless told otherwise. Inked by the scope's person. */
export function aMark(
  scope: Scope,
  of: { lessonId: LessonId; recordingId: RecordingId; chapterId: ChapterId },
  given: Partial<typeof marks.$inferInsert> = {},
  rows: readonly ValueRow[] = [EIGHTY_EIGHT],
): MarkId {
  const { id: markId } = scope.db
    .insert(marks)
    .values({
      shopId: scope.shopId,
      ...of,
      atMs: 60_000,
      kind: "torque",
      state: "inked",
      component: "drain plug",
      componentKey: "oil-drain-plug",
      createdBy: scope.userId,
      createdAt: NOON,
      inkedBy: scope.userId,
      inkedAt: NOON,
      changedAt: NOON,
      ...given,
    })
    .returning({ id: marks.id })
    .get();
  setValues(scope, markId, rows);
  return markId;
}

/** Gives a mark these value rows in place of those it has. */
export function setValues(scope: Scope, markId: MarkId, rows: readonly ValueRow[]): void {
  scope.db.delete(markValues).where(eq(markValues.markId, markId)).run();
  rows.forEach((row, n) =>
    scope.db
      .insert(markValues)
      .values({ shopId: scope.shopId, markId, n, role: "value", text: "", ...row })
      .run(),
  );
}

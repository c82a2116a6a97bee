import { DeleteObjectCommand } from "@aws-sdk/client-s3";
import { and, desc, eq, isNull, sql } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction } from "~/db.server";
import { env } from "~/env.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { clips, lessons, recordings, users } from "#drizzle/schema/index";
import { objectStorage } from "./object-storage.server";

/** Every recording of the shop, newest first. */
export function listRecordings(scope: Scope) {
  return scope.db
    .select({
      id: recordings.id,
      title: recordings.title,
      fileName: recordings.fileName,
      sizeBytes: recordings.sizeBytes,
      state: recordings.state,
      stateReason: recordings.stateReason,
      durationMs: recordings.durationMs,
      width: recordings.width,
      height: recordings.height,
      hasPoster: sql<number>`${recordings.posterKey} is not null`,
      uploadedBy: users.name,
      createdAt: recordings.createdAt,
      lessonTitle: sql<
        string | null
      >`(select l.title from clips c join lessons l on l.id = c.lesson_id where c.recording_id = recordings.id limit 1)`,
    })
    .from(recordings)
    .innerJoin(users, eq(users.id, recordings.uploadedBy))
    .where(and(eq(recordings.shopId, scope.shopId), isNull(recordings.deletedAt)))
    .orderBy(desc(recordings.createdAt))
    .all();
}

/** Gives a recording a title of its own. */
export function renameRecording(scope: Scope, recordingId: RecordingId, title: string): boolean {
  return (
    scope.db
      .update(recordings)
      .set({ title })
      .where(
        and(
          eq(recordings.shopId, scope.shopId),
          eq(recordings.id, recordingId),
          isNull(recordings.deletedAt),
        ),
      )
      .run().changes === 1
  );
}

export type Deleted =
  { ok: true } | { ok: false; reason: "missing" } | { ok: false; reason: "used"; sentence: string };

/** Deletes a recording and its files. Refused while a lesson or a published revision plays it. */
export async function deleteRecording(scope: Scope, recordingId: RecordingId, now: number): Promise<Deleted> {
  const keys = inTransaction(scope, (scope): string[] | Deleted => {
    const row = scope.db
      .select()
      .from(recordings)
      .where(
        and(
          eq(recordings.shopId, scope.shopId),
          eq(recordings.id, recordingId),
          isNull(recordings.deletedAt),
        ),
      )
      .get();
    if (!row) return { ok: false, reason: "missing" };
    const inDraft = scope.db
      .select({ title: lessons.title })
      .from(clips)
      .innerJoin(lessons, eq(lessons.id, clips.lessonId))
      .where(and(eq(clips.shopId, scope.shopId), eq(clips.recordingId, recordingId)))
      .get();
    const [published] = scope.db.all<{ title: string }>(sql`
      select l.title as title from revisions r join lessons l on l.id = r.lesson_id
      join json_each(r.snapshot, '$.clips') clip on json_extract(clip.value, '$.recordingId') = ${recordingId}
      where r.shop_id = ${scope.shopId} limit 1`);
    const user = inDraft ?? published;
    if (user)
      return {
        ok: false,
        reason: "used",
        sentence: `The lesson “${user.title}” plays this recording, so it stays.`,
      };
    scope.db.update(recordings).set({ deletedAt: now }).where(eq(recordings.id, recordingId)).run();
    writeAudit(
      scope,
      { action: "deleted", noun: "recording", nounId: recordingId, detail: row.fileName },
      now,
    );
    return [row.objectKey, row.playKey, row.posterKey, row.storyboardKey].filter((key) => key !== null);
  });
  if (!Array.isArray(keys)) return keys;
  for (const Key of new Set(keys))
    await objectStorage().send(new DeleteObjectCommand({ Bucket: env().S3_BUCKET, Key }));
  return { ok: true };
}

import { and, desc, eq, isNull, sql } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings, users } from "#drizzle/schema/index";

/** The state of the background work on a recording: `open` while it is waited for, `stopped` when it was given up. */
const work = (of: "open" | "stopped") => sql<number>`exists (
  select 1 from tasks t
  where t.dedupe_key in ('check-recording:' || recordings.id, 'prepare-recording:' || recordings.id, 'convert-recording:' || recordings.id)
    and t.done_at is null and t.failed_at is ${of === "open" ? sql`null` : sql`not null`})`;

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
      mine: sql<number>`${recordings.uploadedBy} = ${scope.userId}`,
      working: work("open"),
      stopped: work("stopped"),
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

/** What this person began to upload and did not finish, newest first. */
export function unfinishedUploads(scope: Scope) {
  return scope.db
    .select({
      id: recordings.id,
      fileName: recordings.fileName,
      sizeBytes: recordings.sizeBytes,
      createdAt: recordings.createdAt,
    })
    .from(recordings)
    .where(
      and(
        eq(recordings.shopId, scope.shopId),
        eq(recordings.uploadedBy, scope.userId),
        eq(recordings.state, "uploading"),
        isNull(recordings.deletedAt),
      ),
    )
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

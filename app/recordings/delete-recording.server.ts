import { and, eq, isNull, sql } from "drizzle-orm";
import { z } from "zod";
import type { Scope, ShopScope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction, type Database } from "~/db.server";
import { addTask } from "~/queue/add-task.server";
import type { RecordingId, ShopId } from "#drizzle/schema/ids";
import { clips, lessons, recordings } from "#drizzle/schema/index";
import { madeKey } from "./object-key";
import { abortStoredUpload, deleteStored } from "./stored-files.server";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

/** Asks for the files of a recording to leave storage. Call it in the transaction that deletes or refuses the recording. */
export function addFileDeletion(scope: InShop, recordingId: RecordingId, now: number): void {
  addTask(
    scope,
    {
      kind: "delete-recording",
      payload: { recordingId },
      dedupeKey: `delete-recording:${recordingId}`,
    },
    now,
  );
}

export type Deleted =
  { ok: true } | { ok: false; reason: "missing" } | { ok: false; reason: "used"; sentence: string };

/** Deletes a recording; its files leave storage at once after. Refused while a lesson or a published revision plays it. */
export function deleteRecording(scope: Scope, recordingId: RecordingId, now: number): Deleted {
  return inTransaction(scope, (scope): Deleted => {
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
    addFileDeletion(scope, recordingId, now);
    writeAudit(
      scope,
      { action: "deleted", noun: "recording", nounId: recordingId, detail: row.fileName },
      now,
    );
    return { ok: true };
  });
}

const Payload = z.object({ recordingId: z.string().transform((id) => id as RecordingId) });

/** Takes everything of a deleted or refused recording out of storage: parts, file, converted copy, pictures. */
export async function deleteRecordingFiles(scope: ShopScope, payload: unknown): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  const row = scope.db
    .select()
    .from(recordings)
    .where(and(eq(recordings.shopId, scope.shopId), eq(recordings.id, recordingId)))
    .get();
  if (!row || (row.deletedAt === null && row.state !== "refused")) return;
  await abortStoredUpload(row);
  const made = (["converted", "poster", "storyboard"] as const).map((what) =>
    madeKey(scope.shopId, recordingId, what),
  );
  for (const key of new Set([row.objectKey, ...made])) await deleteStored(key);
}

import {
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { and, desc, eq, isNull } from "drizzle-orm";
import { ulid } from "ulid";
import { z } from "zod";
import type { Scope, ShopScope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction, type Database } from "~/db.server";
import { env } from "~/env.server";
import { addTask } from "~/queue/add-task.server";
import type { RecordingId, ShopId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { addFileDeletion } from "./delete-recording.server";
import { converterIsThere } from "./ffmpeg.server";
import { fileProblem, partBytesOf, partsOf } from "./limits";
import { recordingKey } from "./object-key";
import { objectStorage, publicObjectStorage } from "./object-storage.server";
import { isUnknownUpload, storedParts, storedSize } from "./stored-files.server";

const ABANDONED_AFTER_MS = 7 * 86_400_000;
const PART_LINK_S = 3600;

type Refused = { ok: false; status: 404 | 409 | 422; sentence: string };

const missing: Refused = {
  ok: false,
  status: 404,
  sentence: "That upload is not yours, or it is gone. Choose the file again.",
};

/** An upload that is still going on: of this shop and begun by this very person. */
function findUpload(scope: Scope, recordingId: RecordingId) {
  return scope.db
    .select()
    .from(recordings)
    .where(
      and(
        eq(recordings.shopId, scope.shopId),
        eq(recordings.id, recordingId),
        eq(recordings.uploadedBy, scope.userId),
        isNull(recordings.deletedAt),
      ),
    )
    .get();
}

type Row = NonNullable<ReturnType<typeof findUpload>>;

/** Parts that arrived whole. */
function wholeParts(row: Row, stored: readonly { n: number; size: number }[]): number[] {
  const sizes = new Map(partsOf(row.sizeBytes, row.partBytes).map(({ n, from, to }) => [n, to - from]));
  return stored.filter(({ n, size }) => sizes.get(n) === size).map(({ n }) => n);
}

export type UploadOrder = { fileName: string; sizeBytes: number; lastModified: number };
export type UploadPlan = {
  ok: true;
  recordingId: RecordingId;
  partBytes: number;
  done: number[];
  /** Who makes poster, storyboard and peaks: a server without a converter leaves it to the browser. */
  picturesBy: "server" | "browser";
};

/** "GX010042.MP4" → "GX010042": a title until somebody gives a better one. */
function titleOf(fileName: string): string {
  return (
    fileName
      .replace(/\.[^.]{1,5}$/, "")
      .replace(/[_-]+/g, " ")
      .trim()
      .slice(0, 120) || "Recording"
  );
}

/** Begins an upload, or goes on with one of the same file by the same person that was cut off. */
export async function beginUpload(
  scope: Scope,
  order: UploadOrder,
  now: number,
): Promise<UploadPlan | Refused> {
  const problem = fileProblem({ sizeBytes: order.sizeBytes });
  if (problem) return { ok: false, status: 422, sentence: problem };
  const picturesBy = (await converterIsThere()) ? "server" : "browser";
  const open = scope.db
    .select()
    .from(recordings)
    .where(
      and(
        eq(recordings.shopId, scope.shopId),
        eq(recordings.uploadedBy, scope.userId),
        eq(recordings.state, "uploading"),
        eq(recordings.fileName, order.fileName),
        eq(recordings.sizeBytes, order.sizeBytes),
        eq(recordings.lastModified, order.lastModified),
        isNull(recordings.deletedAt),
      ),
    )
    .orderBy(desc(recordings.createdAt))
    .get();
  const stored = open && (await storedParts(open));
  if (open && stored)
    return {
      ok: true,
      recordingId: open.id,
      partBytes: open.partBytes,
      done: wholeParts(open, stored),
      picturesBy,
    };
  // Completed in storage, and the server stopped before it wrote that down: nothing is left to send.
  if (open && (await storedSize(open.objectKey)) === open.sizeBytes)
    return {
      ok: true,
      recordingId: open.id,
      partBytes: open.partBytes,
      done: partsOf(open.sizeBytes, open.partBytes).map(({ n }) => n),
      picturesBy,
    };

  const recordingId = ulid(now) as RecordingId;
  const objectKey = recordingKey(scope.shopId, recordingId);
  const { UploadId: uploadId } = await objectStorage().send(
    new CreateMultipartUploadCommand({
      Bucket: env().S3_BUCKET,
      Key: objectKey,
      ContentType: "application/octet-stream",
    }),
  );
  if (!uploadId) throw new Error("Object storage began no upload.");
  const partBytes = partBytesOf(order.sizeBytes);
  inTransaction(scope, (scope) => {
    // Storage has thrown the older upload of this file away.
    if (open) dropUpload(scope, open.id, now);
    scope.db
      .insert(recordings)
      .values({
        id: recordingId,
        shopId: scope.shopId,
        title: titleOf(order.fileName),
        ...order,
        state: "uploading",
        objectKey,
        uploadId,
        partBytes,
        uploadedBy: scope.userId,
        createdAt: now,
      })
      .run();
    addTask(
      scope,
      {
        kind: "abandon-upload",
        payload: { recordingId },
        dedupeKey: `abandon-upload:${recordingId}`,
        runAt: now + ABANDONED_AFTER_MS,
      },
      now,
    );
  });
  return { ok: true, recordingId, partBytes, done: [], picturesBy };
}

/** Where the browser puts these parts. Only part numbers that the file has are signed. */
export async function signParts(
  scope: Scope,
  recordingId: RecordingId,
  parts: readonly number[],
): Promise<{ ok: true; urls: Record<number, string> } | Refused> {
  const row = findUpload(scope, recordingId);
  if (!row) return missing;
  if (row.state !== "uploading" || row.uploadId === null)
    return { ok: false, status: 409, sentence: "This upload is finished already." };
  const last = partsOf(row.sizeBytes, row.partBytes).length;
  if (parts.some((n) => n < 1 || n > last))
    return { ok: false, status: 422, sentence: "This file has no such part." };
  const urls: Record<number, string> = {};
  for (const n of parts)
    urls[n] = await getSignedUrl(
      publicObjectStorage(),
      new UploadPartCommand({
        Bucket: env().S3_BUCKET,
        Key: row.objectKey,
        UploadId: row.uploadId ?? "",
        PartNumber: n,
      }),
      { expiresIn: PART_LINK_S },
    );
  return { ok: true, urls };
}

/** How far an upload is, as storage has it. */
export async function uploadState(scope: Scope, recordingId: RecordingId) {
  const row = findUpload(scope, recordingId);
  if (!row) return missing;
  const stored = row.state === "uploading" ? await storedParts(row) : null;
  return {
    ok: true as const,
    state: row.state,
    stateReason: row.stateReason,
    done: stored ? wholeParts(row, stored) : [],
  };
}

/**
 * Closes an upload. Storage is asked for the parts; the browser is not believed. Parts that are missing are named, and
 * nothing is lost. Asking twice is one completion.
 */
export async function completeUpload(
  scope: Scope,
  recordingId: RecordingId,
  now: number,
): Promise<{ ok: true } | (Refused & { missing?: number[] })> {
  const row = findUpload(scope, recordingId);
  if (!row) return missing;
  if (row.state !== "uploading") return { ok: true };
  const stored = await storedParts(row);
  if (stored) {
    const whole = new Set(wholeParts(row, stored));
    const lacking = partsOf(row.sizeBytes, row.partBytes)
      .map(({ n }) => n)
      .filter((n) => !whole.has(n));
    if (lacking.length > 0)
      return { ok: false, status: 409, sentence: "Some parts have not arrived yet.", missing: lacking };
    try {
      await objectStorage().send(
        new CompleteMultipartUploadCommand({
          Bucket: env().S3_BUCKET,
          Key: row.objectKey,
          UploadId: row.uploadId ?? "",
          MultipartUpload: { Parts: stored.map(({ n, etag }) => ({ PartNumber: n, ETag: etag })) },
        }),
      );
    } catch (error) {
      // Asked twice at one time: the other one has closed it.
      if (!isUnknownUpload(error)) throw error;
    }
  }
  // Without the upload in storage it may have been completed just before the server stopped: the object tells.
  const sizeBytes = await storedSize(row.objectKey);
  if (sizeBytes === null) return missing;
  if (sizeBytes !== row.sizeBytes)
    return {
      ok: false,
      status: 409,
      sentence: "What arrived is not as large as the file. Choose the file again.",
    };
  inTransaction(scope, (scope) => {
    const { changes } = scope.db
      .update(recordings)
      .set({ state: "checking", uploadId: null })
      .where(and(eq(recordings.id, row.id), eq(recordings.state, "uploading"), isNull(recordings.deletedAt)))
      .run();
    if (changes === 0) return;
    addTask(
      scope,
      { kind: "check-recording", payload: { recordingId }, dedupeKey: `check-recording:${recordingId}` },
      now,
    );
    writeAudit(
      scope,
      { action: "uploaded", noun: "recording", nounId: recordingId, detail: row.fileName },
      now,
    );
  });
  return { ok: true };
}

/** Drops an upload that is still going on: the row is deleted, its parts leave storage after. False when it is finished. */
function dropUpload(
  scope: Readonly<{ db: Database; shopId: ShopId }>,
  id: RecordingId,
  now: number,
): boolean {
  const { changes } = scope.db
    .update(recordings)
    .set({ deletedAt: now })
    .where(
      and(
        eq(recordings.shopId, scope.shopId),
        eq(recordings.id, id),
        eq(recordings.state, "uploading"),
        isNull(recordings.deletedAt),
      ),
    )
    .run();
  if (changes === 0) return false;
  addFileDeletion(scope, id, now);
  return true;
}

/** Gives an upload up: its row goes at once, its parts leave storage after. */
export function cancelUpload(scope: Scope, recordingId: RecordingId, now: number): { ok: true } | Refused {
  return inTransaction(scope, (scope): { ok: true } | Refused => {
    if (!findUpload(scope, recordingId)) return missing;
    return dropUpload(scope, recordingId, now)
      ? { ok: true }
      : {
          ok: false,
          status: 409,
          sentence: "This upload is finished already. Delete the recording instead.",
        };
  });
}

const Payload = z.object({ recordingId: z.string().transform((id) => id as RecordingId) });

/** Clears an upload away that nobody finished within a week. */
export async function abandonUpload(scope: ShopScope, payload: unknown, now: number): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  inTransaction(scope, (scope) => dropUpload(scope, recordingId, now));
}

import {
  AbortMultipartUploadCommand,
  DeleteObjectCommand,
  HeadObjectCommand,
  ListPartsCommand,
} from "@aws-sdk/client-s3";
import { env } from "~/env.server";
import { objectStorage } from "./object-storage.server";

type Place = Readonly<{ objectKey: string; uploadId: string | null }>;

/** A part of an upload as storage has it; `n` counts from 1. */
export type StoredPart = Readonly<{ n: number; etag: string; size: number }>;

const named = (error: unknown, ...names: string[]) => error instanceof Error && names.includes(error.name);

/** Storage does not know this upload: it was completed or given up. */
export function isUnknownUpload(error: unknown): boolean {
  return named(error, "NoSuchUpload");
}

/** The parts that storage has; null when storage does not know the upload (any more). */
export async function storedParts({ objectKey, uploadId }: Place): Promise<StoredPart[] | null> {
  if (uploadId === null) return null;
  const found: StoredPart[] = [];
  let after: string | undefined;
  try {
    do {
      const page = await objectStorage().send(
        new ListPartsCommand({
          Bucket: env().S3_BUCKET,
          Key: objectKey,
          UploadId: uploadId,
          ...(after ? { PartNumberMarker: after } : {}),
        }),
      );
      for (const part of page.Parts ?? [])
        found.push({ n: part.PartNumber ?? 0, etag: part.ETag ?? "", size: part.Size ?? 0 });
      after = page.IsTruncated ? page.NextPartNumberMarker : undefined;
    } while (after);
  } catch (error) {
    if (isUnknownUpload(error)) return null;
    throw error;
  }
  return found;
}

/** How large an object is; null when there is none. */
export async function storedSize(objectKey: string): Promise<number | null> {
  try {
    const head = await objectStorage().send(
      new HeadObjectCommand({ Bucket: env().S3_BUCKET, Key: objectKey }),
    );
    return head.ContentLength ?? 0;
  } catch (error) {
    if (named(error, "NotFound", "NoSuchKey")) return null;
    throw error;
  }
}

/** Takes an upload that is not complete out of storage; nothing happens when there is none. */
export async function abortStoredUpload({ objectKey, uploadId }: Place): Promise<void> {
  if (uploadId === null) return;
  try {
    await objectStorage().send(
      new AbortMultipartUploadCommand({ Bucket: env().S3_BUCKET, Key: objectKey, UploadId: uploadId }),
    );
  } catch (error) {
    if (!isUnknownUpload(error)) throw error;
  }
}

/** Takes an object out of storage; nothing happens when there is none. */
export async function deleteStored(key: string): Promise<void> {
  await objectStorage().send(new DeleteObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
}

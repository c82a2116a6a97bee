import { PutObjectCommand } from "@aws-sdk/client-s3";
import { and, eq, isNull } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { env } from "~/env.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { madeKey } from "./object-key";
import { objectStorage } from "./object-storage.server";
import { readPeaks, PEAK_COUNT } from "./sound-peaks";

const MOST_BYTES = 2 * 1024 * 1024;

/** A JPEG file begins with FF D8 FF (ITU-T T.81); nothing else is kept as a picture. */
function isJpeg(bytes: Uint8Array): boolean {
  return (
    bytes.length > 3 &&
    bytes.length <= MOST_BYTES &&
    bytes[0] === 0xff &&
    bytes[1] === 0xd8 &&
    bytes[2] === 0xff
  );
}

function peaksFit(peaks: string): boolean {
  return /^[A-Za-z0-9+/]{100,4000}={0,2}$/.test(peaks) && readPeaks(peaks).length === PEAK_COUNT;
}

export type Made = Readonly<{ poster: Uint8Array; storyboard: Uint8Array; peaks: string | null }>;

/** Keeps what the browser made of its own upload, unless the server made it already. */
export async function keepPictures(
  scope: Scope,
  recordingId: RecordingId,
  made: Made,
): Promise<{ ok: true } | { ok: false; status: 404 | 422; sentence: string }> {
  const mine = and(
    eq(recordings.shopId, scope.shopId),
    eq(recordings.id, recordingId),
    eq(recordings.uploadedBy, scope.userId),
    isNull(recordings.deletedAt),
  );
  const row = scope.db.select().from(recordings).where(mine).get();
  if (!row || row.state === "refused")
    return { ok: false, status: 404, sentence: "That recording is not yours, or it is gone." };
  if (!isJpeg(made.poster) || !isJpeg(made.storyboard) || (made.peaks !== null && !peaksFit(made.peaks)))
    return { ok: false, status: 422, sentence: "These are no pictures of a recording." };
  if (row.posterKey !== null) return { ok: true };
  const keys = {
    poster: madeKey(scope.shopId, recordingId, "poster"),
    storyboard: madeKey(scope.shopId, recordingId, "storyboard"),
  };
  for (const what of ["poster", "storyboard"] as const)
    await objectStorage().send(
      new PutObjectCommand({
        Bucket: env().S3_BUCKET,
        Key: keys[what],
        Body: made[what],
        ContentType: "image/jpeg",
      }),
    );
  scope.db
    .update(recordings)
    .set({ posterKey: keys.poster, storyboardKey: keys.storyboard, peaks: made.peaks })
    .where(and(mine, isNull(recordings.posterKey)))
    .run();
  return { ok: true };
}

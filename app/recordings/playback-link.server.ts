import { GetObjectCommand } from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { and, eq, isNull, sql } from "drizzle-orm";
import { can } from "~/auth/permissions";
import type { Scope } from "~/auth/scope.server";
import { env } from "~/env.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { publicObjectStorage } from "./object-storage.server";

const LIFETIME_S = 15 * 60;

export type PlaybackLink = Readonly<{ url: string; expiresAt: number }>;

/** A recording that this person may play: who works on the bench any of the shop, others those that a newest revision plays. */
function findPlayable(scope: Scope, recordingId: RecordingId) {
  const published = sql`exists (
    select 1 from revisions r
    join lessons l on l.id = r.lesson_id and l.newest_revision = r.n and l.withdrawn_at is null
    join json_each(r.snapshot, '$.clips') clip on json_extract(clip.value, '$.recordingId') = ${recordingId}
    where r.shop_id = ${scope.shopId})`;
  return scope.db
    .select()
    .from(recordings)
    .where(
      and(
        eq(recordings.shopId, scope.shopId),
        eq(recordings.id, recordingId),
        isNull(recordings.deletedAt),
        can(scope.role, "lesson:edit") ? undefined : published,
      ),
    )
    .get();
}

async function link(key: string, type: string, now: number): Promise<PlaybackLink> {
  const url = await getSignedUrl(
    publicObjectStorage(),
    new GetObjectCommand({
      Bucket: env().S3_BUCKET,
      Key: key,
      ResponseContentType: type,
      ResponseCacheControl: "private, max-age=900",
    }),
    { expiresIn: LIFETIME_S },
  );
  return { url, expiresAt: now + LIFETIME_S * 1000 };
}

/** A link to play a recording, good for 15 minutes; null when there is none for this person, or it does not play. */
export async function playbackLink(
  scope: Scope,
  recordingId: RecordingId,
  now: number,
): Promise<PlaybackLink | null> {
  const recording = findPlayable(scope, recordingId);
  if (!recording?.playKey) return null;
  const type =
    recording.container === "webm" && recording.playKey === recording.objectKey ? "video/webm" : "video/mp4";
  return link(recording.playKey, type, now);
}

/** A link to the poster or the storyboard; null when it is not made, or not for this person. */
export async function pictureLink(
  scope: Scope,
  recordingId: RecordingId,
  what: "poster" | "storyboard",
  now: number,
): Promise<PlaybackLink | null> {
  const recording = findPlayable(scope, recordingId);
  const key = what === "poster" ? recording?.posterKey : recording?.storyboardKey;
  return key ? link(key, "image/jpeg", now) : null;
}

import { createReadStream } from "node:fs";
import { readFile, stat } from "node:fs/promises";
import { join } from "node:path";
import { GetObjectCommand, PutObjectCommand } from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { and, eq, isNull } from "drizzle-orm";
import { z } from "zod";
import type { ShopScope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import { env } from "~/env.server";
import { addTask } from "~/queue/add-task.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { converterIsThere, inWorkFolder, runFfmpeg } from "./ffmpeg.server";
import { madeKey } from "./object-key";
import { objectStorage } from "./object-storage.server";
import { soundPeaks } from "./sound-peaks";
import { STORYBOARD, storyboardPlan } from "./storyboard";

const Payload = z.object({ recordingId: z.string().transform((id) => id as RecordingId) });
const MINUTE = 60_000;

function find(scope: ShopScope, recordingId: RecordingId) {
  return scope.db
    .select()
    .from(recordings)
    .where(
      and(eq(recordings.shopId, scope.shopId), eq(recordings.id, recordingId), isNull(recordings.deletedAt)),
    )
    .get();
}

/** A link for the converter on this machine. */
function readLink(key: string): Promise<string> {
  return getSignedUrl(objectStorage(), new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: key }), {
    expiresIn: 6 * 3600,
  });
}

async function put(key: string, body: Buffer, type: string): Promise<void> {
  await objectStorage().send(
    new PutObjectCommand({ Bucket: env().S3_BUCKET, Key: key, Body: body, ContentType: type }),
  );
}

/** A file that may be too large for memory goes up as a stream. */
async function putFile(key: string, file: string, type: string): Promise<void> {
  const { size } = await stat(file);
  await objectStorage().send(
    new PutObjectCommand({
      Bucket: env().S3_BUCKET,
      Key: key,
      Body: createReadStream(file),
      ContentLength: size,
      ContentType: type,
    }),
  );
}

/** Poster, storyboard and sound peaks of a recording that plays. Without a converter those that the browser made stay. */
export async function prepareRecording(scope: ShopScope, payload: unknown): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  const recording = find(scope, recordingId);
  if (!recording?.playKey || !recording.durationMs || !(await converterIsThere())) return;
  const { durationMs, playKey } = recording;
  const source = await readLink(playKey);
  await inWorkFolder(async (folder) => {
    const poster = join(folder, "poster.jpg");
    const at = Math.min(3, durationMs / 2000);
    await runFfmpeg(
      ["-ss", at.toFixed(2), "-i", source, "-frames:v", "1", "-vf", "scale=640:-2", "-q:v", "4", poster],
      MINUTE,
    );
    const { count, everyMs } = storyboardPlan(durationMs);
    const { width, height, columns } = STORYBOARD;
    const board = join(folder, "storyboard.jpg");
    const fit = `scale=${width}:${height}:force_original_aspect_ratio=decrease,pad=${width}:${height}:-1:-1`;
    const filter = `fps=fps=1000/${everyMs.toFixed(3)}:eof_action=pass,${fit},tile=${columns}x${Math.ceil(count / columns)}`;
    // Of long recordings only key frames are decoded: there are enough of them.
    const quickly = durationMs > 20 * MINUTE ? ["-skip_frame", "nokey"] : [];
    await runFfmpeg(
      [...quickly, "-i", source, "-an", "-vf", filter, "-frames:v", "1", "-q:v", "6", board],
      20 * MINUTE,
    );
    const peaks = recording.audioCodec === null ? soundPeaks(new Int16Array(0)) : await readSound(source);
    const [posterKey, storyboardKey] = [
      madeKey(scope.shopId, recordingId, "poster"),
      madeKey(scope.shopId, recordingId, "storyboard"),
    ];
    await put(posterKey, await readFile(poster), "image/jpeg");
    await put(storyboardKey, await readFile(board), "image/jpeg");
    scope.db
      .update(recordings)
      .set({ posterKey, storyboardKey, peaks })
      .where(and(eq(recordings.shopId, scope.shopId), eq(recordings.id, recordingId)))
      .run();
  });
}

/** A thousand samples a second are plenty for 1,800 peaks: four hours make 29 MB. */
async function readSound(source: string): Promise<string> {
  const raw = await runFfmpeg(
    ["-i", source, "-vn", "-ac", "1", "-ar", "1000", "-f", "s16le", "-"],
    20 * MINUTE,
  );
  return soundPeaks(new Int16Array(raw.buffer, raw.byteOffset, Math.floor(raw.byteLength / 2)));
}

/** Makes a copy that every browser plays: 720p H.264 with AAC, its index in front. */
export async function convertRecording(scope: ShopScope, payload: unknown, now: number): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  const recording = find(scope, recordingId);
  if (!recording || recording.state !== "converting") return;
  const source = await readLink(recording.objectKey);
  await inWorkFolder(async (folder) => {
    const made = join(folder, "converted.mp4");
    await runFfmpeg(
      [
        ...["-i", source, "-map", "0:v:0", "-map", "0:a:0?"],
        ...[
          "-vf",
          "scale='min(1280,iw)':-2",
          "-c:v",
          "libx264",
          "-preset",
          "veryfast",
          "-crf",
          "23",
          "-pix_fmt",
          "yuv420p",
        ],
        ...["-c:a", "aac", "-b:a", "128k", "-movflags", "+faststart", made],
      ],
      6 * 60 * MINUTE,
    );
    const playKey = madeKey(scope.shopId, recordingId, "converted");
    await putFile(playKey, made, "video/mp4");
    inTransaction(scope, (scope) => {
      scope.db
        .update(recordings)
        .set({ state: "ready", stateReason: "", playKey, readyAt: now })
        .where(and(eq(recordings.shopId, scope.shopId), eq(recordings.id, recordingId)))
        .run();
      addTask(
        scope,
        {
          kind: "prepare-recording",
          payload: { recordingId },
          dedupeKey: `prepare-recording:${recordingId}`,
        },
        now,
      );
    });
  });
}

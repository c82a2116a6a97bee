import { readFile } from "node:fs/promises";
import { join } from "node:path";
import { PutObjectCommand } from "@aws-sdk/client-s3";
import { and, eq, isNull } from "drizzle-orm";
import { z } from "zod";
import type { ShopScope } from "~/auth/scope.server";
import { env } from "~/env.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { converterInput } from "./converter-input.server";
import { converterIsThere, inWorkFolder, runFfmpeg } from "./ffmpeg.server";
import { madeKey } from "./object-key";
import { objectStorage } from "./object-storage.server";
import { PeakCollector, soundPeaks } from "./sound-peaks";
import { deleteStored } from "./stored-files.server";
import { STORYBOARD, storyboardPlan } from "./storyboard";

const Payload = z.object({ recordingId: z.string().transform((id) => id as RecordingId) });
const MINUTE = 60_000;

async function put(key: string, body: Buffer, type: string): Promise<void> {
  await objectStorage().send(
    new PutObjectCommand({ Bucket: env().S3_BUCKET, Key: key, Body: body, ContentType: type }),
  );
}

async function drawPoster(source: readonly string[], durationMs: number, file: string): Promise<void> {
  const at = Math.min(3, durationMs / 2000).toFixed(2);
  const fit = "scale='min(640,iw)':-2";
  await runFfmpeg(["-ss", at, ...source, "-frames:v", "1", "-vf", fit, "-q:v", "4", file], MINUTE);
}

async function drawStoryboard(source: readonly string[], durationMs: number, file: string): Promise<void> {
  const { count, everyMs } = storyboardPlan(durationMs);
  const { width, height, columns } = STORYBOARD;
  const fit = `scale=${width}:${height}:force_original_aspect_ratio=decrease,pad=${width}:${height}:-1:-1`;
  const filter = `fps=fps=1000/${everyMs.toFixed(3)}:eof_action=pass,${fit},tile=${columns}x${Math.ceil(count / columns)}`;
  // Of long recordings only key frames are decoded: there are enough of them.
  const quickly = durationMs > 20 * MINUTE ? ["-skip_frame", "nokey"] : [];
  await runFfmpeg(
    [...quickly, ...source, "-an", "-vf", filter, "-frames:v", "1", "-q:v", "6", file],
    20 * MINUTE,
  );
}

/** 8,000 samples a second, as a telephone has: speech and wrench clicks are in it. Never all of them at one time. */
async function readSound(source: readonly string[]): Promise<string> {
  const collector = new PeakCollector(8000);
  let odd: Buffer = Buffer.alloc(0);
  await runFfmpeg([...source, "-vn", "-ac", "1", "-ar", "8000", "-f", "s16le", "-"], 20 * MINUTE, (piece) => {
    const bytes = odd.length > 0 ? Buffer.concat([odd, piece]) : piece;
    const whole = bytes.length - (bytes.length % 2);
    for (let at = 0; at < whole; at += 2) collector.add(bytes.readInt16LE(at));
    odd = bytes.subarray(whole);
  });
  return collector.peaks();
}

/** Poster, storyboard and sound peaks of a recording that plays. Without a converter those that the browser made stay. */
export async function prepareRecording(scope: ShopScope, payload: unknown): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  const mine = and(
    eq(recordings.shopId, scope.shopId),
    eq(recordings.id, recordingId),
    isNull(recordings.deletedAt),
  );
  const recording = scope.db.select().from(recordings).where(mine).get();
  if (!recording?.playKey || !recording.durationMs || !(await converterIsThere())) return;
  const { durationMs, playKey, objectKey, container, audioCodec } = recording;
  const source = await converterInput(playKey, playKey === objectKey ? container : "mp4");
  const [posterKey, storyboardKey] = [
    madeKey(scope.shopId, recordingId, "poster"),
    madeKey(scope.shopId, recordingId, "storyboard"),
  ];
  await inWorkFolder(async (folder) => {
    const [poster, storyboard] = [join(folder, "poster.jpg"), join(folder, "storyboard.jpg")];
    await drawPoster(source, durationMs, poster);
    await drawStoryboard(source, durationMs, storyboard);
    const peaks = audioCodec === null ? soundPeaks(new Int16Array(0)) : await readSound(source);
    await put(posterKey, await readFile(poster), "image/jpeg");
    await put(storyboardKey, await readFile(storyboard), "image/jpeg");
    const { changes } = scope.db
      .update(recordings)
      .set({ posterKey, storyboardKey, peaks })
      .where(mine)
      .run();
    // Deleted meanwhile: then nobody would ever take the pictures away.
    if (changes === 0) for (const key of [posterKey, storyboardKey]) await deleteStored(key);
  });
}

import { createReadStream } from "node:fs";
import { stat } from "node:fs/promises";
import { join } from "node:path";
import { PutObjectCommand } from "@aws-sdk/client-s3";
import { and, eq, isNull } from "drizzle-orm";
import { z } from "zod";
import type { ShopScope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import { env } from "~/env.server";
import { addTask } from "~/queue/add-task.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { converterInput } from "./converter-input.server";
import { ConverterStopped, inWorkFolder, runFfmpeg } from "./ffmpeg.server";
import { CONVERT_STEPS } from "./judge-video";
import { madeKey } from "./object-key";
import { objectStorage } from "./object-storage.server";
import { deleteStored, storedSize } from "./stored-files.server";

const Payload = z.object({ recordingId: z.string().transform((id) => id as RecordingId) });
const HOUR = 3_600_000;

/** The shorter side is 720 at most, both are even, as 4:2:0 wants them; upright films stay upright. */
const SIZE_720 =
  "scale=w='if(gt(iw,ih),-2,trunc(min(720,iw)/2)*2)':h='if(gt(iw,ih),trunc(min(720,ih)/2)*2,-2)'";

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

/**
 * Makes a copy that every browser plays: 720p H.264 with AAC, its index in front. A file that the converter cannot read
 * then needs converting by hand; a fault of the storage is thrown and tried again.
 */
export async function convertRecording(scope: ShopScope, payload: unknown, now: number): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  const converting = and(
    eq(recordings.shopId, scope.shopId),
    eq(recordings.id, recordingId),
    eq(recordings.state, "converting"),
    isNull(recordings.deletedAt),
  );
  const recording = scope.db.select().from(recordings).where(converting).get();
  if (!recording) return;
  const source = await converterInput(recording.objectKey, recording.container);
  const playKey = madeKey(scope.shopId, recordingId, "converted");
  try {
    await inWorkFolder(async (folder) => {
      const made = join(folder, "converted.mp4");
      const picture = ["-vf", SIZE_720, "-c:v", "libx264", "-preset", "veryfast", "-crf", "23"];
      const sound = ["-c:a", "aac", "-b:a", "128k", "-ac", "2"];
      await runFfmpeg(
        [
          ...source,
          ...["-map", "0:v:0", "-map", "0:a:0?", "-map_metadata", "-1"],
          ...[...picture, "-pix_fmt", "yuv420p", ...sound, "-movflags", "+faststart", made],
        ],
        10 * HOUR,
      );
      await putFile(playKey, made, "video/mp4");
    });
  } catch (error) {
    // Deleted meanwhile: its file is gone, and so is the work.
    if (!scope.db.select({ id: recordings.id }).from(recordings).where(converting).get())
      return deleteStored(playKey);
    if (!(error instanceof ConverterStopped)) throw error;
    // Storage that is not there looks like a broken file to the converter: ask it, and try again later if it is silent.
    if ((await storedSize(recording.objectKey)) !== recording.sizeBytes) throw error;
    scope.db
      .update(recordings)
      .set({
        state: "needs-converting",
        stateReason: `This recording could not be converted here. ${error.message.replace(/\.?$/, ".")} ${CONVERT_STEPS}`,
      })
      .where(converting)
      .run();
    return;
  }
  const changed = inTransaction(scope, (scope) => {
    const { changes } = scope.db
      .update(recordings)
      .set({ state: "ready", stateReason: "", playKey, readyAt: now })
      .where(converting)
      .run();
    if (changes === 0) return false;
    addTask(
      scope,
      {
        kind: "prepare-recording",
        payload: { recordingId },
        dedupeKey: `prepare-recording:${recordingId}`,
      },
      now,
    );
    return true;
  });
  // Deleted meanwhile: then nobody would ever take the copy away.
  if (!changed) await deleteStored(playKey);
}

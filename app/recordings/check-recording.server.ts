import { and, eq, isNull } from "drizzle-orm";
import { z } from "zod";
import type { ShopScope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import { addTask } from "~/queue/add-task.server";
import type { RecordingId } from "#drizzle/schema/ids";
import { recordings } from "#drizzle/schema/index";
import { addFileDeletion } from "./delete-recording.server";
import { CONVERT_STEPS, judgeVideo } from "./judge-video";
import { converterIsThere } from "./ffmpeg.server";
import { probeVideo } from "./probe-video.server";
import { storedSize } from "./stored-files.server";

const Payload = z.object({ recordingId: z.string().transform((id) => id as RecordingId) });

type Change = Partial<typeof recordings.$inferInsert>;

function change(scope: ShopScope, recordingId: RecordingId, values: Change): void {
  scope.db
    .update(recordings)
    .set(values)
    .where(and(eq(recordings.shopId, scope.shopId), eq(recordings.id, recordingId)))
    .run();
}

/** Looks into an uploaded file itself: what it is decides, not what the browser said. Refused files leave storage. */
export async function checkRecording(scope: ShopScope, payload: unknown, now: number): Promise<void> {
  const { recordingId } = Payload.parse(payload);
  const recording = scope.db
    .select()
    .from(recordings)
    .where(
      and(eq(recordings.shopId, scope.shopId), eq(recordings.id, recordingId), isNull(recordings.deletedAt)),
    )
    .get();
  if (!recording || recording.state !== "checking") return;
  const refuse = (stateReason: string) =>
    inTransaction(scope, (scope) => {
      change(scope, recordingId, { state: "refused", stateReason });
      addFileDeletion(scope, recordingId, now);
    });
  const sizeBytes = await storedSize(recording.objectKey);
  if (sizeBytes === null) return refuse("This file is not in storage any more. Upload it again.");
  if (sizeBytes === 0) return refuse("This file is empty. Copy it from the camera again.");
  const probe = await probeVideo(recording.objectKey, sizeBytes);
  if (!probe)
    return refuse(
      "This is not a video file that can be read, or its end is missing. Copy it from the camera again; it should be MP4, MOV or WebM.",
    );
  const verdict = judgeVideo(probe);
  if (!verdict.plays && !verdict.convert) return refuse(verdict.sentence);
  const found = { sizeBytes, ...probe };
  if (verdict.plays) {
    inTransaction(scope, (scope) => {
      change(scope, recordingId, {
        ...found,
        state: "ready",
        stateReason: "",
        playKey: recording.objectKey,
        readyAt: now,
      });
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
    return;
  }
  const convert = await converterIsThere();
  inTransaction(scope, (scope) => {
    change(scope, recordingId, {
      ...found,
      state: convert ? "converting" : "needs-converting",
      stateReason: convert
        ? `${verdict.sentence} It is being converted.`
        : `${verdict.sentence} ${CONVERT_STEPS}`,
    });
    if (convert)
      addTask(
        scope,
        {
          kind: "convert-recording",
          payload: { recordingId },
          dedupeKey: `convert-recording:${recordingId}`,
        },
        now,
      );
  });
}

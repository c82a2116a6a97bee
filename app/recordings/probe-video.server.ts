import { GetObjectCommand } from "@aws-sdk/client-s3";
import { CustomSource, Input, MATROSKA, MP4, QTFF, WEBM } from "mediabunny";
import { env } from "~/env.server";
import type { Probe } from "./judge-video";
import { objectStorage } from "./object-storage.server";

const CONTAINERS: Readonly<Record<string, Probe["container"]>> = {
  MP4: "mp4",
  QuickTime: "mov",
  WebM: "webm",
  Matroska: "mkv",
};

async function readBytes(key: string, start: number, end: number): Promise<Uint8Array> {
  const part = await objectStorage().send(
    new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: key, Range: `bytes=${start}-${end - 1}` }),
  );
  if (!part.Body) throw new Error("Object storage sent no body.");
  return part.Body.transformToByteArray();
}

/**
 * Reads what a stored file really is, over a few ranges of it; null when it is no video file that can be read.
 * Faults of the storage are thrown: they say nothing about the file.
 */
export async function probeVideo(key: string, sizeBytes: number): Promise<Probe | null> {
  let storageFault: unknown;
  const source = new CustomSource({
    getSize: () => sizeBytes,
    prefetchProfile: "none",
    read: async (start, end) => {
      try {
        return await readBytes(key, start, end);
      } catch (error) {
        storageFault = error;
        throw error;
      }
    },
  });
  const input = new Input({ source, formats: [MP4, QTFF, WEBM, MATROSKA] });
  try {
    if (!(await input.canRead())) return null;
    const [video, audio] = [await input.getPrimaryVideoTrack(), await input.getPrimaryAudioTrack()];
    const container = CONTAINERS[(await input.getFormat()).name] ?? "other";
    const duration = (await input.getDurationFromMetadata()) ?? (await input.computeDuration());
    // A file that was cut off still has its table of contents in front; its last second is then missing.
    if (video) await lastSecondIsThere(input, duration);
    return {
      container,
      videoCodec: video ? ((await video.getCodec()) ?? "unknown") : null,
      audioCodec: audio ? ((await audio.getCodec()) ?? "unknown") : null,
      width: video ? await video.getDisplayWidth() : 0,
      height: video ? await video.getDisplayHeight() : 0,
      rotation: video ? await video.getRotation() : 0,
      durationMs: Math.round(duration * 1000),
    };
  } catch {
    if (storageFault) throw storageFault;
    return null;
  } finally {
    input.dispose();
  }
}

async function lastSecondIsThere(input: Input, duration: number): Promise<void> {
  const { EncodedPacketSink } = await import("mediabunny");
  const video = await input.getPrimaryVideoTrack();
  if (!video) return;
  const packet = await new EncodedPacketSink(video).getPacket(Math.max(0, duration - 0.5));
  if (!packet || packet.byteLength === 0) throw new Error("the end of the file is missing");
}

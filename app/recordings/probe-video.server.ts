import { GetObjectCommand } from "@aws-sdk/client-s3";
import { CustomSource, EncodedPacketSink, Input, MATROSKA, MP4, QTFF, WEBM } from "mediabunny";
import { env } from "~/env.server";
import type { Probe } from "./judge-video";
import { objectStorage } from "./object-storage.server";
import { readProbe } from "./read-probe";

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
    const probe = await readProbe(input);
    if (probe?.videoCodec && !(await endIsThere(input, probe.durationMs / 1000))) return null;
    return probe;
  } catch {
    if (storageFault) throw storageFault;
    return null;
  } finally {
    input.dispose();
  }
}

/** A file that was cut off may still have its table of contents in front; its last pictures are then missing. */
async function endIsThere(input: Input, duration: number): Promise<boolean> {
  const video = await input.getPrimaryVideoTrack();
  if (!video) return false;
  const packet = await new EncodedPacketSink(video).getPacket(Math.max(0, duration - 0.5));
  return packet !== null && packet.byteLength > 0;
}

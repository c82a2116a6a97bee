import { GetObjectCommand } from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { env } from "~/env.server";
import { objectStorage } from "./object-storage.server";

/**
 * The arguments with which ffmpeg on this machine reads a stored file. The container is the one that was probed and the
 * protocols are named, so that no file makes the converter open anything else.
 */
export async function converterInput(key: string, container: string | null): Promise<string[]> {
  const link = await getSignedUrl(
    objectStorage(),
    new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: key }),
    // Twelve hours: longer than the longest conversion.
    { expiresIn: 12 * 3600 },
  );
  const format = container === "webm" || container === "mkv" ? "matroska" : "mov";
  return ["-protocol_whitelist", "http,https,tcp,tls", "-f", format, "-i", link];
}

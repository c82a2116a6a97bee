import { S3Client } from "@aws-sdk/client-s3";
import { env } from "~/env.server";

const clients = new Map<string, S3Client>();

function clientFor(endpoint: string): S3Client {
  let client = clients.get(endpoint);
  if (!client) {
    const { S3_REGION, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = env();
    client = new S3Client({
      endpoint,
      region: S3_REGION,
      forcePathStyle: true,
      credentials: { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY },
      // Otherwise a presigned part carries the checksum of an empty body, which real storage may refuse.
      requestChecksumCalculation: "WHEN_REQUIRED",
      responseChecksumValidation: "WHEN_REQUIRED",
    });
    clients.set(endpoint, client);
  }
  return client;
}

/** The storage as this server reaches it. */
export function objectStorage(): S3Client {
  return clientFor(env().S3_ENDPOINT);
}

/** The storage as browsers reach it: links are signed for this very host. */
export function publicObjectStorage(): S3Client {
  return clientFor(env().S3_PUBLIC_ENDPOINT);
}

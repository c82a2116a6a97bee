import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { S3Client, type S3ClientConfig } from "@aws-sdk/client-s3";
import { startFakeS3 } from "./start-fake-s3";

export const ORIGIN = "http://localhost:3000";
export const Bucket = "films";

/** A server on a free port over a folder of its own, with clients for it. */
export async function startStorage() {
  const root = mkdtempSync(join(tmpdir(), "fake-s3-"));
  const settings = {
    root,
    port: 0,
    accessKeyId: "id",
    secretAccessKey: "secret",
    origins: [ORIGIN],
    buckets: [Bucket],
  };
  const server = await startFakeS3(settings);
  const client = (config: S3ClientConfig = {}) =>
    new S3Client({
      endpoint: server.url,
      region: "us-east-1",
      forcePathStyle: true,
      credentials: { accessKeyId: "id", secretAccessKey: "secret" },
      maxAttempts: 1,
      ...config,
    });
  return {
    root,
    settings,
    url: server.url,
    port: server.port,
    client,
    /** As the client's defaults are: checksums on everything. */
    checked: client(),
    /** As links for browsers must be signed. */
    plain: client({
      requestChecksumCalculation: "WHEN_REQUIRED",
      responseChecksumValidation: "WHEN_REQUIRED",
    }),
    close: async () => {
      await server.close();
      rmSync(root, { recursive: true, force: true });
    },
  };
}

/** "accepted", or the code of the refusal. */
export function codeOf(work: Promise<unknown>): Promise<string> {
  return work.then(
    () => "accepted",
    (error: unknown) => (error instanceof Error ? error.name : String(error)),
  );
}

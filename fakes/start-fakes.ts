import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { randomBytes } from "node:crypto";
import { createServer } from "node:net";
import { join } from "node:path";
import { startFakeS3 } from "./s3/start-fake-s3";
import { startFakeSmtp } from "./smtp/start-fake-smtp";

export type Ports = { application: number; s3?: number; smtp?: number; inbox?: number };

export type Fakes = {
  /** The environment for the application; nothing in it says that these are fakes. */
  env: Record<string, string>;
  inboxUrl: string;
  close: () => Promise<void>;
};

/** A port that is free now. */
export async function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, () => {
      const address = server.address();
      server.close(() =>
        typeof address === "object" && address ? resolve(address.port) : reject(new Error("no port")),
      );
    });
  });
}

/** Kept between starts, so that people stay signed in. */
function keptSecret(storage: string): string {
  const file = join(storage, "session-secret");
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString("hex"), { mode: 0o600 });
  return readFileSync(file, "utf8");
}

/** Empties a storage folder: database, objects, mail. */
export function emptyStorage(storage: string): void {
  for (const name of [
    "objects",
    "mail",
    "castlenut.db",
    "castlenut.db-wal",
    "castlenut.db-shm",
    "session-secret",
  ])
    rmSync(join(storage, name), { recursive: true, force: true });
}

/** Starts object storage and mail server and returns the environment that points the application to them. */
export async function startFakes(storage: string, ports: Ports): Promise<Fakes> {
  mkdirSync(storage, { recursive: true });
  const origin = `http://localhost:${ports.application}`;
  const [accessKeyId, secretAccessKey, bucket] = ["castlenut-local", "castlenut-local-secret", "castlenut"];
  const s3 = await startFakeS3({
    root: join(storage, "objects"),
    port: ports.s3 ?? 0,
    accessKeyId,
    secretAccessKey,
    origins: [origin],
    buckets: [bucket],
  });
  const smtp = await startFakeSmtp({
    port: ports.smtp ?? 0,
    inboxPort: ports.inbox ?? 0,
    directory: join(storage, "mail"),
  });
  return {
    env: {
      PORT: String(ports.application),
      PUBLIC_ORIGIN: origin,
      SESSION_SECRET: keptSecret(storage),
      DATABASE_FILE: join(storage, "castlenut.db"),
      S3_ENDPOINT: s3.url,
      S3_PUBLIC_ENDPOINT: s3.url,
      S3_REGION: "us-east-1",
      S3_BUCKET: bucket,
      S3_ACCESS_KEY_ID: accessKeyId,
      S3_SECRET_ACCESS_KEY: secretAccessKey,
      SMTP_URL: smtp.url,
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true",
    },
    inboxUrl: smtp.inboxUrl,
    close: async () => {
      await Promise.all([s3.close(), smtp.close()]);
    },
  };
}

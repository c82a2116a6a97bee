import { HeadBucketCommand } from "@aws-sdk/client-s3";
import { sql } from "drizzle-orm";
import { database } from "~/db.server";
import { env } from "~/env.server";
import { objectStorage } from "~/recordings/object-storage.server";

/** 200 when database and storage answer, else 503 with what is down. */
export async function loader() {
  const down: string[] = [];
  try {
    database().db.get(sql`select 1`);
  } catch {
    down.push("database");
  }
  try {
    await objectStorage().send(new HeadBucketCommand({ Bucket: env().S3_BUCKET }), {
      abortSignal: AbortSignal.timeout(3000),
    });
  } catch {
    down.push("object storage");
  }
  return Response.json(down.length === 0 ? { ok: true } : { ok: false, down }, {
    status: down.length === 0 ? 200 : 503,
  });
}

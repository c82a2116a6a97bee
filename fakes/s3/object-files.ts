import { createHash, randomUUID } from "node:crypto";
import { createReadStream, createWriteStream, existsSync } from "node:fs";
import { mkdir, readdir, readFile, rename, rm, writeFile } from "node:fs/promises";
import type { IncomingMessage } from "node:http";
import { dirname, join } from "node:path";
import { Transform } from "node:stream";
import { pipeline } from "node:stream/promises";
import { unchunk } from "./aws-chunked";
import { BodyChecksums, verifyChecksums } from "./checksum";
import { S3Error } from "./s3-error";

export type ObjectRecord = { key: string; type: string; size: number; etag: string; modified: string };
export type PartRecord = { n: number; size: number; etag: string };
type UploadRecord = { bucket: string; key: string; type: string };

const MIN_PART_BYTES = 5 * 1024 * 1024;

async function readJson<T>(file: string): Promise<T | null> {
  try {
    return JSON.parse(await readFile(file, "utf8")) as T;
  } catch {
    return null;
  }
}

/** Written beside its place and moved there whole: a crash leaves the old file or the new one. */
async function writeWhole(file: string, text: string): Promise<void> {
  const draft = `${file}.${randomUUID()}.tmp`;
  await writeFile(draft, text);
  await rename(draft, file);
}

/** Objects and open multipart uploads as files under one folder. Names are hashes, so no key can leave it. */
export class ObjectFiles {
  constructor(private readonly root: string) {}

  #object(bucket: string, key: string): string {
    return join(this.root, bucket, createHash("sha256").update(key).digest("hex"));
  }

  #upload(id: string): string {
    if (!/^[0-9a-f-]{36}$/.test(id)) throw new S3Error(404, "NoSuchUpload");
    return join(this.root, ".uploads", id);
  }

  bucketExists(bucket: string): boolean {
    return existsSync(join(this.root, bucket));
  }

  async createBucket(bucket: string): Promise<void> {
    await mkdir(join(this.root, bucket), { recursive: true });
  }

  /** Streams a body into a file; nothing stays of one that is cut or does not match its checksums. */
  async #receive(
    request: IncomingMessage,
    file: string,
    payloadHash: string,
  ): Promise<{ etag: string; size: number }> {
    const sums = new BodyChecksums();
    const claimed: Record<string, string | string[] | undefined> = { ...request.headers };
    const count = new Transform({
      transform(chunk: Buffer, _encoding, done) {
        sums.update(chunk);
        done(null, chunk);
      },
    });
    const draft = `${file}.${randomUUID()}.tmp`;
    await mkdir(dirname(file), { recursive: true });
    try {
      const stream = createWriteStream(draft);
      if (payloadHash.startsWith("STREAMING-"))
        await pipeline(
          request,
          unchunk((name, value) => (claimed[name] = value)),
          count,
          stream,
        );
      else await pipeline(request, count, stream);
      const counted = sums.finish();
      verifyChecksums(counted, claimed, payloadHash);
      await rename(draft, file);
      return { etag: `"${counted.md5Hex}"`, size: sums.size };
    } catch (error) {
      await rm(draft, { force: true });
      throw error;
    }
  }

  async put(
    bucket: string,
    key: string,
    request: IncomingMessage,
    payloadHash: string,
  ): Promise<ObjectRecord> {
    const file = this.#object(bucket, key);
    const received = await this.#receive(request, file, payloadHash);
    const record = {
      key,
      type: request.headers["content-type"] ?? "application/octet-stream",
      ...received,
      modified: new Date().toISOString(),
    };
    await writeWhole(`${file}.json`, JSON.stringify(record));
    return record;
  }

  async find(bucket: string, key: string): Promise<ObjectRecord> {
    const record = await readJson<ObjectRecord>(`${this.#object(bucket, key)}.json`);
    if (!record) throw new S3Error(404, "NoSuchKey");
    return record;
  }

  open(bucket: string, key: string, start: number, end: number) {
    return createReadStream(this.#object(bucket, key), { start, end });
  }

  async remove(bucket: string, key: string): Promise<void> {
    const file = this.#object(bucket, key);
    await rm(`${file}.json`, { force: true });
    await rm(file, { force: true });
  }

  async list(bucket: string, prefix: string): Promise<ObjectRecord[]> {
    const names = (await readdir(join(this.root, bucket))).filter((name) => name.endsWith(".json"));
    const records = await Promise.all(
      names.map((name) => readJson<ObjectRecord>(join(this.root, bucket, name))),
    );
    return records
      .filter((record) => record !== null)
      .filter((record) => record.key.startsWith(prefix))
      .sort((a, b) => (a.key < b.key ? -1 : 1));
  }

  async createUpload(bucket: string, key: string, type: string): Promise<string> {
    const id = randomUUID();
    await mkdir(this.#upload(id), { recursive: true });
    await writeWhole(
      join(this.#upload(id), "upload.json"),
      JSON.stringify({ bucket, key, type } satisfies UploadRecord),
    );
    return id;
  }

  async findUpload(bucket: string, key: string, id: string): Promise<UploadRecord> {
    const record = await readJson<UploadRecord>(join(this.#upload(id), "upload.json"));
    if (!record || record.bucket !== bucket || record.key !== key) throw new S3Error(404, "NoSuchUpload");
    return record;
  }

  async putPart(id: string, n: number, request: IncomingMessage, payloadHash: string): Promise<PartRecord> {
    const file = join(this.#upload(id), String(n));
    const record = { n, ...(await this.#receive(request, file, payloadHash)) };
    await writeWhole(`${file}.part.json`, JSON.stringify(record));
    return record;
  }

  async parts(id: string): Promise<PartRecord[]> {
    const folder = this.#upload(id);
    const names = (await readdir(folder)).filter((name) => /^\d+\.part\.json$/.test(name));
    const records = await Promise.all(names.map((name) => readJson<PartRecord>(join(folder, name))));
    return records.filter((record) => record !== null).sort((a, b) => a.n - b.n);
  }

  async completeUpload(
    id: string,
    upload: UploadRecord,
    wanted: readonly { n: number; etag: string }[],
  ): Promise<ObjectRecord> {
    const folder = this.#upload(id);
    const stored = await this.parts(id);
    const md5 = createHash("md5");
    if (wanted.some(({ n }, at) => at > 0 && n <= (wanted[at - 1]?.n ?? 0)))
      throw new S3Error(400, "InvalidPartOrder");
    const chosen = wanted.map(({ n, etag }, at) => {
      const part = stored.find((found) => found.n === n);
      if (!part || part.etag.replaceAll('"', "") !== etag.replaceAll('"', ""))
        throw new S3Error(400, "InvalidPart");
      if (at < wanted.length - 1 && part.size < MIN_PART_BYTES) throw new S3Error(400, "EntityTooSmall");
      md5.update(Buffer.from(part.etag.replaceAll('"', ""), "hex"));
      return part;
    });
    const file = this.#object(upload.bucket, upload.key);
    const draft = `${file}.${randomUUID()}.tmp`;
    try {
      for (const part of chosen)
        await pipeline(
          createReadStream(join(folder, String(part.n))),
          createWriteStream(draft, { flags: "a" }),
        );
      await rename(draft, file);
    } catch (error) {
      await rm(draft, { force: true });
      throw error;
    }
    const record: ObjectRecord = {
      key: upload.key,
      type: upload.type,
      size: chosen.reduce((sum, part) => sum + part.size, 0),
      etag: `"${md5.digest("hex")}-${chosen.length}"`,
      modified: new Date().toISOString(),
    };
    await writeWhole(`${file}.json`, JSON.stringify(record));
    await rm(folder, { recursive: true, force: true });
    return record;
  }

  async abortUpload(id: string): Promise<void> {
    await rm(this.#upload(id), { recursive: true, force: true });
  }
}

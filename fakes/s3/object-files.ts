import { createHash, randomUUID } from "node:crypto";
import { type FileHandle, mkdir, open, readdir, rename, rm, stat } from "node:fs/promises";
import { join } from "node:path";
import type { Checksum } from "./checksum";
import { OneAtATime } from "./one-at-a-time";
import { S3Error } from "./s3-error";
import { type Drafts, isMissing, readRecord, removeAbandoned } from "./whole-files";

/** A checksum of the whole body, or one made of the checksums of its parts. */
export type ObjectChecksum = Checksum & Readonly<{ type: "FULL_OBJECT" | "COMPOSITE" }>;

/** What is kept of an object beside its body. */
export type ObjectRecord = Readonly<{
  key: string;
  /** File name of the body. Every write takes a new one, so a reader never sees half of two bodies. */
  body: string;
  size: number;
  /** With its quotation marks. */
  etag: string;
  /** ISO 8601. */
  modified: string;
  /** Headers to answer with: content-type, cache-control, x-amz-meta-… */
  headers: Readonly<Record<string, string>>;
  checksum: ObjectChecksum | null;
}>;

/** A look at the object that is there (or null) right before it is replaced; throws to keep it. */
export type Condition = (existing: ObjectRecord | null) => void;

const isBucket = (name: string) => /^[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/.test(name);

/** Objects as files under one folder: a record and a body each. File names are hashes, so no key can leave it. */
export class ObjectFiles {
  readonly #turns = new OneAtATime();

  constructor(
    private readonly root: string,
    readonly drafts: Drafts,
  ) {}

  /** Makes the folder ready and removes bodies that no record names, which a crash may leave. */
  async open(): Promise<void> {
    await mkdir(this.root, { recursive: true });
    await this.drafts.open();
    for (const { name } of await this.buckets()) {
      const named = new Set((await this.list(name)).map(({ body }) => body));
      for (const file of await readdir(join(this.root, name)))
        if (!file.endsWith(".json") && !named.has(file)) await removeAbandoned(join(this.root, name, file));
    }
  }

  #file(bucket: string, name: string): string {
    return join(this.root, bucket, name);
  }

  #record(bucket: string, key: string): string {
    return this.#file(bucket, `${hashOf(key)}.json`);
  }

  async buckets(): Promise<{ name: string; created: string }[]> {
    const names = (await readdir(this.root)).filter(isBucket).toSorted();
    return Promise.all(
      names.map(async (name) => ({
        name,
        created: (await stat(join(this.root, name))).birthtime.toISOString(),
      })),
    );
  }

  async createBucket(bucket: string): Promise<void> {
    if (!isBucket(bucket)) throw new S3Error(400, "InvalidBucketName", undefined, { BucketName: bucket });
    await mkdir(join(this.root, bucket), { recursive: true });
  }

  /** Throws S3Error when there is no such bucket. */
  async needBucket(bucket: string): Promise<void> {
    const found = isBucket(bucket) && (await stat(join(this.root, bucket)).catch(() => null));
    if (!found) throw new S3Error(404, "NoSuchBucket", undefined, { BucketName: bucket });
  }

  async removeBucket(bucket: string): Promise<void> {
    if ((await this.list(bucket)).length > 0)
      throw new S3Error(409, "BucketNotEmpty", undefined, { BucketName: bucket });
    await rm(join(this.root, bucket), { recursive: true, force: true });
  }

  find(bucket: string, key: string): Promise<ObjectRecord | null> {
    return readRecord<ObjectRecord>(this.#record(bucket, key));
  }

  /** The object with its open body, which stays readable when it is replaced meanwhile. The caller closes it. */
  async openObject(bucket: string, key: string): Promise<{ record: ObjectRecord; body: FileHandle }> {
    for (;;) {
      const record = await this.find(bucket, key);
      if (!record) throw new S3Error(404, "NoSuchKey", undefined, { Key: key });
      try {
        return { record, body: await open(this.#file(bucket, record.body)) };
      } catch (error) {
        if (!isMissing(error)) throw error;
        // Replaced between the two looks. A record that stays without its body was tampered with.
        if ((await this.find(bucket, key))?.body === record.body) throw error;
      }
    }
  }

  /** Moves a finished draft into its place as the object's body. */
  async keep(
    bucket: string,
    draft: string,
    object: Omit<ObjectRecord, "body" | "modified">,
    condition: Condition,
  ): Promise<ObjectRecord> {
    return this.#turns.run(`${bucket}/${object.key}`, async () => {
      await this.needBucket(bucket);
      const before = await this.find(bucket, object.key);
      condition(before);
      const record = {
        ...object,
        body: `${hashOf(object.key)}.${randomUUID()}`,
        modified: new Date().toISOString(),
      };
      await rename(draft, this.#file(bucket, record.body));
      await this.drafts.writeRecord(this.#record(bucket, object.key), record);
      if (before) await rm(this.#file(bucket, before.body), { force: true });
      return record;
    });
  }

  async remove(bucket: string, key: string): Promise<void> {
    await this.#turns.run(`${bucket}/${key}`, async () => {
      const record = await this.find(bucket, key);
      if (!record) return;
      await rm(this.#record(bucket, key), { force: true });
      await rm(this.#file(bucket, record.body), { force: true });
    });
  }

  /** All objects of a bucket by the bytes of their keys, which is the order of S3. */
  async list(bucket: string): Promise<ObjectRecord[]> {
    const names = (await readdir(join(this.root, bucket))).filter((name) => name.endsWith(".json"));
    const records = await Promise.all(
      names.map((name) => readRecord<ObjectRecord>(this.#file(bucket, name))),
    );
    return records.filter((record) => record !== null).toSorted((a, b) => compareKeys(a.key, b.key));
  }
}

function hashOf(key: string): string {
  return createHash("sha256").update(key).digest("hex");
}

/** Orders keys by their UTF-8 bytes. */
export function compareKeys(a: string, b: string): number {
  return Buffer.compare(Buffer.from(a), Buffer.from(b));
}

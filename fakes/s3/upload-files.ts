import { createHash, randomUUID } from "node:crypto";
import { createReadStream, createWriteStream } from "node:fs";
import { mkdir, readdir, rename, rm } from "node:fs/promises";
import type { IncomingMessage } from "node:http";
import { join } from "node:path";
import { pipeline } from "node:stream/promises";
import { type Checksum, type ChecksumName, countChecksum } from "./checksum";
import {
  compareKeys,
  type Condition,
  type ObjectChecksum,
  type ObjectFiles,
  type ObjectRecord,
} from "./object-files";
import { OneAtATime } from "./one-at-a-time";
import { receiveFile } from "./receive-body";
import { S3Error } from "./s3-error";
import type { Verified } from "./signature";
import { isMissing, readRecord } from "./whole-files";

/** An open multipart upload. */
export type UploadRecord = Readonly<{
  id: string;
  bucket: string;
  key: string;
  headers: Readonly<Record<string, string>>;
  /** The checksum that was asked for, and what it covers. */
  algorithm: Readonly<{ name: ChecksumName; type: ObjectChecksum["type"] }> | null;
  /** ISO 8601. */
  initiated: string;
}>;

/** A part that arrived whole. */
export type PartRecord = Readonly<{
  n: number;
  body: string;
  size: number;
  /** With its quotation marks. */
  etag: string;
  checksum: Checksum | null;
  /** ISO 8601. */
  modified: string;
}>;

/** A part as the request to complete names it. */
export type NamedPart = Readonly<{ n: number; etag: string; checksum: Checksum | null }>;

const MIN_PART_BYTES = 5 * 1024 * 1024;
const bare = (etag: string) => etag.replaceAll('"', "");

/** Open multipart uploads as folders of parts; they outlive the server. */
export class UploadFiles {
  readonly #turns = new OneAtATime();
  readonly #root: string;

  constructor(
    root: string,
    private readonly objects: ObjectFiles,
  ) {
    this.#root = join(root, ".uploads");
  }

  #folder(id: string): string {
    if (!/^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/.test(id))
      throw new S3Error(404, "NoSuchUpload", undefined, { UploadId: id });
    return join(this.#root, id);
  }

  async create(upload: Omit<UploadRecord, "id" | "initiated">): Promise<UploadRecord> {
    const record = { ...upload, id: randomUUID(), initiated: new Date().toISOString() };
    await mkdir(this.#folder(record.id), { recursive: true });
    await this.objects.drafts.writeRecord(join(this.#folder(record.id), "upload.json"), record);
    return record;
  }

  async find(bucket: string, key: string, id: string): Promise<UploadRecord> {
    const record = await readRecord<UploadRecord>(join(this.#folder(id), "upload.json"));
    if (!record || record.bucket !== bucket || record.key !== key)
      throw new S3Error(404, "NoSuchUpload", undefined, { UploadId: id });
    return record;
  }

  /** The open uploads of a bucket by key, then age. */
  async list(bucket: string): Promise<UploadRecord[]> {
    const ids = await readdir(this.#root).catch((error: unknown) => {
      if (isMissing(error)) return [];
      throw error;
    });
    const records = await Promise.all(
      ids.map((id) => readRecord<UploadRecord>(join(this.#folder(id), "upload.json"))),
    );
    return records
      .filter((record) => record !== null)
      .filter((record) => record.bucket === bucket)
      .toSorted((a, b) => compareKeys(a.key, b.key) || compareKeys(a.initiated + a.id, b.initiated + b.id));
  }

  /** Receives a part; one of the same number is replaced. */
  async putPart(
    upload: UploadRecord,
    n: number,
    request: IncomingMessage,
    verified: Verified,
  ): Promise<PartRecord> {
    return this.objects.drafts.with(
      async (draft) => receiveFile(request, verified, draft),
      async (draft, { size, md5, checksum }) => {
        const wanted = upload.algorithm?.type === "COMPOSITE" ? upload.algorithm.name : null;
        if (wanted && checksum?.name !== wanted)
          throw new S3Error(
            400,
            "InvalidRequest",
            `Checksum Type mismatch occurred, expected checksum Type: ${wanted}, actual checksum Type: ${checksum?.name ?? "null"}`,
          );
        return this.#turns.run(upload.id, async () => {
          // It may have been completed or aborted while the part was on its way.
          await this.find(upload.bucket, upload.key, upload.id);
          const folder = this.#folder(upload.id);
          const place = join(folder, `${n}.part.json`);
          const before = await readRecord<PartRecord>(place);
          const record = {
            n,
            body: `${n}.${randomUUID()}`,
            size,
            etag: `"${md5}"`,
            checksum,
            modified: new Date().toISOString(),
          };
          await rename(draft, join(folder, record.body));
          await this.objects.drafts.writeRecord(place, record);
          if (before) await rm(join(folder, before.body), { force: true });
          return record;
        });
      },
    );
  }

  /** The parts that arrived, by number. */
  async parts(upload: UploadRecord): Promise<PartRecord[]> {
    const folder = this.#folder(upload.id);
    const names = (await readdir(folder)).filter((name) => name.endsWith(".part.json"));
    const records = await Promise.all(names.map((name) => readRecord<PartRecord>(join(folder, name))));
    return records.filter((record) => record !== null).toSorted((a, b) => a.n - b.n);
  }

  /** Joins the named parts into the object and closes the upload; a refusal leaves both as they were. */
  async complete(
    opened: UploadRecord,
    named: readonly NamedPart[],
    claim: Checksum | null,
    condition: Condition,
  ): Promise<ObjectRecord> {
    return this.#turns.run(opened.id, async () => {
      const upload = await this.find(opened.bucket, opened.key, opened.id);
      const chosen = chooseParts(upload, named, await this.parts(upload));
      const folder = this.#folder(upload.id);
      const whole = upload.algorithm?.type === "FULL_OBJECT" ? upload.algorithm.name : null;
      const counter = whole && countChecksum(whole);
      const record = await this.objects.drafts.with(
        (draft) =>
          pipeline(
            async function* () {
              for (const part of chosen)
                for await (const data of createReadStream(join(folder, part.body))) {
                  counter?.update(data as Buffer);
                  yield data as Buffer;
                }
            },
            createWriteStream(draft, { flags: "wx" }),
          ),
        (draft) => {
          const checksum: ObjectChecksum | null =
            whole && counter
              ? { name: whole, value: counter.digest().toString("base64"), type: "FULL_OBJECT" }
              : compositeOf(upload, chosen);
          if (
            claim &&
            checksum &&
            (claim.name !== checksum.name || claim.value !== checksum.value.split("-")[0])
          )
            throw new S3Error(
              400,
              "BadDigest",
              `The ${claim.name} you specified did not match the calculated checksum.`,
            );
          const md5 = createHash("md5");
          for (const part of chosen) md5.update(Buffer.from(bare(part.etag), "hex"));
          return this.objects.keep(
            upload.bucket,
            draft,
            {
              key: upload.key,
              size: chosen.reduce((sum, { size }) => sum + size, 0),
              etag: `"${md5.digest("hex")}-${chosen.length}"`,
              headers: upload.headers,
              checksum,
            },
            condition,
          );
        },
      );
      await rm(folder, { recursive: true, force: true });
      return record;
    });
  }

  async abort(upload: UploadRecord): Promise<void> {
    await this.#turns.run(upload.id, async () => {
      await this.find(upload.bucket, upload.key, upload.id);
      await rm(this.#folder(upload.id), { recursive: true, force: true });
    });
  }
}

/** The stored parts behind the named ones; throws S3Error when they do not make an object. */
function chooseParts(
  upload: UploadRecord,
  named: readonly NamedPart[],
  stored: readonly PartRecord[],
): PartRecord[] {
  if (named.some(({ n }, at) => at > 0 && n <= (named[at - 1]?.n ?? 0)))
    throw new S3Error(400, "InvalidPartOrder", undefined, { UploadId: upload.id });
  const byNumber = new Map(stored.map((part) => [part.n, part]));
  const chosen = named.map(({ n, etag, checksum }) => {
    const part = byNumber.get(n);
    const details = { UploadId: upload.id, PartNumber: n, ETag: bare(etag) };
    if (!part || bare(part.etag) !== bare(etag)) throw new S3Error(400, "InvalidPart", undefined, details);
    if (checksum && (checksum.name !== part.checksum?.name || checksum.value !== part.checksum.value))
      throw new S3Error(400, "InvalidPart", undefined, details);
    if (upload.algorithm?.type === "COMPOSITE" && !checksum)
      throw new S3Error(
        400,
        "InvalidRequest",
        `The upload was created using a ${upload.algorithm.name} checksum. The complete request must include the checksum for each part. It was missing for part ${n} in the request.`,
      );
    return part;
  });
  const small = chosen.slice(0, -1).find(({ size }) => size < MIN_PART_BYTES);
  if (small)
    throw new S3Error(400, "EntityTooSmall", undefined, {
      ProposedSize: small.size,
      MinSizeAllowed: MIN_PART_BYTES,
      PartNumber: small.n,
      ETag: bare(small.etag),
    });
  return chosen;
}

/** The checksum of the parts' checksums, with their number: "Yk2…=-3". */
function compositeOf(upload: UploadRecord, parts: readonly PartRecord[]): ObjectChecksum | null {
  if (!upload.algorithm) return null;
  const counter = countChecksum(upload.algorithm.name);
  for (const { checksum } of parts) counter.update(Buffer.from(checksum?.value ?? "", "base64"));
  return {
    name: upload.algorithm.name,
    value: `${counter.digest().toString("base64")}-${parts.length}`,
    type: "COMPOSITE",
  };
}

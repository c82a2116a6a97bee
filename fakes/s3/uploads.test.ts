import { createHash, randomBytes } from "node:crypto";
import { existsSync, readdirSync } from "node:fs";
import { join } from "node:path";
import {
  AbortMultipartUploadCommand,
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListMultipartUploadsCommand,
  ListPartsCommand,
  paginateListParts,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { afterAll, beforeAll, expect, test } from "vitest";
import { startFakeS3 } from "./start-fake-s3";
import { Bucket, codeOf, ORIGIN, startStorage } from "./storage-under-test";

const PART = 5 * 1024 * 1024;
let storage: Awaited<ReturnType<typeof startStorage>>;
beforeAll(async () => {
  storage = await startStorage();
});
afterAll(() => storage.close());

async function begin(Key: string, more: object = {}) {
  const { UploadId = "" } = await storage.plain.send(
    new CreateMultipartUploadCommand({ Bucket, Key, ...more }),
  );
  const named = { Bucket, Key, UploadId };
  return {
    ...named,
    named,
    send: async (PartNumber: number, Body: Buffer | string) => {
      const { ETag } = await storage.plain.send(new UploadPartCommand({ ...named, PartNumber, Body }));
      return { PartNumber, ETag };
    },
    sendFromPage: async (PartNumber: number, body: Buffer) => {
      const url = await getSignedUrl(storage.plain, new UploadPartCommand({ ...named, PartNumber }), {
        expiresIn: 60,
      });
      const reply = await fetch(url, {
        method: "PUT",
        body: new Uint8Array(body),
        headers: { origin: ORIGIN },
      });
      return { PartNumber, ETag: reply.headers.get("etag") ?? `status ${reply.status}` };
    },
    complete: (Parts: { PartNumber: number; ETag: string | undefined }[], condition: object = {}) =>
      storage.plain.send(
        new CompleteMultipartUploadCommand({ ...named, MultipartUpload: { Parts }, ...condition }),
      ),
  };
}

test("parts that a page sends through links, out of order and at once, become the file", async () => {
  const file = randomBytes(2 * PART + 12_345);
  const pieces = [file.subarray(0, PART), file.subarray(PART, 2 * PART), file.subarray(2 * PART)];
  const upload = await begin("film.mp4", { ContentType: "video/mp4", Metadata: { shop: "harrow" } });
  const parts = await Promise.all(
    [3, 1, 2].map((n) => upload.sendFromPage(n, pieces[n - 1] ?? Buffer.alloc(0))),
  );
  const done = await upload.complete(parts.toSorted((a, b) => a.PartNumber - b.PartNumber));
  // The ETag of an upload: MD5 of the parts' MD5s, a hyphen, their number.
  const md5 = createHash("md5");
  for (const piece of pieces) md5.update(createHash("md5").update(piece).digest());
  expect(done).toMatchObject({
    ETag: `"${md5.digest("hex")}-3"`,
    Bucket,
    Key: "film.mp4",
    Location: `${storage.url}/films/film.mp4`,
  });
  const reply = await storage.checked.send(new GetObjectCommand({ Bucket, Key: "film.mp4" }));
  expect(Buffer.from((await reply.Body?.transformToByteArray()) ?? []).equals(file)).toBe(true);
  expect(reply).toMatchObject({ ContentType: "video/mp4", Metadata: { shop: "harrow" } });
  expect(existsSync(join(storage.root, ".uploads", upload.UploadId))).toBe(false);
});

test("a part that is sent again replaces the one before", async () => {
  const upload = await begin("again");
  const old = await upload.send(1, "first try");
  const part = await upload.send(1, "second try");
  expect(await codeOf(upload.complete([old]))).toBe("InvalidPart");
  await upload.complete([part]);
  const { Body } = await storage.plain.send(new GetObjectCommand({ Bucket, Key: "again" }));
  expect(await Body?.transformToString()).toBe("second try");
});

test("a completion names some of the parts; the others are dropped", async () => {
  const upload = await begin("some");
  await upload.send(1, "dropped");
  const part = await upload.send(7, "kept");
  expect((await upload.complete([part])).ETag).toMatch(/-1"$/);
  expect((await storage.plain.send(new HeadObjectCommand({ Bucket, Key: "some" }))).ContentLength).toBe(4);
});

test("a refused completion leaves upload and object as they were", async () => {
  const before = await begin("guarded");
  await before.complete([await before.send(1, "before")]);
  const upload = await begin("guarded");
  const part = await upload.send(1, "after");
  expect(await codeOf(upload.complete([{ PartNumber: 2, ETag: part.ETag }]))).toBe("InvalidPart");
  expect(await codeOf(upload.complete([part, part]))).toBe("InvalidPartOrder");
  expect(await codeOf(upload.complete([]))).toBe("MalformedXML");
  expect(await codeOf(upload.complete([part], { IfNoneMatch: "*" }))).toBe("PreconditionFailed");
  const { Body } = await storage.plain.send(new GetObjectCommand({ Bucket, Key: "guarded" }));
  expect(await Body?.transformToString()).toBe("before");
  expect(await codeOf(upload.complete([part]))).toBe("accepted");
  expect(readdirSync(join(storage.root, ".drafts"))).toEqual([]);
});

test("of completions at the same time one succeeds and the others find no upload", async () => {
  const upload = await begin("raced");
  const part = await upload.send(1, "x");
  const results = await Promise.all([1, 2, 3].map(() => codeOf(upload.complete([part]))));
  expect(results.toSorted()).toEqual(["NoSuchUpload", "NoSuchUpload", "accepted"]);
});

test("part numbers go from 1 to 10000, and an upload belongs to its key", async () => {
  const upload = await begin("numbers");
  for (const n of [0, 10_001]) expect(await codeOf(upload.send(n, "x"))).toBe("InvalidArgument");
  expect(await codeOf(upload.send(10_000, "x"))).toBe("accepted");
  const elsewhere = { Bucket, Key: "other", UploadId: upload.UploadId };
  expect(await codeOf(storage.plain.send(new ListPartsCommand(elsewhere)))).toBe("NoSuchUpload");
  for (const UploadId of ["../../films", "nonsense"])
    expect(await codeOf(storage.plain.send(new ListPartsCommand({ ...elsewhere, UploadId })))).toBe(
      "NoSuchUpload",
    );
});

test("parts are listed page by page with their sizes", async () => {
  const upload = await begin("paged");
  for (const n of [5, 1, 3, 2, 4]) await upload.send(n, "x".repeat(n));
  const pages = [];
  for await (const page of paginateListParts({ client: storage.plain, pageSize: 2 }, upload.named))
    pages.push(page.Parts?.map(({ PartNumber, Size }) => [PartNumber, Size]));
  expect(pages).toEqual([
    [
      [1, 1],
      [2, 2],
    ],
    [
      [3, 3],
      [4, 4],
    ],
    [[5, 5]],
  ]);
});

test("open uploads are listed by key, page by page, until they end", async () => {
  const [b, a1, a2] = [await begin("open/b"), await begin("open/a"), await begin("open/a")];
  const list = (more: object = {}) =>
    storage.plain.send(new ListMultipartUploadsCommand({ Bucket, Prefix: "open/", ...more }));
  const all = (await list()).Uploads ?? [];
  expect(all.map(({ Key }) => Key)).toEqual(["open/a", "open/a", "open/b"]);
  expect(all.map(({ UploadId }) => UploadId).toSorted()).toEqual(
    [a1, a2, b].map(({ UploadId }) => UploadId).toSorted(),
  );
  const first = await list({ MaxUploads: 1 });
  expect(first.IsTruncated).toBe(true);
  const rest = await list({ KeyMarker: first.NextKeyMarker, UploadIdMarker: first.NextUploadIdMarker });
  expect([...(first.Uploads ?? []), ...(rest.Uploads ?? [])]).toEqual(all);
  await storage.plain.send(new AbortMultipartUploadCommand(b.named));
  expect((await list()).Uploads?.map(({ Key }) => Key)).toEqual(["open/a", "open/a"]);
});

test("after an abort nothing is left and nothing is taken", async () => {
  const upload = await begin("aborted");
  await upload.send(1, "x");
  await storage.plain.send(new AbortMultipartUploadCommand(upload.named));
  expect(existsSync(join(storage.root, ".uploads", upload.UploadId))).toBe(false);
  expect(await codeOf(upload.send(2, "x"))).toBe("NoSuchUpload");
  expect(await codeOf(storage.plain.send(new AbortMultipartUploadCommand(upload.named)))).toBe(
    "NoSuchUpload",
  );
});

test("an upload goes on after a restart, with the parts from before", async () => {
  const first = Buffer.alloc(PART, 7);
  const root = join(storage.root, "of-its-own");
  const settings = { ...storage.settings, root };
  const before = await startFakeS3(settings);
  const client = storage.client({ endpoint: before.url, requestChecksumCalculation: "WHEN_REQUIRED" });
  const { UploadId = "" } = await client.send(new CreateMultipartUploadCommand({ Bucket, Key: "resumed" }));
  const named = { Bucket, Key: "resumed", UploadId };
  await client.send(new UploadPartCommand({ ...named, PartNumber: 1, Body: first }));
  await before.close();
  const after = await startFakeS3(settings);
  const again = storage.client({ endpoint: after.url, requestChecksumCalculation: "WHEN_REQUIRED" });
  await again.send(new UploadPartCommand({ ...named, PartNumber: 2, Body: "end" }));
  const { Parts = [] } = await again.send(new ListPartsCommand(named));
  await again.send(
    new CompleteMultipartUploadCommand({
      ...named,
      MultipartUpload: { Parts: Parts.map(({ PartNumber, ETag }) => ({ PartNumber, ETag })) },
    }),
  );
  const head = await again.send(new HeadObjectCommand({ Bucket, Key: "resumed" }));
  expect(head.ContentLength).toBe(PART + 3);
  await after.close();
});

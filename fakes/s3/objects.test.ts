import { createHash, randomBytes } from "node:crypto";
import { readdirSync } from "node:fs";
import { request as sendHttp } from "node:http";
import { join } from "node:path";
import { Readable } from "node:stream";
import {
  CopyObjectCommand,
  CreateBucketCommand,
  DeleteBucketCommand,
  DeleteObjectsCommand,
  GetObjectAclCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListBucketsCommand,
  ListObjectsCommand,
  ListObjectsV2Command,
  paginateListObjectsV2,
  PutObjectCommand,
  type PutObjectCommandInput,
} from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { afterAll, beforeAll, expect, test } from "vitest";
import { startFakeS3 } from "./start-fake-s3";
import { Bucket, codeOf, ORIGIN, startStorage } from "./storage-under-test";

let storage: Awaited<ReturnType<typeof startStorage>>;
beforeAll(async () => {
  storage = await startStorage();
});
afterAll(() => storage.close());

const put = (Key: string, Body: string | Buffer, more: Partial<PutObjectCommandInput> = {}) =>
  storage.checked.send(new PutObjectCommand({ Bucket, Key, Body, ...more }));
const get = async (Key: string) =>
  (await storage.checked.send(new GetObjectCommand({ Bucket, Key }))).Body?.transformToString() ?? "";
const link = (Key: string, more = {}) =>
  getSignedUrl(storage.plain, new GetObjectCommand({ Bucket, Key, ...more }), { expiresIn: 60 });
const putLink = (Key: string) =>
  getSignedUrl(storage.plain, new PutObjectCommand({ Bucket, Key }), { expiresIn: 60 });
const drafts = () => readdirSync(join(storage.root, ".drafts"));

test("both settings of the client write buffers, text and streams that read back equal", async () => {
  const body = randomBytes(200_003);
  for (const client of [storage.checked, storage.plain])
    for (const Body of [body, Readable.from([body.subarray(0, 70_000), body.subarray(70_000)])]) {
      await client.send(new PutObjectCommand({ Bucket, Key: "both", Body, ContentLength: body.length }));
      const reply = await client.send(new GetObjectCommand({ Bucket, Key: "both" }));
      expect(Buffer.from((await reply.Body?.transformToByteArray()) ?? []).equals(body)).toBe(true);
    }
});

test("an empty object is an object", async () => {
  await put("empty", "");
  expect(await get("empty")).toBe("");
  const reply = await fetch(await link("empty"), { headers: { range: "bytes=0-" } });
  expect([reply.status, reply.headers.get("content-range")]).toEqual([416, "bytes */0"]);
});

test("metadata and headers come back with the object; a link may ask for others", async () => {
  await put("meta", "x", {
    ContentType: "text/vtt",
    CacheControl: "no-store",
    ContentDisposition: "inline",
    ContentEncoding: "identity",
    Metadata: { shop: "harrow" },
  });
  const head = await storage.checked.send(new HeadObjectCommand({ Bucket, Key: "meta" }));
  expect(head).toMatchObject({
    ContentType: "text/vtt",
    CacheControl: "no-store",
    ContentDisposition: "inline",
    ContentEncoding: "identity",
    Metadata: { shop: "harrow" },
  });
  expect(head.LastModified?.getTime()).toBeGreaterThan(Date.now() - 60_000);
  const reply = await fetch(
    await link("meta", {
      ResponseContentDisposition: 'attachment; filename="a b.vtt"',
      ResponseCacheControl: "private",
    }),
  );
  expect(reply.headers.get("content-disposition")).toBe('attachment; filename="a b.vtt"');
  expect(reply.headers.get("cache-control")).toBe("private");
  expect(
    (await fetch(await link("meta", { ResponseContentDisposition: "inline; filename=ü→" }))).status,
  ).toBe(400);
});

test("a streamed body is not kept as aws-chunked", async () => {
  await storage.checked.send(
    new PutObjectCommand({
      Bucket,
      Key: "chunked",
      Body: Readable.from([Buffer.from("abc")]),
      ContentLength: 3,
    }),
  );
  const head = await storage.checked.send(new HeadObjectCommand({ Bucket, Key: "chunked" }));
  expect(head.ContentEncoding).toBeUndefined();
  expect(head.ContentLength).toBe(3);
});

test("ranges over HTTP: part, tail, several, outside, and If-Range", async () => {
  const { ETag = "" } = await put("range", "0123456789");
  const url = await link("range");
  const ask = async (headers: Record<string, string>) => {
    const reply = await fetch(url, { headers });
    return [reply.status, reply.headers.get("content-range"), await reply.text()];
  };
  expect(await ask({ range: "bytes=2-5" })).toEqual([206, "bytes 2-5/10", "2345"]);
  expect(await ask({ range: "bytes=-3" })).toEqual([206, "bytes 7-9/10", "789"]);
  expect(await ask({ range: "bytes=0-1,4-5" })).toEqual([200, null, "0123456789"]);
  expect(await ask({ range: "bytes=0-1", "if-range": ETag })).toEqual([206, "bytes 0-1/10", "01"]);
  expect(await ask({ range: "bytes=0-1", "if-range": '"other"' })).toEqual([200, null, "0123456789"]);
  const [status, range, document] = await ask({ range: "bytes=10-" });
  expect([status, range]).toEqual([416, "bytes */10"]);
  expect(document).toContain("<Code>InvalidRange</Code>");
  expect(document).toContain("<ActualObjectSize>10</ActualObjectSize>");
});

test("the head of a range has its length and no body", async () => {
  await put("headed", "0123456789");
  const reply = await storage.checked.send(
    new HeadObjectCommand({ Bucket, Key: "headed", Range: "bytes=2-5" }),
  );
  expect(reply.ContentLength).toBe(4);
  expect(reply.$metadata.httpStatusCode).toBe(206);
});

test("a refusal is XML with code, message, resource and request id; to HEAD it is the status alone", async () => {
  const reply = await fetch(await link("no <such> & key"));
  expect([reply.status, reply.headers.get("content-type")]).toEqual([404, "application/xml"]);
  const document = await reply.text();
  expect(document).toMatch(
    /^<\?xml version="1.0" encoding="UTF-8"\?>\n<Error><Code>NoSuchKey<\/Code><Message>/,
  );
  expect(document).toContain("<Key>no &#60;such&#62; &#38; key</Key>");
  expect(document).toContain(`<RequestId>${reply.headers.get("x-amz-request-id")}</RequestId>`);
  const head = await fetch(
    await getSignedUrl(storage.plain, new HeadObjectCommand({ Bucket, Key: "nowhere" }), { expiresIn: 60 }),
    { method: "HEAD" },
  );
  expect([head.status, await head.text()]).toEqual([404, ""]);
});

test("conditions on reading", async () => {
  const { ETag = "" } = await put("conditional", "x");
  const url = await link("conditional");
  const unchanged = await fetch(url, { headers: { "if-none-match": ETag } });
  expect([unchanged.status, unchanged.headers.get("etag"), await unchanged.text()]).toEqual([304, ETag, ""]);
  expect((await fetch(url, { headers: { "if-none-match": '"other"' } })).status).toBe(200);
  expect((await fetch(url, { headers: { "if-match": '"other"' } })).status).toBe(412);
});

test("conditions on writing: of many that must be first, one is", async () => {
  const results = await Promise.all(
    Array.from({ length: 8 }, (_, n) => codeOf(put("first", `writer ${n}`, { IfNoneMatch: "*" }))),
  );
  expect(results.filter((result) => result === "accepted")).toHaveLength(1);
  expect(results.filter((result) => result === "PreconditionFailed")).toHaveLength(7);
  const winner = results.indexOf("accepted");
  expect(await get("first")).toBe(`writer ${winner}`);
  expect(await codeOf(put("first", "next", { IfMatch: '"other"' }))).toBe("PreconditionFailed");
  const { ETag = "" } = await storage.checked.send(new HeadObjectCommand({ Bucket, Key: "first" }));
  expect(await codeOf(put("first", "next", { IfMatch: ETag }))).toBe("accepted");
  expect(await codeOf(put("absent", "x", { IfMatch: ETag }))).toBe("NoSuchKey");
});

test("a reader of an object that is replaced gets the old body whole", async () => {
  const old = randomBytes(8_000_000);
  await put("replaced", old);
  const reply = await storage.plain.send(new GetObjectCommand({ Bucket, Key: "replaced" }));
  const reader = (reply.Body as Readable)[Symbol.asyncIterator]() as AsyncIterator<Buffer>;
  const pieces = [(await reader.next()).value as Buffer];
  await put("replaced", "new");
  for (let piece = await reader.next(); !piece.done; piece = await reader.next()) pieces.push(piece.value);
  expect(Buffer.concat(pieces).equals(old)).toBe(true);
  expect(await get("replaced")).toBe("new");
});

test("of writers at the same time one is kept whole, and no file is left over", async () => {
  const bodies = Array.from({ length: 6 }, () => randomBytes(300_000));
  await Promise.all(bodies.map((body) => put("contended", body)));
  const { Body } = await storage.plain.send(new GetObjectCommand({ Bucket, Key: "contended" }));
  const kept = Buffer.from((await Body?.transformToByteArray()) ?? []);
  expect(bodies.some((body) => body.equals(kept))).toBe(true);
  const hash = createHash("sha256").update("contended").digest("hex");
  expect(readdirSync(join(storage.root, Bucket)).filter((name) => name.startsWith(hash))).toHaveLength(2);
  expect(drafts()).toEqual([]);
});

/** PUT with hand-made headers; the status and document of the reply. */
function rawPut(url: string, headers: Record<string, string>, body: string, cut = false) {
  return new Promise<[number, string]>((resolve) => {
    const request = sendHttp(url, { method: "PUT", headers }, (response) => {
      let document = "";
      response.on("data", (data: Buffer) => (document += data.toString()));
      response.on("end", () => resolve([response.statusCode ?? 0, document]));
    });
    request.on("error", () => resolve([0, ""]));
    request.write(body);
    if (cut) setTimeout(() => request.destroy(), 100);
    else request.end();
  });
}

test("a body without a length is refused; one that is cut leaves nothing", async () => {
  const [status, document] = await rawPut(
    await putLink("lengthless"),
    { "transfer-encoding": "chunked" },
    "abc",
  );
  expect([status, document]).toEqual([411, expect.stringContaining("MissingContentLength")]);
  await put("survivor", "before");
  await rawPut(await putLink("survivor"), { "content-length": "1000" }, "only the beginning", true);
  await expect.poll(drafts, { timeout: 20_000 }).toEqual([]);
  expect(await get("survivor")).toBe("before");
});

test("a bucket is listed by folders, in the order of bytes, page by page", async () => {
  await storage.checked.send(new CreateBucketCommand({ Bucket: "listing" }));
  const keys = ["a.txt", "b/1", "b/2", "b/3", "c/1", "d.txt", "é.txt", "Z.txt", "with & <mark>"];
  for (const Key of keys)
    await storage.checked.send(new PutObjectCommand({ Bucket: "listing", Key, Body: Key }));
  const seen: string[] = [];
  let pages = 0;
  for await (const page of paginateListObjectsV2(
    { client: storage.checked, pageSize: 2 },
    { Bucket: "listing", Delimiter: "/" },
  )) {
    pages += 1;
    seen.push(
      ...(page.Contents ?? []).map(({ Key = "" }) => Key),
      ...(page.CommonPrefixes ?? []).map(({ Prefix = "" }) => Prefix),
    );
  }
  expect(seen.toSorted()).toEqual(
    ["Z.txt", "a.txt", "b/", "c/", "d.txt", "with & <mark>", "é.txt"].toSorted(),
  );
  expect(pages).toBe(4);
  const all = await storage.checked.send(new ListObjectsV2Command({ Bucket: "listing" }));
  expect(all.Contents?.map(({ Key }) => Key)).toEqual([
    "Z.txt",
    "a.txt",
    "b/1",
    "b/2",
    "b/3",
    "c/1",
    "d.txt",
    "with & <mark>",
    "é.txt",
  ]);
  expect(all.Contents?.[0]).toMatchObject({ Size: 5, ETag: expect.stringMatching(/^"[0-9a-f]{32}"$/) });
  const after = await storage.checked.send(
    new ListObjectsV2Command({ Bucket: "listing", Prefix: "b/", StartAfter: "b/1", EncodingType: "url" }),
  );
  expect(after.Contents?.map(({ Key }) => Key)).toEqual(["b/2", "b/3"]);
  const old = await storage.checked.send(new ListObjectsCommand({ Bucket: "listing", Marker: "d.txt" }));
  expect(old.Contents?.map(({ Key }) => Key)).toEqual(["with & <mark>", "é.txt"]);
  expect(
    await codeOf(
      storage.checked.send(new ListObjectsV2Command({ Bucket: "listing", ContinuationToken: "??" })),
    ),
  ).toBe("InvalidArgument");
});

test("many objects are deleted at once; a bucket goes when it is empty", async () => {
  const client = storage.plain;
  await client.send(new CreateBucketCommand({ Bucket: "emptied" }));
  for (const Key of ["1", "2 & <3>"])
    await client.send(new PutObjectCommand({ Bucket: "emptied", Key, Body: "x" }));
  expect((await client.send(new ListBucketsCommand({}))).Buckets?.map(({ Name }) => Name)).toContain(
    "emptied",
  );
  expect(await codeOf(client.send(new DeleteBucketCommand({ Bucket: "emptied" })))).toBe("BucketNotEmpty");
  const Objects = [{ Key: "1" }, { Key: "2 & <3>" }, { Key: "never was" }];
  const deleted = await client.send(new DeleteObjectsCommand({ Bucket: "emptied", Delete: { Objects } }));
  expect(deleted.Deleted?.map(({ Key }) => Key)).toEqual(["1", "2 & <3>", "never was"]);
  await client.send(new DeleteBucketCommand({ Bucket: "emptied" }));
  expect(await codeOf(client.send(new ListObjectsV2Command({ Bucket: "emptied" })))).toBe("NoSuchBucket");
});

test("a copy has the body and headers of its source, or new headers", async () => {
  await put("source ü", "copied", { ContentType: "text/vtt", Metadata: { a: "1" } });
  const CopySource = `${Bucket}/${encodeURIComponent("source ü")}`;
  await storage.checked.send(new CopyObjectCommand({ Bucket, Key: "copy", CopySource }));
  expect(await get("copy")).toBe("copied");
  expect(await storage.checked.send(new HeadObjectCommand({ Bucket, Key: "copy" }))).toMatchObject({
    ContentType: "text/vtt",
    Metadata: { a: "1" },
  });
  const itself = { Bucket, Key: "source ü", CopySource };
  expect(await codeOf(storage.checked.send(new CopyObjectCommand(itself)))).toBe("InvalidRequest");
  await storage.checked.send(
    new CopyObjectCommand({ ...itself, MetadataDirective: "REPLACE", ContentType: "text/plain" }),
  );
  expect((await storage.checked.send(new HeadObjectCommand({ Bucket, Key: "source ü" }))).ContentType).toBe(
    "text/plain",
  );
  expect(await get("source ü")).toBe("copied");
  expect(
    await codeOf(
      storage.checked.send(new CopyObjectCommand({ Bucket, Key: "copy", CopySource: `${Bucket}/nowhere` })),
    ),
  ).toBe("NoSuchKey");
});

test("what is not there is refused by its name, never answered as something else", async () => {
  expect(await codeOf(storage.checked.send(new GetObjectAclCommand({ Bucket, Key: "x" })))).toBe(
    "NotImplemented",
  );
  expect(await codeOf(put("a".repeat(1025), "x"))).toBe("KeyTooLongError");
  expect(await codeOf(storage.checked.send(new CreateBucketCommand({ Bucket: "Not_A_Bucket" })))).toBe(
    "InvalidBucketName",
  );
  expect(await codeOf(storage.checked.send(new GetObjectCommand({ Bucket: "nobucket", Key: "x" })))).toBe(
    "NoSuchBucket",
  );
});

test("a clock that is off is told so", async () => {
  const late = storage.client({ systemClockOffset: -3_600_000 });
  expect(await codeOf(late.send(new GetObjectCommand({ Bucket, Key: "x" })))).toBe("RequestTimeTooSkewed");
});

test("objects outlive a restart, and a taken port is an error", async () => {
  await put("kept", "still here");
  const again = await startFakeS3(storage.settings);
  const { Body } = await storage
    .client({ endpoint: again.url })
    .send(new GetObjectCommand({ Bucket, Key: "kept" }));
  expect(await Body?.transformToString()).toBe("still here");
  await again.close();
  await expect(startFakeS3({ ...storage.settings, port: storage.port })).rejects.toThrow("EADDRINUSE");
});

test("pages of our origin read replies and refusals; others, and other methods, get no leave", async () => {
  await put("cors", "x");
  const reply = await fetch(await link("cors"), { headers: { origin: ORIGIN } });
  expect(reply.headers.get("access-control-allow-origin")).toBe(ORIGIN);
  expect(reply.headers.get("access-control-expose-headers")).toContain("Content-Range");
  expect(reply.headers.get("vary")).toContain("Origin");
  const refused = await fetch(await link("nowhere"), { headers: { origin: ORIGIN } });
  expect([refused.status, refused.headers.get("access-control-allow-origin")]).toEqual([404, ORIGIN]);
  const stranger = await fetch(await link("cors"), { headers: { origin: "http://evil.example" } });
  expect(stranger.headers.get("access-control-allow-origin")).toBeNull();
  const preflight = (headers: Record<string, string>) =>
    fetch(`${storage.url}/${Bucket}/cors`, { method: "OPTIONS", headers });
  const asked = { "access-control-request-method": "PUT", "access-control-request-headers": "content-type" };
  const leave = await preflight({ origin: ORIGIN, ...asked });
  expect([leave.status, leave.headers.get("access-control-allow-headers")]).toEqual([200, "content-type"]);
  expect((await preflight({ origin: ORIGIN, "access-control-request-method": "DELETE" })).status).toBe(403);
  expect((await preflight(asked)).status).toBe(400);
});

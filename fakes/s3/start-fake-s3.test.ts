import { createHash } from "node:crypto";
import { mkdtempSync, readdirSync, rmSync } from "node:fs";
import { connect } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import {
  AbortMultipartUploadCommand,
  type CompletedPart,
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  ListPartsCommand,
  PutObjectCommand,
  S3Client,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { afterAll, beforeAll, expect, test } from "vitest";
import { startFakeS3, type FakeS3 } from "./start-fake-s3";

const ORIGIN = "http://localhost:3000";
const Bucket = "films";
const PART = 5 * 1024 * 1024;
const root = mkdtempSync(join(tmpdir(), "fake-s3-"));
const settings = {
  root,
  port: 0,
  accessKeyId: "id",
  secretAccessKey: "secret",
  origins: [ORIGIN],
  buckets: [Bucket],
};
let fake: FakeS3;
let s3: S3Client;

const clientOf = (
  url: string,
  secretAccessKey = "secret",
  accessKeyId = "id",
  checksums: "WHEN_REQUIRED" | "WHEN_SUPPORTED" = "WHEN_SUPPORTED",
) =>
  new S3Client({
    endpoint: url,
    region: "us-east-1",
    forcePathStyle: true,
    credentials: { accessKeyId, secretAccessKey },
    requestChecksumCalculation: checksums,
    responseChecksumValidation: checksums,
    maxAttempts: 1,
  });

beforeAll(async () => {
  fake = await startFakeS3(settings);
  s3 = clientOf(fake.url);
});

afterAll(async () => {
  await fake.close();
  rmSync(root, { recursive: true, force: true });
});

const put = (Key: string, Body: string | Buffer) =>
  s3.send(new PutObjectCommand({ Bucket, Key, Body, ContentType: "video/mp4" }));
const text = async (Key: string, Range?: string) =>
  (await (
    await s3.send(new GetObjectCommand({ Bucket, Key, ...(Range ? { Range } : {}) }))
  ).Body?.transformToString()) ?? "";
const codeOf = (work: Promise<unknown>) =>
  work.then(
    () => "accepted",
    (error: unknown) => (error as Error).name,
  );

test("what is put is got back, byte for byte, under any key", async () => {
  for (const key of ["plain.txt", "with space/ü+&=?%.mp4", "../../escape", "a".repeat(900)]) {
    await put(key, `body of ${key}`);
    expect(await text(key)).toBe(`body of ${key}`);
  }
  const stored = readdirSync(join(root, Bucket));
  expect(stored.every((name) => /^[0-9a-f]{64}\.(json|[0-9a-f-]{36})$/.test(name))).toBe(true);
});

test("a stream with its checksum in a trailer arrives without the framing", async () => {
  const body = Buffer.alloc(300_000, "abc");
  await s3.send(
    new PutObjectCommand({
      Bucket,
      Key: "stream",
      Body: Readable.from([body.subarray(0, 100), body.subarray(100)]),
      ContentLength: body.length,
    }),
  );
  expect(
    createHash("sha256")
      .update(await text("stream"))
      .digest("hex"),
  ).toBe(createHash("sha256").update(body).digest("hex"));
});

test("the head tells size, type and ETag; the ETag of a whole object is its MD5", async () => {
  await put("head", "hello");
  const head = await s3.send(new HeadObjectCommand({ Bucket, Key: "head" }));
  expect(head).toMatchObject({ ContentLength: 5, ContentType: "video/mp4", AcceptRanges: "bytes" });
  // MD5 of "hello" (RFC 1321 algorithm), as any md5sum prints it.
  expect(head.ETag).toBe('"5d41402abc4b2a76b9719d911017c592"');
});

test("every form of a range is answered as RFC 9110 section 14 says", async () => {
  await put("range", "0123456789");
  expect(await text("range", "bytes=2-5")).toBe("2345");
  expect(await text("range", "bytes=7-")).toBe("789");
  expect(await text("range", "bytes=-3")).toBe("789");
  expect(await text("range", "bytes=8-99")).toBe("89");
  const reply = await s3.send(new GetObjectCommand({ Bucket, Key: "range", Range: "bytes=2-5" }));
  expect(reply.ContentRange).toBe("bytes 2-5/10");
  await reply.Body?.transformToString();
  expect(await codeOf(s3.send(new GetObjectCommand({ Bucket, Key: "range", Range: "bytes=10-" })))).toBe(
    "InvalidRange",
  );
});

test("an unchanged object is not sent again", async () => {
  const { ETag = "" } = await put("cached", "hello");
  const url = await getSignedUrl(s3, new GetObjectCommand({ Bucket, Key: "cached" }), { expiresIn: 60 });
  expect((await fetch(url, { headers: { "if-none-match": ETag } })).status).toBe(304);
});

test("missing keys, buckets and uploads are named", async () => {
  expect(await codeOf(s3.send(new GetObjectCommand({ Bucket, Key: "nowhere" })))).toBe("NoSuchKey");
  expect(await codeOf(s3.send(new HeadObjectCommand({ Bucket, Key: "nowhere" })))).toBe("NotFound");
  expect(await codeOf(s3.send(new HeadBucketCommand({ Bucket: "nobucket" })))).toBe("NotFound");
  expect(
    await codeOf(
      s3.send(new ListPartsCommand({ Bucket, Key: "x", UploadId: "00000000-0000-0000-0000-000000000000" })),
    ),
  ).toBe("NoSuchUpload");
});

test("deleting is final and asking again is no fault", async () => {
  await put("gone", "x");
  await s3.send(new DeleteObjectCommand({ Bucket, Key: "gone" }));
  expect(await codeOf(s3.send(new GetObjectCommand({ Bucket, Key: "gone" })))).toBe("NoSuchKey");
  expect(await codeOf(s3.send(new DeleteObjectCommand({ Bucket, Key: "gone" })))).toBe("accepted");
});

test("objects are listed by prefix, page by page", async () => {
  for (const n of [1, 2, 3]) await put(`list/${n}`, "x");
  const first = await s3.send(new ListObjectsV2Command({ Bucket, Prefix: "list/", MaxKeys: 2 }));
  expect(first.Contents?.map(({ Key }) => Key)).toEqual(["list/1", "list/2"]);
  const next = await s3.send(
    new ListObjectsV2Command({
      Bucket,
      Prefix: "list/",
      ContinuationToken: first.NextContinuationToken ?? "",
    }),
  );
  expect(next.Contents?.map(({ Key }) => Key)).toEqual(["list/3"]);
  expect(next.IsTruncated).toBe(false);
});

async function begin(Key: string) {
  const { UploadId = "" } = await s3.send(new CreateMultipartUploadCommand({ Bucket, Key }));
  const send = async (PartNumber: number, Body: Buffer) => {
    const { ETag = "", ChecksumCRC32 } = await s3.send(
      new UploadPartCommand({ Bucket, Key, UploadId, PartNumber, Body }),
    );
    return { PartNumber, ETag, ChecksumCRC32 };
  };
  const complete = (Parts: CompletedPart[]) =>
    s3.send(new CompleteMultipartUploadCommand({ Bucket, Key, UploadId, MultipartUpload: { Parts } }));
  return { Key, UploadId, send, complete };
}

test("parts become one object, whose ETag counts them", async () => {
  const upload = await begin("parts");
  const second = await upload.send(2, Buffer.from("end"));
  const first = await upload.send(1, Buffer.alloc(PART, 1));
  const listed = await s3.send(
    new ListPartsCommand({ Bucket, Key: "parts", UploadId: upload.UploadId, MaxParts: 1 }),
  );
  expect(listed).toMatchObject({ IsTruncated: true, Parts: [{ PartNumber: 1, Size: PART }] });
  const rest = await s3.send(
    new ListPartsCommand({
      Bucket,
      Key: "parts",
      UploadId: upload.UploadId,
      PartNumberMarker: listed.NextPartNumberMarker ?? "",
    }),
  );
  expect(rest.Parts?.map(({ PartNumber }) => PartNumber)).toEqual([2]);
  const done = await upload.complete([first, second]);
  expect(done.ETag).toMatch(/^"[0-9a-f]{32}-2"$/);
  expect(done.Location).toContain("/films/parts");
  expect((await s3.send(new HeadObjectCommand({ Bucket, Key: "parts" }))).ContentLength).toBe(PART + 3);
  expect(await text("parts", `bytes=${PART}-`)).toBe("end");
});

test("an upload completes only with its own parts, in order and large enough", async () => {
  const upload = await begin("strict");
  const [first, second] = [
    await upload.send(1, Buffer.alloc(PART)),
    await upload.send(2, Buffer.from("end")),
  ];
  expect(
    await codeOf(upload.complete([{ ...first, ETag: '"00000000000000000000000000000000"' }, second])),
  ).toBe("InvalidPart");
  expect(await codeOf(upload.complete([first, { ...second, PartNumber: 3 }]))).toBe("InvalidPart");
  expect(await codeOf(upload.complete([second, first]))).toBe("InvalidPartOrder");
  const small = await begin("small");
  const parts = [await small.send(1, Buffer.from("tiny")), await small.send(2, Buffer.from("end"))];
  expect(await codeOf(small.complete(parts))).toBe("EntityTooSmall");
});

test("an aborted upload is gone", async () => {
  const upload = await begin("aborted");
  const part = await upload.send(1, Buffer.from("x"));
  await s3.send(new AbortMultipartUploadCommand({ Bucket, Key: "aborted", UploadId: upload.UploadId }));
  expect(await codeOf(upload.complete([part]))).toBe("NoSuchUpload");
});

test("open uploads outlive a restart of the server", async () => {
  const upload = await begin("restart");
  const first = await upload.send(1, Buffer.from("kept"));
  const again = await startFakeS3(settings);
  const other = clientOf(again.url);
  const parts = await other.send(new ListPartsCommand({ Bucket, Key: "restart", UploadId: upload.UploadId }));
  expect(parts.Parts?.[0]?.ETag).toBe(first.ETag);
  await other.send(
    new CompleteMultipartUploadCommand({
      Bucket,
      Key: "restart",
      UploadId: upload.UploadId,
      MultipartUpload: { Parts: [first] },
    }),
  );
  await again.close();
  expect(await text("restart")).toBe("kept");
});

test("a connection that is cut leaves no part behind", async () => {
  const upload = await begin("cut");
  const url = new URL(
    await getSignedUrl(
      clientOf(fake.url, "secret", "id", "WHEN_REQUIRED"),
      new UploadPartCommand({ Bucket, Key: "cut", UploadId: upload.UploadId, PartNumber: 1 }),
      { expiresIn: 60 },
    ),
  );
  await new Promise<void>((resolve) => {
    const socket = connect(Number(url.port), "localhost", () => {
      socket.write(
        `PUT ${url.pathname}${url.search} HTTP/1.1\r\nHost: ${url.host}\r\nContent-Length: 1000000\r\n\r\nonly the beginning`,
      );
      setTimeout(() => socket.destroy(), 100);
    });
    socket.on("close", () => setTimeout(resolve, 200));
  });
  expect(
    (await s3.send(new ListPartsCommand({ Bucket, Key: "cut", UploadId: upload.UploadId }))).Parts ?? [],
  ).toEqual([]);
});

test("wrong keys, wrong secrets and no signature are refused", async () => {
  const get = new GetObjectCommand({ Bucket, Key: "head" });
  expect(await codeOf(clientOf(fake.url, "wrong").send(get))).toBe("SignatureDoesNotMatch");
  expect(await codeOf(clientOf(fake.url, "secret", "nobody").send(get))).toBe("InvalidAccessKeyId");
  expect((await fetch(`${fake.url}/${Bucket}/head`)).status).toBe(403);
});

test("a presigned link holds for its key, its method and its time, and for nothing else", async () => {
  await put("linked", "hello");
  const link = await getSignedUrl(
    s3,
    new GetObjectCommand({ Bucket, Key: "linked", ResponseContentType: "video/webm" }),
    { expiresIn: 60 },
  );
  const reply = await fetch(link);
  expect([reply.status, reply.headers.get("content-type"), await reply.text()]).toEqual([
    200,
    "video/webm",
    "hello",
  ]);
  expect((await fetch(link.replace("linked", "head"))).status).toBe(403);
  expect((await fetch(link.replace(/.$/, (last) => (last === "0" ? "1" : "0")))).status).toBe(403);
  expect((await fetch(link, { method: "DELETE" })).status).toBe(403);
  expect((await fetch(link.replace("X-Amz-Expires=60", "X-Amz-Expires=6000"))).status).toBe(403);
  const old = await getSignedUrl(s3, new GetObjectCommand({ Bucket, Key: "linked" }), {
    expiresIn: 60,
    signingDate: new Date(Date.now() - 120_000),
  });
  const expired = await fetch(old);
  expect([expired.status, await expired.text()]).toEqual([
    403,
    expect.stringContaining("Request has expired"),
  ]);
});

test("a browser of our origin may send parts and read the ETag; another may not", async () => {
  const upload = await begin("cors");
  const url = await getSignedUrl(
    clientOf(fake.url, "secret", "id", "WHEN_REQUIRED"),
    new UploadPartCommand({ Bucket, Key: "cors", UploadId: upload.UploadId, PartNumber: 1 }),
    { expiresIn: 60 },
  );
  const asked = await fetch(url, {
    method: "OPTIONS",
    headers: { origin: ORIGIN, "access-control-request-method": "PUT" },
  });
  expect(asked.headers.get("access-control-allow-methods")).toContain("PUT");
  const sent = await fetch(url, { method: "PUT", body: "part", headers: { origin: ORIGIN } });
  expect(sent.status).toBe(200);
  expect(sent.headers.get("access-control-allow-origin")).toBe(ORIGIN);
  expect(sent.headers.get("access-control-expose-headers")).toContain("ETag");
  const elsewhere = await fetch(url, {
    method: "OPTIONS",
    headers: { origin: "http://evil.example", "access-control-request-method": "PUT" },
  });
  expect(elsewhere.status).toBe(403);
});

test("a checksum that does not fit the body is refused and nothing is stored", async () => {
  const digest = (name: string) => createHash(name).update("other").digest("base64");
  for (const wrong of [
    { ContentMD5: digest("md5") },
    { ChecksumSHA256: digest("sha256") },
    { ChecksumSHA1: digest("sha1") },
    { ChecksumCRC32: "AAAAAA==" },
    { ChecksumCRC32C: "AAAAAA==" },
  ])
    expect(
      await codeOf(s3.send(new PutObjectCommand({ Bucket, Key: "damaged", Body: "hello", ...wrong }))),
    ).toBe("BadDigest");
  expect(await codeOf(s3.send(new GetObjectCommand({ Bucket, Key: "damaged" })))).toBe("NoSuchKey");
});

// The check value of CRC-32C in catalogues of CRC algorithms, from memory.
test("right checksums are taken: CRC-32C of 123456789 is e3069283", async () => {
  const ChecksumCRC32C = Buffer.from("e3069283", "hex").toString("base64");
  expect(
    await codeOf(s3.send(new PutObjectCommand({ Bucket, Key: "crc", Body: "123456789", ChecksumCRC32C }))),
  ).toBe("accepted");
});

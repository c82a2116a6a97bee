// What arrives damaged is refused and leaves nothing; what is damaged in storage is noticed by the client.
import { createHash } from "node:crypto";
import { readdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { Readable } from "node:stream";
import { crc32 } from "node:zlib";
import {
  type ChecksumAlgorithm,
  type CompletedPart,
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
  type S3Client,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { afterAll, beforeAll, expect, test } from "vitest";
import { Bucket, codeOf, startStorage } from "./storage-under-test";

const PART = 5 * 1024 * 1024;
let storage: Awaited<ReturnType<typeof startStorage>>;
beforeAll(async () => {
  storage = await startStorage();
});
afterAll(() => storage.close());

/** Gives a client that changes what it sends after everything is signed and summed. */
function damaging(client: S3Client, change: (sent: Buffer) => Buffer): S3Client {
  client.middlewareStack.add(
    (next) => async (args) => {
      const request = args.request as { body: unknown };
      if (request.body instanceof Readable) {
        const pieces: Buffer[] = [];
        for await (const piece of request.body) pieces.push(Buffer.from(piece as Uint8Array));
        request.body = Readable.from([change(Buffer.concat(pieces))]);
      } else if (request.body !== undefined) request.body = change(Buffer.from(request.body as string));
      return next(args);
    },
    { step: "finalizeRequest", priority: "low", name: "damage" },
  );
  return client;
}
const flip = (sent: Buffer) => Buffer.from(sent.toString("latin1").replace("payload", "paylord"), "latin1");
const stream = (text: string) => ({ Body: Readable.from([Buffer.from(text)]), ContentLength: text.length });
const put = (client: S3Client, Key: string, more: object) =>
  codeOf(client.send(new PutObjectCommand({ Bucket, Key, ...more })));
const has = async (Key: string) => {
  const code = await codeOf(storage.plain.send(new HeadObjectCommand({ Bucket, Key })));
  return code === "accepted";
};

const ALGORITHMS = ["CRC32", "CRC32C", "CRC64NVME", "SHA1", "SHA256"] as const satisfies ChecksumAlgorithm[];

test.each(ALGORITHMS)("%s is checked, in a header and in a trailer", async (ChecksumAlgorithm) => {
  const right = `${ChecksumAlgorithm} right`;
  expect(await put(storage.checked, right, { Body: "the payload", ChecksumAlgorithm })).toBe("accepted");
  expect(await put(storage.checked, right, { ...stream("the payload"), ChecksumAlgorithm })).toBe("accepted");
  const head = await storage.checked.send(
    new HeadObjectCommand({ Bucket, Key: right, ChecksumMode: "ENABLED" }),
  );
  const value = head[`Checksum${ChecksumAlgorithm}`] ?? "";
  const wrong = Buffer.alloc(Buffer.from(value, "base64").length).toString("base64");
  const claimed = { Body: "the payload", [`Checksum${ChecksumAlgorithm}`]: wrong };
  expect(await put(storage.checked, "header", claimed)).toBe("BadDigest");
  const damaged = { ...stream("the payload"), ChecksumAlgorithm };
  expect(await put(damaging(storage.client(), flip), "trailer", damaged)).toBe("BadDigest");
  expect([await has("header"), await has("trailer")]).toEqual([false, false]);
  expect(readdirSync(join(storage.root, ".drafts"))).toEqual([]);
});

test("a body that does not have its signed hash is refused", async () => {
  const client = damaging(storage.client({ requestChecksumCalculation: "WHEN_REQUIRED" }), flip);
  expect(await put(client, "hash", { Body: "the payload" })).toBe("XAmzContentSHA256Mismatch");
  expect(await has("hash")).toBe(false);
});

test("Content-MD5 is checked, and one that is none is said to be", async () => {
  const ContentMD5 = createHash("md5").update("the payload").digest("base64");
  expect(await put(storage.plain, "md5", { Body: "the payload", ContentMD5 })).toBe("accepted");
  expect(await put(storage.plain, "md5", { Body: "the paylord", ContentMD5 })).toBe("BadDigest");
  expect(await put(storage.plain, "md5", { Body: "x", ContentMD5: "AAAA" })).toBe("InvalidDigest");
});

test("broken framing is refused with its code, also while the body is on its way", async () => {
  const broken = damaging(storage.client(), (sent) =>
    Buffer.concat([Buffer.from("zz\r\n"), sent, Buffer.alloc(5_000_000)]),
  );
  expect(await put(broken, "framing", stream("the payload"))).toBe("IncompleteBody");
  const bare = damaging(storage.client(), (sent) =>
    Buffer.from(sent.toString("latin1").replace(/x-amz-checksum-crc32:.*\r\n/, ""), "latin1"),
  );
  expect(await put(bare, "framing", stream("the payload"))).toBe("MalformedTrailerError");
  const short = damaging(storage.client(), (sent) =>
    Buffer.from(sent.toString("latin1").replace("b\r\nthe payload", "3\r\nthe"), "latin1"),
  );
  expect(await put(short, "framing", stream("the payload"))).toBe("IncompleteBody");
  expect(await has("framing")).toBe(false);
});

test("a link with the checksum of an empty body takes an empty body only", async () => {
  const url = await getSignedUrl(storage.checked, new PutObjectCommand({ Bucket, Key: "baked" }), {
    expiresIn: 60,
  });
  expect(url).toContain("x-amz-checksum-crc32=AAAAAA");
  const reply = await fetch(url, { method: "PUT", body: "film" });
  expect([reply.status, await reply.text()]).toEqual([
    400,
    expect.stringContaining("<Code>BadDigest</Code>"),
  ]);
  expect((await fetch(url, { method: "PUT", body: "" })).status).toBe(200);
});

test("a header that is not signed cannot be added to a link", async () => {
  const url = await getSignedUrl(storage.plain, new PutObjectCommand({ Bucket, Key: "added" }), {
    expiresIn: 60,
  });
  const reply = await fetch(url, { method: "PUT", body: "x", headers: { "x-amz-meta-role": "owner" } });
  expect([reply.status, await reply.text()]).toEqual([
    403,
    expect.stringContaining("<HeadersNotSigned>x-amz-meta-role</HeadersNotSigned>"),
  ]);
});

test("the client is given the checksum back and notices damage on the disk", async () => {
  await storage.checked.send(new PutObjectCommand({ Bucket, Key: "rotten", Body: "the payload" }));
  const read = async () => {
    const reply = await storage.checked.send(new GetObjectCommand({ Bucket, Key: "rotten" }));
    expect(reply.ChecksumCRC32).toBeDefined();
    return reply.Body?.transformToString();
  };
  expect(await read()).toBe("the payload");
  const name = createHash("sha256").update("rotten").digest("hex");
  const folder = join(storage.root, Bucket);
  const body = readdirSync(folder).find((file) => file.startsWith(name) && !file.endsWith(".json")) ?? "";
  writeFileSync(join(folder, body), "the paylord");
  await expect(read()).rejects.toThrow("Checksum mismatch");
});

const base64 = (value: number) => {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32BE(value);
  return bytes.toString("base64");
};

/** Two parts, as the client sends them. */
async function uploadTwo(Key: string, create: object = {}) {
  const bodies = [Buffer.alloc(PART, "one "), Buffer.from("two")];
  const { UploadId = "" } = await storage.checked.send(
    new CreateMultipartUploadCommand({ Bucket, Key, ...create }),
  );
  const Parts: CompletedPart[] = [];
  for (const [at, Body] of bodies.entries()) {
    const { ETag, ChecksumCRC32 } = await storage.checked.send(
      new UploadPartCommand({ Bucket, Key, UploadId, PartNumber: at + 1, Body, ChecksumAlgorithm: "CRC32" }),
    );
    Parts.push({ PartNumber: at + 1, ETag, ChecksumCRC32 });
  }
  const complete = (parts: CompletedPart[], more: object = {}) =>
    storage.checked.send(
      new CompleteMultipartUploadCommand({
        Bucket,
        Key,
        UploadId,
        MultipartUpload: { Parts: parts },
        ...more,
      }),
    );
  return { UploadId, Parts, complete, bodies };
}

test("the checksum of an upload is the one of its parts' checksums, and its parts must be named with theirs", async () => {
  const { Parts, complete, bodies } = await uploadTwo("composite", { ChecksumAlgorithm: "CRC32" });
  const sums = bodies.map((body) => base64(crc32(body)));
  expect(Parts.map(({ ChecksumCRC32 }) => ChecksumCRC32)).toEqual(sums);
  // aws-sdk-js-v3#6818: "The complete request must include the checksum for each part."
  const bare = Parts.map(({ PartNumber, ETag }) => ({ PartNumber, ETag }));
  expect(await codeOf(complete(bare))).toBe("InvalidRequest");
  const wrong = Parts.map((part) => ({ ...part, ChecksumCRC32: "AAAAAA==" }));
  expect(await codeOf(complete(wrong))).toBe("InvalidPart");
  const done = await complete(Parts);
  const composite = crc32(Buffer.concat(sums.map((sum) => Buffer.from(sum, "base64"))));
  expect(done).toMatchObject({ ChecksumCRC32: `${base64(composite)}-2`, ChecksumType: "COMPOSITE" });
});

test("a checksum of the whole object is made and compared when it was asked for", async () => {
  const asked = { ChecksumAlgorithm: "CRC32", ChecksumType: "FULL_OBJECT" };
  const { Parts, complete, bodies } = await uploadTwo("full", asked);
  const whole = base64(crc32(Buffer.concat(bodies)));
  expect(await codeOf(complete(Parts, { ChecksumCRC32: "AAAAAA==", ChecksumType: "FULL_OBJECT" }))).toBe(
    "BadDigest",
  );
  const done = await complete(Parts, { ChecksumCRC32: whole, ChecksumType: "FULL_OBJECT" });
  expect(done).toMatchObject({ ChecksumCRC32: whole, ChecksumType: "FULL_OBJECT" });
});

test("a part without the checksum that its upload was begun with is refused", async () => {
  const { UploadId = "" } = await storage.checked.send(
    new CreateMultipartUploadCommand({ Bucket, Key: "mixed", ChecksumAlgorithm: "CRC32" }),
  );
  const part = { Bucket, Key: "mixed", UploadId, PartNumber: 1, Body: "x" };
  expect(await codeOf(storage.plain.send(new UploadPartCommand(part)))).toBe("InvalidRequest");
});

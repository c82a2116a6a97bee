import { createWriteStream } from "node:fs";
import { pipeline } from "node:stream/promises";
import { readByteRange } from "./byte-range";
import { readCondition, rangeHolds, writeCondition } from "./conditions";
import { checksumHeaders, keptHeaders, replyHeaders } from "./object-headers";
import { receiveFile } from "./receive-body";
import type { S3Call } from "./s3-call";
import { S3Error } from "./s3-error";
import { readPath } from "./signature";
import { element, sendXml } from "./xml";

/** PUT /bucket/key. */
export async function putObject({
  request,
  response,
  bucket,
  key,
  verified,
  objects,
}: S3Call): Promise<void> {
  const condition = writeCondition(request.headers);
  // Asked before the body is on its way, and once more when it has arrived.
  condition(await objects.find(bucket, key));
  const record = await objects.drafts.with(
    async (draft) => receiveFile(request, verified, draft),
    (draft, { size, md5, checksum }) =>
      objects.keep(
        bucket,
        draft,
        {
          key,
          size,
          etag: `"${md5}"`,
          headers: keptHeaders(request.headers),
          checksum: checksum && { ...checksum, type: "FULL_OBJECT" },
        },
        condition,
      ),
  );
  response.writeHead(200, {
    etag: record.etag,
    ...checksumHeaders(record.checksum),
    "content-length": 0,
  });
  response.end();
}

/** PUT /bucket/key with x-amz-copy-source. */
export async function copyObject(call: S3Call): Promise<void> {
  const { request, response, bucket, key, objects } = call;
  const source = String(request.headers["x-amz-copy-source"] ?? "").replace(/^\/?/, "/");
  const [fromBucket = "", ...rest] = readPath(source);
  const fromKey = rest.join("/");
  if (fromKey === "")
    throw new S3Error(400, "InvalidArgument", "Copy Source must mention the source bucket and key");
  await objects.needBucket(fromBucket);
  const isReplaced = request.headers["x-amz-metadata-directive"] === "REPLACE";
  if (fromBucket === bucket && fromKey === key && !isReplaced)
    throw new S3Error(400, "InvalidRequest", "An object can be copied to itself only with other metadata.");
  const { record, body } = await objects.openObject(fromBucket, fromKey);
  const copied = await objects.drafts
    .with(
      // From the open body: the source may be replaced while it is copied.
      (draft) =>
        pipeline(body.createReadStream({ autoClose: false }), createWriteStream(draft, { flags: "wx" })),
      (draft) =>
        objects.keep(
          bucket,
          draft,
          {
            key,
            size: record.size,
            etag: record.etag,
            headers: isReplaced ? keptHeaders(request.headers) : record.headers,
            checksum: record.checksum,
          },
          () => undefined,
        ),
    )
    .finally(() => body.close());
  sendXml(
    response,
    "CopyObjectResult",
    element("ETag", copied.etag) + element("LastModified", copied.modified),
  );
}

/** GET and HEAD /bucket/key, whole or a range, under conditions. */
export async function getObject(call: S3Call): Promise<void> {
  const { request, response, bucket, key, query, objects } = call;
  const { record, body } = await objects.openObject(bucket, key);
  try {
    const headers: Record<string, string | number> = replyHeaders(record, query);
    if (readCondition(request.headers, record) === "not-modified") {
      for (const name of ["content-type", "content-encoding", "content-language", "content-disposition"])
        delete headers[name];
      return void response.writeHead(304, headers).end();
    }
    const range = rangeHolds(request.headers["if-range"], record)
      ? readByteRange(request.headers.range, record.size)
      : "whole";
    if (range === "unsatisfiable") {
      response.setHeader("content-range", `bytes */${record.size}`);
      throw new S3Error(416, "InvalidRange", undefined, {
        RangeRequested: request.headers.range ?? "",
        ActualObjectSize: record.size,
      });
    }
    const mode = request.headers["x-amz-checksum-mode"] ?? query.get("x-amz-checksum-mode");
    if (range === "whole") {
      if (String(mode).toUpperCase() === "ENABLED") Object.assign(headers, checksumHeaders(record.checksum));
      headers["content-length"] = record.size;
    } else {
      headers["content-range"] = `bytes ${range.start}-${range.end}/${record.size}`;
      headers["content-length"] = range.end - range.start + 1;
    }
    response.writeHead(range === "whole" ? 200 : 206, headers);
    if (request.method === "HEAD" || record.size === 0) return void response.end();
    const stream = body.createReadStream({ ...(range === "whole" ? {} : range), autoClose: false });
    // A player that seeks away cuts the reply; that is no fault.
    await pipeline(stream, response).catch(() => undefined);
  } finally {
    await body.close();
  }
}

/** DELETE /bucket/key; an object that is not there counts as deleted. */
export async function deleteObject({ response, bucket, key, objects }: S3Call): Promise<void> {
  await objects.remove(bucket, key);
  response.writeHead(204).end();
}

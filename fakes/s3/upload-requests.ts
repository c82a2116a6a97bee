import { checksumName, readChecksum } from "./checksum";
import { writeCondition } from "./conditions";
import { compareKeys } from "./object-files";
import { checksumHeaders, keptHeaders } from "./object-headers";
import { receiveText } from "./receive-body";
import { readCount, type S3Call } from "./s3-call";
import { S3Error } from "./s3-error";
import type { NamedPart, UploadRecord } from "./upload-files";
import { contentsOf, element, sendXml, textOf } from "./xml";

const MOST_PARTS = 10_000;

function readAlgorithm({ request }: S3Call): UploadRecord["algorithm"] {
  const asked = request.headers["x-amz-checksum-algorithm"];
  const type = String(request.headers["x-amz-checksum-type"] ?? "").toUpperCase();
  if (asked === undefined) return null;
  const name = checksumName(String(asked));
  if (!name) throw new S3Error(501, "NotImplemented", `${String(asked)} cannot be checked here.`);
  if (!["", "COMPOSITE", "FULL_OBJECT"].includes(type))
    throw new S3Error(400, "InvalidRequest", "Value for x-amz-checksum-type header is invalid.");
  const isCrc = name.startsWith("crc");
  if ((type === "FULL_OBJECT" && !isCrc) || (type === "COMPOSITE" && name === "crc64nvme"))
    throw new S3Error(
      400,
      "InvalidRequest",
      `The ${type} checksum type cannot be used with the ${name} checksum algorithm.`,
    );
  return { name, type: type === "FULL_OBJECT" || name === "crc64nvme" ? "FULL_OBJECT" : "COMPOSITE" };
}

/** POST /bucket/key?uploads. */
export async function createUpload(call: S3Call): Promise<void> {
  const { request, response, bucket, key, uploads } = call;
  const algorithm = readAlgorithm(call);
  const { id } = await uploads.create({ bucket, key, headers: keptHeaders(request.headers), algorithm });
  if (algorithm) {
    response.setHeader("x-amz-checksum-algorithm", algorithm.name.toUpperCase());
    response.setHeader("x-amz-checksum-type", algorithm.type);
  }
  sendXml(
    response,
    "InitiateMultipartUploadResult",
    element("Bucket", bucket) + element("Key", key) + element("UploadId", id),
  );
}

/** PUT /bucket/key?partNumber=&uploadId=. */
export async function putPart(call: S3Call, upload: UploadRecord): Promise<void> {
  const { request, response, query, verified, uploads } = call;
  const text = query.get("partNumber") ?? "";
  const n = Number(text);
  if (!/^\d{1,5}$/.test(text) || n < 1 || n > MOST_PARTS)
    throw new S3Error(
      400,
      "InvalidArgument",
      `Part number must be an integer between 1 and ${MOST_PARTS}, inclusive`,
      { ArgumentName: "partNumber", ArgumentValue: text },
    );
  if (request.headers["x-amz-copy-source"] !== undefined) throw new S3Error(501, "NotImplemented");
  const part = await uploads.putPart(upload, n, request, verified);
  response.writeHead(200, { etag: part.etag, ...checksumHeaders(part.checksum), "content-length": 0 });
  response.end();
}

/** GET /bucket/key?uploadId=, page by page. */
export async function listParts(call: S3Call, upload: UploadRecord): Promise<void> {
  const { response, bucket, key, uploads } = call;
  const after = readCount(call, "part-number-marker", MOST_PARTS, 0);
  const most = readCount(call, "max-parts", 1000);
  const rest = (await uploads.parts(upload)).filter(({ n }) => n > after);
  const page = rest.slice(0, most);
  const isTruncated = most > 0 && rest.length > page.length;
  const rows = page.map(
    ({ n, etag, size, checksum, modified }) =>
      `<Part>${element("PartNumber", n)}${element("LastModified", modified)}${element("ETag", etag)}${element("Size", size)}${checksum ? element(`Checksum${checksum.name.toUpperCase()}`, checksum.value) : ""}</Part>`,
  );
  const head = [
    element("Bucket", bucket),
    element("Key", key),
    element("UploadId", upload.id),
    element("PartNumberMarker", after),
    // On the last page it would send the client's paginator round again.
    isTruncated ? element("NextPartNumberMarker", page.at(-1)?.n ?? 0) : "",
    element("MaxParts", most),
    element("IsTruncated", isTruncated),
    element("StorageClass", "STANDARD"),
  ];
  sendXml(response, "ListPartsResult", head.join("") + rows.join(""));
}

function readNamedParts(document: string): NamedPart[] {
  const parts = contentsOf(document, "Part").map((part) => {
    const claims = [...part.matchAll(/<Checksum([A-Z0-9]+)>/g)].map(
      ([, name = ""]) => [`x-amz-checksum-${name}`, textOf(part, `Checksum${name}`) ?? ""] as const,
    );
    return {
      n: Number(textOf(part, "PartNumber") ?? "x"),
      etag: textOf(part, "ETag") ?? "",
      checksum: readChecksum(claims),
    };
  });
  const isReadable = parts.every(({ n, etag }) => Number.isInteger(n) && etag !== "");
  if (parts.length === 0 || parts.length > MOST_PARTS || !isReadable) throw new S3Error(400, "MalformedXML");
  return parts;
}

/** POST /bucket/key?uploadId=: joins the parts. */
export async function completeUpload(call: S3Call, upload: UploadRecord): Promise<void> {
  const { request, response, bucket, key, uploads } = call;
  // Here the header is about the object, not about the document that the request carries.
  const claim = readChecksum(Object.entries(request.headers).map(([name, value]) => [name, String(value)]));
  const parts = readNamedParts(await receiveText(request, call.verified, { hasBodyChecksum: false }));
  const record = await uploads.complete(upload, parts, claim, writeCondition(request.headers));
  const location = `http://${request.headers.host ?? ""}${(request.url ?? "").split("?")[0] ?? ""}`;
  const { checksum } = record;
  sendXml(
    response,
    "CompleteMultipartUploadResult",
    [
      element("Location", location),
      element("Bucket", bucket),
      element("Key", key),
      element("ETag", record.etag),
      checksum
        ? element(`Checksum${checksum.name.toUpperCase()}`, checksum.value) +
          element("ChecksumType", checksum.type)
        : "",
    ].join(""),
  );
}

/** DELETE /bucket/key?uploadId=. */
export async function abortUpload({ response, uploads }: S3Call, upload: UploadRecord): Promise<void> {
  await uploads.abort(upload);
  response.writeHead(204).end();
}

/** GET /bucket?uploads: the open uploads, page by page. */
export async function listUploads(call: S3Call): Promise<void> {
  const { query, response, bucket, uploads } = call;
  const prefix = query.get("prefix") ?? "";
  const most = readCount(call, "max-uploads", 1000);
  const [keyMarker, idMarker] = [query.get("key-marker") ?? "", query.get("upload-id-marker") ?? ""];
  const all = (await uploads.list(bucket)).filter(({ key }) => key.startsWith(prefix));
  const markerAt = idMarker === "" ? -1 : all.findIndex(({ id }) => id === idMarker);
  const rest =
    markerAt >= 0 ? all.slice(markerAt + 1) : all.filter(({ key }) => compareKeys(key, keyMarker) > 0);
  const page = rest.slice(0, most);
  const last = page.at(-1);
  const isTruncated = most > 0 && rest.length > page.length;
  const head = [
    element("Bucket", bucket),
    element("KeyMarker", keyMarker),
    element("UploadIdMarker", idMarker),
    element("Prefix", prefix),
    element("MaxUploads", most),
    element("IsTruncated", isTruncated),
  ];
  if (isTruncated && last)
    head.push(element("NextKeyMarker", last.key), element("NextUploadIdMarker", last.id));
  const rows = page.map(
    ({ key, id, initiated }) =>
      `<Upload>${element("Key", key)}${element("UploadId", id)}${element("StorageClass", "STANDARD")}${element("Initiated", initiated)}</Upload>`,
  );
  sendXml(response, "ListMultipartUploadsResult", head.join("") + rows.join(""));
}

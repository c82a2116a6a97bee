import { compareKeys, type ObjectRecord } from "./object-files";
import { receiveText } from "./receive-body";
import { readCount, type S3Call } from "./s3-call";
import { S3Error } from "./s3-error";
import { encodeUri } from "./signature";
import { contentsOf, element, sendXml, textOf } from "./xml";

/** GET /: the buckets. */
export async function listBuckets({ objects, response }: S3Call): Promise<void> {
  const rows = (await objects.buckets()).map(
    ({ name, created }) => `<Bucket>${element("Name", name)}${element("CreationDate", created)}</Bucket>`,
  );
  sendXml(response, "ListAllMyBucketsResult", `<Buckets>${rows.join("")}</Buckets>`);
}

/** A page of a bucket: objects, and with a delimiter the "folders" they fall into. */
type Entry = { kind: "object"; key: string; record: ObjectRecord } | { kind: "prefix"; key: string };

function entriesOf(records: readonly ObjectRecord[], prefix: string, delimiter: string): Entry[] {
  const entries = new Map<string, Entry>();
  for (const record of records) {
    if (!record.key.startsWith(prefix)) continue;
    const at = delimiter === "" ? -1 : record.key.indexOf(delimiter, prefix.length);
    const key = at < 0 ? record.key : record.key.slice(0, at + delimiter.length);
    if (at < 0) entries.set(`object ${key}`, { kind: "object", key, record });
    else entries.set(`prefix ${key}`, { kind: "prefix", key });
  }
  return [...entries.values()].toSorted((a, b) => compareKeys(a.key, b.key));
}

function readToken(token: string): string {
  const text = Buffer.from(token, "base64url").toString("utf8");
  if (token === "" || Buffer.from(text, "utf8").toString("base64url") !== token)
    throw new S3Error(400, "InvalidArgument", "The continuation token provided is incorrect");
  return text;
}

/** GET /bucket: ListObjectsV2, and ListObjects with its marker. */
export async function listObjects(call: S3Call): Promise<void> {
  const { query, response, bucket, objects } = call;
  const isV2 = query.get("list-type") === "2";
  const [prefix, delimiter] = [query.get("prefix") ?? "", query.get("delimiter") ?? ""];
  const most = readCount(call, "max-keys", 1000);
  const token = query.get("continuation-token");
  const after =
    isV2 && token !== undefined ? readToken(token) : (query.get(isV2 ? "start-after" : "marker") ?? "");
  const isEncoded = query.get("encoding-type") === "url";
  const keyText = (key: string) => (isEncoded ? key.split("/").map(encodeUri).join("/") : key);

  // A page that ended with a prefix goes on after everything under it.
  const rest = entriesOf(await objects.list(bucket), prefix, delimiter).filter(
    ({ key }) => compareKeys(key, after) > 0,
  );
  const page = rest.slice(0, most);
  const last = page.at(-1);
  const isTruncated = most > 0 && rest.length > page.length;
  const head = [
    element("Name", bucket),
    element("Prefix", keyText(prefix)),
    delimiter === "" ? "" : element("Delimiter", keyText(delimiter)),
    element("MaxKeys", most),
    isEncoded ? element("EncodingType", "url") : "",
    element("IsTruncated", isTruncated),
  ];
  if (isV2) {
    head.push(element("KeyCount", page.length));
    if (token !== undefined) head.push(element("ContinuationToken", token));
    const startAfter = query.get("start-after");
    if (startAfter !== undefined) head.push(element("StartAfter", keyText(startAfter)));
    if (isTruncated && last)
      head.push(element("NextContinuationToken", Buffer.from(last.key, "utf8").toString("base64url")));
  } else {
    head.push(element("Marker", keyText(after)));
    if (isTruncated && last) head.push(element("NextMarker", keyText(last.key)));
  }
  const rows = page.map((entry) =>
    entry.kind === "prefix"
      ? `<CommonPrefixes>${element("Prefix", keyText(entry.key))}</CommonPrefixes>`
      : `<Contents>${element("Key", keyText(entry.key))}${element("LastModified", entry.record.modified)}${element("ETag", entry.record.etag)}${element("Size", entry.record.size)}${element("StorageClass", "STANDARD")}</Contents>`,
  );
  sendXml(response, "ListBucketResult", head.join("") + rows.join(""));
}

/** POST /bucket?delete: up to 1000 keys at once; one that is not there counts as deleted. */
export async function deleteObjects(call: S3Call): Promise<void> {
  const { request, response, bucket, objects, verified } = call;
  const isChecked =
    request.headers["content-md5"] !== undefined ||
    request.headers["x-amz-trailer"] !== undefined ||
    Object.keys(request.headers).some((name) => name.startsWith("x-amz-checksum-"));
  if (!isChecked)
    throw new S3Error(400, "InvalidRequest", "Missing required header for this request: Content-MD5");
  const document = await receiveText(request, verified);
  const keys = contentsOf(document, "Object").map((object) => textOf(object, "Key") ?? "");
  if (keys.length === 0 || keys.length > 1000 || keys.includes("")) throw new S3Error(400, "MalformedXML");
  for (const key of keys) await objects.remove(bucket, key);
  const isQuiet = textOf(document, "Quiet") === "true";
  sendXml(
    response,
    "DeleteResult",
    isQuiet ? "" : keys.map((key) => `<Deleted>${element("Key", key)}</Deleted>`).join(""),
  );
}

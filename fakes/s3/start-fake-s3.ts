// A small S3-compatible server for development and tests: the real client and browsers use it over HTTP.
import { randomUUID } from "node:crypto";
import { createServer, type IncomingMessage, type ServerResponse } from "node:http";
import { pipeline } from "node:stream/promises";
import { ObjectFiles, type ObjectRecord } from "./object-files";
import { S3Error } from "./s3-error";
import { readQuery, verifySignature } from "./signature";

export type FakeS3Options = Readonly<{
  root: string;
  port: number;
  accessKeyId: string;
  secretAccessKey: string;
  /** Origins that browsers may come from. */
  origins: readonly string[];
  /** Buckets that exist from the start. */
  buckets?: readonly string[];
}>;

export type FakeS3 = Readonly<{ url: string; port: number; close: () => Promise<void> }>;

const escapeXml = (text: string) => text.replace(/[<>&"']/g, (letter) => `&#${letter.charCodeAt(0)};`);
const NAMESPACE = "http://s3.amazonaws.com/doc/2006-03-01/";

function sendXml(response: ServerResponse, tag: string, body: string): void {
  response.writeHead(200, { "content-type": "application/xml" });
  response.end(`<?xml version="1.0" encoding="UTF-8"?><${tag} xmlns="${NAMESPACE}">${body}</${tag}>`);
}

function allowOrigin(request: IncomingMessage, response: ServerResponse, origins: readonly string[]): void {
  const { origin } = request.headers;
  if (origin === undefined) return;
  response.setHeader("vary", "Origin");
  if (!origins.includes("*") && !origins.includes(origin)) return;
  response.setHeader("access-control-allow-origin", origin);
  response.setHeader(
    "access-control-expose-headers",
    "ETag, Content-Length, Content-Range, Accept-Ranges, x-amz-request-id",
  );
}

function preflight(request: IncomingMessage, response: ServerResponse): void {
  if (!response.hasHeader("access-control-allow-origin")) throw new S3Error(403, "AccessForbidden");
  response.setHeader("access-control-allow-methods", "GET, HEAD, PUT");
  response.setHeader("access-control-allow-headers", request.headers["access-control-request-headers"] ?? "");
  response.setHeader("access-control-max-age", "600");
  response.writeHead(204).end();
}

async function readText(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString("utf8");
}

/** "bytes=2-5", "bytes=2-", "bytes=-3"; null for the whole object. */
function readRange(header: string | undefined, size: number): { start: number; end: number } | null {
  const found = /^bytes=(\d*)-(\d*)$/.exec(header ?? "");
  if (!found || (found[1] === "" && found[2] === "")) return null;
  const [, from = "", to = ""] = found;
  const start = from === "" ? Math.max(0, size - Number(to)) : Number(from);
  const end = from === "" || to === "" ? size - 1 : Math.min(Number(to), size - 1);
  if (start >= size || start > end) throw new S3Error(416, "InvalidRange");
  return { start, end };
}

async function sendObject(
  files: ObjectFiles,
  bucket: string,
  record: ObjectRecord,
  query: ReadonlyMap<string, string>,
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const headers: Record<string, string | number> = {
    "accept-ranges": "bytes",
    etag: record.etag,
    "last-modified": new Date(record.modified).toUTCString(),
    "content-type": query.get("response-content-type") ?? record.type,
  };
  for (const name of ["content-disposition", "cache-control"]) {
    const wanted = query.get(`response-${name}`);
    if (wanted !== undefined) headers[name] = wanted;
  }
  if (request.headers["if-none-match"] === record.etag) return void response.writeHead(304, headers).end();
  let range: ReturnType<typeof readRange>;
  try {
    range = readRange(request.headers.range, record.size);
  } catch (error) {
    response.setHeader("content-range", `bytes */${record.size}`);
    throw error;
  }
  const { start, end } = range ?? { start: 0, end: record.size - 1 };
  headers["content-length"] = record.size === 0 ? 0 : end - start + 1;
  if (range) headers["content-range"] = `bytes ${start}-${end}/${record.size}`;
  response.writeHead(range ? 206 : 200, headers);
  if (request.method === "HEAD" || record.size === 0) return void response.end();
  // A player that seeks away cuts the reply; that is no fault.
  await pipeline(files.open(bucket, record.key, start, end), response).catch(() => undefined);
}

function listBucket(
  query: ReadonlyMap<string, string>,
  bucket: string,
  records: readonly ObjectRecord[],
  response: ServerResponse,
): void {
  const most = Math.min(1000, Number(query.get("max-keys") ?? 1000) || 1000);
  const after = query.get("continuation-token") ?? query.get("start-after") ?? "";
  const rest = records.filter(({ key }) => key > after);
  const page = rest.slice(0, most);
  const more = rest.length > page.length;
  const rows = page.map(
    ({ key, size, etag, modified }) =>
      `<Contents><Key>${escapeXml(key)}</Key><Size>${size}</Size><ETag>${escapeXml(etag)}</ETag><LastModified>${modified}</LastModified></Contents>`,
  );
  const next = more
    ? `<NextContinuationToken>${escapeXml(page.at(-1)?.key ?? "")}</NextContinuationToken>`
    : "";
  sendXml(
    response,
    "ListBucketResult",
    `<Name>${bucket}</Name><KeyCount>${page.length}</KeyCount><MaxKeys>${most}</MaxKeys><IsTruncated>${more}</IsTruncated>${next}${rows.join("")}`,
  );
}

function readParts(document: string): { n: number; etag: string }[] {
  const parts = [...document.matchAll(/<Part>([\s\S]*?)<\/Part>/g)].map(([, part = ""]) => ({
    n: Number(/<PartNumber>(\d+)</.exec(part)?.[1]),
    etag: (/<ETag>([^<]+)</.exec(part)?.[1] ?? "").replace(/&quot;|&#34;/g, '"'),
  }));
  if (parts.length === 0 || parts.some(({ n, etag }) => !Number.isInteger(n) || etag === ""))
    throw new S3Error(400, "MalformedXML");
  return parts;
}

/** Starts the server; port 0 takes a free one. */
export async function startFakeS3(options: FakeS3Options): Promise<FakeS3> {
  const files = new ObjectFiles(options.root);
  for (const bucket of options.buckets ?? []) await files.createBucket(bucket);
  const keys = { [options.accessKeyId]: options.secretAccessKey };

  async function upload(
    bucket: string,
    key: string,
    id: string,
    query: ReadonlyMap<string, string>,
    request: IncomingMessage,
    response: ServerResponse,
    payloadHash: string,
  ): Promise<void> {
    const record = await files.findUpload(bucket, key, id);
    switch (request.method) {
      case "PUT": {
        const n = Number(query.get("partNumber"));
        if (!(Number.isInteger(n) && n >= 1 && n <= 10_000)) throw new S3Error(400, "InvalidArgument");
        const part = await files.putPart(id, n, request, payloadHash);
        return void response.writeHead(200, { etag: part.etag }).end();
      }
      case "GET": {
        const after = Number(query.get("part-number-marker") ?? 0) || 0;
        const most = Math.min(1000, Number(query.get("max-parts") ?? 1000) || 1000);
        const rest = (await files.parts(id)).filter(({ n }) => n > after);
        const page = rest.slice(0, most);
        const more = rest.length > page.length;
        const rows = page.map(
          ({ n, etag, size }) =>
            `<Part><PartNumber>${n}</PartNumber><ETag>${escapeXml(etag)}</ETag><Size>${size}</Size></Part>`,
        );
        return sendXml(
          response,
          "ListPartsResult",
          `<IsTruncated>${more}</IsTruncated>${more ? `<NextPartNumberMarker>${page.at(-1)?.n}</NextPartNumberMarker>` : ""}${rows.join("")}`,
        );
      }
      case "DELETE":
        await files.abortUpload(id);
        return void response.writeHead(204).end();
      case "POST": {
        const done = await files.completeUpload(id, record, readParts(await readText(request)));
        const location = `http://${request.headers.host ?? ""}${(request.url ?? "").split("?")[0]}`;
        return sendXml(
          response,
          "CompleteMultipartUploadResult",
          `<Location>${escapeXml(location)}</Location><Bucket>${bucket}</Bucket><Key>${escapeXml(key)}</Key><ETag>${escapeXml(done.etag)}</ETag>`,
        );
      }
      default:
        throw new S3Error(405, "MethodNotAllowed");
    }
  }

  async function handle(request: IncomingMessage, response: ServerResponse): Promise<void> {
    response.setHeader("x-amz-request-id", randomUUID());
    allowOrigin(request, response, options.origins);
    if (request.method === "OPTIONS") return preflight(request, response);
    const { payloadHash } = verifySignature(request, keys, Date.now());
    const url = request.url ?? "/";
    const query = new Map(readQuery(url));
    const [bucket = "", ...rest] = (url.split("?")[0] ?? "/").slice(1).split("/").map(decodeURIComponent);
    const key = rest.join("/");
    if (!/^[a-z0-9][a-z0-9.-]{2,62}$/.test(bucket)) throw new S3Error(400, "InvalidBucketName");
    if (key === "") {
      if (request.method === "PUT") {
        await files.createBucket(bucket);
        return void response.writeHead(200).end();
      }
      if (!files.bucketExists(bucket)) throw new S3Error(404, "NoSuchBucket");
      if (request.method === "HEAD") return void response.writeHead(200).end();
      if (request.method === "GET")
        return listBucket(query, bucket, await files.list(bucket, query.get("prefix") ?? ""), response);
      throw new S3Error(405, "MethodNotAllowed");
    }
    if (!files.bucketExists(bucket)) throw new S3Error(404, "NoSuchBucket");
    if (request.method === "POST" && query.has("uploads")) {
      const id = await files.createUpload(
        bucket,
        key,
        request.headers["content-type"] ?? "application/octet-stream",
      );
      return sendXml(
        response,
        "InitiateMultipartUploadResult",
        `<Bucket>${bucket}</Bucket><Key>${escapeXml(key)}</Key><UploadId>${id}</UploadId>`,
      );
    }
    const id = query.get("uploadId");
    if (id !== undefined) return upload(bucket, key, id, query, request, response, payloadHash);
    if (request.method === "PUT") {
      const record = await files.put(bucket, key, request, payloadHash);
      return void response.writeHead(200, { etag: record.etag }).end();
    }
    if (request.method === "DELETE") {
      await files.remove(bucket, key);
      return void response.writeHead(204).end();
    }
    if (request.method !== "GET" && request.method !== "HEAD") throw new S3Error(405, "MethodNotAllowed");
    await sendObject(files, bucket, await files.find(bucket, key), query, request, response);
  }

  const server = createServer((request, response) => {
    handle(request, response).catch((error: unknown) => {
      if (response.headersSent) return void response.destroy();
      request.resume();
      const refusal = error instanceof S3Error ? error : new S3Error(500, "InternalError", String(error));
      response.writeHead(refusal.status, { "content-type": "application/xml" });
      response.end(
        request.method === "HEAD"
          ? undefined
          : `<?xml version="1.0" encoding="UTF-8"?><Error><Code>${refusal.code}</Code><Message>${escapeXml(refusal.message)}</Message></Error>`,
      );
    });
  });
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(options.port, "localhost", resolve);
  });
  const address = server.address();
  const port = typeof address === "object" && address ? address.port : options.port;
  return {
    url: `http://localhost:${port}`,
    port,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

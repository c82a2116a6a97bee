// A small S3-compatible server for development and tests: the real client and browsers use it over HTTP.
import { randomUUID } from "node:crypto";
import { createServer, type IncomingMessage, type ServerResponse } from "node:http";
import { deleteObjects, listBuckets, listObjects } from "./bucket-requests";
import { allowOrigin, answerPreflight } from "./cross-origin";
import { ObjectFiles } from "./object-files";
import { copyObject, deleteObject, getObject, putObject } from "./object-requests";
import type { S3Call } from "./s3-call";
import { S3Error } from "./s3-error";
import { readPath, readQuery, verifySignature } from "./signature";
import { UploadFiles } from "./upload-files";
import {
  abortUpload,
  completeUpload,
  createUpload,
  listParts,
  listUploads,
  putPart,
} from "./upload-requests";
import { Drafts } from "./whole-files";
import { sendError } from "./xml";

export type FakeS3Options = Readonly<{
  /** Folder that keeps buckets, objects and open uploads between starts. */
  root: string;
  /** 0 takes a free one. */
  port: number;
  accessKeyId: string;
  secretAccessKey: string;
  /** Origins that browsers may come from; "*" is any. */
  origins: readonly string[];
  /** Buckets that exist from the start. */
  buckets?: readonly string[];
}>;

export type FakeS3 = Readonly<{
  /** "http://localhost:PORT": the endpoint, and the host that links must be signed for. */
  url: string;
  port: number;
  close: () => Promise<void>;
}>;

// Parts of the protocol that are named in the query and not available; answered so, never as something else.
const UNAVAILABLE = [
  "accelerate",
  "acl",
  "analytics",
  "attributes",
  "cors",
  "encryption",
  "inventory",
  "legal-hold",
  "lifecycle",
  "location",
  "logging",
  "metrics",
  "notification",
  "object-lock",
  "ownershipControls",
  "policy",
  "policyStatus",
  "publicAccessBlock",
  "replication",
  "requestPayment",
  "restore",
  "retention",
  "select",
  "tagging",
  "torrent",
  "versionId",
  "versioning",
  "versions",
  "website",
];

const notAllowed = () => new S3Error(405, "MethodNotAllowed");

async function answerBucket(call: S3Call): Promise<void> {
  const { request, response, bucket, query, objects } = call;
  if (request.method === "PUT") {
    await objects.createBucket(bucket);
    return void response.writeHead(200, { location: `/${bucket}`, "content-length": 0 }).end();
  }
  await objects.needBucket(bucket);
  switch (request.method) {
    case "HEAD":
      return void response.writeHead(200, { "content-type": "application/xml" }).end();
    case "GET":
      return query.has("uploads") ? listUploads(call) : listObjects(call);
    case "POST":
      if (query.has("delete")) return deleteObjects(call);
      throw notAllowed();
    case "DELETE":
      await objects.removeBucket(bucket);
      return void response.writeHead(204).end();
    default:
      throw notAllowed();
  }
}

async function answerUpload(call: S3Call, id: string): Promise<void> {
  const upload = await call.uploads.find(call.bucket, call.key, id);
  switch (call.request.method) {
    case "PUT":
      return putPart(call, upload);
    case "GET":
      return listParts(call, upload);
    case "POST":
      return completeUpload(call, upload);
    case "DELETE":
      return abortUpload(call, upload);
    default:
      throw notAllowed();
  }
}

async function answerObject(call: S3Call): Promise<void> {
  const { request, key, query } = call;
  if (Buffer.byteLength(key) > 1024) throw new S3Error(400, "KeyTooLongError");
  await call.objects.needBucket(call.bucket);
  const id = query.get("uploadId");
  if (id !== undefined) return answerUpload(call, id);
  if (query.has("partNumber")) throw new S3Error(501, "NotImplemented");
  switch (request.method) {
    case "POST":
      if (query.has("uploads")) return createUpload(call);
      throw notAllowed();
    case "PUT":
      return request.headers["x-amz-copy-source"] === undefined ? putObject(call) : copyObject(call);
    case "GET":
    case "HEAD":
      return getObject(call);
    case "DELETE":
      return deleteObject(call);
    default:
      throw notAllowed();
  }
}

/** Starts the server. Rejects when the port is taken. */
export async function startFakeS3(options: FakeS3Options): Promise<FakeS3> {
  const objects = new ObjectFiles(options.root, new Drafts(options.root));
  const uploads = new UploadFiles(options.root, objects);
  await objects.open();
  for (const bucket of options.buckets ?? []) await objects.createBucket(bucket);
  const keys = new Map([[options.accessKeyId, options.secretAccessKey]]);

  async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    response.setHeader("x-amz-request-id", randomUUID());
    response.setHeader("server", "castlenut-storage");
    allowOrigin(request, response, options.origins);
    if (request.method === "OPTIONS") return answerPreflight(request, response);
    const verified = verifySignature(request, keys, Date.now());
    const url = request.url ?? "/";
    const [bucket = "", ...rest] = readPath(url);
    const call: S3Call = {
      request,
      response,
      bucket,
      key: rest.join("/"),
      query: new Map(readQuery(url)),
      verified,
      objects,
      uploads,
    };
    if (UNAVAILABLE.some((name) => call.query.has(name))) throw new S3Error(501, "NotImplemented");
    if (bucket !== "") return call.key === "" ? answerBucket(call) : answerObject(call);
    if (request.method !== "GET") throw notAllowed();
    return listBuckets(call);
  }

  const server = createServer((request, response) => {
    answer(request, response).catch((error: unknown) => {
      if (response.headersSent || response.destroyed) return void response.destroy();
      // The client may be in the middle of a body; it reads the refusal after it.
      request.resume();
      if (!(error instanceof S3Error)) console.error(error);
      sendError(
        request,
        response,
        error instanceof S3Error
          ? error
          : new S3Error(500, "InternalError", "We encountered an internal error."),
      );
    });
  });
  // A slow line may take its time over a large body.
  server.requestTimeout = 0;
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

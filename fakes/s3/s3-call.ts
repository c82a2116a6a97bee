import type { IncomingMessage, ServerResponse } from "node:http";
import type { ObjectFiles } from "./object-files";
import { S3Error } from "./s3-error";
import type { Verified } from "./signature";
import type { UploadFiles } from "./upload-files";

/** A signed request, read, with the storage it works on. */
export type S3Call = Readonly<{
  request: IncomingMessage;
  response: ServerResponse;
  bucket: string;
  key: string;
  query: ReadonlyMap<string, string>;
  verified: Verified;
  objects: ObjectFiles;
  uploads: UploadFiles;
}>;

/** A whole number in the query, from 0 to `most`; larger ones count as `most`. */
export function readCount(call: S3Call, name: string, most: number, otherwise = most): number {
  const text = call.query.get(name);
  if (text === undefined || text === "") return otherwise;
  if (!/^\d{1,9}$/.test(text))
    throw new S3Error(
      400,
      "InvalidArgument",
      `Argument ${name} must be an integer between 0 and 2147483647`,
      {
        ArgumentName: name,
        ArgumentValue: text,
      },
    );
  return Math.min(most, Number(text));
}

// npm run -s captions -- FILE: the cues of a caption file as JSON, times in seconds.
import { readFileSync } from "node:fs";
import { readWebVtt } from "~/captions/read-webvtt";

function refuse(error: string): never {
  console.log(JSON.stringify({ error }));
  process.exit(1);
}

const file = process.argv[2];
if (file === undefined) refuse("Name a caption file.");
let bytes: Uint8Array;
try {
  bytes = readFileSync(file);
} catch {
  refuse(`${file} cannot be read.`);
}
const read = readWebVtt(bytes);
if (!read.ok) refuse(read.error);
console.log(
  JSON.stringify({
    format: read.format,
    cues: read.cues.map(({ startMs, endMs, text, identifier }) => ({
      start: startMs / 1000,
      end: endMs / 1000,
      text,
      ...(identifier === "" ? {} : { id: identifier }),
    })),
    warnings: read.warnings,
  }),
);

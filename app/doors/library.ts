// npm run -s library -- DIR: every DIR/*.vtt with its annotations *.json as published lessons of a scratch shop in memory;
// one query a line on standard input, one line of JSON each, in the form of /api/search.
import { readFileSync, readdirSync } from "node:fs";
import { join } from "node:path";
import { createInterface } from "node:readline";
import { foundJson } from "~/search/found-json";
import { searchShop } from "~/search/search-shop.server";
import type { AnnotatedJob } from "./annotated-lesson";
import { publishJob, scratchShop } from "./scratch-shop.server";

function refuse(error: string): never {
  console.log(JSON.stringify({ error }));
  process.exit(1);
}

const folder = process.argv[2];
if (folder === undefined) refuse("Name a folder with caption files and their annotations.");
let names: string[];
try {
  names = readdirSync(folder)
    .filter((name) => name.endsWith(".vtt"))
    .toSorted();
} catch {
  refuse(`${folder} cannot be read.`);
}
const scope = scratchShop();
for (const name of names) {
  const file = join(folder, name);
  try {
    publishJob(
      scope,
      JSON.parse(readFileSync(file.replace(/\.vtt$/, ".json"), "utf8")) as AnnotatedJob,
      readFileSync(file),
      name,
    );
  } catch (error) {
    refuse(`${name} cannot be loaded: ${error instanceof Error ? error.message : String(error)}`);
  }
}
for await (const line of createInterface({ input: process.stdin }))
  console.log(JSON.stringify(foundJson(searchShop(scope, line, "", 10))));

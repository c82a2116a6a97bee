// Plain JavaScript on node: modules alone.
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readFileSync, readdirSync, writeFileSync } from "node:fs";

const SOURCES = ["app", "drizzle", "public"];
const FILES = ["package-lock.json", "react-router.config.ts", "vite.config.ts", "tsconfig.json"];
const MARK = "build/made-from";

function fingerprint() {
  const hash = createHash("sha256");
  for (const folder of SOURCES)
    for (const path of readdirSync(folder, { recursive: true, encoding: "utf8" }).toSorted()) {
      const file = `${folder}/${path}`;
      if (/\.(tsx?|css|svg|json|txt|sql|webmanifest|js)$/.test(file))
        hash.update(file).update(readFileSync(file));
    }
  for (const file of FILES) hash.update(file).update(readFileSync(file));
  return hash.digest("hex");
}

/** Builds the application unless the build is of these very sources. */
export function buildIfNeeded() {
  const wanted = fingerprint();
  if (existsSync("build/server/index.js") && existsSync(MARK) && readFileSync(MARK, "utf8") === wanted)
    return;
  const built = spawnSync("npm", ["run", "-s", "build"], {
    stdio: "inherit",
    env: { ...process.env, NODE_ENV: "production" },
  });
  if (built.status !== 0) {
    console.error("\nThe build failed; the lines above say where.\n");
    process.exit(1);
  }
  writeFileSync(MARK, wanted);
}

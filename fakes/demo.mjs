// `npm run demo`: everything from a fresh clone to a running shop. Plain JavaScript until packages are there.
import { spawn } from "node:child_process";
import { prepare } from "./prepare.mjs";
import { buildIfNeeded } from "./build.mjs";

await prepare(["ffmpeg"]);
buildIfNeeded();
const child = spawn(
  process.execPath,
  ["--import", "tsx", "fakes/start.ts", "--demo", ...process.argv.slice(2)],
  {
    stdio: "inherit",
    env: { ...process.env, NODE_ENV: "production" },
  },
);
for (const signal of ["SIGINT", "SIGTERM"]) process.on(signal, () => child.kill(signal));
child.on("close", (code) => process.exit(code ?? 1));

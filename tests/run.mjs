// `npm test`: installs what is missing, then types, lint, unit tests, build and journeys, with the time of each.
// Plain JavaScript on node: modules alone, until the packages are there.
import { spawn } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { resolve } from "node:path";
import { prepare } from "../fakes/prepare.mjs";
import { buildIfNeeded } from "../fakes/build.mjs";

const RESULTS = "test-results";
const stages = [];

async function stage(name, work) {
  const start = Date.now();
  const ok = await work();
  stages.push({ name, seconds: (Date.now() - start) / 1000, ok: ok !== false });
  console.log(
    `\n[${name}] ${ok === false ? "failed" : "done"} in ${((Date.now() - start) / 1000).toFixed(0)} s\n`,
  );
}

function run(command, args, env = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      stdio: ["ignore", "inherit", "inherit"],
      env: { ...process.env, ...env },
    });
    child.on("error", () => resolve(false));
    child.on("close", (code) => resolve(code === 0));
  });
}

const bin = (name) => `node_modules/.bin/${name}`;

/** What a runner counted; a missing or unreadable report is one failure, never silence. */
function counted(file, read) {
  try {
    return read(JSON.parse(readFileSync(file, "utf8")));
  } catch {
    return { passed: 0, failed: 1 };
  }
}

rmSync(RESULTS, { recursive: true, force: true });
mkdirSync(RESULTS, { recursive: true });

await stage("install", () => prepare(["chromium", "ffmpeg"]));
await stage(
  "types",
  async () => (await run(bin("react-router"), ["typegen"])) && (await run(bin("tsc"), ["--noEmit"])),
);
await stage("lint", async () => {
  const lint = await run(bin("oxlint"), ["--deny-warnings"]);
  return (await run(bin("prettier"), ["--check", "--log-level", "warn", "."])) && lint;
});
await stage("unit", () =>
  run(bin("vitest"), [
    "run",
    "--reporter=default",
    "--reporter=json",
    `--outputFile.json=${RESULTS}/unit.json`,
  ]),
);
await stage("build", () => buildIfNeeded());
await stage("journeys", () =>
  run(bin("playwright"), ["test", "--config", "tests/playwright.config.ts"], {
    // The runner takes a relative name from the folder of its configuration.
    PLAYWRIGHT_JSON_OUTPUT_NAME: resolve(RESULTS, "journeys.json"),
  }),
);

const unit = counted(`${RESULTS}/unit.json`, (report) => ({
  passed: report.numPassedTests,
  failed: report.numFailedTests + (report.numFailedTests === 0 && !report.success ? 1 : 0),
}));
const journeys = existsSync(`${RESULTS}/journeys.json`)
  ? counted(`${RESULTS}/journeys.json`, (report) => ({
      passed: report.stats.expected,
      failed: report.stats.unexpected + report.stats.flaky + report.errors.length,
    }))
  : { passed: 0, failed: 1 };
const checks = stages.filter(({ name }) => name === "types" || name === "lint");

console.log("\nTime by stage");
for (const { name, seconds, ok } of stages)
  console.log(`  ${name.padEnd(10)} ${seconds.toFixed(0).padStart(5)} s  ${ok ? "ok" : "FAILED"}`);
const passed = unit.passed + journeys.passed + checks.filter(({ ok }) => ok).length;
const failed = unit.failed + journeys.failed + checks.filter(({ ok }) => !ok).length;
console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 && stages.every(({ ok }) => ok) ? 0 : 1);

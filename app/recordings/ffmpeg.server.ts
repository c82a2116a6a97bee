import { spawn } from "node:child_process";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** Runs ffmpeg with a list of arguments, never through a shell; gives what it wrote to standard output. */
export function runFfmpeg(args: readonly string[], timeoutMs: number): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const child = spawn("ffmpeg", ["-nostdin", "-hide_banner", "-loglevel", "error", ...args], {
      stdio: ["ignore", "pipe", "pipe"],
      timeout: timeoutMs,
    });
    const [out, problems]: [Buffer[], Buffer[]] = [[], []];
    child.stdout.on("data", (chunk: Buffer) => out.push(chunk));
    child.stderr.on("data", (chunk: Buffer) => problems.push(chunk));
    child.on("error", reject);
    child.on("close", (code, signal) => {
      if (code === 0) return resolve(Buffer.concat(out));
      const said = Buffer.concat(problems).toString("utf8").trim().split("\n").at(-1) ?? "";
      reject(
        new Error(
          signal
            ? `The converter took too long.`
            : `The converter stopped: ${said.replace(/https?:\S+/g, "the recording")}`,
        ),
      );
    });
  });
}

let there: Promise<boolean> | undefined;

/** Whether a converter is installed on this machine. */
export function converterIsThere(): Promise<boolean> {
  there ??= runFfmpeg(["-version"], 10_000).then(
    () => true,
    () => false,
  );
  return there;
}

/** A folder for the work that is gone afterwards, whatever happens. */
export async function inWorkFolder<T>(work: (folder: string) => Promise<T>): Promise<T> {
  const folder = await mkdtemp(join(tmpdir(), "castlenut-"));
  try {
    return await work(folder);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

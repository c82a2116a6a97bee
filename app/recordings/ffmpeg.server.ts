import { spawn, type ChildProcess } from "node:child_process";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** The converter ran and could not do it, or took too long. */
export class ConverterStopped extends Error {}

// A converter that outlives this process would go on for hours while the next one starts the same work again.
const running = new Set<ChildProcess>();
process.on("exit", () => {
  for (const child of running) child.kill("SIGKILL");
});

/**
 * Runs ffmpeg with a list of arguments, never through a shell. What it writes to standard output goes to `onOutput`
 * piece by piece. Throws ConverterStopped with a sentence, or the fault of starting it.
 */
export function runFfmpeg(
  args: readonly string[],
  timeoutMs: number,
  onOutput: (piece: Buffer) => void = () => {},
): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn("ffmpeg", ["-nostdin", "-hide_banner", "-loglevel", "error", ...args], {
      stdio: ["ignore", "pipe", "pipe"],
    });
    running.add(child);
    let late = false;
    const clock = setTimeout(() => {
      late = true;
      child.kill("SIGKILL");
    }, timeoutMs);
    let said = "";
    child.stdout.on("data", onOutput);
    child.stderr.on("data", (piece: Buffer) => {
      said = (said + piece.toString("utf8")).slice(-4000);
    });
    const end = () => {
      clearTimeout(clock);
      running.delete(child);
    };
    child.on("error", (error) => {
      end();
      reject(error);
    });
    child.on("close", (code) => {
      end();
      if (code === 0) return resolve();
      // Links to storage are secrets while they live.
      const last = (said.trim().split("\n").at(-1) ?? "").replace(/https?:\S+/g, "the recording");
      reject(
        new ConverterStopped(
          late ? "The converter took too long." : `The converter stopped: ${last || code}`,
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

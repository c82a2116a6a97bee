import { randomUUID } from "node:crypto";
import { mkdir, readdir, readFile, rename, rm, stat, writeFile } from "node:fs/promises";
import { join } from "node:path";

/** Whether a file system call failed because the file is not there. */
export function isMissing(error: unknown): boolean {
  return error instanceof Error && "code" in error && error.code === "ENOENT";
}

/** The record in a file; null when there is no such file. */
export async function readRecord<T>(file: string): Promise<T | null> {
  try {
    return JSON.parse(await readFile(file, "utf8")) as T;
  } catch (error) {
    if (isMissing(error)) return null;
    throw error;
  }
}

// Another server on the same folder may be in the middle of a younger one.
const ABANDONED_AFTER_MS = 3_600_000;

/** Removes a file that nobody has written to for an hour. */
export async function removeAbandoned(file: string): Promise<void> {
  const found = await stat(file).catch(() => null);
  if (found && Date.now() - found.mtimeMs > ABANDONED_AFTER_MS) await rm(file, { force: true });
}

/** Files are written here and moved to their place whole, so a crash leaves the old file or the new one. */
export class Drafts {
  readonly #folder: string;

  constructor(root: string) {
    this.#folder = join(root, ".drafts");
  }

  /** Throws away what an earlier run left unfinished. */
  async open(): Promise<void> {
    await mkdir(this.#folder, { recursive: true });
    for (const name of await readdir(this.#folder)) await removeAbandoned(join(this.#folder, name));
  }

  /** Lets `write` fill a new file and hands it to `keep`, which moves it; whatever fails, no draft stays. */
  async with<W, T>(
    write: (file: string) => Promise<W>,
    keep: (file: string, written: W) => Promise<T>,
  ): Promise<T> {
    const file = join(this.#folder, randomUUID());
    try {
      return await keep(file, await write(file));
    } finally {
      await rm(file, { force: true });
    }
  }

  async writeRecord(place: string, record: unknown): Promise<void> {
    await this.with(
      (file) => writeFile(file, JSON.stringify(record)),
      (file) => rename(file, place),
    );
  }
}

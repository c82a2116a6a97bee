// Recordings for the journeys, drawn once by ffmpeg's test generators.
import { execFileSync } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";

const FOLDER = "test-results/fixtures";

export const FILMS = {
  /** A minute of H.264 and AAC, index in front, filled up to a bit more than 60 MB: five parts of an upload. */
  large: `${FOLDER}/bay-two.mp4`,
  /** Twelve seconds, well under one part. */
  short: `${FOLDER}/short.mp4`,
  /** The short one broken off half way, index in front: the bytes that it names are missing. */
  cutOff: `${FOLDER}/cut-off.mp4`,
  /** The short one broken off before its index. */
  withoutIndex: `${FOLDER}/without-index.mp4`,
  /** Text that calls itself a film. */
  text: `${FOLDER}/notes.mp4`,
  empty: `${FOLDER}/empty.mp4`,
} as const;

function draw(path: string, seconds: number, megabits: number, indexInFront: boolean): void {
  if (existsSync(path)) return;
  const rate = `${megabits}M`;
  const sources = [
    ["-f", "lavfi", "-i", "testsrc2=size=640x360:rate=15"],
    ["-f", "lavfi", "-i", "sine=frequency=440:sample_rate=48000"],
  ].flat();
  // A constant rate with filler makes the file large without making the picture slow to encode.
  const picture = ["-c:v", "libx264", "-preset", "ultrafast", "-pix_fmt", "yuv420p", "-g", "30"];
  const constant = ["-b:v", rate, "-minrate", rate, "-maxrate", rate, "-bufsize", rate];
  const filled = ["-x264-params", "nal-hrd=cbr:force-cfr=1", "-c:a", "aac", "-b:a", "96k"];
  const index = indexInFront ? ["-movflags", "+faststart"] : [];
  const half = `${path}.part.mp4`;
  execFileSync("ffmpeg", [
    ...["-v", "error", "-y", ...sources, "-t", String(seconds)],
    ...[...picture, ...constant, ...filled, ...index, half],
  ]);
  renameSync(half, path);
}

/** Runs once before the journeys. */
export default function makeFilms(): void {
  mkdirSync(FOLDER, { recursive: true });
  draw(FILMS.large, 60, 10, true);
  draw(FILMS.short, 12, 1, true);
  const whole = readFileSync(FILMS.short);
  writeFileSync(FILMS.cutOff, whole.subarray(0, Math.floor(whole.length / 2)));
  const plain = `${FOLDER}/index-at-the-end.mp4`;
  draw(plain, 12, 1, false);
  const late = readFileSync(plain);
  writeFileSync(FILMS.withoutIndex, late.subarray(0, Math.floor(late.length / 2)));
  writeFileSync(FILMS.text, "This is a note about the job, no film at all.\n".repeat(200));
  writeFileSync(FILMS.empty, "");
}

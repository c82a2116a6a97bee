// Makes the recordings of the demo: narration by espeak-ng, pictures by a browser, put together by ffmpeg.
//
//   npx tsx fakes/demo/make-recordings/make.ts [job ...] [--stills FOLDER] [--browser PATH]
//
// What is said is the caption file of each recording (fakes/demo/captions); every cue is spoken inside its own window, faster
// only where it must be. The length and the chapter titles come from <job>.chapters.json. What is drawn from which moment on
// stands in the shots-*.ts files beside this one; the drawings are in scenes/, pure functions of a moment in a short turn that
// is repeated until the next shot, so only some thousand frames are drawn. A figure is drawn only while it is being said.
// Needs ffmpeg with libx264, espeak-ng and Chromium on the machine. The program itself needs none of these to show the demo:
// the finished files are in fakes/demo/recordings. --stills writes one picture of each shot into a folder and makes no video.
import { spawn } from "node:child_process";
import { once } from "node:events";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { parseArgs } from "node:util";
import { readChapters, readCues, type Chapter } from "./cues";
import { frame, FRAMES_A_SECOND, openDrawing } from "./draw-frames";
import { RATE, speakCue } from "./narrate";
import type { Recording } from "./recording";
import { OIL_DRAIN_FILTER, SERPENTINE_BELT } from "./shots-oil-and-belt";
import { BRAKE_PADS, CLICK_WRENCH, WHEEL_NUTS } from "./shots-short";
import { FOSS_SWAY_BAR_LINKS, SWAY_BAR_LINKS } from "./shots-sway-bar";
import { THERMOSTAT } from "./shots-thermostat";
import { addSounds } from "./sounds";

const RECORDINGS: readonly Recording[] = [
  CLICK_WRENCH,
  WHEEL_NUTS,
  BRAKE_PADS,
  FOSS_SWAY_BAR_LINKS,
  SERPENTINE_BELT,
  THERMOSTAT,
  OIL_DRAIN_FILTER,
  SWAY_BAR_LINKS,
];
const demo = fileURLToPath(new URL("..", import.meta.url));
const captionsOf = (name: string) => join(demo, "captions", name);
type Drawing = Awaited<ReturnType<typeof openDrawing>>;

/** Speech and sounds as one WAV file of 16 bits, one channel. */
function soundTrack(recording: Recording, durationMs: number): Buffer {
  const track = new Float32Array(Math.round((durationMs / 1000) * RATE));
  for (const cue of readCues(captionsOf(recording.captions))) {
    const start = Math.round((cue.startMs / 1000) * RATE);
    for (const [i, sample] of speakCue(recording.voice, cue).entries())
      if (start + i < track.length) track[start + i] = track[start + i]! + sample / 0x8000;
  }
  addSounds(track, recording.sounds);
  const pcm = Int16Array.from(track, (s) => Math.round(Math.min(1, Math.max(-1, s)) * 0x7fff));
  const header = Buffer.alloc(44);
  header.write("RIFF", 0);
  header.writeUInt32LE(36 + pcm.byteLength, 4);
  header.write("WAVEfmt ", 8);
  header.writeUInt32LE(16, 16);
  header.writeUInt16LE(1, 20);
  header.writeUInt16LE(1, 22);
  header.writeUInt32LE(RATE, 24);
  header.writeUInt32LE(RATE * 2, 28);
  header.writeUInt16LE(2, 32);
  header.writeUInt16LE(16, 34);
  header.write("data", 36);
  header.writeUInt32LE(pcm.byteLength, 40);
  return Buffer.concat([header, Buffer.from(pcm.buffer)]);
}

/** The frame at a moment: its shot's turn begins when the shot does. */
function frameAt({ shots }: Recording, chapters: readonly Chapter[], atMs: number): string {
  const shot = shots.findLast(([from]) => from <= atMs);
  const chapter = chapters.findLast(({ startMs }) => startMs <= atMs);
  if (!shot || !chapter) throw new Error(`nothing is drawn at ${atMs} ms`);
  const [from, scene] = shot;
  const count = Math.round(scene.seconds * FRAMES_A_SECOND);
  const at = Math.floor(((atMs - from) / 1000) * FRAMES_A_SECOND + 0.001) % count;
  return frame(scene, at / count, chapter.title);
}

async function make(recording: Recording, drawing: Drawing): Promise<void> {
  const { title, chapters } = readChapters(captionsOf(`${recording.job}.chapters.json`));
  const durationMs = chapters.at(-1)!.endMs;
  const work = mkdtempSync(join(tmpdir(), "recording-"));
  const wav = join(work, "sound.wav");
  writeFileSync(wav, soundTrack(recording, durationMs));
  const keyEvery = String(FRAMES_A_SECOND * 4);
  const video = [
    "-c:v",
    "libx264",
    "-profile:v",
    "high",
    "-pix_fmt",
    "yuv420p",
    "-preset",
    "slow",
    "-tune",
    "animation",
  ];
  const rate = ["-crf", "33", "-g", keyEvery, "-threads", "1", "-color_range", "tv"];
  const audio = [
    "-af",
    "loudnorm=I=-18:TP=-2:LRA=11",
    "-ar",
    "24000",
    "-ac",
    "1",
    "-c:a",
    "aac",
    "-b:a",
    "32k",
  ];
  const meta = [
    "-map_metadata",
    "-1",
    "-metadata",
    `title=${title}`,
    "-movflags",
    "+faststart",
    "-t",
    String(durationMs / 1000),
  ];
  const out = join(demo, "recordings", `${recording.job}.mp4`);
  const input = [
    "-f",
    "image2pipe",
    "-framerate",
    String(FRAMES_A_SECOND),
    "-c:v",
    "png",
    "-i",
    "-",
    "-i",
    wav,
  ];
  const ffmpeg = spawn("ffmpeg", ["-y", "-v", "error", ...input, ...video, ...rate, ...audio, ...meta, out], {
    stdio: ["pipe", "inherit", "inherit"],
  });
  const ended = once(ffmpeg, "close");
  const frames = Math.round((durationMs * FRAMES_A_SECOND) / 1000);
  for (let i = 0; i < frames; i++) {
    const png = await drawing.png(frameAt(recording, chapters, (i * 1000) / FRAMES_A_SECOND));
    if (!ffmpeg.stdin.write(png)) await once(ffmpeg.stdin, "drain");
  }
  ffmpeg.stdin.end();
  const [code] = (await ended) as [number];
  rmSync(work, { recursive: true, force: true });
  if (code !== 0) throw new Error(`ffmpeg ended with ${code} for ${recording.job}`);
  console.log(`${recording.job}: ${frames} frames, ${durationMs / 1000} s`);
}

async function writeStills(recording: Recording, drawing: Drawing, folder: string): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const { chapters } = readChapters(captionsOf(`${recording.job}.chapters.json`));
  for (const [from, scene] of recording.shots) {
    const name = `${recording.job}-${String(from).padStart(6, "0")}.png`;
    writeFileSync(
      join(folder, name),
      await drawing.png(frameAt(recording, chapters, from + scene.seconds * 650)),
    );
  }
}

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: { stills: { type: "string" }, browser: { type: "string", default: "/usr/bin/chromium" } },
});
const chosen = RECORDINGS.filter(({ job }) => positionals.length === 0 || positionals.includes(job));
mkdirSync(join(demo, "recordings"), { recursive: true });
for (const recording of chosen) {
  const drawing = await openDrawing(values.browser);
  try {
    await (values.stills ? writeStills(recording, drawing, values.stills) : make(recording, drawing));
  } finally {
    await drawing.close();
  }
}

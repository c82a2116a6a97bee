import { soundPeaks } from "~/recordings/sound-peaks";
import { STORYBOARD, storyboardPlan } from "~/recordings/storyboard";

/** Above this length or size the whole sound would not fit into a phone's memory. */
const LONGEST_SOUND_MS = 15 * 60_000;
const MOST_SOUND_BYTES = 400 * 1024 ** 2;

function seek(video: HTMLVideoElement, seconds: number): Promise<void> {
  return new Promise((resolve, reject) => {
    video.addEventListener("seeked", () => resolve(), { once: true });
    video.addEventListener("error", () => reject(new Error("the film cannot be shown")), { once: true });
    video.currentTime = seconds;
  });
}

/** The picture that stands now, fitted into a tile with its sides kept. */
function draw(
  video: HTMLVideoElement,
  canvas: HTMLCanvasElement,
  x: number,
  y: number,
  width: number,
  height: number,
): void {
  const scale = Math.min(width / video.videoWidth, height / video.videoHeight);
  const [w, h] = [video.videoWidth * scale, video.videoHeight * scale];
  canvas.getContext("2d")?.drawImage(video, x + (width - w) / 2, y + (height - h) / 2, w, h);
}

function asJpeg(canvas: HTMLCanvasElement): Promise<Blob> {
  return new Promise((resolve, reject) =>
    canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error("no picture"))), "image/jpeg", 0.75),
  );
}

async function peaksOf(file: File, durationMs: number): Promise<string | null> {
  if (durationMs > LONGEST_SOUND_MS || file.size > MOST_SOUND_BYTES) return null;
  try {
    const sound = await new OfflineAudioContext(1, 1, 8000).decodeAudioData(await file.arrayBuffer());
    const samples = sound.getChannelData(0);
    return soundPeaks(
      Int16Array.from(samples, (sample) => Math.round(Math.max(-1, Math.min(1, sample)) * 32767)),
    );
  } catch {
    return null;
  }
}

/** Poster, storyboard and sound peaks as the server makes them, for a server without a converter. */
export async function makePictures(file: File): Promise<FormData> {
  const video = document.createElement("video");
  const address = URL.createObjectURL(file);
  try {
    video.muted = true;
    video.preload = "auto";
    video.src = address;
    await new Promise<void>((resolve, reject) => {
      video.addEventListener("loadeddata", () => resolve(), { once: true });
      video.addEventListener("error", () => reject(new Error("the film cannot be shown")), { once: true });
    });
    if (video.videoWidth === 0) throw new Error("the film has no picture here");
    const durationMs = video.duration * 1000;
    const poster = document.createElement("canvas");
    poster.width = 640;
    poster.height = Math.round((640 * video.videoHeight) / video.videoWidth);
    await seek(video, Math.min(3, video.duration / 2));
    draw(video, poster, 0, 0, poster.width, poster.height);
    const { count, everyMs } = storyboardPlan(durationMs);
    const { columns, width, height } = STORYBOARD;
    const board = document.createElement("canvas");
    board.width = columns * width;
    board.height = Math.ceil(count / columns) * height;
    for (let n = 0; n < count; n += 1) {
      await seek(video, (n * everyMs) / 1000);
      draw(video, board, (n % columns) * width, Math.floor(n / columns) * height, width, height);
    }
    const made = new FormData();
    made.set("poster", await asJpeg(poster));
    made.set("storyboard", await asJpeg(board));
    const peaks = await peaksOf(file, durationMs);
    if (peaks) made.set("peaks", peaks);
    return made;
  } finally {
    URL.revokeObjectURL(address);
  }
}

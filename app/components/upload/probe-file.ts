import type { Probe } from "~/recordings/judge-video";

/** What a chosen file is, read in the browser before a byte is sent; null when it is no video that can be read. */
export async function probeFile(file: File): Promise<Probe | null> {
  // Only this page needs it, so it comes when a file is chosen.
  const { BlobSource, Input, MATROSKA, MP4, QTFF, WEBM } = await import("mediabunny");
  const input = new Input({ source: new BlobSource(file), formats: [MP4, QTFF, WEBM, MATROSKA] });
  try {
    if (!(await input.canRead())) return null;
    const [video, audio] = [await input.getPrimaryVideoTrack(), await input.getPrimaryAudioTrack()];
    const containers: Record<string, Probe["container"]> = {
      MP4: "mp4",
      QuickTime: "mov",
      WebM: "webm",
      Matroska: "mkv",
    };
    const duration = (await input.getDurationFromMetadata()) ?? (await input.computeDuration());
    return {
      container: containers[(await input.getFormat()).name] ?? "other",
      videoCodec: video ? ((await video.getCodec()) ?? "unknown") : null,
      audioCodec: audio ? ((await audio.getCodec()) ?? "unknown") : null,
      width: video ? await video.getDisplayWidth() : 0,
      height: video ? await video.getDisplayHeight() : 0,
      rotation: video ? await video.getRotation() : 0,
      durationMs: Math.round(duration * 1000),
    };
  } catch {
    return null;
  } finally {
    input.dispose();
  }
}

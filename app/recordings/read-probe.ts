import type { Input } from "mediabunny";
import type { Probe } from "./judge-video";

/** By the names that mediabunny gives its formats. */
const CONTAINERS: Readonly<Record<string, Probe["container"]>> = {
  MP4: "mp4",
  "QuickTime File Format": "mov",
  WebM: "webm",
  Matroska: "mkv",
};

/**
 * The profiles of H.264 that browsers play: 8 bit, 4:2:0. Cameras also write 10 bit and 4:2:2 ones.
 * profile_idc of Rec. ITU-T H.264, Annex A: 66 Baseline, 77 Main, 100 High.
 */
const PLAYED_PROFILES = new Set([66, 77, 100]);

/** "avc1.64001f" names profile 0x64 = 100 in its first two hexadecimal digits (RFC 6381, section 3.3). */
function avcName(parameters: string | null): string {
  const profile = /^avc[13]\.([0-9a-f]{2})/i.exec(parameters ?? "")?.[1];
  return profile === undefined || PLAYED_PROFILES.has(Number.parseInt(profile, 16))
    ? "avc"
    : "avc-professional";
}

/**
 * What a file is, read out of its index; null when it is no video file that can be read. The same reading in the browser,
 * before a byte is sent, and on the server, which believes only its own.
 */
export async function readProbe(input: Input): Promise<Probe | null> {
  if (!(await input.canRead())) return null;
  const [video, audio] = [await input.getPrimaryVideoTrack(), await input.getPrimaryAudioTrack()];
  const duration = (await input.getDurationFromMetadata()) ?? (await input.computeDuration());
  const codec = video ? ((await video.getCodec()) ?? "unknown") : null;
  return {
    container: CONTAINERS[(await input.getFormat()).name] ?? "other",
    videoCodec: codec === "avc" && video ? avcName(await video.getCodecParameterString()) : codec,
    audioCodec: audio ? ((await audio.getCodec()) ?? "unknown") : null,
    width: video ? await video.getDisplayWidth() : 0,
    height: video ? await video.getDisplayHeight() : 0,
    rotation: video ? await video.getRotation() : 0,
    durationMs: Math.round(duration * 1000),
  };
}

/** What a probe found in a file. Duration in ms, sizes in displayed pixels, rotation in degrees. */
export type Probe = Readonly<{
  container: "mp4" | "mov" | "webm" | "mkv" | "other";
  videoCodec: string | null;
  audioCodec: string | null;
  width: number;
  height: number;
  rotation: number;
  durationMs: number;
}>;

export type Verdict =
  | Readonly<{ plays: true }>
  /** Real video that browsers do not all play. */
  | Readonly<{ plays: false; convert: true; sentence: string }>
  | Readonly<{ plays: false; convert: false; sentence: string }>;

const AUDIO_IN_MP4 = new Set([null, "aac", "mp3"]);
const AUDIO_IN_WEBM = new Set([null, "opus", "vorbis"]);

const CODEC_NAMES: Readonly<Record<string, string>> = {
  hevc: "HEVC (high efficiency)",
  avc: "H.264",
  "avc-professional": "H.264 in a professional profile (10 bit or 4:2:2)",
  unknown: "in a coding unknown here,",
};

/** Whether browsers play a recording as it is: H.264 with AAC in MP4 or MOV, VP8, VP9 or AV1 with Opus in WebM. */
export function judgeVideo(probe: Probe): Verdict {
  if (probe.videoCodec === null && probe.audioCodec === null)
    return {
      plays: false,
      convert: false,
      sentence:
        "This file has neither picture nor sound in it: the recording was cut off before its end. Copy it from the camera again.",
    };
  if (probe.videoCodec === null)
    return {
      plays: false,
      convert: false,
      sentence: "There is no picture in this file, only sound. Upload the video itself.",
    };
  if (!(probe.durationMs > 0))
    return {
      plays: false,
      convert: false,
      sentence: "This file has no length: the recording was cut off. Copy it from the camera again.",
    };
  if (probe.durationMs > 4 * 3_600_000)
    return {
      plays: false,
      convert: false,
      sentence: "This recording is longer than four hours. Cut it into jobs and upload them one by one.",
    };
  const inMp4 = probe.container === "mp4" || probe.container === "mov";
  const picturePlays = inMp4
    ? probe.videoCodec === "avc"
    : probe.container === "webm" && ["vp8", "vp9", "av1"].includes(probe.videoCodec);
  const soundPlays = (inMp4 ? AUDIO_IN_MP4 : AUDIO_IN_WEBM).has(probe.audioCodec);
  if (picturePlays && soundPlays) return { plays: true };
  const container = probe.container.toUpperCase();
  return {
    plays: false,
    convert: true,
    sentence: picturePlays
      ? `The sound of this recording is ${(probe.audioCodec ?? "").toUpperCase()} in ${container}, which browsers do not all play.`
      : `This recording is ${CODEC_NAMES[probe.videoCodec] ?? probe.videoCodec.toUpperCase()} in ${container}, which browsers do not all play.`,
  };
}

/** What to do where no converter is installed. */
export const CONVERT_STEPS =
  "Export it on the phone or computer as H.264 (often called “most compatible”) in MP4 and upload that, or ask whoever runs this server to install ffmpeg.";

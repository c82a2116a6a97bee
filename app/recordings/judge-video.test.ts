import { expect, test } from "vitest";
import { judgeVideo, type Probe } from "./judge-video";

const phone: Probe = {
  container: "mp4",
  videoCodec: "avc",
  audioCodec: "aac",
  width: 1280,
  height: 720,
  rotation: 0,
  durationMs: 60_000,
};

test("H.264 with AAC plays from MP4 and MOV, VP9 with Opus from WebM, also without sound", () => {
  expect(judgeVideo(phone)).toEqual({ plays: true });
  expect(judgeVideo({ ...phone, container: "mov", audioCodec: null })).toEqual({ plays: true });
  expect(judgeVideo({ ...phone, container: "webm", videoCodec: "vp9", audioCodec: "opus" })).toEqual({
    plays: true,
  });
});

test("HEVC and mixtures are converted", () => {
  expect(judgeVideo({ ...phone, videoCodec: "hevc" })).toMatchObject({ plays: false, convert: true });
  expect(judgeVideo({ ...phone, container: "mkv" })).toMatchObject({ convert: true });
  expect(judgeVideo({ ...phone, container: "webm" })).toMatchObject({ convert: true });
  expect(judgeVideo({ ...phone, videoCodec: "avc-professional" })).toMatchObject({
    convert: true,
    sentence: expect.stringContaining("professional profile") as string,
  });
  expect(judgeVideo({ ...phone, container: "mov", audioCodec: "pcm-s16" })).toMatchObject({
    convert: true,
    sentence: "The sound of this recording is PCM-S16 in MOV, which browsers do not all play.",
  });
});

test("no picture, no length and too long are refused", () => {
  expect(judgeVideo({ ...phone, videoCodec: null })).toMatchObject({
    convert: false,
    sentence: "There is no picture in this file, only sound. Upload the video itself.",
  });
  // An MP4 without its index, as a camera leaves it when the battery dies, is a container with no track.
  expect(judgeVideo({ ...phone, videoCodec: null, audioCodec: null })).toMatchObject({
    convert: false,
    sentence: expect.stringContaining("the recording was cut off before its end") as string,
  });
  expect(judgeVideo({ ...phone, durationMs: 0 })).toMatchObject({ convert: false });
  expect(judgeVideo({ ...phone, durationMs: 5 * 3_600_000 })).toMatchObject({ convert: false });
});

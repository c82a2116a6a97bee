// video.js ships types for its full entry only; the core entry has the same face.
declare module "video.js/core" {
  import videojs from "video.js";
  export default videojs;
}

declare module "webvtt-parser" {
  type ParsedCue = {
    id: string;
    startTime: number;
    endTime: number;
    text: string;
  };
  type ParseError = { message: string; line: number; col?: number };
  export class WebVTTParser {
    parse(
      input: string,
      mode?: "subtitles" | "captions" | "chapters" | "metadata",
    ): { cues: ParsedCue[]; errors: ParseError[]; time: number };
  }
  const webvtt: { WebVTTParser: typeof WebVTTParser };
  export default webvtt;
}

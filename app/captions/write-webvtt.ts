import type { Cue } from "./cue";
import { fileCueText } from "./cue-text";
import { clock } from "./read-webvtt";

/** An identifier that would be read as something else is left out. */
function identifierLine(identifier: string): string {
  const unusable = identifier === "" || /[\r\n]|-->|^(?:NOTE|STYLE|REGION)(?:$|[ \t])/.test(identifier);
  return unusable ? "" : `${identifier.replaceAll("\0", "\ufffd")}\n`;
}

/** A WebVTT file of these cues. Text may hold markup; what would break the file or hide words is written out. */
export function writeWebVtt(cues: readonly Cue[]): string {
  const blocks = cues.map(
    (cue) =>
      `${identifierLine(cue.identifier)}${clock(cue.startMs)} --> ${clock(cue.endMs)}\n${fileCueText(cue.text)}\n`,
  );
  return ["WEBVTT\n", ...blocks].join("\n");
}

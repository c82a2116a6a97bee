import type { Mark } from "./mark";

type Correction = Pick<Mark, "kind" | "recordingId" | "atMs" | "replaces" | "words">;

// A correction is written at the moment of the slip or just after it: common practice on the bench, no source.
const BEFORE_MS = 2_000;
const AFTER_MS = 3_000;

function plain(text: string): string {
  return text.toLowerCase().replace(/\s+/g, " ").trim();
}

/**
 * What is right where something wrong is said: the words of the correction that stands at this stretch of the recording
 * (milliseconds) or whose wrong words are in `text`; "" when nothing is corrected.
 */
export function correctionAt(
  marks: readonly Correction[],
  line: Readonly<{ recordingId: string; startMs: number; endMs: number; text: string }>,
): string {
  const said = plain(line.text);
  const found = marks.find((mark) => {
    if (mark.kind !== "correction" || mark.recordingId !== line.recordingId) return false;
    const wrong = plain(mark.replaces);
    if (wrong !== "" && said.includes(wrong)) return true;
    return mark.atMs >= line.startMs - BEFORE_MS && mark.atMs <= line.endMs + AFTER_MS;
  });
  return found?.words ?? "";
}

import { expect, test } from "vitest";
import { madeKey, readRecordingKey, recordingKey } from "./object-key";

test("every key that is written can be read back", () => {
  expect(readRecordingKey(recordingKey("A", "B"))).toEqual({ shopId: "A", recordingId: "B", what: "source" });
  for (const what of ["converted", "poster", "storyboard"] as const)
    expect(readRecordingKey(madeKey("A", "B", what))).toEqual({ shopId: "A", recordingId: "B", what });
  expect(readRecordingKey("shops/A/other/B/source")).toBeUndefined();
});

import { expect, test } from "vitest";
import { correctionAt } from "./correction-at";

const right = {
  kind: "correction" as const,
  recordingId: "one" as never,
  atMs: 60_000,
  replaces: "75 foot pounds",
  words: "65 foot pounds",
};
const line = (text: string, startMs: number, recordingId = "one") => ({
  text,
  startMs,
  endMs: startMs + 4_000,
  recordingId,
});

test("what is said around a correction carries what is right", () => {
  expect(correctionAt([right], line("Pull it to the mark.", 58_000))).toBe("65 foot pounds");
  expect(correctionAt([right], line("Pull it to the mark.", 40_000))).toBe("");
  expect(correctionAt([right], line("Pull it to the mark.", 58_000, "two"))).toBe("");
});

test("the wrong words are corrected wherever the recording says them", () => {
  expect(correctionAt([right], line("It gets 75 Foot\npounds.", 5_000))).toBe("65 foot pounds");
  expect(correctionAt([{ ...right, replaces: "" }], line("anything", 5_000))).toBe("");
  expect(correctionAt([{ ...right, kind: "torque" }], line("75 foot pounds", 60_000))).toBe("");
});

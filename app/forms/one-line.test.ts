import { expect, test } from "vitest";
import { oneLine } from "./one-line";

const name = oneLine("Type a name.");

test("a name cannot write lines of its own into a mail", () => {
  expect(name.parse("  Tom\r\nBcc: all@lane.example\u0000 ")).toBe("Tom Bcc: all@lane.example");
});

test("nothing, blanks and 81 characters are refused with a sentence", () => {
  for (const text of [undefined, "", " \n "])
    expect(name.safeParse(text).error?.issues[0]?.message).toBe("Type a name.");
  expect(name.safeParse("x".repeat(81)).error?.issues[0]?.message).toContain("80 characters");
  expect(name.safeParse("x".repeat(80)).success).toBe(true);
});

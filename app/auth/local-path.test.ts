import { expect, test } from "vitest";
import { localPath } from "./local-path";

test("a page of our own is kept with its query and place", () => {
  for (const path of ["/", "/team", "/search?q=drain%20plug&vehicle=1", "/lessons/1?t=12#step-2"])
    expect(localPath(path)).toBe(path);
});

// How browsers read these: WHATWG URL Standard, "basic URL parser" (tabs and newlines removed, "\\" as "/").
test("another site is never reached, however it is written", () => {
  const page = "https://training.example/sign-in";
  for (const text of [
    "https://elsewhere.example/",
    "//elsewhere.example",
    "/\\elsewhere.example",
    "/\t/elsewhere.example",
    "/\n/elsewhere.example",
    "\t//elsewhere.example",
    "/.//elsewhere.example",
    "/a/..//elsewhere.example",
    "javascript:alert(1)",
    "",
    null,
    undefined,
  ]) {
    expect(localPath(text), String(text)).toBe("/");
    expect(new URL(localPath(text), page).origin).toBe("https://training.example");
  }
});

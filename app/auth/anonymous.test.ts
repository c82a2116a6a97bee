import { readdirSync, readFileSync } from "node:fs";
import { expect, test } from "vitest";

// What may be done without signing in. A new function here is a new door: think first, then add it.
const LISTED = [
  "acceptInvitation",
  "askForReset",
  "endSession",
  "findInvitation",
  "findReset",
  "readSession",
  "resetPassword",
  "signInAuthenticator",
  "signUp",
  "startSession",
];

test("the functions that serve nobody signed in are these and no others", () => {
  const found = readdirSync("app", { recursive: true, encoding: "utf8" })
    .filter((path) => path.endsWith(".server.ts"))
    .flatMap((path) => [
      ...readFileSync(`app/${path}`, "utf8").matchAll(/export (?:async )?function (\w+)\(\s*\w+: Anonymous/g),
    ])
    .map(([, name]) => name);
  expect(found.toSorted()).toEqual(LISTED);
});

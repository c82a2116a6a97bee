import { UNSAFE_ErrorResponseImpl as ErrorResponse } from "react-router";
import { expect, test } from "vitest";
import { explainError } from "./explain-error";

test("a refusal of our own is said in its own sentence", () => {
  expect(explainError(new ErrorResponse(403, "", "Ask the shop's owner."))).toEqual({
    status: 403,
    sentence: "Ask the shop's owner.",
  });
});

test("technical words and stacks never reach the page", () => {
  const technical = [
    new ErrorResponse(405, "", new Error('You made a POST request to "/x" but did not provide an `action`')),
    new ErrorResponse(404, "", "Error: No route matches URL"),
    new ErrorResponse(400, "", { issues: [] }),
    new ErrorResponse(500, "", "SQLITE_BUSY: database is locked"),
    new TypeError("Cannot read properties of undefined"),
    "x",
    null,
  ];
  for (const error of technical) {
    const { sentence } = explainError(error);
    expect(sentence).toMatch(/\.$/);
    expect(sentence).not.toMatch(/Error|POST|SQLITE|undefined|object/);
  }
});

// RFC 9110, sections 13.1 and 13.2.2.
import { expect, test } from "vitest";
import { rangeHolds, readCondition } from "./conditions";
import { S3Error } from "./s3-error";

const current = { etag: '"abc"', modified: "2026-03-01T12:00:00.500Z" };
const AT = "Sun, 01 Mar 2026 12:00:00 GMT";
const BEFORE = "Sun, 01 Mar 2026 11:59:59 GMT";
const outcome = (headers: Parameters<typeof readCondition>[0]) => {
  try {
    return readCondition(headers, current);
  } catch (error) {
    if (!(error instanceof S3Error)) throw error;
    return error.status;
  }
};

test("without conditions the object is sent", () => {
  expect(outcome({})).toBe("send");
});

test("If-None-Match knows one tag, a list, a weak tag and any", () => {
  for (const header of ['"abc"', '"x", "abc"', 'W/"abc"', "*"])
    expect(outcome({ "if-none-match": header })).toBe("not-modified");
  expect(outcome({ "if-none-match": '"x"' })).toBe("send");
});

test("If-Match fails unless the tag is the one", () => {
  expect(outcome({ "if-match": '"abc"' })).toBe("send");
  expect(outcome({ "if-match": "*" })).toBe("send");
  expect(outcome({ "if-match": '"x"' })).toBe(412);
});

test("dates count in whole seconds, and the tag goes before the date", () => {
  expect(outcome({ "if-modified-since": AT })).toBe("not-modified");
  expect(outcome({ "if-modified-since": BEFORE })).toBe("send");
  expect(outcome({ "if-modified-since": "soon" })).toBe("send");
  expect(outcome({ "if-unmodified-since": AT })).toBe("send");
  expect(outcome({ "if-unmodified-since": BEFORE })).toBe(412);
  expect(outcome({ "if-none-match": '"x"', "if-modified-since": AT })).toBe("send");
  expect(outcome({ "if-match": '"abc"', "if-unmodified-since": BEFORE })).toBe("send");
});

test("a range holds for the same tag or the same date only", () => {
  expect(rangeHolds(undefined, current)).toBe(true);
  expect(rangeHolds('"abc"', current)).toBe(true);
  expect(rangeHolds('W/"abc"', current)).toBe(false);
  expect(rangeHolds('"x"', current)).toBe(false);
  expect(rangeHolds(AT, current)).toBe(true);
  expect(rangeHolds(BEFORE, current)).toBe(false);
});

import { ulid } from "ulid";
import { expect, test } from "vitest";
import { parseForm } from "~/forms/parse-form";
import { BenchForm } from "./bench-form";

function read(fields: Record<string, string>) {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  return parseForm(BenchForm, form);
}

test("each button of the bench is read as one request", () => {
  const chapterId = ulid();
  const chapter = { version: "3", chapterId, title: " Fit links ", phase: "install", start: "12:44" };
  expect(read({ intent: "add-chapter", ...chapter })).toEqual({
    ok: true,
    value: {
      do: "chapters",
      version: 3,
      request: { edit: "add", id: chapterId, atMs: 764_000, title: "Fit links", phase: "install" },
    },
  });
  expect(read({ intent: "change-chapter", ...chapter, phase: "" })).toMatchObject({
    value: { request: { edit: "change", phase: null } },
  });
  expect(read({ intent: "remove-chapter", version: "3", chapterId })).toMatchObject({
    value: { request: { edit: "remove", id: chapterId } },
  });
  expect(read({ intent: "erase", version: "3", markId: chapterId })).toMatchObject({
    value: { do: "erase", markId: chapterId },
  });
  expect(read({ intent: "details", version: "3", title: "Links", system: "suspension" })).toMatchObject({
    value: { do: "details", version: 3, details: { title: "Links", vehicles: [], newVehicle: null } },
  });
});

test("what is wrong stands beside its field, all of it at once", () => {
  const fields = {
    intent: "add-chapter",
    version: "3",
    chapterId: ulid(),
    title: "",
    phase: "install",
    start: "soon",
  };
  expect(read(fields)).toMatchObject({
    errors: {
      title: "Name the chapter, like “Remove links”.",
      start: "“soon” is not a time. Type it like 12:44.",
    },
    typed: fields,
  });
  expect(read({ intent: "details", version: "3" })).toMatchObject({
    errors: { title: expect.any(String), system: expect.any(String) },
  });
  expect(read({ intent: "burn" })).toMatchObject({ ok: false });
});

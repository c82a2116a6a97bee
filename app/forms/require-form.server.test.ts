import { expect, test } from "vitest";
import { requireForm } from "./require-form.server";

const send = (method: string, path: string, type?: string) => () =>
  requireForm(
    new Request(`https://training.example${path}`, { method, headers: type ? { "Content-Type": type } : {} }),
    path,
  );

test("a page takes forms of both kinds, and nothing else", () => {
  expect(send("POST", "/team", "application/x-www-form-urlencoded;charset=UTF-8")).not.toThrow();
  expect(send("POST", "/team", "multipart/form-data; boundary=x")).not.toThrow();
  expect(send("GET", "/team")).not.toThrow();
  for (const type of ["application/json", "text/plain", "application/x-www-form-urlencodedx", undefined])
    expect(send("POST", "/team", type), type ?? "none").toThrow();
});

test("answers for programs read their own bodies, and signing out needs none", () => {
  expect(send("POST", "/api/watched", "application/json")).not.toThrow();
  expect(send("POST", "/sign-out")).not.toThrow();
});

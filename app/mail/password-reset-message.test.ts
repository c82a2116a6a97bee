import { expect, test } from "vitest";
import { passwordResetMessage } from "./password-reset-message";

test("a reset mail has the link, how long it works, and what to do when nobody asked for it", () => {
  const link = "https://training.example/reset-password/abc";
  const { to, subject, text } = passwordResetMessage({ to: "tom@lane.example", name: "Tom", link });
  expect(to).toBe("tom@lane.example");
  expect(subject).toBe("Choose a new password for Castlenut");
  for (const words of ["Hello Tom,", link, "within two hours", "works once", "do nothing"])
    expect(text).toContain(words);
});

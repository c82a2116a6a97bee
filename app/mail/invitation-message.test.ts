import { expect, test } from "vitest";
import { invitationMessage } from "./invitation-message";

const given = {
  to: "tom@lane.example",
  name: "Tom",
  by: "Hannah",
  shop: "Lane",
  role: "trainee",
  link: "https://training.example/invitation/abc",
};

test("an invitation says who invites to which shop, as what, until when and where to press", () => {
  const { to, subject, text } = invitationMessage(given);
  expect(to).toBe("tom@lane.example");
  expect(subject).toBe("Hannah invites you to Lane on Castlenut");
  for (const words of ["Hello Tom,", "as a trainee", "within 14 days", given.link])
    expect(text).toContain(words);
});

test("the article fits the role", () => {
  expect(invitationMessage({ ...given, role: "instructor" }).text).toContain("as an instructor");
  expect(invitationMessage({ ...given, role: "owner" }).text).toContain("as an owner");
});

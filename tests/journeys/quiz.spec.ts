// Answers typed with units, graded as the trade thinks about numbers. Every test answers as another person of the demo shop.
import type { Page } from "@playwright/test";
import { DEMO, expect, test } from "../support/journey";
import { answer, answerAll, openQuiz } from "../support/take-quiz";

const LESSON = "Front sway-bar links: replace and torque";
const LOWER = /lower link nut/;

async function start(page: Page): Promise<void> {
  await openQuiz(page, LESSON);
  await page.getByRole("button", { name: "Start the quiz" }).click();
}

async function submit(page: Page): Promise<void> {
  await page.getByRole("button", { name: "Submit the answers" }).click();
  await expect(page).toHaveURL(/\/result$/);
}

const rowOf = (page: Page, prompt: RegExp) =>
  page
    .locator("main")
    .getByRole("listitem")
    .filter({ hasText: prompt })
    .filter({ hasText: /^\d+\. / });

// 65 lbf·ft = 65 × 1.3558179… = 88.1 N·m and 65 lbf·in = 7.34 N·m: NIST SP 811, appendix B.8.
test("88 N·m for 65 lbf·ft is right in another unit, and the result leads to the moment", async ({
  signedIn,
}) => {
  const { page } = await signedIn(DEMO.trainee);
  await start(page);
  await answerAll(page, [[LOWER, "88 Nm"]]);
  await submit(page);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Passed");
  await expect(page.getByText("7 of 7 right")).toBeVisible();
  const row = rowOf(page, LOWER);
  await expect(row).toContainText("Right, in another unit");
  await expect(row).toContainText("Right. 88 N·m is 65 lbf·ft.");
  await row.getByRole("link", { name: "See it at 2:05" }).click();
  await expect(page).toHaveURL(/\/lessons\/[0-9A-Z]{26}\?t=125\.[12]/);
  await expect(page.getByRole("region", { name: "Recording" })).toContainText("Play from 2:05");
});

test("65 lbf·in for 65 lbf·ft: right number, wrong unit, twelve times too loose", async ({ signedIn }) => {
  const { page } = await signedIn(DEMO.kofi);
  await start(page);
  await answerAll(page, [[LOWER, "65 in-lb"]]);
  await submit(page);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Not passed yet");
  const row = rowOf(page, LOWER);
  await expect(row).toContainText("Right number, wrong unit. 65 lbf·in is 7.3 N·m, twelve times too loose.");
  await expect(page.getByText("A safety-critical value was not right")).toBeVisible();
});

test("digits turned round are not right", async ({ signedIn }) => {
  const { page } = await signedIn(DEMO.ana);
  await start(page);
  await answerAll(page, [[LOWER, "56 lbf·ft"]]);
  await submit(page);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Not passed yet");
  await expect(page.getByText("6 of 7 right")).toBeVisible();
  await expect(rowOf(page, LOWER)).toContainText("Not right");
  await expect(rowOf(page, LOWER)).toContainText("Not that one. The value is 65 lbf·ft.");
});

test("no unit is asked again and costs no try; a closed tab keeps what was typed; twice submitted counts once", async ({
  signedIn,
}) => {
  const person = await signedIn(DEMO.ines);
  const { page } = person;
  await start(page);
  await answerAll(page, [[LOWER, "65"]]);
  await expect(page.getByRole("button", { name: "Submit the answers" })).toHaveCount(0);
  await expect(page.getByText("One answer is missing or not readable. That costs no try")).toBeVisible();
  const open = new URL(page.url()).pathname;
  // Past the page, by the form itself: the answer that lacks its unit still stops it.
  const early = await person.post(open, {});
  expect(early.headers()["location"]).toBe(open);
  await page.close();

  const again = await person.context.newPage();
  await openQuiz(again, LESSON);
  await expect(again.getByRole("heading", { name: "Your attempts" })).toHaveCount(0);
  await again.getByRole("button", { name: "Go on with the quiz" }).click();
  await expect(again.locator("#answer")).toHaveValue("18 mm");
  await again.getByRole("link", { name: "All questions" }).click();
  const row = again.getByRole("listitem").filter({ hasText: LOWER });
  await expect(row).toContainText("65");
  await row.getByRole("link", { name: /^(Change|Answer) question/ }).click();
  await answer(again, "65 lbf·ft");
  await again.getByRole("button", { name: "Next question" }).click();
  await expect(again.getByRole("heading", { level: 1 })).toHaveText("Question 7 of 7");
  const [first, second] = await Promise.all([person.post(open, {}), person.post(open, {})]);
  expect([first.status(), second.status()]).toEqual([302, 302]);
  expect(first.headers()["location"]).toMatch(/\/result$/);
  expect(second.headers()["location"]).toBe(first.headers()["location"]);
  await openQuiz(again, LESSON);
  const attempts = again.locator("main").getByRole("listitem");
  await expect(attempts).toHaveCount(1);
  await expect(attempts).toContainText("7 of 7 right, passed");
});

import type { Page } from "@playwright/test";
import { expect } from "./journey";

/** A right answer for every question on the demo's sway-bar links of the Foss, as the lesson's captions say them. */
export const FOSS_ANSWERS: readonly (readonly [RegExp, string])[] = [
  [/wrench fits/, "18 mm"],
  [/hex key fits/, "6 mm"],
  [/sway bar diameter/, "24.0 mm"],
  [/crowfoot fits/, "18 mm"],
  [/upper link nut/, "70 Nm"],
  [/lower link nut/, "65 lbf·ft"],
  [/wheel nuts/, "80 lbf·ft"],
];

/** Opens a lesson from the library and goes to its quiz. */
export async function openQuiz(page: Page, lesson: string): Promise<void> {
  await page.goto("/");
  await page.getByRole("link", { name: lesson }).click();
  await page.getByRole("link", { name: "Take the quiz" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Quiz");
}

/** Types or chooses one answer on the question that is open. */
export async function answer(page: Page, text: string): Promise<void> {
  const choice = page.getByRole("radio", { name: text, exact: true });
  if ((await page.getByRole("radio").count()) > 0) await choice.check();
  else await page.locator("#answer").fill(text);
}

/**
 * Goes through the questions from the first to the page that looks them over. `mine` goes before the right answers.
 */
export async function answerAll(
  page: Page,
  mine: readonly (readonly [RegExp, string])[],
  all: readonly (readonly [RegExp, string])[] = FOSS_ANSWERS,
): Promise<void> {
  for (;;) {
    const heading = page.getByRole("heading", { level: 1, name: /^Question \d+ of \d+$/ });
    await expect(heading).toBeVisible();
    const title = await heading.textContent();
    const [, n, count] = /(\d+) of (\d+)/.exec(title ?? "") ?? [];
    const prompt = (await page.locator("form legend, label[for=answer]").first().textContent()) ?? "";
    const given = [...mine, ...all].find(([asks]) => asks.test(prompt));
    if (!given) throw new Error(`no answer for “${prompt}”`);
    await answer(page, given[1]);
    if (n === count) {
      await page.getByRole("button", { name: "Look it over" }).click();
      break;
    }
    await page.getByRole("button", { name: "Next question" }).click();
    await expect(heading).not.toHaveText(title ?? "");
  }
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Look over your answers");
}

// Everything a learner needs works as plain pages and forms.
import { DEMO, expect, PASSWORD, test } from "../support/journey";
import { answerAll } from "../support/take-quiz";

test.use({ javaScriptEnabled: false });

const LESSON = "Front sway-bar links: replace and torque";

test("sign in, find a value, read the lesson, take the quiz", async ({ page }) => {
  await page.goto("/training");
  await page.getByLabel("E-mail").fill(DEMO.dario);
  await page.getByLabel("Password").fill("wrong");
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page.getByRole("alert")).toContainText("That e-mail and password do not fit together.");
  await expect(page.getByLabel("E-mail")).toHaveValue(DEMO.dario);
  await page.getByLabel("Password").fill(PASSWORD);
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("My training");

  await page.getByRole("link", { name: "Library", exact: true }).click();
  await page.getByLabel("System").selectOption({ label: "Suspension" });
  await page.getByRole("button", { name: "Show" }).click();
  await expect(page.getByRole("link", { name: LESSON })).toBeVisible();

  await page.getByLabel("Find a value or a job").fill("lower link nut torque foss");
  await page.keyboard.press("Enter");
  const values = page.getByRole("region", { name: "Values" });
  await expect(values).toContainText("65");
  await expect(values).toContainText("88");
  await expect(values.getByRole("link", { name: "Play from 2:05" })).toBeVisible();
  await values.getByRole("link", { name: LESSON }).first().click();

  await expect(page.getByRole("heading", { level: 1 })).toHaveText(LESSON);
  const sheet = page.locator("main");
  for (const words of [
    "Upper link nut to strut",
    "Lower link nut to bar",
    "Wheel nuts",
    "Chock both rear wheels",
  ])
    await expect(sheet).toContainText(words);
  await expect(sheet).toContainText("Aldren workshop manual Foss, suspension");
  const moment = page.getByRole("link", { name: /^Play from 2:05/ }).first();
  expect(await moment.getAttribute("href")).toMatch(/^\/recordings\/[0-9A-Z]{26}\/play#t=125\.[12]$/);
  const film = await page.request.get((await moment.getAttribute("href")) ?? "", { maxRedirects: 0 });
  expect(film.status()).toBe(302);
  const bytes = await page.request.get(film.headers()["location"] ?? "", {
    headers: { Range: "bytes=0-99" },
  });
  expect([bytes.status(), (await bytes.body()).length]).toEqual([206, 100]);

  await page.getByRole("link", { name: "Take the quiz" }).click();
  await page.getByRole("button", { name: /^(Start|Go on with) the quiz$/ }).click();
  await answerAll(page, [[/lower link nut/, "88 Nm"]]);
  await page.getByRole("button", { name: "Submit the answers" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Passed");
  await expect(page.getByText("Right. 88 N·m is 65 lbf·ft.")).toBeVisible();
});

// By keyboard alone: skip link, search, player; and the focus can be seen.
import type { Page } from "@playwright/test";
import { DEMO, expect, test } from "../support/journey";

const LESSON = "Front sway-bar links: replace and torque";

/** Whether what has the focus is drawn with an outline of at least two pixels. */
async function outlined(page: Page): Promise<string> {
  return page.evaluate(() => {
    const { outlineStyle, outlineWidth } = getComputedStyle(document.activeElement ?? document.body);
    return outlineStyle !== "none" && Number.parseFloat(outlineWidth) >= 2 ? "outlined" : "not outlined";
  });
}

test("the first Tab is the way past the frame", async ({ signedIn }) => {
  const { page } = await signedIn(DEMO.ana);
  await page.goto("/training");
  await page.keyboard.press("Tab");
  const skip = page.getByRole("link", { name: "Skip to the content" });
  await expect(skip).toBeFocused();
  const box = await skip.boundingBox();
  expect(box?.width).toBeGreaterThan(40);
  expect(box?.height).toBeGreaterThan(20);
  await page.keyboard.press("Enter");
  await expect(page.locator("#content")).toBeFocused();
  await page.keyboard.press("Tab");
  expect(await page.evaluate(() => document.activeElement?.closest("main") !== null)).toBe(true);
});

test("every stop of the Tab key in library, lesson and sign-in can be seen", async ({
  signedIn,
  page: outside,
}) => {
  const { page } = await signedIn(DEMO.ana);
  await outside.goto("/sign-in");
  await page.goto("/");
  const lesson = (await page.getByRole("link", { name: LESSON }).getAttribute("href")) ?? "";
  for (const [at, address, stops] of [
    [outside, "/sign-in", 5],
    [page, "/", 14],
    [page, lesson, 20],
  ] as const) {
    await at.goto(address);
    for (let n = 0; n < stops; n += 1) {
      await at.keyboard.press("Tab");
      const what = await at.evaluate(() => document.activeElement?.outerHTML.slice(0, 120) ?? "");
      expect(await outlined(at), `${address}, stop ${n + 1}: ${what}`).toBe("outlined");
    }
  }
});

test("“/” jumps into the search box; arrows and Enter lead to the value's lesson", async ({ signedIn }) => {
  const { page } = await signedIn(DEMO.ana);
  await page.goto("/training");
  await page.waitForLoadState("networkidle");
  await page.keyboard.press("/");
  const box = page.getByRole("combobox", { name: "Find a value or a job" });
  await expect(box).toBeFocused();
  await expect(box).toHaveValue("");
  await page.keyboard.type("lower link nut to bar");
  await expect(box).toHaveAttribute("aria-expanded", "true");
  const options = page.getByRole("listbox", { name: "Suggestions" }).getByRole("option");
  await expect(options.filter({ hasText: "Lower link nut to bar: 65 lbf·ft" }).first()).toBeVisible();
  const texts = await options.allTextContents();
  const wanted = texts.findIndex((text) => text.includes("Lower link nut to bar: 65 lbf·ft"));
  await page.keyboard.press("ArrowUp");
  await expect(options.last()).toHaveAttribute("aria-selected", "true");
  await page.keyboard.press("ArrowDown");
  for (let n = 0; n <= wanted; n += 1) await page.keyboard.press("ArrowDown");
  await expect(options.nth(wanted)).toHaveAttribute("aria-selected", "true");
  expect(await box.getAttribute("aria-activedescendant")).toBe(await options.nth(wanted).getAttribute("id"));
  await page.keyboard.press("Enter");
  await expect(page.getByRole("heading", { level: 1 })).toHaveText(LESSON);
  await expect(page).toHaveURL(/\?t=125\.[12]$/);
});

test("Escape closes the suggestions, and “/” is a letter where somebody types", async ({ signedIn }) => {
  const { page } = await signedIn(DEMO.ana);
  await page.goto("/");
  await page.waitForLoadState("networkidle");
  const box = page.getByRole("combobox", { name: "Find a value or a job" });
  await box.focus();
  await page.keyboard.type("link");
  await expect(box).toHaveAttribute("aria-expanded", "true");
  await page.keyboard.press("Escape");
  await expect(box).toHaveAttribute("aria-expanded", "false");
  await expect(box).toBeFocused();
  await page.getByLabel("Title", { exact: true }).focus();
  await page.keyboard.type("1/2");
  await expect(page.getByLabel("Title", { exact: true })).toHaveValue("1/2");
});

test("the player starts, pauses and moves by keyboard", async ({ signedIn }) => {
  const { page } = await signedIn(DEMO.ana);
  await page.goto("/");
  await page.getByRole("link", { name: LESSON }).click();
  const recording = page.getByRole("region", { name: "Recording" });
  await recording
    .getByRole("link", { name: /^(Play|From 0:00)/ })
    .last()
    .focus();
  await page.keyboard.press("Enter");
  const video = page.locator("video");
  const paused = () => video.evaluate((element: HTMLVideoElement) => element.paused);
  const at = () => video.evaluate((element: HTMLVideoElement) => element.currentTime);
  await expect.poll(at).toBeGreaterThan(0.5);
  await recording.getByRole("button", { name: /^Picture: play or pause/ }).focus();
  expect(await outlined(page)).toBe("outlined");
  await page.keyboard.press("Space");
  await expect.poll(paused).toBe(true);
  const stood = await at();
  await page.keyboard.press("ArrowRight");
  await expect.poll(at).toBeCloseTo(stood + 5, 0);
  await page.keyboard.press("ArrowLeft");
  await expect.poll(at).toBeCloseTo(stood, 0);
  await page.keyboard.press("Space");
  await expect.poll(paused).toBe(false);
  const slider = recording.getByRole("slider", { name: "Moment in the lesson" });
  await expect(slider).toHaveAttribute("aria-valuetext", /^0:\d\d of 3:09$/);
});

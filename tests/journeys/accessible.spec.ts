// WCAG 2.2 AA as far as a machine can tell, on a phone and a desk, light and dark; and nothing wider than a narrow phone.
import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "@playwright/test";
import { DEMO, expect, test, type Person } from "../support/journey";
import { signUpShop } from "../support/shop-of-own";
import { answerAll } from "../support/take-quiz";

// Every fault is told in words; a trace of each look would take longer than the looks.
test.use({ trace: "off" });

const LESSON = "Front sway-bar links: replace and torque";
const TAGS = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
const LOOKS = [
  { width: 360, colorScheme: "light" },
  { width: 360, colorScheme: "dark" },
  { width: 1440, colorScheme: "light" },
  { width: 1440, colorScheme: "dark" },
] as const;

/** Faults of a page that keep somebody out, in every look. */
async function faultsOf(page: Page, address: string): Promise<string[]> {
  const faults: string[] = [];
  await page.goto(address);
  await expect(page.getByRole("heading", { level: 1 })).toBeVisible();
  for (const { width, colorScheme } of LOOKS) {
    await page.setViewportSize({ width, height: 780 });
    await page.emulateMedia({ colorScheme, reducedMotion: "reduce" });
    // No page has a frame in it, so the analysis needs no second page to put frames together.
    const axe = new AxeBuilder({ page }).setLegacyMode(true);
    // Dark changes colours and nothing else.
    const { violations } = await (
      colorScheme === "dark" ? axe.withRules("color-contrast") : axe.withTags(TAGS)
    ).analyze();
    for (const { id, impact, nodes } of violations)
      if (impact === "serious" || impact === "critical")
        faults.push(
          `${address} at ${width} ${colorScheme}: ${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(" | ")}`,
        );
    const wide = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    if (wide > 0) faults.push(`${address} at ${width}: ${wide} px wider than the window`);
  }
  return faults;
}

async function lessonOf(person: Person): Promise<string> {
  await person.page.goto("/");
  const address = await person.page.getByRole("link", { name: LESSON }).getAttribute("href");
  return address?.split("/").at(-1) ?? "";
}

test("pages before sign-in, first steps and an empty shop", async ({ page, somebody }) => {
  test.setTimeout(400_000);
  const faults: string[] = [];
  for (const address of ["/sign-in", "/sign-up", "/forgot-password", "/invitation/none"])
    faults.push(...(await faultsOf(page, address)));
  const owner = await signUpShop(somebody);
  for (const address of ["/", "/bench", "/bench/recordings", "/training", "/skills", "/search"])
    faults.push(...(await faultsOf(owner.page, address)));
  expect(faults).toEqual([]);
});

test("a form that was refused", async ({ page }) => {
  await page.goto("/sign-up");
  await page.getByLabel("Name of the shop").fill("Short Lane");
  await page.getByLabel("Your name").fill("Ida");
  await page.getByLabel("E-mail").fill("ida@shop.example");
  await page.getByLabel("Password").fill("short");
  await page.getByRole("button", { name: "Set up the shop" }).click();
  await expect(page.getByRole("alert")).toBeVisible();
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  expect(violations.map(({ id }) => id)).toEqual([]);
});

test("what a learner sees: library, lesson, search, quiz, result, my training, account", async ({
  signedIn,
}) => {
  test.setTimeout(600_000);
  const person = await signedIn(DEMO.owner);
  const { page } = person;
  const lessonId = await lessonOf(person);
  const faults: string[] = [];
  for (const address of [
    "/",
    `/lessons/${lessonId}`,
    "/search?q=link%20nut%20torque",
    "/search?q=nothing%20of%20this%20kind",
    `/lessons/${lessonId}/quiz`,
    "/training",
    "/account",
  ])
    faults.push(...(await faultsOf(page, address)));
  await page.goto(`/lessons/${lessonId}/quiz`);
  await page.getByRole("button", { name: /^(Start|Go on with) the quiz$/ }).click();
  await expect(page.getByRole("heading", { level: 1, name: /^Question 1/ })).toBeVisible();
  const attempt = new URL(page.url()).pathname;
  faults.push(...(await faultsOf(page, attempt)), ...(await faultsOf(page, `${attempt}?question=7`)));
  await page.goto(attempt);
  await answerAll(page, [[/lower link nut/, "65 in-lb"]]);
  faults.push(...(await faultsOf(page, `${attempt}/review`)));
  await page.getByRole("button", { name: "Submit the answers" }).click();
  await expect(page).toHaveURL(/\/result$/);
  faults.push(...(await faultsOf(page, `${attempt}/result`)));
  expect(faults).toEqual([]);
});

/** The demo lesson's bench and the mark of its lower link nut. */
async function benchAddresses(person: Person): Promise<{ bench: string; markId: string }> {
  const bench = `/bench/lessons/${await lessonOf(person)}`;
  const html = await (await person.get(bench)).text();
  const markId = /id="mark-([0-9A-Z]{26})"[\s\S]{0,900}?Lower link nut/.exec(html)?.[1];
  if (!markId) throw new Error("no mark of the lower link nut on the bench");
  return { bench, markId };
}

test("the bench: list, lesson, mark, captions, questions", async ({ signedIn }) => {
  test.setTimeout(600_000);
  const person = await signedIn(DEMO.instructor);
  const { bench, markId } = await benchAddresses(person);
  const faults: string[] = [];
  for (const address of [
    "/bench",
    bench,
    `${bench}/marks/new?kind=torque&at=130`,
    `${bench}/marks/new?kind=caution&at=130`,
    `${bench}/marks/${markId}`,
    `${bench}/captions`,
    `${bench}/questions`,
  ])
    faults.push(...(await faultsOf(person.page, address)));
  expect(faults).toEqual([]);
});

test("recordings, a new lesson, check, publish, revision, doubts", async ({ signedIn }) => {
  test.setTimeout(600_000);
  const person = await signedIn(DEMO.instructor);
  const { bench } = await benchAddresses(person);
  const faults: string[] = [];
  for (const address of [
    "/bench/recordings",
    "/bench/recordings/upload",
    "/bench/lessons/new",
    `${bench}/check`,
    `${bench}/publish`,
    `${bench}/revisions/1`,
    "/bench/doubts",
  ])
    faults.push(...(await faultsOf(person.page, address)));
  expect(faults).toEqual([]);
});

test("who has shown what, assigning, sign-offs, team, settings", async ({ signedIn }) => {
  test.setTimeout(600_000);
  const { page } = await signedIn(DEMO.owner);
  const faults: string[] = [];
  for (const address of [
    "/skills",
    "/training/assign",
    "/training/sign-offs",
    "/team",
    "/settings",
    "/settings/tasks",
    "/settings/audit",
  ])
    faults.push(...(await faultsOf(page, address)));
  expect(faults).toEqual([]);
});

test("the player while it plays, and a value that looks wrong", async ({ signedIn }) => {
  const person = await signedIn(DEMO.ines);
  const { page } = person;
  const lessonId = await lessonOf(person);
  await page.goto(`/lessons/${lessonId}?t=124`);
  await page.getByRole("region", { name: "Recording" }).getByRole("link", { name: "Play from 2:04" }).click();
  await expect
    .poll(() => page.locator("video").evaluate((element: HTMLVideoElement) => element.currentTime))
    .toBeGreaterThan(125.5);
  for (const width of [360, 1440]) {
    await page.setViewportSize({ width, height: 780 });
    const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
    expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html.slice(0, 160)}`)).toEqual([]);
    expect(
      await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
  }
  const wrong = await page
    .getByRole("link", { name: /looks wrong/ })
    .first()
    .getAttribute("href");
  expect(await faultsOf(page, wrong ?? "")).toEqual([]);
});

test("what a gloved finger taps on a phone is 44 px high", async ({ signedIn }) => {
  const person = await signedIn(DEMO.ana, { viewport: { width: 390, height: 780 }, hasTouch: true });
  const { page } = person;
  const lessonId = await lessonOf(person);
  for (const address of ["/", `/lessons/${lessonId}`, "/search?q=link%20nut%20torque", "/training"]) {
    await page.goto(address);
    const small = await page.evaluate(() =>
      [
        ...document.querySelectorAll<HTMLElement>(
          "main button, main select, main summary, main input:not([type=hidden],[type=checkbox],[type=radio],[type=range]), nav a",
        ),
      ]
        .filter((element) => element.checkVisibility() && element.getBoundingClientRect().height > 1)
        .filter((element) => element.getBoundingClientRect().height < 43.5)
        .map(
          (element) =>
            `${element.tagName} ${element.textContent?.trim().slice(0, 40)} ${element.getBoundingClientRect().height}`,
        ),
    );
    expect(small, address).toEqual([]);
  }
});

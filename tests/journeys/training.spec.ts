// A lesson is assigned, watched, answered and shown on a car, in a shop of its own.
import { FILMS } from "../support/films";
import { countMails, linkIn, mailTo } from "../support/inbox";
import { expect, test } from "../support/journey";
import { join, publishShortLesson, signUpShop } from "../support/shop-of-own";
import { answerAll, openQuiz } from "../support/take-quiz";

const LESSON = "Front link nuts";
const dayFrom = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);

test("assigned, seen, answered, shown", async ({ somebody }) => {
  test.setTimeout(180_000);
  const owner = await signUpShop(somebody);
  const lessonId = await publishShortLesson(owner, FILMS.short, LESSON);
  const trainee = await join(somebody, owner, "Theo Marsh", "trainee");
  const { page } = owner;
  const theirs = trainee.page;
  const skill = () => page.getByRole("row").filter({ hasText: "Theo Marsh" }).getByRole("img");

  await test.step("a day in the past is refused beside its field, and what was typed is kept", async () => {
    await page.goto("/training/assign");
    await page.getByLabel("Lesson").selectOption({ label: LESSON });
    await page.getByLabel(/Theo Marsh/).check();
    const due = page.getByLabel("Due on");
    // As a phone without a calendar would let it through.
    await due.evaluate((input: HTMLInputElement) => input.removeAttribute("min"));
    await due.fill(dayFrom(-3));
    await page.getByLabel("Note for the mail (optional)").fill("Before the Foss comes in.");
    await page.getByRole("button", { name: "Assign", exact: true }).click();
    await expect(due).toHaveAccessibleDescription(/This day is in the past\. Choose today or later\./);
    await expect(due).toHaveAttribute("aria-invalid", "true");
    await expect(due).toHaveValue(dayFrom(-3));
    await expect(page.getByLabel("Lesson")).toHaveValue(lessonId);
    await expect(page.getByLabel(/Theo Marsh/)).toBeChecked();
    await expect(page.getByLabel("Note for the mail (optional)")).toHaveValue("Before the Foss comes in.");
    expect(await countMails(trainee.email, /Front link nuts/)).toBe(0);
  });

  await test.step("assigned, and the mail leads to the lesson", async () => {
    await page.getByLabel("Due on").fill(dayFrom(10));
    await page.getByRole("button", { name: "Assign", exact: true }).click();
    await expect(page.getByText("Assigned to 1 person. The mail is on its way.")).toBeVisible();
    await expect(skill()).toHaveAccessibleName("not started");
    const mail = await mailTo(trainee.email, /^Front link nuts: due /);
    expect(mail.text).toContain("Before the Foss comes in.");
    expect(linkIn(mail)).toBe(`/lessons/${lessonId}`);
    await theirs.goto("/training");
    const assigned = theirs.getByRole("region", { name: "Assigned" });
    await expect(assigned).toContainText(LESSON);
    await expect(assigned).toContainText(/due \w{3} \d{1,2} \w{3} \d{4}/);
    await assigned.getByRole("link", { name: "Watch", exact: true }).click();
  });

  await test.step("watched to the end", async () => {
    const recording = theirs.getByRole("region", { name: "Recording" });
    await recording.getByRole("link", { name: /^Play, / }).click();
    const video = theirs.locator("video");
    await expect
      .poll(() => video.evaluate((element: HTMLVideoElement) => element.currentTime), { timeout: 45_000 })
      .toBeGreaterThan(11.5);
    await theirs.waitForTimeout(1000);
    await expect
      .poll(
        async () => {
          await page.goto("/skills");
          return skill().getAttribute("aria-label");
        },
        { timeout: 30_000 },
      )
      .toBe("seen");
  });

  await test.step("answered", async () => {
    await openQuiz(theirs, LESSON);
    await theirs.getByRole("button", { name: "Start the quiz" }).click();
    await answerAll(theirs, [], [[/lower link nut/, "65 ft-lb"]]);
    await theirs.getByRole("button", { name: "Submit the answers" }).click();
    await expect(theirs.getByRole("heading", { level: 1 })).toHaveText("Passed");
    await page.goto("/skills");
    await expect(skill()).toHaveAccessibleName("seen, answered");
  });

  await test.step("a sign-off is asked for, given and shown", async () => {
    await theirs.goto("/training");
    await theirs.getByRole("link", { name: "Ask for a sign-off" }).click();
    await theirs.getByLabel("Note (optional)").fill("The Foss in bay 2. Olive was there.");
    await theirs.getByRole("button", { name: "Ask for a sign-off" }).click();
    await expect(theirs.getByRole("region", { name: "Waiting for a sign-off" })).toContainText(LESSON);
    const mail = await mailTo(owner.email, /Theo Marsh asks for a sign-off: Front link nuts/);
    await page.goto(linkIn(mail));
    await expect(page.getByText("The Foss in bay 2. Olive was there.")).toBeVisible();
    await page.getByRole("link", { name: "Answer" }).click();
    await page.getByLabel("How much of the job did you see?").selectOption("all-the-time");
    await page.getByLabel("How did they do it?").selectOption("on-own");
    const set = page.getByLabel("What was set, and how it was tightened");
    await expect(set).toHaveValue("Lower link nut to bar: ");
    await page.getByRole("button", { name: "Sign off", exact: true }).click();
    await expect(set).toHaveAccessibleDescription(/Write down what was set at the car/);
    await set.fill("Lower link nut to bar: 65 lbf·ft, wrench 4, one click, paint mark.");
    await page.getByRole("button", { name: "Sign off", exact: true }).click();
    await expect(page.getByText(/on their own, shown .* to Olive Quill/)).toBeVisible();
    await mailTo(trainee.email, /^Signed off: Front link nuts/);
    await page.goto("/skills");
    await expect(page.getByRole("row").filter({ hasText: "Theo Marsh" })).toContainText("shown once");
    await theirs.goto("/training");
    await expect(theirs.getByRole("region", { name: "Signed off" })).toContainText("on their own");
    await expect(theirs.getByRole("region", { name: "Waiting for a sign-off" })).toHaveCount(0);
  });

  await test.step("shown a second time on another day fills the third slot", async () => {
    await page.goto("/skills");
    await page.getByRole("row").filter({ hasText: "Theo Marsh" }).getByRole("link").first().click();
    await page.getByRole("link", { name: "Sign off", exact: true }).click();
    await page.getByLabel("How much of the job did you see?").selectOption("critical-steps");
    await page.getByLabel("How did they do it?").selectOption("on-own");
    await page.getByLabel("Day it was shown").fill(dayFrom(-2));
    await page
      .getByLabel("What was set, and how it was tightened")
      .fill("Lower link nut to bar: 65 lbf·ft, wrench 4, one click.");
    await page.getByRole("button", { name: "Sign off", exact: true }).click();
    await expect(page.getByRole("img", { name: "seen, answered, shown" })).toBeVisible();
    await page.goto("/skills");
    await expect(skill()).toHaveAccessibleName("seen, answered, shown");
  });
});

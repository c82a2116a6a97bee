// From an empty shop to a value found at the car: upload under a bad network, bench, gate, publish, search on a phone.
import type { Locator, Page, Request } from "@playwright/test";
import { STORAGE_ORIGIN } from "../support/addresses";
import { FILMS } from "../support/films";
import { expect, test } from "../support/journey";
import { newAddress, OWN_PASSWORD, signUpShop } from "../support/shop-of-own";

const MB = 1024 * 1024;
const PARTS = 5;

/** Counts the parts that a page sends to storage and those that storage took. */
function countParts(page: Page) {
  const begun: number[] = [];
  const arrived: number[] = [];
  const partOf = (request: Request) =>
    request.method() === "PUT" && request.url().startsWith(STORAGE_ORIGIN)
      ? Number(new URL(request.url()).searchParams.get("partNumber"))
      : 0;
  page.on("request", (request) => {
    if (partOf(request) > 0) begun.push(partOf(request));
  });
  page.on("response", (response) => {
    if (response.status() === 200 && partOf(response.request()) > 0) arrived.push(partOf(response.request()));
  });
  return { begun, arrived };
}

async function choose(page: Page, path: string): Promise<void> {
  await page.goto("/bench/recordings/upload");
  // Until the page's script runs nobody listens to the field.
  await page.waitForLoadState("networkidle");
  await page.getByLabel("Choose recordings").setInputFiles(path);
}

const ascending = (numbers: readonly number[]) => numbers.toSorted((a, b) => a - b);

const CAPTIONS = `WEBVTT

00:01.000 --> 00:05.000
Chock the rear wheels and set stands on the maker's points.

00:25.000 --> 00:29.500
Lower link nut, sixty-five foot-pounds.

00:46.000 --> 00:50.000
Turn the bar by hand: no play.
`;

test("an empty shop makes its first lesson, and a phone finds its torque at the second", async ({
  network,
  somebody,
}) => {
  test.setTimeout(240_000);
  const { page } = await somebody({ proxy: network.proxy });
  const email = newAddress("olive");

  await test.step("sign up and see the first steps", async () => {
    await page.goto("/");
    await expect(page).toHaveURL(/\/sign-in/);
    await page.getByRole("link", { name: "New here? Set up your shop" }).click();
    await page.getByLabel("Name of the shop").fill("Tallow Row Motors");
    await page.getByLabel("Country").selectOption({ label: "United States" });
    await page.getByLabel("Your name").fill("Olive Quill");
    await page.getByLabel("E-mail").fill(email);
    await page.getByLabel("Password").fill(OWN_PASSWORD);
    await page.getByRole("button", { name: "Set up the shop" }).click();
    await expect(page.getByText("The library of Tallow Row Motors is empty.")).toBeVisible();
    await page.getByRole("link", { name: "Upload a recording" }).click();
    await expect(page.getByRole("heading", { level: 1 })).toHaveText("Upload recordings");
  });

  await test.step("upload: pause, resume, and a network that goes away in the middle", async () => {
    const parts = countParts(page);
    await choose(page, FILMS.large);
    network.slow(10 * MB);
    const row = page.getByRole("list", { name: "Uploads" }).getByRole("listitem");
    const status = row.getByRole("status");
    // Three parts are sent at a time.
    await expect.poll(() => parts.begun.length).toBe(3);
    await row.getByRole("button", { name: "Pause" }).click();
    await expect(status).toContainText("Paused at");
    // What is under way arrives, and nothing more is begun.
    await expect.poll(() => parts.arrived.length).toBe(parts.begun.length);
    const pausedWith = parts.begun.length;
    expect(pausedWith).toBeLessThan(PARTS);
    await page.waitForTimeout(1500);
    expect(parts.begun.length).toBe(pausedWith);
    await expect(status).toContainText("Paused at");
    await expect(row.getByRole("progressbar")).not.toHaveAttribute("value", "0");

    network.slow(4 * MB);
    const before = [...parts.arrived];
    await row.getByRole("button", { name: "Resume" }).click();
    await expect.poll(() => parts.begun.length).toBeGreaterThan(pausedWith);
    await page.waitForTimeout(700);
    network.cut();
    await page.context().setOffline(true);
    await expect(status).toContainText("No network. It goes on by itself when the network is back.");
    await page.waitForTimeout(2000);
    expect(parts.arrived.length).toBeLessThan(PARTS);
    network.back();
    await page.context().setOffline(false);
    await expect(status).toHaveText("Uploaded. It is being checked.", { timeout: 60_000 });
    expect(ascending(parts.arrived)).toEqual([1, 2, 3, 4, 5]);
    for (const n of before) expect(parts.begun.filter((part) => part === n)).toEqual([n]);
  });

  await test.step("the recording becomes ready", async () => {
    await page.getByRole("link", { name: "Go to the recordings" }).click();
    const row = page.getByRole("listitem").filter({ hasText: "bay-two.mp4" });
    await expect(row.getByText("Ready", { exact: true })).toBeVisible({ timeout: 60_000 });
    await expect(row.getByText(/640 × 360/)).toBeVisible();
    await row.getByRole("link", { name: "Make a lesson" }).click();
  });

  await test.step("make the lesson", async () => {
    await page.getByLabel("Title", { exact: true }).fill("Front sway-bar links on the Foss");
    await page.getByLabel("System").selectOption({ label: "Suspension" });
    await page.getByText("Add a vehicle").click();
    await page.getByLabel("Make", { exact: true }).fill("Aldren");
    await page.getByLabel("Model", { exact: true }).fill("Foss");
    await page.getByRole("button", { name: "Make the lesson" }).click();
    await expect(page.getByRole("heading", { level: 1 })).toHaveText("Front sway-bar links on the Foss");
  });

  await test.step("import captions", async () => {
    await page.getByRole("link", { name: "Captions", exact: true }).click();
    await page.getByLabel("Caption file (.vtt)").setInputFiles({
      name: "links.vtt",
      mimeType: "text/vtt",
      buffer: Buffer.from(CAPTIONS),
    });
    await page.getByRole("button", { name: "Import captions" }).click();
    await expect(page.getByText(/3 cues from links\.vtt/)).toBeVisible();
    await page.getByRole("link", { name: "Back to the bench" }).click();
  });

  const chapter = (title: string) =>
    page
      .getByRole("region", { name: "Chapters and marks" })
      .locator("li[id^=chapter-]")
      .filter({ has: page.getByRole("heading", { name: new RegExp(`^\\d+\\. ${title}$`) }) });

  await test.step("chapters: rename, add, move, remove", async () => {
    const change = async (card: Locator, fields: { title?: string; phase?: string; start?: string }) => {
      const title = card.getByLabel("Title");
      if ((await card.locator("details").getAttribute("open")) === null)
        await card.getByText("Change this chapter").click();
      if (fields.title) await title.fill(fields.title);
      if (fields.phase) await card.getByLabel("Phase").selectOption({ label: fields.phase });
      if (fields.start) await card.getByLabel("Starts at").fill(fields.start);
      await card.getByRole("button", { name: "Save chapter" }).click();
    };
    await change(chapter("Step 1"), { title: "Lift and support", phase: "Prepare" });
    await expect(chapter("Lift and support")).toContainText("Prepare");
    const add = async (title: string, phase: string, start: string) => {
      const form = page.locator("#add-chapter");
      await form.getByLabel("Title").fill(title);
      await form.getByLabel("Phase").selectOption({ label: phase });
      await form.getByLabel("Starts at").fill(start);
      await form.getByRole("button", { name: "Add the chapter" }).click();
      await expect(chapter(title)).toBeVisible();
    };
    await add("Fit and torque links", "Install", "0:20");
    await add("Check for play", "Verify", "0:40");
    await add("Not needed", "Inspect", "0:50");
    await change(chapter("Check for play"), { start: "0:45" });
    await expect(chapter("Check for play")).toContainText("0:45–0:50");
    await expect(chapter("Fit and torque links")).toContainText("0:20–0:45");
    const spare = chapter("Not needed");
    await spare.getByText("Change this chapter").click();
    await spare.getByRole("button", { name: "Remove chapter: Not needed" }).click();
    await expect(spare).toHaveCount(0);
    await expect(chapter("Check for play")).toContainText("0:45–1:00");
  });

  const addMark = async (title: string, kind: string, at: string, fill: () => Promise<void>) => {
    await chapter(title).getByRole("link", { name: kind, exact: true }).click();
    await expect(page.getByRole("heading", { level: 1 })).toHaveText(`New ${kind}`);
    await page.getByLabel("Moment", { exact: true }).fill(at);
    await fill();
    await page.getByRole("button", { name: "Ink it" }).click();
    await expect(page.getByRole("heading", { level: 2, name: "Chapters and marks" })).toBeVisible();
  };
  const cite = async (page_: string) => {
    await page.getByLabel("Document").selectOption({ index: 1 });
    await page.getByLabel("Page or section").fill(page_);
  };

  await test.step("a torque with a new document as its source", async () => {
    await addMark("Fit and torque links", "torque", "0:25", async () => {
      await page.getByLabel("Fastener", { exact: true }).fill("Lower link nut to bar");
      await page.getByLabel("Torque", { exact: true }).fill("65 ft-lb");
      await expect(page.getByText("65 lbf·ft = 88 N·m")).toBeVisible();
      await page.getByLabel("Torque", { exact: true }).fill("65 lbf·ft");
      await page.getByLabel("Tighten at").selectOption({ label: "Ride height, weight on the wheels" });
      await page.getByLabel("Reuse of the fastener").selectOption({ label: "Replace always" });
      await page.getByLabel("Thread", { exact: true }).fill("M12x1.75");
      await page.getByLabel("Document").selectOption({ label: "A new document, named below" });
      await page.getByLabel("Page or section").fill("page 31");
      await page.getByText("Add a new document").click();
      await page
        .getByRole("group", { name: "Source" })
        .getByLabel("Title", { exact: true })
        .fill("Workshop manual Foss");
    });
    await expect(chapter("Fit and torque links")).toContainText("Workshop manual Foss, page 31");
  });

  await test.step("one mark of every other kind", async () => {
    await addMark("Lift and support", "tool", "0:05", async () => {
      await page.getByLabel("Tool", { exact: true }).fill("wrench");
      await page.getByLabel("Size").fill("18 mm");
      await page.getByLabel("What for").fill("Link nuts");
    });
    await addMark("Check for play", "measure", "0:47", async () => {
      await page.getByLabel("What is measured").fill("Sway bar diameter");
      await page.getByLabel("As specified").fill("24.0 mm");
      await cite("page 28");
    });
    await addMark("Fit and torque links", "part", "0:21", async () => {
      await page.getByLabel("Part", { exact: true }).fill("Link nut");
      await page.getByLabel("Part number").fill("TR-4410");
      await page.getByLabel("Quantity").fill("4");
    });
    await addMark("Fit and torque links", "supply", "0:22", async () => {
      await page.getByLabel("Product").fill("Silicone grease");
      await page.getByLabel("Where", { exact: true }).fill("Bushing, inside");
    });
    await addMark("Fit and torque links", "correction", "0:27", async () => {
      await page.getByLabel("What was said or shown").fill("56 foot-pounds for the lower nut");
      await page.getByLabel("What is right").fill("65 lbf·ft. The digits were turned round.");
      await page
        .getByLabel("Which value it is about")
        .selectOption({ label: "Torque: Lower link nut to bar, 65 lbf·ft" });
    });
  });

  await test.step("the gate stops for the missing caution, and opens with it", async () => {
    await page.getByRole("link", { name: "Publish", exact: true }).click();
    await expect(page.getByRole("heading", { name: "One thing stops this lesson" })).toBeVisible();
    await expect(page.getByText(/A caution on lifting and support is missing/)).toBeVisible();
    await expect(page.getByRole("button", { name: /Publish revision/ })).toHaveCount(0);
    await page.getByRole("link", { name: "Back to the bench" }).click();
    await addMark("Lift and support", "caution", "0:02", async () => {
      await page.getByLabel("Who or what is hurt").selectOption({ label: "A person" });
      await page.getByLabel("Signal word").selectOption("WARNING");
      await page
        .getByLabel("What to do or not to do")
        .fill("Set stands on the maker's points before you go under the car.");
      await page.getByLabel("Why").fill("A jack can sink or tip.");
    });
  });

  await test.step("check the values: the only person of the shop checks their own", async () => {
    await page.getByRole("link", { name: "Check values" }).click();
    await expect(page.getByRole("heading", { name: "For you to check (3)" })).toBeVisible();
    for (const left of [2, 1, 0]) {
      await page
        .getByRole("button", { name: /^I (read it in the source|tried this size)/ })
        .first()
        .click();
      await expect(page.getByRole("heading", { name: `Checked (${3 - left})` })).toBeVisible();
    }
    await expect(page.getByText(/self-checked/i).first()).toBeVisible();
    await page.getByRole("link", { name: "Back to the bench" }).click();
  });

  await test.step("publish revision 1", async () => {
    await page.getByRole("link", { name: "Publish", exact: true }).click();
    await expect(page.getByRole("heading", { name: /stops? this lesson/ })).toHaveCount(0);
    await page.getByRole("button", { name: "Publish revision 1" }).click();
    await expect(page.getByRole("heading", { level: 1 })).toHaveText("Revision 1 is out");
  });

  await test.step("a phone finds the torque and plays its second", async () => {
    const storageState = await page.context().storageState();
    const phone = await somebody({ storageState, viewport: { width: 390, height: 780 }, hasTouch: true });
    await phone.page.goto("/");
    await phone.page.getByRole("combobox", { name: "Find a value or a job" }).fill("lower link nut torque");
    await phone.page.keyboard.press("Enter");
    const values = phone.page.getByRole("region", { name: "Values" });
    await expect(values).toContainText("65");
    await expect(values).toContainText("88");
    await expect(values).toContainText("Workshop manual Foss");
    await values.getByRole("link", { name: "Play from 0:25" }).first().tap();
    await expect(phone.page.getByRole("heading", { level: 1 })).toHaveText(
      "Front sway-bar links on the Foss",
    );
    await phone.page
      .getByRole("region", { name: "Recording" })
      .getByRole("link", { name: "Play from 0:25" })
      .tap();
    const video = phone.page.locator("video");
    await expect
      .poll(() => video.evaluate((element: HTMLVideoElement) => element.currentTime))
      .toBeGreaterThanOrEqual(24.9);
    const at = await video.evaluate((element: HTMLVideoElement) => element.currentTime);
    expect(at).toBeLessThan(32);
    await expect
      .poll(() => video.evaluate((element: HTMLVideoElement) => element.currentTime))
      .toBeGreaterThan(at);
    expect(await video.evaluate((element: HTMLVideoElement) => element.videoWidth)).toBe(640);
  });
});

test("a closed tab loses nothing: the same file chosen again sends only what is missing", async ({
  network,
  somebody,
}) => {
  const storageState = await (await signUpShop(somebody)).context.storageState();
  const { page, context } = await somebody({ proxy: network.proxy, storageState });
  const first = countParts(page);
  network.slow(10 * MB);
  await choose(page, FILMS.large);
  await expect.poll(() => first.arrived.length, { timeout: 30_000 }).toBeGreaterThan(0);
  network.slow(200_000);
  // What storage answered by now is what it has.
  await page.close();
  network.slow(Infinity);
  const kept = [...first.arrived];
  expect(kept.length).toBeLessThan(PARTS);

  const again = await context.newPage();
  const second = countParts(again);
  await choose(again, FILMS.large);
  await expect(again.getByRole("list", { name: "Uploads" }).getByRole("status")).toHaveText(
    "Uploaded. It is being checked.",
    { timeout: 60_000 },
  );
  for (const n of kept) expect(second.begun).not.toContain(n);
  expect(second.begun.length).toBeLessThan(PARTS);
  await again.getByRole("link", { name: "Go to the recordings" }).click();
  const rows = again.getByRole("listitem").filter({ hasText: "bay-two.mp4" });
  await expect(rows).toHaveCount(1);
  await expect(rows.getByText("Ready", { exact: true })).toBeVisible({ timeout: 60_000 });
});

test("a cancelled upload leaves nothing behind", async ({ network, somebody }) => {
  const storageState = await (await signUpShop(somebody)).context.storageState();
  const { page } = await somebody({ proxy: network.proxy, storageState });
  const parts = countParts(page);
  network.slow(6 * MB);
  await choose(page, FILMS.large);
  const row = page.getByRole("list", { name: "Uploads" }).getByRole("listitem");
  await expect.poll(() => parts.begun.length).toBeGreaterThan(0);
  const cancelled = page.waitForResponse(
    (response) => response.request().postData()?.includes('"cancel"') ?? false,
  );
  await row.getByRole("button", { name: "Cancel" }).click();
  await expect(row.getByRole("status")).toHaveText("Cancelled");
  expect((await cancelled).status()).toBe(200);
  const sent = parts.begun.length;
  await page.waitForTimeout(1000);
  expect(parts.begun.length).toBe(sent);
  await page.goto("/bench/recordings");
  await expect(page.getByText("No recordings yet")).toBeVisible();
});

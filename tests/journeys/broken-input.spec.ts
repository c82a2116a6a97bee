// What people get wrong: each has its sentence beside its field, what was typed is kept, and nothing is half-written.
import { ulid } from "ulid";
import { FILMS } from "../support/films";
import { expect, test, type Person } from "../support/journey";
import {
  benchOf,
  createLesson,
  LINK_NUT,
  publishShortLesson,
  recordingState,
  sendFilm,
  signUpShop,
  STANDS,
  writeMark,
} from "../support/shop-of-own";

const NOT_A_FILM = "This is not a video file that can be read. Choose an MP4, MOV or WebM file.";
const CUT_OFF =
  "This file has neither picture nor sound in it: the recording was cut off before its end. Copy it from the camera again.";
const REFUSED =
  "This is not a video file that can be read, or its end is missing. Copy it from the camera again; it should be MP4, MOV or WebM.";

async function readyFilm(person: Person): Promise<string> {
  const recordingId = await sendFilm(person, FILMS.short);
  expect((await recordingState(person, recordingId)).state).toBe("ready");
  return recordingId;
}

test("the upload page refuses text, an empty file and broken films before a byte is sent", async ({
  somebody,
}) => {
  const { page } = await signUpShop(somebody);
  const sent: string[] = [];
  page.on("request", (request) => {
    if (request.method() === "PUT" || request.url().includes("/api/uploads")) sent.push(request.url());
  });
  await page.goto("/bench/recordings/upload");
  await page.waitForLoadState("networkidle");
  const rows = page.getByRole("list", { name: "Uploads" }).getByRole("listitem");
  const choose = page.getByLabel("Choose recordings");
  await choose.setInputFiles([FILMS.text, FILMS.empty, FILMS.withoutIndex]);
  await expect(rows.filter({ hasText: "notes.mp4" })).toContainText(NOT_A_FILM);
  await expect(rows.filter({ hasText: "empty.mp4" })).toContainText(
    "This file is empty. Copy it from the camera again.",
  );
  await expect(rows.filter({ hasText: "without-index.mp4" })).toContainText(CUT_OFF);
  expect(sent).toEqual([]);
  await page.goto("/bench/recordings");
  await expect(page.getByText("No recordings yet")).toBeVisible();
});

test("a film that is broken off but keeps its index is never ready", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const { page } = owner;
  await page.goto("/bench/recordings/upload");
  await page.waitForLoadState("networkidle");
  await page.getByLabel("Choose recordings").setInputFiles(FILMS.cutOff);
  const row = page.getByRole("list", { name: "Uploads" }).getByRole("listitem");
  await expect(row).toContainText(/not a video file that can be read|its end is missing|Uploaded/);
  await page.goto("/bench/recordings");
  await expect(page.getByText("Ready", { exact: true })).toHaveCount(0);
  await expect(page.getByText(/No recordings yet|Refused/)).toBeVisible();
});

test("past the page, by the door: the file itself decides, and a refused one leaves storage", async ({
  somebody,
}) => {
  const owner = await signUpShop(somebody);
  for (const [film, sentence] of [
    [FILMS.text, REFUSED],
    [FILMS.withoutIndex, CUT_OFF],
    [FILMS.cutOff, REFUSED],
  ] as const) {
    const recordingId = await sendFilm(owner, film);
    const { state, stateReason } = await recordingState(owner, recordingId);
    expect([state, stateReason], film).toEqual(["refused", sentence]);
    expect((await owner.get(`/recordings/${recordingId}/play`)).status()).toBe(404);
    expect((await owner.get(`/api/recordings/${recordingId}/link`)).status()).toBe(404);
    const made = await owner.post("/bench/lessons/new", {
      lessonId: ulid(),
      title: "From nothing",
      system: "workshop",
      [`recording-${recordingId}`]: "yes",
    });
    expect(made.status(), film).toBeGreaterThanOrEqual(400);
  }
  await owner.page.goto("/bench/recordings");
  await expect(owner.page.getByText("Refused", { exact: true })).toHaveCount(3);
  await expect(owner.page.getByText(REFUSED)).toHaveCount(2);
  await owner.page.goto("/bench");
  await expect(owner.page.getByText("No lesson yet")).toBeVisible();

  const empty = await owner.send("/api/uploads", { fileName: "empty.mp4", sizeBytes: 0, lastModified: 1 });
  expect(empty.status()).toBe(422);
  expect(await empty.json()).toEqual({ error: "This file is empty. Copy it from the camera again." });
  const huge = await owner.send("/api/uploads", { fileName: "huge.mp4", sizeBytes: 9e9, lastModified: 1 });
  expect(huge.status()).toBe(422);
  expect(((await huge.json()) as { error: string }).error).toContain("8 GB is the most");
  for (const broken of [
    {},
    { fileName: "", sizeBytes: 5, lastModified: 1 },
    { fileName: "a", sizeBytes: -1, lastModified: 1 },
    "[]",
  ])
    expect((await owner.send("/api/uploads", broken)).status()).toBe(400);
  const none = await owner.context.request.get("/bench/recordings");
  expect(await none.text()).not.toContain("huge.mp4");
});

test("an upload that is closed before its parts arrived names them and stays open", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const begun = await owner.send("/api/uploads", { fileName: "a.mp4", sizeBytes: 40e6, lastModified: 1 });
  const { recordingId } = (await begun.json()) as { recordingId: string };
  const closed = await owner.send(`/api/uploads/${recordingId}`, { intent: "complete" });
  expect(closed.status()).toBe(409);
  expect(await closed.json()).toMatchObject({
    missing: [1, 2, 3],
    error: "Some parts have not arrived yet.",
  });
  expect((await owner.send(`/api/uploads/${recordingId}`, { intent: "sign", parts: [9] })).status()).toBe(
    422,
  );
});

test("captions without their signature, or none at all", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const recordingId = await readyFilm(owner);
  const lessonId = await createLesson(owner, recordingId);
  const { page } = owner;
  await page.goto(`/bench/lessons/${lessonId}/captions`);
  const file = page.getByLabel("Caption file (.vtt)");
  await page.getByRole("button", { name: "Import captions" }).click();
  await expect(file).toHaveAccessibleDescription(/Choose a \.vtt file or paste its text\./);
  await file.setInputFiles({
    name: "plain.vtt",
    mimeType: "text/vtt",
    buffer: Buffer.from("00:01.000 --> 00:04.000\nLower link nut.\n"),
  });
  await page.getByLabel("Language").selectOption("de");
  await page.getByRole("button", { name: "Import captions" }).click();
  await expect(file).toHaveAccessibleDescription(
    /The file does not start with WEBVTT, so it is not a WebVTT caption file\. Export the captions as \.vtt\./,
  );
  await expect(page.getByLabel("Language")).toHaveValue("de");
  await expect(page.getByText("No captions yet.")).toBeVisible();
  const latin = await owner.postMultipart(`/bench/lessons/${lessonId}/captions`, {
    recordingId,
    language: "en",
    file: {
      name: "latin.vtt",
      mimeType: "text/vtt",
      buffer: Buffer.from("WEBVTT\n\n00:01.000 --> 00:02.000\nStoßdämpfer\n", "latin1"),
    },
  });
  expect(latin.status()).toBe(400);
  expect(await latin.text()).toContain("The file is not in UTF-8.");
  await page.reload();
  await expect(page.getByText("No captions yet.")).toBeVisible();
});

test("a mark outside its chapter, and a torque without its unit", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const lessonId = await createLesson(owner, await readyFilm(owner));
  const first = await benchOf(owner, lessonId);
  const added = await owner.post(`/bench/lessons/${lessonId}`, {
    intent: "add-chapter",
    version: first.version,
    chapterId: ulid(),
    title: "Afterwards",
    phase: "verify",
    start: "0:08",
  });
  expect(added.status()).toBe(302);
  const { page } = owner;
  await page.goto(`/bench/lessons/${lessonId}/marks/new?kind=torque&at=3`);
  const moment = page.getByLabel("Moment", { exact: true });
  const torque = page.getByLabel("Torque", { exact: true });
  await page.getByLabel("Fastener", { exact: true }).fill("Lower link nut to bar");
  await page.getByLabel("Tighten at").selectOption("ride-height");
  await torque.fill("65");
  await page.getByRole("button", { name: "Ink it" }).click();
  await expect(torque).toHaveAttribute("aria-invalid", "true");
  await expect(torque).toHaveAccessibleDescription(/65.*(no unit|unit)/i);
  await expect(torque).toHaveValue("65");
  await expect(page.getByLabel("Fastener", { exact: true })).toHaveValue("Lower link nut to bar");

  await torque.fill("65 lbf·ft");
  await moment.fill("0:09");
  await page.getByRole("button", { name: "Ink it" }).click();
  await expect(moment).toHaveAccessibleDescription(
    /0:09 is in “Afterwards”, not in “Tighten the nuts”\. Change the moment or the chapter\./,
  );
  await expect(torque).toHaveValue("65 lbf·ft");
  await moment.fill("7:00");
  await page.getByRole("button", { name: "Ink it" }).click();
  await expect(moment).toHaveAccessibleDescription(/That is outside the recording, which plays for 0:12/);
  await page.goto(`/bench/lessons/${lessonId}`);
  await expect(page.getByText("No marks yet.")).toHaveCount(2);
});

test("forms posted twice make one lesson, one mark, one revision, one assignment", async ({ somebody }) => {
  test.setTimeout(120_000);
  const owner = await signUpShop(somebody);
  const recordingId = await readyFilm(owner);
  const { page } = owner;
  const twice = async (path: string, form: Record<string, string>) => {
    const answers = await Promise.all([owner.post(path, form), owner.post(path, form)]);
    const places = answers.map((answer) => answer.headers()["location"]);
    expect(
      answers.map((answer) => answer.status()),
      path,
    ).toEqual([302, 302]);
    return places;
  };

  const lessonId = ulid();
  const made = await twice("/bench/lessons/new", {
    lessonId,
    title: "Only once",
    system: "suspension",
    chapterTitle: "Nuts",
    [`recording-${recordingId}`]: "yes",
  });
  expect(made[1]).toBe(made[0]);
  await page.goto("/bench");
  await expect(page.getByRole("link", { name: "Only once" })).toHaveCount(1);

  const { version, chapters } = await benchOf(owner, lessonId);
  const chapterId = [...chapters.values()][0] ?? "";
  const mark = { ...LINK_NUT, version, chapterId, markId: ulid(), at: "0:04" };
  await twice(`/bench/lessons/${lessonId}/marks/new`, mark);
  await writeMark(owner, lessonId, STANDS);
  await page.goto(`/bench/lessons/${lessonId}`);
  await expect(page.getByText("Lower link nut to bar", { exact: true })).toHaveCount(1);
  await page.goto(`/bench/lessons/${lessonId}/marks/new?kind=torque`);
  await expect(page.getByLabel("Document").getByRole("option")).toHaveCount(3);

  const phased = await owner.post(`/bench/lessons/${lessonId}`, {
    intent: "change-chapter",
    version: (await benchOf(owner, lessonId)).version,
    chapterId,
    title: "Nuts",
    phase: "install",
    start: "0:00",
  });
  expect(phased.status()).toBe(302);
  const published = await twice(`/bench/lessons/${lessonId}/publish`, {
    version: (await benchOf(owner, lessonId)).version,
    note: "",
  });
  expect(published).toEqual([
    `/bench/lessons/${lessonId}/revisions/1`,
    `/bench/lessons/${lessonId}/revisions/1`,
  ]);
  expect((await owner.get(`/bench/lessons/${lessonId}/revisions/2`)).status()).toBe(404);

  const me = /name="person"[^>]*value="([0-9A-Z]{26})"/.exec(
    await (await owner.get("/training/assign")).text(),
  )?.[1];
  const order = {
    lesson: lessonId,
    person: me ?? "",
    dueOn: new Date(Date.now() + 5 * 86_400_000).toISOString().slice(0, 10),
    note: "",
  };
  await twice("/training/assign", order);
  await page.goto("/training");
  const assigned = page.getByRole("region", { name: "Assigned" });
  await expect(assigned.getByRole("listitem")).toHaveCount(1);
});

test("a draft changed in another tab is not overwritten, and what was typed stays", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const lessonId = await createLesson(owner, await readyFilm(owner));
  const { page } = owner;
  await page.goto(`/bench/lessons/${lessonId}/marks/new?kind=tool&at=2`);
  await page.getByLabel("Tool", { exact: true }).fill("wrench");
  await page.getByLabel("Size").fill("18 mm");
  await writeMark(owner, lessonId, STANDS);
  await page.getByRole("button", { name: "Ink it" }).click();
  await expect(page.getByRole("alert")).toContainText(/changed/);
  await expect(page.getByLabel("Tool", { exact: true })).toHaveValue("wrench");
  await expect(page.getByLabel("Size")).toHaveValue("18 mm");
  await page.getByRole("button", { name: "Ink it" }).click();
  await expect(page.getByRole("heading", { name: "Chapters and marks" })).toBeVisible();
  await expect(page.getByText("18 mm").first()).toBeVisible();
});

test("the gate cannot be walked around by posting its form", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const lessonId = await createLesson(owner, await readyFilm(owner));
  await writeMark(owner, lessonId, { ...LINK_NUT, documentId: "", newTitle: "", place: "", readOn: "" });
  const answer = await owner.post(`/bench/lessons/${lessonId}/publish`, {
    version: (await benchOf(owner, lessonId)).version,
    note: "",
  });
  expect(answer.status()).toBe(409);
  const html = await answer.text();
  for (const sentence of [
    "has no phase. Choose one.",
    "has no source.",
    "A caution on lifting and support is missing",
  ])
    expect(html).toContain(sentence);
  expect((await owner.get(`/lessons/${lessonId}`)).status()).toBe(404);
});

test("addresses that cannot be ids, and words that are no numbers, are a missing page or a plain list", async ({
  somebody,
}) => {
  const owner = await signUpShop(somebody);
  const lessonId = await publishShortLesson(owner, FILMS.short);
  for (const path of [
    "/lessons/1",
    "/lessons/..%2f..%2fetc",
    "/lessons/%00",
    `/lessons/${lessonId.toLowerCase()}`,
    `/bench/lessons/${lessonId}/revisions/0`,
    `/bench/lessons/${lessonId}/revisions/1e9`,
    `/bench/lessons/${lessonId}/marks/new?kind=spell`,
    "/nowhere",
  ])
    expect((await owner.get(path)).status(), path).toBe(404);
  for (const path of [
    `/lessons/${lessonId}?t=x`,
    `/lessons/${lessonId}?t=-5`,
    `/lessons/${lessonId}?t=1e12`,
    "/settings/audit?page=-3",
    "/?system=none",
  ])
    expect((await owner.get(path)).status(), path).toBe(200);
  for (const query of [
    "q=%22%27%3B--",
    "q=*",
    `q=${"x".repeat(301)}`,
    "q=a&limit=0",
    "q=a&limit=x",
    "q=a&vehicle=1",
  ]) {
    const answer = await owner.get(`/api/search?${query}`);
    expect([200, 400], query).toContain(answer.status());
    if (answer.status() === 400) expect(((await answer.json()) as { error: string }).error).toMatch(/\.$/);
  }
});

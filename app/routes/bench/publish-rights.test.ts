import { RouterContextProvider } from "react-router";
import { beforeAll, expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { importCaptions } from "~/captions/import-captions.server";
import { scopeContext, viewerContext } from "~/context";
import { marksForCheck } from "~/publishing/check-mark.server";
import { raiseDoubt } from "~/publishing/doubts.server";
import { publishLesson } from "~/publishing/publish-lesson.server";
import { captionTracks, checks, doubts, revisions } from "#drizzle/schema/index";
import {
  aChapter,
  aCitation,
  aDatabase,
  aLesson,
  aMark,
  aScope,
  aShop,
  NOON,
} from "../../../tests/support/factories";
import * as captionTrack from "../api/caption-track";
import * as chapters from "../api/chapters";
import * as looksWrong from "../library/looks-wrong";
import * as captionOriginal from "./caption-original";
import * as captions from "./captions";
import * as check from "./check";
import * as doubt from "./doubt";
import * as doubtList from "./doubts";
import * as publish from "./publish";
import * as revision from "./revision";

beforeAll(() => {
  Object.assign(process.env, {
    PUBLIC_ORIGIN: "https://training.example",
    SESSION_SECRET: "-".repeat(32),
    DATABASE_FILE: ":memory:",
    S3_ENDPOINT: "http://storage.example",
    S3_PUBLIC_ENDPOINT: "http://storage.example",
    S3_BUCKET: "bucket",
    S3_ACCESS_KEY_ID: "key",
    S3_SECRET_ACCESS_KEY: "secret",
    SMTP_URL: "smtp://mail.example",
  });
});

type Body = Record<string, string | File>;
type Door = (visit: never) => unknown;

function aVisit(scope: Scope, params: Record<string, string>, body?: Body) {
  const context = new RouterContextProvider();
  context.set(scopeContext, scope);
  context.set(viewerContext, {
    userId: scope.userId,
    name: "Somebody",
    email: "somebody@shop.example",
    role: scope.role,
    shopName: "Shop",
    country: "US",
    timeZone: "America/Chicago",
    units: "inch",
  });
  const form = new FormData();
  for (const [name, value] of Object.entries(body ?? {})) form.set(name, value);
  const url = new URL("https://training.example/");
  return {
    request: new Request(url, body ? { method: "POST", body: form } : {}),
    context,
    params,
    url,
  } as never;
}

async function statusOf(
  door: Door,
  scope: Scope,
  params: Record<string, string>,
  body?: Body,
): Promise<number> {
  try {
    const answer = await door(aVisit(scope, params, body));
    if (answer instanceof Response) return answer.status;
    return (answer as { init?: { status?: number } | null }).init?.status ?? 200;
  } catch (thrown) {
    const { status, init } = thrown as { status?: number; init?: { status?: number } };
    return status ?? init?.status ?? 0;
  }
}

/** A published lesson with captions, an open doubt and a value that waits for its check. */
function aShopFloor() {
  const db = aDatabase();
  const shopId = aShop(db);
  const author = aScope(db, shopId, "instructor");
  const checker = aScope(db, shopId, "owner");
  const trainee = aScope(db, shopId, "trainee");
  const lesson = aLesson(author, { title: "Valve cover gasket" });
  const of = { ...lesson, chapterId: aChapter(author, lesson) };
  const markId = aMark(author, of, {
    component: "valve cover bolt",
    componentKey: "valve-cover+bolt",
    citationId: aCitation(author),
  });
  const track = importCaptions(
    author,
    of.recordingId,
    { fileName: "a.vtt", language: "en", file: "WEBVTT\n\n00:01.000 --> 00:02.000\nhello\n" },
    NOON,
  );
  const published = publishLesson(author, of.lessonId, { version: 1, note: "" }, NOON);
  const raised = raiseDoubt(trainee, of.lessonId, markId, "x", "https://training.example", NOON);
  if (!track.ok || !published.ok || !raised.ok) throw new Error("not set up");
  const params = {
    lessonId: of.lessonId,
    markId,
    n: "1",
    trackId: track.trackId,
    doubtId: raised.doubtId,
  };
  const seal = marksForCheck(checker, of.lessonId)?.rows[0]?.seal ?? "";
  const forms = {
    captions: {
      recordingId: of.recordingId,
      language: "en",
      file: new File(["WEBVTT\n\n00:01.000 --> 00:02.000\nother\n"], "b.vtt"),
    },
    check: { intent: "check", markId, seal, outcome: "confirmed" },
    publish: { version: "1", note: "" },
    doubt: { reason: "read again" },
    wrong: { reason: "maker", note: "" },
  } satisfies Record<string, Body>;
  return { db, author, checker, trainee, params, forms };
}

type Floor = ReturnType<typeof aShopFloor>;
const BENCH: readonly [name: string, door: Door, form?: keyof Floor["forms"]][] = [
  ["captions", captions.loader],
  ["captions, post", captions.action, "captions"],
  ["original captions", captionOriginal.loader],
  ["check", check.loader],
  ["check, post", check.action, "check"],
  ["publish", publish.loader],
  ["publish, post", publish.action, "publish"],
  ["revision", revision.loader],
  ["doubt", doubt.loader],
  ["doubt, post", doubt.action, "doubt"],
];
const LEARNERS: typeof BENCH = [
  ["this looks wrong", looksWrong.loader],
  ["this looks wrong, post", looksWrong.action, "wrong"],
  ["caption track", captionTrack.loader],
  ["chapters", chapters.loader],
];

const written = ({ db }: Floor) => [
  db.select().from(captionTracks).all(),
  db.select().from(checks).all(),
  db.select().from(revisions).all(),
  db.select().from(doubts).all(),
];

for (const [name, door, form] of BENCH)
  test(`${name}: a trainee is refused with 403 and nothing is written`, async () => {
    const floor = aShopFloor();
    const before = written(floor);
    expect(await statusOf(door, floor.trainee, floor.params, form && floor.forms[form])).toBe(403);
    expect(written(floor)).toEqual(before);
  });

test("the list of doubts is for who may stop values, and shows those of the own shop", async () => {
  const floor = aShopFloor();
  expect(await statusOf(doubtList.loader, floor.trainee, {})).toBe(403);
  expect(await statusOf(doubtList.loader, floor.author, {})).toBe(200);
});

for (const [name, door, form] of [...BENCH, ...LEARNERS])
  test(`${name}: what is another shop's is a 404, like what never was, and nothing is written`, async () => {
    const floor = aShopFloor();
    const before = written(floor);
    const theirs = aScope(floor.db, aShop(floor.db), "owner");
    const body = form && floor.forms[form];
    expect(await statusOf(door, theirs, floor.params, body)).toBe(404);
    const never = "01ARZ3NDEKTSV4RRFFQ69G5FAV";
    expect(
      await statusOf(door, floor.author, { ...floor.params, lessonId: never, doubtId: never }, body),
    ).toBe(404);
    expect(
      await statusOf(door, floor.author, { ...floor.params, lessonId: "' or 1", doubtId: "x" }, body),
    ).toBe(404);
    expect(written(floor)).toEqual(before);
  });

test("who may gets the pages, and a good form goes on", async () => {
  const floor = aShopFloor();
  for (const [name, door, form] of [...BENCH, ...LEARNERS])
    expect(await statusOf(door, floor.checker, floor.params, form && floor.forms[form]), name).toBe(
      form ? 302 : 200,
    );
  for (const [name, door, form] of LEARNERS)
    if (!name.startsWith("caption"))
      expect(await statusOf(door, floor.trainee, floor.params, form && floor.forms[form]), name).toBe(
        form ? 302 : 200,
      );
});

test("a broken form is a 400 with what was typed; a stale or stopped one a 409", async () => {
  const { author, checker, params, forms } = aShopFloor();
  expect(await statusOf(captions.action, author, params, { ...forms.captions, file: new File([], "") })).toBe(
    400,
  );
  expect(
    await statusOf(captions.action, author, params, { ...forms.captions, file: new File(["x"], "x.srt") }),
  ).toBe(400);
  expect(await statusOf(captions.action, author, params, { ...forms.captions, pasted: "WEBVTT" })).toBe(400);
  expect(await statusOf(check.action, checker, params, { ...forms.check, outcome: "maybe" })).toBe(400);
  expect(await statusOf(check.action, checker, params, { ...forms.check, seal: "old" })).toBe(409);
  expect(await statusOf(check.action, author, params, forms.check)).toBe(409);
  expect(await statusOf(publish.action, author, params, { version: "7", note: "" })).toBe(409);
  expect(await statusOf(doubt.action, author, params, { reason: " " })).toBe(400);
  expect(await statusOf(looksWrong.action, author, params, { reason: "angry" })).toBe(400);
  expect(await statusOf(revision.loader, author, { ...params, n: "2" })).toBe(404);
  expect(await statusOf(revision.loader, author, { ...params, n: "1e1" })).toBe(404);
});

test("a recording that is not in the lesson takes no captions through it", async () => {
  const { author, params, forms } = aShopFloor();
  const { recordingId } = aLesson(author);
  expect(await statusOf(captions.action, author, params, { ...forms.captions, recordingId })).toBe(404);
});

test("captions are sent as text/vtt", async () => {
  const { trainee, params } = aShopFloor();
  const answer = captionTrack.loader(aVisit(trainee, params)) as Response;
  expect(answer.headers.get("Content-Type")).toBe("text/vtt; charset=utf-8");
  expect(await answer.text()).toBe("WEBVTT\n\n00:00:01.000 --> 00:00:02.000\nhello\n");
});

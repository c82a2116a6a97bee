// What is of one shop is nobody else's: every id on every route, as the build knows its routes.
import { ulid } from "ulid";
import { ORIGIN } from "../support/addresses";
import { FILMS } from "../support/films";
import { DEMO, expect, test, type Person } from "../support/journey";
import { fill, routesOfBuild, type BuiltRoute } from "../support/routes-of-build";
import {
  benchOf,
  checkAll,
  join,
  LINK_NUT,
  OWN_PASSWORD,
  publishShortLesson,
  signUpShop,
  writeMark,
} from "../support/shop-of-own";

const ID = "([0-9A-HJKMNP-TV-Z]{26})";
const today = () => new Date().toISOString().slice(0, 10);

async function text(person: Person, path: string): Promise<string> {
  const answer = await person.get(path);
  expect(answer.status(), path).toBe(200);
  return answer.text();
}

function found(html: string, pattern: string, what: string): string {
  const id = new RegExp(pattern).exec(html)?.[1];
  if (!id) throw new Error(`no ${what} in the page`);
  return id;
}

type Body =
  | { form: Record<string, string> }
  | { json: unknown }
  | { multipart: Record<string, string | { name: string; mimeType: string; buffer: Buffer }> };

function post(person: Person, path: string, body: Body) {
  if ("json" in body) return person.send(path, body.json);
  return "form" in body ? person.post(path, body.form) : person.postMultipart(path, body.multipart);
}

/** A shop in which everything that has an id exists once. */
async function fullShop(somebody: Parameters<typeof signUpShop>[0]) {
  const owner = await signUpShop(somebody);
  const lessonId = await publishShortLesson(owner, FILMS.short);
  const trainee = await join(somebody, owner, "Theo Marsh", "trainee");
  const bench = await text(owner, `/bench/lessons/${lessonId}`);
  const markId = found(bench, `id="mark-${ID}"[\\s\\S]{0,900}?Lower link nut`, "mark");
  const recordingId = found(
    await text(owner, "/bench/recordings"),
    `name="recording" value="${ID}"`,
    "recording",
  );
  await expect
    .poll(async () => (await owner.get(`/recordings/${recordingId}/poster`)).status(), {
      // The demo's own recordings are prepared first.
      timeout: 120_000,
    })
    .toBe(302);

  const captions = await owner.postMultipart(`/bench/lessons/${lessonId}/captions`, {
    recordingId,
    language: "en",
    pasted: "WEBVTT\n\n00:01.000 --> 00:03.000\nLower link nut.\n",
  });
  expect(captions.status(), "captions").toBe(302);
  const trackId = found(
    await text(owner, `/bench/lessons/${lessonId}/captions`),
    `/captions/${ID}/original`,
    "caption track",
  );
  const second = await owner.post(`/bench/lessons/${lessonId}/publish`, {
    version: (await benchOf(owner, lessonId)).version,
    note: "with captions",
  });
  expect(second.status(), "revision 2").toBe(302);

  const assigned = await owner.post("/training/assign", {
    lesson: lessonId,
    person: found(
      await text(owner, "/training/assign"),
      `name="person"[^>]*value="${ID}"[^>]*>\\s*Theo`,
      "person",
    ),
    dueOn: new Date(Date.now() + 5 * 86_400_000).toISOString().slice(0, 10),
    note: "",
  });
  expect(assigned.status(), "assignment").toBe(302);
  const userId = found(await text(owner, "/skills"), `/skills/${ID}/${lessonId}"[\\s\\S]*?`, "person");
  const traineeId = found(
    await text(owner, "/training/assign"),
    `name="person"[^>]*value="${ID}"[^>]*>\\s*Theo`,
    "trainee",
  );
  const skill = await text(owner, `/skills/${traineeId}/${lessonId}`);
  const assignmentId = found(skill, `name="assignment" value="${ID}"`, "assignment");
  const signedOff = await owner.post(`/training/people/${traineeId}/lessons/${lessonId}/sign-off`, {
    presence: "all-the-time",
    level: "on-own",
    shownOn: today(),
    valuesSet: "Lower link nut to bar: 65 lbf·ft, wrench 4.",
    note: "",
  });
  expect(signedOff.status(), "sign-off").toBe(302);
  const signOffId = found(
    await text(owner, `/skills/${traineeId}/${lessonId}`),
    `name="signOff" value="${ID}"`,
    "sign-off",
  );
  await trainee.post(`/training/sign-off-requests/new?lesson=${lessonId}`, { doneOn: today(), note: "" });
  const requestId = found(await text(trainee, "/training"), `name="request" value="${ID}"`, "request");

  const doubted = await writeMark(owner, lessonId, {
    ...LINK_NUT,
    component: "Upper link nut",
    at: "0:05",
  });
  await checkAll(owner, lessonId);
  await owner.post(`/bench/lessons/${lessonId}/publish`, {
    version: (await benchOf(owner, lessonId)).version,
    note: "",
  });
  const raised = await trainee.post(`/lessons/${lessonId}/values/${doubted}/wrong`, {
    reason: "maker",
    note: "",
  });
  expect(raised.status(), "doubt").toBe(302);
  const doubtId = found(await text(owner, "/bench/doubts"), `/bench/doubts/${ID}`, "doubt");

  // After the last revision: an attempt belongs to the revision that it began with.
  const begin = async () => {
    const begun = await trainee.post(`/lessons/${lessonId}/quiz`, {});
    const path = begun.headers()["location"] ?? "";
    const page = await text(trainee, path);
    return {
      id: found(path, ID, "attempt"),
      path,
      question: found(page, `name="question" value="${ID}"`, "question"),
    };
  };
  const finished = await begin();
  const count = Number(/Question 1 of (?:<!-- -->)?(\d+)/.exec(await text(trainee, finished.path))?.[1]);
  for (let n = 1; n <= count; n += 1) {
    const open = await text(trainee, `${finished.path}?question=${n}`);
    const answered = await trainee.post(finished.path, {
      question: found(open, `name="question" value="${ID}"`, "question"),
      text: "65 lbf·ft",
      unit: "",
      next: "review",
    });
    expect(answered.status(), "answer").toBe(302);
  }
  const submitted = await trainee.post(`${finished.path}/review`, {});
  expect(submitted.headers()["location"], "result").toMatch(/\/result$/);
  const { id: attemptId, question: versionId } = await begin();
  const questionId = found(
    await text(owner, `/bench/lessons/${lessonId}/questions`),
    `name="question" value="${ID}"`,
    "question",
  );
  await owner.post("/team", {
    intent: "invite",
    name: "Nora",
    email: `n.${ulid()}@shop.example`,
    role: "trainee",
  });
  const invitationId = found(await text(owner, "/team"), `name="invitation" value="${ID}"`, "invitation");
  const { version, chapters } = await benchOf(owner, lessonId);
  const ids = {
    lessonId,
    markId,
    recordingId,
    trackId,
    attemptId,
    userId: traineeId,
    doubtId,
    n: "1",
    what: "poster",
  };
  return {
    owner,
    trainee,
    ids,
    finished: finished.id,
    more: { versionId, questionId, assignmentId, signOffId, requestId, invitationId, anyUserId: userId },
    form: { version, chapterId: [...chapters.values()][0] ?? "" },
  };
}

type Shop = Awaited<ReturnType<typeof fullShop>>;

/** The address of a route with the ids of a shop. */
function addressOf(route: BuiltRoute, { ids, finished }: Pick<Shop, "ids" | "finished">): string {
  const attemptId = route.id === "routes/training/attempt-result" ? finished : ids.attemptId;
  return (
    fill(route.path, { ...ids, attemptId }) + (route.id === "routes/bench/mark-new" ? "?kind=torque" : "")
  );
}

/** What each route that takes a form is posted: what would change something if the shop did not matter. */
function bodies({ ids, more, form }: Shop): Record<string, Body> {
  const { version, chapterId } = form;
  const mark = { ...LINK_NUT, version, chapterId, at: "0:04" };
  return {
    "routes/library/looks-wrong": { form: { reason: "maker", note: "" } },
    "routes/training/quiz": { form: {} },
    "routes/training/attempt": { form: { question: more.versionId, text: "65", unit: "", next: "1" } },
    "routes/training/attempt-review": { form: {} },
    "routes/training/sign-off": {
      form: {
        presence: "all-the-time",
        level: "on-own",
        shownOn: today(),
        valuesSet: "Lower link nut to bar: 65 lbf·ft",
        note: "",
      },
    },
    "routes/training/skill": { form: { intent: "withdraw", assignment: more.assignmentId } },
    "routes/bench/lesson": { form: { intent: "erase", version, markId: ids.markId } },
    "routes/bench/mark-new": { form: { ...mark, markId: ulid() } },
    "routes/bench/mark": { form: mark },
    "routes/bench/questions": { form: { intent: "retire", question: more.questionId } },
    "routes/bench/captions": {
      multipart: {
        recordingId: ids.recordingId,
        language: "en",
        pasted: "WEBVTT\n\n00:01.000 --> 00:02.000\nTaken over.\n",
      },
    },
    "routes/bench/check": { form: { intent: "send" } },
    "routes/bench/publish": { form: { version, note: "" } },
    "routes/bench/doubt": { form: { reason: "It is right, page 31." } },
    "routes/api/upload": { json: { intent: "complete" } },
    "routes/api/upload-pictures": {
      multipart: {
        poster: { name: "poster.jpg", mimeType: "image/jpeg", buffer: Buffer.from([0xff, 0xd8, 0xff, 0xd9]) },
        peaks: "[0,1]",
      },
    },
  };
}

/** What must be as it was when a stranger has tried everything. */
async function recordOf({ owner, trainee, ids }: Shop): Promise<string[]> {
  const pages = [
    `/bench/lessons/${ids.lessonId}`,
    `/bench/lessons/${ids.lessonId}/captions`,
    `/bench/lessons/${ids.lessonId}/questions`,
    `/bench/lessons/${ids.lessonId}/check`,
    `/bench/doubts/${ids.doubtId}`,
    "/bench/recordings",
    `/skills/${ids.userId}/${ids.lessonId}`,
    "/training/sign-offs",
  ];
  const plain = (html: string) =>
    (/<main[\s\S]*<\/main>/.exec(html)?.[0] ?? "")
      .replace(/name="(?:chapterId|markId|lessonId)" value="[0-9A-Z]{26}"/g, "")
      .replace(/<[^>]+>/g, " ")
      .replace(/\s+/g, " ");
  const own = await Promise.all(pages.map(async (path) => plain(await text(owner, path))));
  return [...own, plain(await text(trainee, `/training/attempts/${ids.attemptId}`))];
}

/** Not behind a sign-in: a secret in the address is the right. */
const BY_SECRET = ["routes/auth/reset-password", "routes/auth/invitation"];
const withId = (route: BuiltRoute) => route.path.includes(":") && !BY_SECRET.includes(route.id);

test("a person of another shop gets 404 for every id on every route, by GET and by POST", async ({
  somebody,
  signedIn,
}) => {
  test.setTimeout(300_000);
  const shop = await fullShop(somebody);
  const before = await recordOf(shop);
  const posted = bodies(shop);
  const routes = routesOfBuild().filter(withId);
  expect(routes.length).toBeGreaterThan(20);

  // The addresses are right: the shop's own people are let in.
  for (const route of routes.filter(({ hasLoader }) => hasLoader)) {
    const who = route.id.startsWith("routes/training/attempt") ? shop.trainee : shop.owner;
    const status = (await who.get(addressOf(route, shop))).status();
    expect([200, 302], `own ${route.path}`).toContain(status);
  }

  for (const email of [DEMO.northgate, DEMO.instructor]) {
    const stranger = await signedIn(email);
    const never = Object.fromEntries(
      Object.entries(shop.ids).map(([name, id]) => [
        name,
        id.length === 26 ? "01ARZ3NDEKTSV4RRFFQ69G5FAV" : id,
      ]),
    );
    for (const route of routes) {
      const path = addressOf(route, shop);
      if (route.hasLoader) {
        const [theirs, missing] = [await stranger.get(path), await stranger.get(fill(route.path, never))];
        expect(theirs.status(), `GET ${path}`).toBe(404);
        expect(missing.status(), `GET ${route.path} that never was`).toBe(404);
        expect(await theirs.text(), path).not.toContain("Lower link nut");
      }
      if (route.hasAction) {
        const body = posted[route.id];
        if (!body) throw new Error(`say what ${route.id} is posted`);
        expect((await post(stranger, path, body)).status(), `POST ${path}`).toBe(404);
      } else expect((await stranger.post(path, {})).status(), `POST ${path}`).toBeGreaterThanOrEqual(400);
    }
  }
  expect(await recordOf(shop)).toEqual(before);
});

test("ids of another shop inside a form are a missing thing, or a sentence", async ({
  somebody,
  signedIn,
}) => {
  test.setTimeout(300_000);
  const shop = await fullShop(somebody);
  const before = await recordOf(shop);
  const { ids, more } = shop;
  const stranger = await signedIn(DEMO.northgate);
  const own = /\/lessons\/([0-9A-Z]{26})"/.exec(await text(stranger, "/"))?.[1] ?? "";
  const future = new Date(Date.now() + 9 * 86_400_000).toISOString().slice(0, 10);
  const tries: readonly (readonly [path: string, body: Body, status: number])[] = [
    ["/bench/recordings", { form: { intent: "delete", recording: ids.recordingId } }, 404],
    ["/bench/recordings", { form: { intent: "rename", recording: ids.recordingId, title: "Mine now" } }, 404],
    ["/team", { form: { intent: "role", person: ids.userId, role: "owner" } }, 404],
    ["/team", { form: { intent: "remove", person: ids.userId } }, 404],
    ["/team", { form: { intent: "resend", invitation: more.invitationId } }, 404],
    ["/team", { form: { intent: "withdraw", invitation: more.invitationId } }, 404],
    [
      "/training/assign",
      { form: { lesson: ids.lessonId, person: ids.userId, dueOn: future, note: "" } },
      400,
    ],
    ["/training/assign", { form: { lesson: own, person: ids.userId, dueOn: future, note: "" } }, 400],
    [`/training/sign-off-requests/new?lesson=${ids.lessonId}`, { form: { doneOn: today(), note: "" } }, 404],
    [
      "/api/watched",
      {
        json: {
          lessonId: ids.lessonId,
          revisionId: ids.lessonId,
          stretches: [{ recordingId: ids.recordingId, fromMs: 0, toMs: 1000 }],
        },
      },
      404,
    ],
    [
      "/bench/lessons/new",
      {
        form: {
          lessonId: ulid(),
          title: "Taken over",
          system: "suspension",
          [`recording-${ids.recordingId}`]: "yes",
        },
      },
      404,
    ],
    [`/skills/${ids.userId}/${own}`, { form: { intent: "withdraw", assignment: more.assignmentId } }, 404],
    [
      `/skills/${ids.userId}/${own}`,
      { form: { intent: "revoke", signOff: more.signOffId, reason: "It was not so." } },
      404,
    ],
    ["/settings/tasks", { form: { intent: "retry", task: ids.lessonId } }, 404],
  ];
  for (const [path, body, status] of tries)
    expect((await post(stranger, path, body)).status(), `${path} ${JSON.stringify(body)}`).toBe(status);
  // Withdrawing a request that is not one's own does nothing at all.
  await post(stranger, "/training", { form: { request: more.requestId } });
  expect(await recordOf(shop)).toEqual(before);

  const answered = await stranger.get("/api/search?q=lower%20link%20nut%20torque&limit=50");
  expect(await answered.text()).not.toContain(ids.lessonId);
  for (const page of [
    "/",
    "/search?q=link%20nut",
    "/skills",
    "/team",
    "/bench",
    "/bench/doubts",
    "/settings/audit",
  ])
    expect(await text(stranger, page), page).not.toMatch(/Front link nuts|Theo Marsh|Olive Quill/);
});

// Who may open what, by role. A route that stands in neither list fails the test.
const FOR_EVERYBODY = [
  "routes/library/library",
  "routes/library/search",
  "routes/library/lesson",
  "routes/library/play",
  "routes/library/picture",
  "routes/library/looks-wrong",
  "routes/training/my-training",
  "routes/training/quiz",
  "routes/training/attempt",
  "routes/training/attempt-review",
  "routes/training/attempt-result",
  "routes/training/sign-off-request",
  "routes/team/account",
  "routes/api/caption-track",
  "routes/api/chapters",
  "routes/api/units",
  "routes/api/search",
  "routes/api/watched",
  "routes/api/recording-link",
];
const FOR_OWNERS = ["routes/team/settings", "routes/team/tasks", "routes/team/audit"];
const OUTSIDE = ["routes/auth/", "routes/api/health", "routes/not-found"];

test("a trainee gets 403 on the pages of instructors and owners, an instructor on those of owners", async ({
  somebody,
}) => {
  test.setTimeout(300_000);
  const shop = await fullShop(somebody);
  const instructor = await join(somebody, shop.owner, "Ivo Lang", "instructor");
  const posted = bodies(shop);
  const routes = routesOfBuild().filter(({ id }) => !OUTSIDE.some((start) => id.startsWith(start)));
  const forTeachers = routes.filter(
    ({ id }) => !FOR_EVERYBODY.includes(id) && /^routes\/(bench|training|team|api)\//.test(id),
  );
  expect(forTeachers.length + FOR_EVERYBODY.length).toBe(routes.length);
  for (const route of forTeachers) {
    const path = addressOf(route, shop);
    const ownersOnly = FOR_OWNERS.includes(route.id);
    if (route.hasLoader) {
      expect((await shop.trainee.get(path)).status(), `trainee GET ${path}`).toBe(403);
      const status = (await instructor.get(path)).status();
      // An upload is only of the person who began it.
      const expected = ownersOnly ? [403] : route.id === "routes/api/upload" ? [404] : [200, 302];
      expect(expected, `instructor GET ${path}`).toContain(status);
    }
    if (route.hasAction) {
      const body = posted[route.id] ?? { form: { intent: "invite" } };
      expect((await post(shop.trainee, path, body)).status(), `trainee POST ${path}`).toBe(403);
      if (ownersOnly || route.id === "routes/team/team")
        expect((await post(instructor, path, body)).status(), `instructor POST ${path}`).toBe(403);
    }
  }
});

test("signed out: the sign-in page, and 401 for programs; nothing is posted", async ({ somebody }) => {
  const nobody = await somebody();
  const ids = {
    ...Object.fromEntries(
      ["lessonId", "markId", "recordingId", "trackId", "attemptId", "userId", "doubtId"].map((name) => [
        name,
        ulid(),
      ]),
    ),
    n: "1",
    what: "poster",
  };
  const routes = routesOfBuild().filter(({ inShell }) => inShell);
  expect(routes.length).toBeGreaterThan(40);
  for (const route of routes) {
    const path = fill(route.path, ids);
    const answers = [await nobody.get(path), await nobody.post(path, {})];
    for (const answer of answers)
      if (path.startsWith("/api/")) expect(answer.status(), path).toBe(401);
      else {
        expect(answer.status(), path).toBe(302);
        expect(answer.headers()["location"], path).toMatch(/^\/sign-in\?to=/);
      }
  }
  const back = await nobody.page.goto("/skills?system=brakes");
  expect(back?.status()).toBe(200);
  await expect(nobody.page).toHaveURL("/sign-in?to=%2Fskills%3Fsystem%3Dbrakes");
});

test("a POST that does not come from our own pages is 403 on every route", async ({ somebody }) => {
  const owner = await signUpShop(somebody);
  const values = {
    ...Object.fromEntries(
      ["lessonId", "markId", "recordingId", "trackId", "attemptId", "userId", "doubtId", "token"].map(
        (name) => [name, ulid()],
      ),
    ),
    n: "1",
    what: "poster",
  };
  const refused: Record<string, string>[] = [
    {},
    { Origin: "http://elsewhere.example" },
    { Origin: "null" },
    { "Sec-Fetch-Site": "cross-site" },
    { "Sec-Fetch-Site": "same-site" },
  ];
  for (const route of routesOfBuild().filter(({ hasAction }) => hasAction))
    for (const headers of refused) {
      const answer = await owner.context.request.post(fill(route.path, values), {
        headers,
        form: { email: owner.email, password: OWN_PASSWORD },
        maxRedirects: 0,
      });
      expect(answer.status(), `${route.path} ${JSON.stringify(headers)}`).toBe(403);
    }
  for (const headers of [{ Origin: ORIGIN }, { "Sec-Fetch-Site": "same-origin" }] as Record<
    string,
    string
  >[]) {
    const answer = await owner.context.request.post("/sign-out", { headers, maxRedirects: 0 });
    expect(answer.status(), JSON.stringify(headers)).toBe(302);
  }
});

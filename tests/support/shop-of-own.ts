// A shop of its own for every journey that writes, made through the doors of the application.
import { readFileSync, statSync } from "node:fs";
import { basename } from "node:path";
import { ulid } from "ulid";
import { expect, Person, type test } from "./journey";
import { linkIn, mailTo } from "./inbox";

type Somebody = Parameters<Parameters<typeof test>[2]>[0]["somebody"];
type Options = Parameters<Somebody>[0];

export const OWN_PASSWORD = "three blind mice";

/** An address that no other journey uses. */
export function newAddress(name: string): string {
  return `${name}.${ulid().toLowerCase()}@shop.example`;
}

/** Signs a new shop up; its only person is the owner. */
export async function signUpShop(
  somebody: Somebody,
  shopName = "Quill Street Autos",
  options?: Options,
): Promise<Person> {
  const { context, page } = await somebody(options);
  const owner = new Person(context, page, newAddress("olive"));
  const answer = await owner.post("/sign-up", {
    shopName,
    country: "US",
    timeZone: "",
    name: "Olive Quill",
    email: owner.email,
    password: OWN_PASSWORD,
  });
  expect(answer.status(), "sign-up").toBe(302);
  return owner;
}

/** Invites somebody and accepts with a browser of their own. */
export async function join(
  somebody: Somebody,
  owner: Person,
  name: string,
  role: "trainee" | "instructor" | "owner",
  options?: Options,
): Promise<Person> {
  const email = newAddress(name.split(" ")[0]?.toLowerCase() ?? "somebody");
  const invited = await owner.post("/team", { intent: "invite", name, email, role });
  expect(invited.status(), "invitation").toBe(302);
  const path = linkIn(await mailTo(email, /invites you/));
  const { context, page } = await somebody(options);
  const person = new Person(context, page, email);
  const joined = await person.post(path, { name, password: OWN_PASSWORD });
  expect(joined.status(), "joining").toBe(302);
  return person;
}

/** Sends a file to storage by the door that the upload page uses; returns its id. */
export async function sendFilm(person: Person, path: string): Promise<string> {
  const bytes = readFileSync(path);
  const order = { fileName: basename(path), sizeBytes: bytes.length, lastModified: statSync(path).mtimeMs };
  const begun = await person.send("/api/uploads", { ...order, lastModified: Math.floor(order.lastModified) });
  expect(begun.status(), await begun.text()).toBe(200);
  const { recordingId, partBytes, done } = (await begun.json()) as {
    recordingId: string;
    partBytes: number;
    done: number[];
  };
  for (let n = 1; (n - 1) * partBytes < bytes.length; n += 1) {
    if (done.includes(n)) continue;
    const signed = await person.send(`/api/uploads/${recordingId}`, { intent: "sign", parts: [n] });
    const { urls } = (await signed.json()) as { urls: Record<number, string> };
    const put = await fetch(urls[n] ?? "", {
      method: "PUT",
      body: bytes.subarray((n - 1) * partBytes, n * partBytes),
    });
    expect(put.status).toBe(200);
  }
  const closed = await person.send(`/api/uploads/${recordingId}`, { intent: "complete" });
  expect(closed.status(), await closed.text()).toBe(200);
  return recordingId;
}

/** Waits until a recording is no longer looked through, and says how that ended. */
export async function recordingState(
  person: Person,
  recordingId: string,
): Promise<{ state: string; stateReason: string }> {
  let answer = { state: "", stateReason: "" };
  await expect
    .poll(
      async () => {
        answer = (await (await person.get(`/api/uploads/${recordingId}`)).json()) as typeof answer;
        return answer.state;
      },
      { message: "the recording is looked through", timeout: 30_000 },
    )
    .not.toMatch(/^(checking|uploading)$/);
  return answer;
}

/** What the forms of a lesson's bench need: the draft's version and the chapters by title. */
export async function benchOf(
  person: Person,
  lessonId: string,
): Promise<{ version: string; chapters: Map<string, string>; html: string }> {
  const html = await (await person.get(`/bench/lessons/${lessonId}/marks/new?kind=torque`)).text();
  const version = /name="version" value="(\d+)"/.exec(html)?.[1] ?? "";
  const select = /<select[^>]*name="chapterId"[^>]*>([\s\S]*?)<\/select>/.exec(html)?.[1] ?? "";
  const chapters = new Map<string, string>();
  for (const [, id = "", words = ""] of select.matchAll(/value="([0-9A-Z]{26})"[^>]*>([^<]*)</g))
    chapters.set(words.replace(/^[\d:]+ /, ""), id);
  return { version, chapters, html };
}

/** Creates a lesson of one recording. */
export async function createLesson(
  person: Person,
  recordingId: string,
  fields: Record<string, string> = {},
): Promise<string> {
  const lessonId = ulid();
  const made = await person.post("/bench/lessons/new", {
    lessonId,
    title: "Front link nuts",
    system: "suspension",
    chapterTitle: "Tighten the nuts",
    [`recording-${recordingId}`]: "yes",
    ...fields,
  });
  expect(made.status(), "new lesson").toBe(302);
  return lessonId;
}

/** Writes one mark into the first chapter and returns its id. */
export async function writeMark(
  person: Person,
  lessonId: string,
  fields: Record<string, string>,
): Promise<string> {
  const { version, chapters } = await benchOf(person, lessonId);
  const markId = ulid();
  const saved = await person.post(`/bench/lessons/${lessonId}/marks/new`, {
    version,
    markId,
    chapterId: [...chapters.values()][0] ?? "",
    at: "0:03",
    ...fields,
  });
  expect(saved.status(), `mark ${fields["kind"]}`).toBe(302);
  return markId;
}

export const STANDS = {
  kind: "caution",
  hurt: "person",
  signalWord: "WARNING",
  words: "Set stands on the maker's points before anybody goes under the car.",
  reason: "A jack can sink or tip.",
  at: "0:01",
};

export const LINK_NUT = {
  kind: "torque",
  component: "Lower link nut to bar",
  value: "65 lbf·ft",
  thread: "M12x1.75",
  tightenAt: "ride-height",
  reuse: "replace-always",
  documentId: "new",
  newKind: "maker",
  newTitle: "Workshop manual, chassis",
  place: "page 31",
  readOn: "2026-01-15",
};

/** Confirms every value that this person may check. */
export async function checkAll(person: Person, lessonId: string): Promise<void> {
  const path = `/bench/lessons/${lessonId}/check`;
  const html = await (await person.get(path)).text();
  const forms = [
    ...html.matchAll(/name="markId" value="([0-9A-Z]{26})"[\s\S]*?name="seal" value="([^"]*)"/g),
  ];
  const seals = new Map(forms.map(([, markId = "", seal = ""]) => [markId, seal]));
  for (const [markId, seal] of seals) {
    const checked = await person.post(path, { intent: "check", markId, seal, outcome: "confirmed" });
    expect(checked.status(), "check").toBe(302);
  }
}

/** A published lesson of twelve seconds with one checked torque and its caution. */
export async function publishShortLesson(
  author: Person,
  film: string,
  title = "Front link nuts",
  checker: Person = author,
): Promise<string> {
  const recordingId = await sendFilm(author, film);
  expect((await recordingState(author, recordingId)).state).toBe("ready");
  const lessonId = await createLesson(author, recordingId, { title });
  const { version, chapters } = await benchOf(author, lessonId);
  const changed = await author.post(`/bench/lessons/${lessonId}`, {
    intent: "change-chapter",
    version,
    chapterId: [...chapters.values()][0] ?? "",
    title: "Tighten the nuts",
    phase: "install",
    start: "0:00",
  });
  expect(changed.status(), "phase").toBe(302);
  await writeMark(author, lessonId, STANDS);
  await writeMark(author, lessonId, LINK_NUT);
  await checkAll(checker, lessonId);
  const published = await author.post(`/bench/lessons/${lessonId}/publish`, {
    version: (await benchOf(author, lessonId)).version,
    note: "",
  });
  expect(published.status(), "publish").toBe(302);
  return lessonId;
}

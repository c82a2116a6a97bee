// Loads the demo shop through the application's own rooms, so that nothing in it could not have been typed by hand.
import { readFileSync } from "node:fs";
import { PutObjectCommand } from "@aws-sdk/client-s3";
import { eq } from "drizzle-orm";
import { ulid } from "ulid";
import { hashPassword } from "~/auth/password.server";
import type { Scope } from "~/auth/scope.server";
import { importCaptions } from "~/captions/import-captions.server";
import { database, type Database } from "~/db.server";
import { env } from "~/env.server";
import { createLesson } from "~/lessons/create-lesson.server";
import { addDocument } from "~/lessons/documents.server";
import { readMarkForm } from "~/lessons/mark-form";
import { loadDraft } from "~/lessons/load-draft.server";
import { saveChapters } from "~/lessons/save-chapters.server";
import { saveMark } from "~/lessons/save-mark.server";
import type { Phase } from "~/lessons/mark";
import { checkMark, marksForCheck } from "~/publishing/check-mark.server";
import { publishLesson } from "~/publishing/publish-lesson.server";
import { objectStorage } from "~/recordings/object-storage.server";
import { recordingKey } from "~/recordings/object-key";
import { localDateAt } from "~/training/local-date";
import type {
  ChapterId,
  DocumentId,
  LessonId,
  MarkId,
  RecordingId,
  ShopId,
  VehicleId,
} from "#drizzle/schema/ids";
import { recordings, shops, users, vehicles } from "#drizzle/schema/index";
import type { DemoLesson, DemoMark } from "./demo-lesson";
import { DEMO_LESSONS, NORTHGATE_LESSON } from "./lessons/index";
import {
  DOCUMENTS,
  HARROW_LANE,
  NORTHGATE,
  NORTHGATE_PEOPLE,
  PASSWORD,
  PEOPLE,
  VEHICLES,
  type PersonKey,
} from "./shop";
import { loadTraining } from "./load-training";

const DAY = 86_400_000;

/** A refusal while loading is a fault of the demo's data. */
function must<T>(result: T | undefined, what: string): NonNullable<T> {
  const refused = typeof result === "object" && result !== null && "ok" in result && result.ok === false;
  if (result === undefined || result === null || refused)
    throw new Error(`The demo shop cannot be loaded: ${what}. ${JSON.stringify(result)}`);
  return result;
}

type Shop = typeof HARROW_LANE | typeof NORTHGATE;
type Person = (typeof PEOPLE)[number] | (typeof NORTHGATE_PEOPLE)[number];

function addShop(db: Database, shop: Shop, people: readonly Person[], passwordHash: string, now: number) {
  const { id: shopId } = db
    .insert(shops)
    .values({ ...shop, createdAt: now - 200 * DAY })
    .returning({ id: shops.id })
    .get();
  const scopes = new Map<string, Scope>();
  for (const { key, name, email, role, sinceDays } of people) {
    const { id } = db
      .insert(users)
      .values({ shopId, name, email, role, passwordHash, createdAt: now - sinceDays * DAY })
      .returning({ id: users.id })
      .get();
    scopes.set(key, { db, shopId, userId: id, role });
  }
  const scopeOf = (key: string): Scope => must(scopes.get(key), `nobody is called ${key}`);
  return { shopId, scopeOf };
}

function addVehicles(db: Database, shopId: ShopId, now: number): Map<string, VehicleId> {
  return new Map(
    Object.entries(VEHICLES).map(([name, vehicle]) => [
      name,
      db
        .insert(vehicles)
        .values({ ...vehicle, shopId, createdAt: now })
        .returning({ id: vehicles.id })
        .get().id,
    ]),
  );
}

type Chapters = {
  title: string;
  chapters: { startMs: number; endMs: number; title: string; phase: Phase }[];
};

const folder = "fakes/demo";

/** Puts the recording into storage and has it checked and prepared by the same tasks as an upload. */
async function addRecording(scope: Scope, lesson: DemoLesson, now: number): Promise<RecordingId> {
  const id = ulid(now) as RecordingId;
  const body = readFileSync(`${folder}/recordings/${lesson.job}.mp4`);
  const objectKey = recordingKey(scope.shopId, id);
  await objectStorage().send(
    new PutObjectCommand({ Bucket: env().S3_BUCKET, Key: objectKey, Body: body, ContentType: "video/mp4" }),
  );
  scope.db
    .insert(recordings)
    .values({
      id,
      shopId: scope.shopId,
      title: lesson.title,
      fileName: `${lesson.job}.mp4`,
      sizeBytes: body.length,
      state: "checking",
      objectKey,
      partBytes: 16 * 1024 * 1024,
      uploadedBy: scope.userId,
      createdAt: now,
    })
    .run();
  const { checkRecording } = await import("~/recordings/check-recording.server");
  await checkRecording({ db: scope.db, shopId: scope.shopId, by: "demo" }, { recordingId: id }, now);
  return id;
}

/** A mark as its form would send it. */
function formOf(
  mark: DemoMark,
  place: { version: number; at: number; chapterId: string },
  documents: Map<string, DocumentId>,
  readOn: string,
): FormData {
  const fields: Record<string, string | undefined> = {
    version: String(place.version),
    at: `${Math.floor(place.at / 60_000)}:${((place.at % 60_000) / 1000).toFixed(2).padStart(5, "0")}`,
    chapterId: place.chapterId,
    component: mark.component,
    side: mark.side,
    position: mark.position,
    note: mark.note,
    needs: mark.needs,
    variant: mark.variant,
    question: mark.question,
    safetyCritical: mark.safetyCritical ? "yes" : undefined,
  };
  if (mark.source) {
    const [document, at] = mark.source;
    Object.assign(fields, {
      documentId: must(documents.get(document), `no document ${document}`),
      place: at,
      readOn,
    });
  }
  switch (mark.kind) {
    case "torque": {
      const { value, reusedValue, thread, propertyClass, condition, conditionDetail, reuse, reuseDetail } =
        mark;
      const { tightenAt, runDown, checkAgain, checkAgainDetail, sequence, tightenedState } = mark;
      Object.assign(fields, {
        value,
        reusedValue,
        thread,
        propertyClass,
        condition,
        conditionDetail,
        reuse,
        reuseDetail,
      });
      Object.assign(fields, { tightenAt, runDown, checkAgain, checkAgainDetail, sequence, tightenedState });
      break;
    }
    case "tool":
      Object.assign(fields, { toolName: mark.tool, size: mark.size, toolDrive: mark.drive });
      break;
    case "measure":
      Object.assign(fields, mark.measured ? { measured: mark.value } : { value: mark.value });
      break;
    case "part":
      Object.assign(fields, {
        component: mark.part,
        partNumber: mark.number,
        partRule: mark.rule,
        quantity: mark.quantity,
      });
      break;
    case "supply":
      Object.assign(fields, { product: mark.product });
      break;
    case "caution":
      Object.assign(fields, {
        hurt: mark.word === "NOTICE" ? "car" : "person",
        signalWord: mark.word,
        words: mark.words,
        reason: mark.reason,
      });
      break;
    case "correction":
      Object.assign(fields, { replaces: mark.wrong, words: mark.right });
      break;
    default:
      mark satisfies never;
  }
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) if (value !== undefined) form.set(name, value);
  return form;
}

type Loaded = { lessonId: LessonId; lesson: DemoLesson };

async function addLesson(
  author: Scope,
  checker: Scope | null,
  lesson: DemoLesson,
  ids: { vehicles: Map<string, VehicleId>; documents: Map<string, DocumentId> },
  country: string,
  now: number,
): Promise<Loaded> {
  const at = now - (lesson.publishedDaysAgo ?? 2) * DAY;
  const recordingId = await addRecording(author, lesson, at - 3 * 3_600_000);
  const captions = readFileSync(`${folder}/captions/${lesson.captions ?? `${lesson.job}.vtt`}`);
  must(
    importCaptions(
      author,
      recordingId,
      { fileName: `${lesson.job}.vtt`, language: "en", file: captions },
      at,
    ),
    "captions",
  );
  const { chapters } = JSON.parse(
    readFileSync(`${folder}/captions/${lesson.job}.chapters.json`, "utf8"),
  ) as Chapters;
  const lessonId = ulid(at) as LessonId;
  const [first, ...rest] = chapters;
  must(
    createLesson(
      author,
      {
        lessonId,
        title: lesson.title,
        system: lesson.system,
        position: lesson.position ?? "",
        summary: lesson.summary,
        chapterTitle: must(first, "chapters").title,
        recordings: [recordingId],
        vehicles: lesson.vehicles.map((name) => must(ids.vehicles.get(name), `no vehicle ${name}`)),
        newVehicle: null,
      } as Parameters<typeof createLesson>[1],
      at,
    ),
    `lesson ${lesson.title}`,
  );
  const draft = () => must(loadDraft(author, lessonId), "draft");
  const opening = must(draft().chapters[0], "first chapter");
  must(
    saveChapters(
      author,
      lessonId,
      draft().lesson.version,
      {
        edit: "change",
        id: opening.id,
        atMs: 0,
        title: must(first, "chapters").title,
        phase: must(first, "chapters").phase,
      },
      at,
    ),
    "first chapter",
  );
  for (const { startMs, title, phase } of rest)
    must(
      saveChapters(
        author,
        lessonId,
        draft().lesson.version,
        {
          edit: "add",
          id: ulid(at) as ChapterId,
          atMs: startMs,
          title,
          phase: lesson.phaseless?.includes(title) ? null : phase,
        },
        at,
      ),
      `chapter ${title}`,
    );
  const readOn = localDateAt(at - DAY, HARROW_LANE.timeZone);
  for (const mark of lesson.marks) {
    const { lesson: row, chapters: placed } = draft();
    const chapter = must(
      placed.find(({ startMs, endMs }) => mark.at >= startMs && mark.at < endMs),
      `no chapter at ${mark.at}`,
    );
    const form = formOf(
      mark,
      { version: row.version, at: mark.at, chapterId: chapter.id },
      ids.documents,
      readOn,
    );
    const entry = readMarkForm(mark.kind, form, country);
    if (!entry.ok) throw new Error(`${lesson.job} at ${mark.at}: ${JSON.stringify(entry.errors)}`);
    const markId = ulid(at) as MarkId;
    must(saveMark(author, lessonId, { markId, isNew: true }, entry.value, at), `${lesson.job} at ${mark.at}`);
    const holdsFigure =
      mark.kind === "torque" || mark.kind === "measure" || (mark.kind === "tool" && mark.size);
    if (checker && holdsFigure && !mark.unchecked) {
      const row = marksForCheck(checker, lessonId)?.rows.find((row) => row.mark.id === markId);
      const { seal } = must(row, `${lesson.job} at ${mark.at} is not for check`);
      must(
        checkMark(
          checker,
          lessonId,
          markId,
          { outcome: "confirmed", reason: "", seal },
          env().PUBLIC_ORIGIN,
          at + 3_600_000,
        ),
        `check at ${mark.at}`,
      );
    }
  }
  if (lesson.publishedDaysAgo !== null) {
    const published = publishLesson(
      author,
      lessonId,
      { version: draft().lesson.version, note: "" },
      at + 2 * 3_600_000,
    );
    must(published, `publishing ${lesson.title}`);
  }
  return { lessonId, lesson };
}

/** Loads both shops unless they are there; returns the accounts to print. */
export async function loadDemo(now: number): Promise<string[]> {
  const { db } = database();
  const accounts = [
    ...["owner", "instructor", "trainee"].map((role) => `${role}@harrowlane.example  ${PASSWORD}`),
    `owner@northgate.example  ${PASSWORD}  (a second shop)`,
  ];
  if (db.select({ id: users.id }).from(users).where(eq(users.email, "owner@harrowlane.example")).get())
    return accounts;
  const passwordHash = await hashPassword(PASSWORD);
  const { shopId, scopeOf } = addShop(db, HARROW_LANE, PEOPLE, passwordHash, now);
  const author = scopeOf("Marta");
  const ids = {
    vehicles: addVehicles(db, shopId, now - 100 * DAY),
    documents: new Map(
      Object.entries(DOCUMENTS).map(([key, document]) => [
        key,
        addDocument(author, document, now - 90 * DAY),
      ]),
    ),
  };
  const loaded: Loaded[] = [];
  for (const lesson of DEMO_LESSONS)
    loaded.push(
      await addLesson(
        scopeOf(lesson.by),
        scopeOf(lesson.by === "Marta" ? "Dario" : "Marta"),
        lesson,
        ids,
        HARROW_LANE.country,
        now,
      ),
    );
  const lessonIds = new Map(loaded.map(({ lesson, lessonId }) => [lesson.job, lessonId]));
  loadTraining(
    {
      scopeOf: (key: PersonKey) => scopeOf(key),
      lessonId: (job) => must(lessonIds.get(job), `no lesson ${job}`),
      today: localDateAt(now, HARROW_LANE.timeZone),
    },
    now,
  );

  const northgate = addShop(db, NORTHGATE, NORTHGATE_PEOPLE, passwordHash, now);
  const priya = northgate.scopeOf("Priya");
  await addLesson(
    priya,
    priya,
    NORTHGATE_LESSON,
    {
      vehicles: new Map(),
      documents: new Map(
        Object.entries(DOCUMENTS).map(([key, document]) => [
          key,
          addDocument(priya, document, now - 20 * DAY),
        ]),
      ),
    },
    NORTHGATE.country,
    now,
  );
  return accounts;
}

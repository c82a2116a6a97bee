import { eq } from "drizzle-orm";
import { expect, test } from "vitest";
import type { Scope } from "~/auth/scope.server";
import { valuesText } from "~/lessons/values-text";
import { doubts, lessons, lessonVehicles, vehicles } from "#drizzle/schema/index";
import type { VehicleId } from "#drizzle/schema/ids";
import { aDatabase, aScope, aShop, NOON, setValues } from "../../tests/support/factories";
import { aPublishedLesson, confirm, publish, SIXTY_FIVE, torque } from "../../tests/support/published-lesson";
import { answersWithVariants } from "./answers-with-variants";
import { foundJson } from "./found-json";
import { searchShop } from "./search-shop.server";

function aLibrary() {
  const db = aDatabase();
  const shopId = aShop(db);
  const [author, checker, trainee] = [
    aScope(db, shopId, "instructor"),
    aScope(db, shopId, "instructor"),
    aScope(db, shopId, "trainee"),
  ];
  return { db, shopId, author, checker, trainee };
}

const pulley = { component: "idler pulley bolt", componentKey: "idler-pulley+bolt" };
const texts = (scope: Scope, query: string, vehicle = "") =>
  searchShop(scope, query, vehicle, 10).answers.map(({ found }) => valuesText(found.mark.values));

test("a publish, a check, a doubt and a withdrawal are followed at the very next search", () => {
  const { db, shopId, author, checker, trainee } = aLibrary();
  expect(texts(trainee, "idler pulley torque")).toEqual([]);
  const { lessonId, markIds } = aPublishedLesson(author, checker, [{ mark: pulley, values: [SIXTY_FIVE] }]);
  expect(texts(trainee, "idler pulley torque")).toEqual(["65 lbf·ft"]);
  const markId = markIds[0] as never;

  setValues(author, markId, [torque("70 lbf·ft", 70, "lbf·ft", 70 * 1.3558179483314)]);
  expect(texts(trainee, "idler pulley torque")).toEqual(["65 lbf·ft"]);
  confirm(checker, lessonId, markId, NOON + 1);
  publish(author, lessonId, NOON + 2);
  expect(texts(trainee, "idler pulley torque")).toEqual(["70 lbf·ft"]);

  db.insert(doubts)
    .values({ shopId, lessonId, markId, raisedBy: author.userId, stops: true, reason: "page 31", at: NOON })
    .run();
  expect(texts(trainee, "idler pulley torque")).toEqual([]);
  db.update(doubts).set({ clearedAt: NOON, clearedBy: author.userId }).run();
  expect(texts(trainee, "idler pulley torque")).toEqual(["70 lbf·ft"]);

  db.update(lessons).set({ withdrawnAt: NOON }).where(eq(lessons.id, lessonId)).run();
  expect(texts(trainee, "idler pulley torque")).toEqual([]);
});

test("a value that waits for its check is found without its figure, and programs get none of it", () => {
  const { author, checker, trainee } = aLibrary();
  aPublishedLesson(author, checker, [
    {
      mark: { ...pulley, safetyCritical: true, said: "sixty-five foot-pounds" },
      values: [SIXTY_FIVE],
      unchecked: true,
    },
  ]);
  const result = searchShop(trainee, "idler pulley torque", "", 10);
  expect(result.answers.map(({ found }) => found.showing)).toEqual(["withheld"]);
  expect(JSON.stringify(result)).not.toMatch(/65|sixty-five/);
  expect(foundJson(result).answers).toEqual([]);
});

test("two shops share no value, no moment, no lesson and no index", () => {
  const ours = aLibrary();
  aPublishedLesson(ours.author, ours.checker, [{ mark: pulley, values: [SIXTY_FIVE] }], {
    title: "Idler pulley",
  });
  const theirs = aScope(ours.db, aShop(ours.db), "owner");
  expect(texts(ours.trainee, "idler pulley torque")).toHaveLength(1);
  expect(searchShop(theirs, "idler pulley torque", "", 10)).toMatchObject({
    answers: [],
    elsewhere: [],
    moments: [],
    lessons: [],
  });
  // The same words in another database of the same process.
  expect(texts(aLibrary().trainee, "idler pulley torque")).toEqual([]);
});

test("a shop that was dropped for others answers again", () => {
  const { db, author, checker, trainee } = aLibrary();
  aPublishedLesson(author, checker, [{ mark: pulley, values: [SIXTY_FIVE] }]);
  expect(texts(trainee, "idler pulley torque")).toEqual(["65 lbf·ft"]);
  for (let n = 0; n < 55; n += 1) searchShop(aScope(db, aShop(db), "owner"), "idler", "", 1);
  expect(texts(trainee, "idler pulley torque")).toEqual(["65 lbf·ft"]);
});

test("values for another vehicle than the chosen one stand apart", () => {
  const { db, shopId, author, checker, trainee } = aLibrary();
  const ids = ["Foss", "Drift"].map(
    (model) =>
      db
        .insert(vehicles)
        .values({ shopId, make: "Make", model, createdAt: NOON })
        .returning({ id: vehicles.id })
        .get().id,
  );
  const [foss, drift] = ids as [VehicleId, VehicleId];
  for (const [vehicleId, row] of [
    [foss, SIXTY_FIVE],
    [drift, torque("40 lbf·ft", 40, "lbf·ft", 40 * 1.3558179483314)],
  ] as const) {
    const { lessonId } = aPublishedLesson(author, checker, [{ mark: pulley, values: [row] }]);
    db.insert(lessonVehicles).values({ shopId, lessonId, vehicleId }).run();
    db.update(lessons).set({ version: 5 }).where(eq(lessons.id, lessonId)).run();
    publish(author, lessonId, NOON + 5);
  }
  const found = searchShop(trainee, "idler pulley torque", foss, 10);
  expect(found.answers.map(({ found: value }) => valuesText(value.mark.values))).toEqual(["65 lbf·ft"]);
  expect(found.elsewhere.map(({ found: value }) => valuesText(value.mark.values))).toEqual(["40 lbf·ft"]);
});

test("variants of one component are one answer with the question that settles it", () => {
  const { author, checker, trainee } = aLibrary();
  const variant = (appliesVariant: string, atMs: number) => ({
    ...pulley,
    atMs,
    appliesVariant,
    variantQuestion: "Flanged or plain nut?",
  });
  aPublishedLesson(author, checker, [
    { mark: variant("flanged nut", 60_000), values: [SIXTY_FIVE] },
    { mark: variant("plain nut", 61_000), values: [torque("40 lbf·ft", 40, "lbf·ft", 40 * 1.3558179483314)] },
  ]);
  const [answer, ...more] = answersWithVariants(searchShop(trainee, "idler pulley torque", "", 10).answers);
  expect(more).toEqual([]);
  expect(answer).toMatchObject({ form: "variants", question: "Flanged or plain nut?" });
  expect(answer?.form === "variants" && answer.all).toHaveLength(2);
});

test("the same value written down again is one answer, at its first moment", () => {
  const { author, checker, trainee } = aLibrary();
  aPublishedLesson(
    author,
    checker,
    [
      { mark: { ...pulley, atMs: 90_000 }, values: [SIXTY_FIVE] },
      { mark: { ...pulley, atMs: 30_000 }, values: [SIXTY_FIVE] },
    ],
    {},
  );
  const found = searchShop(trainee, "idler pulley torque", "", 10).answers;
  expect(found.map(({ atMs }) => atMs)).toEqual([30_000]);
});

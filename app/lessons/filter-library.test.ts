import { expect, test } from "vitest";
import type { VehicleId } from "#drizzle/schema/ids";
import { aDatabase, aScope, aShop } from "../../tests/support/factories";
import { aPublishedLesson, SIXTY_FIVE } from "../../tests/support/published-lesson";
import { filterLibrary, libraryChoices } from "./filter-library";
import { listLibrary } from "./list-library.server";

const foss = {
  id: "foss" as VehicleId,
  make: "Aldren",
  model: "Foss",
  yearFrom: 2014,
  yearTo: 2019,
  engine: "1.8",
  drive: "",
};
const LESSONS = [
  { title: "Sway bar links", summary: "", system: "suspension", position: "front", vehicles: [foss] },
  { title: "Using a click wrench", summary: "Torque", system: "workshop", position: "", vehicles: [] },
] as const;

const titles = (wanted: Partial<{ system: string; vehicle: string; q: string }>) =>
  filterLibrary(LESSONS, { system: "", vehicle: "", q: "", ...wanted }).map(({ title }) => title);

test("system, vehicle and words narrow the library; a technique fits every vehicle", () => {
  expect(titles({})).toHaveLength(2);
  expect(titles({ system: "workshop" })).toEqual(["Using a click wrench"]);
  expect(titles({ vehicle: "foss" })).toHaveLength(2);
  expect(titles({ vehicle: "other" })).toEqual(["Using a click wrench"]);
  expect(titles({ q: "LINKS foss" })).toEqual(["Sway bar links"]);
  expect(titles({ q: "links pike" })).toEqual([]);
  expect(titles({ system: "no such system" })).toEqual([]);
});

test("the filters offer what the library has", () => {
  expect(libraryChoices(LESSONS)).toEqual({
    systems: ["suspension", "workshop"],
    vehicles: [{ value: "foss", label: "Aldren Foss 1.8, 2014–2019" }],
  });
});

test("the list holds the shop's published lessons and no others", () => {
  const db = aDatabase();
  const shopId = aShop(db);
  const [marta, dario] = [aScope(db, shopId, "instructor"), aScope(db, shopId, "instructor")];
  const { lessonId } = aPublishedLesson(
    marta,
    dario,
    [{ mark: { component: "pulley bolt" }, values: [SIXTY_FIVE] }],
    {
      title: "Crank pulley",
    },
  );
  expect(listLibrary(marta)).toMatchObject([
    { lessonId, title: "Crank pulley", n: 1, durationMs: 600_000, posterOf: null, vehicles: [] },
  ]);
  expect(listLibrary(aScope(db, aShop(db), "owner"))).toEqual([]);
});

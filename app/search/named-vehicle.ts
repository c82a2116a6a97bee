import type { AppliesTo } from "~/lessons/mark";
import type { SnapshotVehicle } from "~/lessons/snapshot";
import { searchWords } from "./search-words";

/** The vehicles that a query names, and the query without their names. `null`: it names none. */
export type Named = Readonly<{
  rest: string;
  fits: ((vehicle: SnapshotVehicle) => boolean) | null;
}>;

const YEAR = /^(?:19[5-9]|20[0-4])\d$/;
const ENGINE = /^\d[.,]\d$/;

const yearFits = (vehicle: Pick<SnapshotVehicle, "yearFrom" | "yearTo">, year: number) =>
  year >= (vehicle.yearFrom ?? 0) && year <= (vehicle.yearTo ?? 9999);

const sameWords = (a: string, b: string) => {
  const [first, second] = [searchWords(a), searchWords(b)];
  return first.every((word) => second.includes(word)) || second.every((word) => first.includes(word));
};

/**
 * Reads "2016 Corvane Meridian 2.0" out of a query. A model names its vehicles, a make alone all of that make; a year
 * and an engine narrow them. A year without a vehicle narrows as well.
 */
export function namedVehicle(text: string, vehicles: readonly SnapshotVehicle[]): Named {
  const typed = text.slice(0, 300).split(/\s+/).filter(Boolean).slice(0, 24);
  const words = typed.map((word) => searchWords(word).join(" "));
  const has = (name: string) => {
    const parts = searchWords(name);
    return parts.length > 0 && parts.every((part) => words.includes(part));
  };
  const byModel = vehicles.filter(({ model }) => has(model));
  const byMake = vehicles.filter(({ make }) => has(make));
  const both = byModel.filter((vehicle) => byMake.includes(vehicle));
  const named = both.length > 0 ? both : byModel.length > 0 ? byModel : byMake;
  const year = words.find((word) => YEAR.test(word));
  if (named.length === 0 && year === undefined) return { rest: text, fits: null };

  const engine = named.length > 0 ? words.find((word) => ENGINE.test(word)) : undefined;
  const namesOf = new Set(
    named.flatMap(({ make, model, engine, drive }) =>
      searchWords([make, model, engine, drive].filter(Boolean).join(" ")),
    ),
  );
  const wanted = new Set(named.map(({ make, model }) => `${make} ${model}`));
  return {
    rest: typed
      .filter((_, n) => {
        const word = words[n] ?? "";
        return word !== year && word !== engine && !namesOf.has(word);
      })
      .join(" "),
    fits: (vehicle) =>
      (named.length === 0 || wanted.has(`${vehicle.make} ${vehicle.model}`)) &&
      (year === undefined || yearFits(vehicle, Number(year))) &&
      (engine === undefined || vehicle.engine === "" || searchWords(vehicle.engine).includes(engine)),
  };
}

/** False when a value is narrowed to other years, another engine or another drive than this vehicle has. */
export function valueFits(applies: AppliesTo, vehicle: SnapshotVehicle): boolean {
  const { yearFrom, yearTo, engine, drive } = applies;
  return (
    (yearFrom === null || vehicle.yearTo === null || vehicle.yearTo >= yearFrom) &&
    (yearTo === null || vehicle.yearFrom === null || vehicle.yearFrom <= yearTo) &&
    (engine === "" || vehicle.engine === "" || sameWords(engine, vehicle.engine)) &&
    (drive === "" || vehicle.drive === "" || sameWords(drive, vehicle.drive))
  );
}

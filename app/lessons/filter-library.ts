import type { System } from "./draft";
import type { LibraryLesson } from "./list-library.server";
import { SYSTEM_WORDS } from "./mark-words";
import { vehicleWords } from "./vehicle-words";

type Listed = Pick<LibraryLesson, "title" | "summary" | "system" | "vehicles" | "position">;

function folded(text: string): string {
  return text.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase();
}

/** The lessons of a system, for a vehicle, with all words of `q` somewhere in title, summary or vehicle. A lesson for any vehicle fits every vehicle. */
export function filterLibrary<L extends Listed>(
  lessons: readonly L[],
  wanted: Readonly<{ system: string; vehicle: string; q: string }>,
): L[] {
  const words = folded(wanted.q).split(/\s+/).filter(Boolean);
  return lessons.filter((lesson) => {
    if (wanted.system !== "" && lesson.system !== wanted.system) return false;
    const fits = lesson.vehicles.length === 0 || lesson.vehicles.some(({ id }) => id === wanted.vehicle);
    if (wanted.vehicle !== "" && !fits) return false;
    const text = folded(
      [lesson.title, lesson.summary, lesson.position, ...lesson.vehicles.map(vehicleWords)].join(" "),
    );
    return words.every((word) => text.includes(word));
  });
}

/** The systems and vehicles that the lessons are about, for the filters; in the order of the trade and by name. */
export function libraryChoices(lessons: readonly Listed[]): {
  systems: System[];
  vehicles: { value: string; label: string }[];
} {
  const vehicles = new Map<string, string>();
  for (const lesson of lessons)
    for (const vehicle of lesson.vehicles) vehicles.set(vehicle.id, vehicleWords(vehicle));
  return {
    systems: (Object.keys(SYSTEM_WORDS) as System[]).filter((system) =>
      lessons.some((lesson) => lesson.system === system),
    ),
    vehicles: [...vehicles]
      .map(([value, label]) => ({ value, label }))
      .toSorted((a, b) => a.label.localeCompare(b.label, "en")),
  };
}

import { z } from "zod";
import type { LessonId, RecordingId, VehicleId } from "#drizzle/schema/ids";
import { draftVersion, formId, line, modelYear, paragraph, requiredLine } from "./form-parts";
import type { NewVehicle } from "./vehicles.server";
import { wrong } from "./common-fields";

const details = {
  title: requiredLine("Give the lesson a title, like “Front sway-bar links: replace and torque”.", 120),
  system: z.enum(
    [
      "steering",
      "suspension",
      "brakes",
      "wheels",
      "engine",
      "cooling",
      "fuel",
      "electrical",
      "high-voltage",
      "restraint",
      "air-conditioning",
      "driveline",
      "body",
      "workshop",
    ],
    "Choose the system that the job is on.",
  ),
  position: line(60),
  summary: paragraph(1000),
  vehicleMake: line(60),
  vehicleModel: line(60),
  vehicleYearFrom: modelYear,
  vehicleYearTo: modelYear,
  vehicleEngine: line(60),
  vehicleDrive: line(40),
};

type Details = Readonly<{
  [K in Exclude<keyof typeof details, "title" | "system">]: z.output<(typeof details)[K]>;
}>;

function readNewVehicle(form: Details, context: z.core.$RefinementCtx): NewVehicle | null {
  const { vehicleMake: make, vehicleModel: model, vehicleYearFrom: yearFrom, vehicleYearTo: yearTo } = form;
  const { vehicleEngine: engine, vehicleDrive: drive } = form;
  if (make === "" && model === "" && yearFrom === null && yearTo === null && engine === "" && drive === "")
    return null;
  if (make === "") wrong(context, "vehicleMake", "Name the make of the new vehicle.");
  if (model === "") wrong(context, "vehicleModel", "Name the model of the new vehicle.");
  if (yearFrom !== null && yearTo !== null && yearFrom > yearTo)
    wrong(context, "vehicleYearTo", "The last year is before the first.");
  return { make, model, yearFrom, yearTo, engine, drive };
}

/** The ids of the ticked boxes "vehicle-…" or "recording-…", in the order of the form. */
function ticked(form: Readonly<Record<string, unknown>>, prefix: string): string[] {
  return Object.keys(form)
    .filter((name) => name.startsWith(prefix) && form[name] === "yes")
    .map((name) => name.slice(prefix.length));
}

/** Title, system, position, vehicles and summary of a lesson on the bench. */
export const LessonForm = z
  .looseObject({ intent: z.literal("details"), ...details, version: draftVersion })
  .transform((form, context) => {
    const { title, system, position, summary, version } = form;
    return {
      version,
      title,
      system,
      position,
      summary,
      vehicles: ticked(form, "vehicle-") as VehicleId[],
      newVehicle: readNewVehicle(form, context),
    };
  });
export type LessonDetails = Omit<z.output<typeof LessonForm>, "version">;

const place = z.coerce.number().int().min(1).max(99);

/** A new lesson: its details, the recordings in order, and the name of the first chapter. */
export const NewLessonForm = z
  .looseObject({ ...details, lessonId: formId, chapterTitle: line(120) })
  // Said together with what else is missing, not one form later.
  .refine((form) => ticked(form, "recording-").length > 0, {
    path: ["recordings"],
    message: "Choose at least one recording.",
    when: () => true,
  })
  .transform((form, context) => {
    const { title, system, position, summary, lessonId, chapterTitle } = form;
    const recordings = ticked(form, "recording-");
    const placeOf = (id: string, n: number) => {
      const given = place.safeParse(form[`place-${id}`]);
      return given.success ? given.data : n + 1;
    };
    const order = recordings.map((id, n) => ({ id, n, place: placeOf(id, n) }));
    order.sort((a, b) => a.place - b.place || a.n - b.n);
    return {
      lessonId: lessonId as LessonId,
      title,
      system,
      position,
      summary,
      chapterTitle: chapterTitle === "" ? "Step 1" : chapterTitle,
      recordings: order.map(({ id }) => id as RecordingId),
      vehicles: ticked(form, "vehicle-") as VehicleId[],
      newVehicle: readNewVehicle(form, context),
    };
  });
export type NewLesson = z.output<typeof NewLessonForm>;

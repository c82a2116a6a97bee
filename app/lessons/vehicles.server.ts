import { and, asc, eq, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, ShopId, VehicleId } from "#drizzle/schema/ids";
import { lessonVehicles, vehicles } from "#drizzle/schema/index";
import { missing, type DraftRefusal } from "./draft-refusal";
import type { SnapshotVehicle } from "./snapshot";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

export type NewVehicle = Omit<SnapshotVehicle, "id">;

/** The vehicles that the shop has lessons for, by name. */
export function listVehicles(scope: InShop): SnapshotVehicle[] {
  return scope.db
    .select({
      id: vehicles.id,
      make: vehicles.make,
      model: vehicles.model,
      yearFrom: vehicles.yearFrom,
      yearTo: vehicles.yearTo,
      engine: vehicles.engine,
      drive: vehicles.drive,
    })
    .from(vehicles)
    .where(eq(vehicles.shopId, scope.shopId))
    .orderBy(asc(vehicles.make), asc(vehicles.model), asc(vehicles.yearFrom), asc(vehicles.id))
    .all();
}

function sameYear(column: typeof vehicles.yearFrom | typeof vehicles.yearTo, value: number | null) {
  return value === null ? isNull(column) : eq(column, value);
}

/** Adds a vehicle; one that the shop already has in every point is taken instead. */
export function addVehicle(scope: InShop, vehicle: NewVehicle, now: number): VehicleId {
  const same = scope.db
    .select({ id: vehicles.id })
    .from(vehicles)
    .where(
      and(
        eq(vehicles.shopId, scope.shopId),
        eq(vehicles.make, vehicle.make),
        eq(vehicles.model, vehicle.model),
        sameYear(vehicles.yearFrom, vehicle.yearFrom),
        sameYear(vehicles.yearTo, vehicle.yearTo),
        eq(vehicles.engine, vehicle.engine),
        eq(vehicles.drive, vehicle.drive),
      ),
    )
    .get();
  if (same) return same.id;
  return scope.db
    .insert(vehicles)
    .values({ ...vehicle, shopId: scope.shopId, createdAt: now })
    .returning({ id: vehicles.id })
    .get().id;
}

/** Sets which vehicles a lesson applies to; none means any vehicle. */
export function setLessonVehicles(
  scope: InShop,
  lessonId: LessonId,
  chosen: readonly VehicleId[],
  added: NewVehicle | null,
  now: number,
): Readonly<{ ok: true }> | DraftRefusal {
  const known = new Set<string>(listVehicles(scope).map((vehicle) => vehicle.id));
  if (chosen.some((id) => !known.has(id))) return missing("vehicle");
  const ids = new Set(chosen);
  if (added) ids.add(addVehicle(scope, added, now));
  scope.db
    .delete(lessonVehicles)
    .where(and(eq(lessonVehicles.shopId, scope.shopId), eq(lessonVehicles.lessonId, lessonId)))
    .run();
  for (const vehicleId of ids)
    scope.db.insert(lessonVehicles).values({ shopId: scope.shopId, lessonId, vehicleId }).run();
  return { ok: true };
}

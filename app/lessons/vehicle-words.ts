import type { SnapshotVehicle } from "./snapshot";

/** "2014–2019", "from 2014", "until 2019" or "". */
export function yearsWords(from: number | null, to: number | null): string {
  if (from !== null && to !== null) return from === to ? String(from) : `${from}–${to}`;
  if (from !== null) return `from ${from}`;
  return to !== null ? `until ${to}` : "";
}

/** A vehicle as a shop says it: "Aldren Foss 1.8, 2014–2019, front-wheel drive". */
export function vehicleWords(
  vehicle: Pick<SnapshotVehicle, "make" | "model" | "yearFrom" | "yearTo" | "engine" | "drive">,
): string {
  const name = [vehicle.make, vehicle.model, vehicle.engine].filter(Boolean).join(" ");
  return [name, yearsWords(vehicle.yearFrom, vehicle.yearTo), vehicle.drive].filter(Boolean).join(", ");
}

/** All vehicles of a lesson; a technique that fits every vehicle says so. */
export function vehiclesWords(vehicles: readonly SnapshotVehicle[]): string {
  return vehicles.length === 0 ? "Any vehicle" : vehicles.map(vehicleWords).join("; ");
}

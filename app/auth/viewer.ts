import type { UnitPreference } from "~/quantities/format";
import type { Role } from "./permissions";

/** The signed-in person and shop as pages show them. */
export type Viewer = Readonly<{
  userId: string;
  name: string;
  email: string;
  role: Role;
  shopName: string;
  country: string;
  timeZone: string;
  units: UnitPreference;
}>;

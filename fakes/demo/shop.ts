// The fictional shop of the demo. Nobody and nothing here exists.
import type { SourceKind } from "~/lessons/mark";

export const PASSWORD = "castlenut-demo";

export const HARROW_LANE = {
  name: "Harrow Lane Garage",
  country: "US",
  timeZone: "America/Chicago",
  preferredUnits: "inch",
} as const;

export const PEOPLE = [
  { key: "Hannah", name: "Hannah Lowe", email: "owner@harrowlane.example", role: "owner", sinceDays: 200 },
  {
    key: "Marta",
    name: "Marta Osei",
    email: "instructor@harrowlane.example",
    role: "instructor",
    sinceDays: 198,
  },
  { key: "Dario", name: "Dario Ruiz", email: "dario@harrowlane.example", role: "instructor", sinceDays: 198 },
  { key: "Tom", name: "Tom Okafor", email: "trainee@harrowlane.example", role: "trainee", sinceDays: 90 },
  { key: "Ines", name: "Ines Duarte", email: "ines@harrowlane.example", role: "trainee", sinceDays: 150 },
  { key: "Kofi", name: "Kofi Mensah", email: "kofi@harrowlane.example", role: "trainee", sinceDays: 60 },
  { key: "Ana", name: "Ana Petrov", email: "ana@harrowlane.example", role: "trainee", sinceDays: 180 },
] as const;

export type PersonKey = (typeof PEOPLE)[number]["key"];

export const VEHICLES = {
  "Corvane Meridian 2.0": {
    make: "Corvane",
    model: "Meridian",
    yearFrom: 2014,
    yearTo: 2018,
    engine: "2.0 petrol",
    drive: "front-wheel drive",
  },
  "Merrow Drift 2.4": {
    make: "Merrow",
    model: "Drift",
    yearFrom: 2013,
    yearTo: 2017,
    engine: "2.4 petrol",
    drive: "front-wheel drive",
  },
  "Cassel Wren 1.6": {
    make: "Cassel",
    model: "Wren",
    yearFrom: 2009,
    yearTo: 2013,
    engine: "1.6 petrol",
    drive: "front-wheel drive",
  },
  "Tessaly Pike 5.3": {
    make: "Tessaly",
    model: "Pike",
    yearFrom: 2010,
    yearTo: 2014,
    engine: "5.3 petrol V8",
    drive: "four-wheel drive",
  },
  "Aldren Foss 1.8": {
    make: "Aldren",
    model: "Foss",
    yearFrom: 2014,
    yearTo: 2019,
    engine: "1.8 petrol",
    drive: "front-wheel drive",
  },
} as const;

export type VehicleName = keyof typeof VEHICLES;

export const DOCUMENTS: Record<string, { kind: SourceKind; title: string; edition: string; dated: string }> =
  {
    meridian: {
      kind: "maker",
      title: "Corvane workshop manual Meridian, chassis",
      edition: "4th edition",
      dated: "2017",
    },
    drift: {
      kind: "maker",
      title: "Merrow workshop manual Drift 2.4, engine front end",
      edition: "2nd edition",
      dated: "2016",
    },
    wren: {
      kind: "maker",
      title: "Cassel workshop manual Wren, cooling and sensors",
      edition: "6th edition",
      dated: "2012",
    },
    pike: {
      kind: "maker",
      title: "Tessaly maintenance guide Pike 5.3",
      edition: "3rd edition",
      dated: "2013",
    },
    foss: {
      kind: "maker",
      title: "Aldren workshop manual Foss, suspension",
      edition: "5th edition",
      dated: "2018",
    },
    brakes: {
      kind: "maker",
      title: "Merrow workshop manual Drift 2.4, brakes",
      edition: "2nd edition",
      dated: "2016",
    },
    card: { kind: "shop-practice", title: "Harrow Lane shop card", edition: "", dated: "2026" },
    measured: { kind: "shop-practice", title: "Measured in the recording", edition: "", dated: "2026" },
  };

export const NORTHGATE = {
  name: "Northgate Motors",
  country: "GB",
  timeZone: "Europe/London",
  preferredUnits: "metric",
} as const;

export const NORTHGATE_PEOPLE = [
  { key: "Priya", name: "Priya Nandal", email: "owner@northgate.example", role: "owner", sinceDays: 40 },
  { key: "Callum", name: "Callum Reid", email: "trainee@northgate.example", role: "trainee", sinceDays: 30 },
] as const;

import { Checkbox, Field, Select, TextArea, type Refusal } from "~/components/ui/field";
import { choices, SYSTEM_WORDS } from "~/lessons/mark-words";
import type { SnapshotVehicle } from "~/lessons/snapshot";
import { vehicleWords } from "~/lessons/vehicle-words";
import { Rare } from "./rare";

const NEW_VEHICLE = [
  "vehicleMake",
  "vehicleModel",
  "vehicleYearFrom",
  "vehicleYearTo",
  "vehicleEngine",
  "vehicleDrive",
];

/** Title, system, position, vehicles and summary: for a new lesson and for one on the bench. */
export function LessonFields({
  fields,
  chosen,
  vehicles,
  refusal,
}: {
  fields: Readonly<Record<string, string>>;
  /** The ids of the vehicles that the lesson applies to. */
  chosen: readonly string[];
  vehicles: readonly SnapshotVehicle[];
  refusal: Refusal;
}) {
  const fill = (name: string) => ({ name, refusal, defaultValue: fields[name] ?? "" });
  return (
    <>
      <Field label="Title" hint="“Front sway-bar links: replace and torque”" {...fill("title")} />
      <div className="grid gap-4 sm:grid-cols-2">
        <Select
          label="System"
          hint="It decides which values are safety-critical from the start."
          options={[{ value: "", label: "Choose" }, ...choices(SYSTEM_WORDS)]}
          {...fill("system")}
        />
        <Field
          label="Position"
          hint="Front, rear, upper, lower; empty where it does not matter."
          {...fill("position")}
        />
      </div>
      <TextArea label="Summary" hint="What the job is, in a sentence or two." {...fill("summary")} />
      <fieldset className="grid gap-1 rounded border border-line px-4 pt-2 pb-4">
        <legend className="px-1 font-semibold">Vehicles</legend>
        <p className="text-sm text-ink-soft">None ticked: the lesson is for any vehicle, like a technique.</p>
        {vehicles.map((vehicle) => (
          <Checkbox
            key={vehicle.id}
            label={vehicleWords(vehicle)}
            name={`vehicle-${vehicle.id}`}
            refusal={refusal}
            defaultChecked={chosen.includes(vehicle.id)}
          />
        ))}
        <Rare title="Add a vehicle" names={NEW_VEHICLE} fields={{}} refusal={refusal}>
          <Field label="Make" {...fill("vehicleMake")} />
          <Field label="Model" {...fill("vehicleModel")} />
          <Field label="From model year" inputMode="numeric" {...fill("vehicleYearFrom")} />
          <Field label="To model year" inputMode="numeric" {...fill("vehicleYearTo")} />
          <Field label="Engine" {...fill("vehicleEngine")} />
          <Field label="Drive" {...fill("vehicleDrive")} />
        </Rare>
      </fieldset>
    </>
  );
}

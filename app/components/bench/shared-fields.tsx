import { Checkbox, Field, Select, TextArea, type Refusal } from "~/components/ui/field";
import { choices, SIDE_WORDS } from "~/lessons/mark-words";
import { Rare } from "./rare";

export type FieldsProps = Readonly<{
  fields: Readonly<Record<string, string>>;
  refusal: Refusal;
  /** Why values of this kind are safety-critical in this lesson; null: a person may say so. */
  safetyReason: string | null;
  /** ISO code of the shop: decides which pint is meant. */
  country: string;
  /** The values that a correction may be about. */
  values: readonly Readonly<{ id: string; label: string }>[];
}>;

/** What every field of a mark is filled with: what was typed before, or the mark as it is. */
export function filler({ fields, refusal }: FieldsProps) {
  return (name: string) => ({ name, refusal, defaultValue: fields[name] ?? "" });
}

export function SafetyCritical({ fields, refusal, safetyReason }: FieldsProps) {
  if (safetyReason !== null || fields["safetyCritical"] === "yes")
    return (
      <p className="rounded border border-line bg-paper px-4 py-3 text-sm">
        <strong>Safety-critical.</strong> {safetyReason ?? "A person marked it so; that stays."} Learners see
        the figure only after a second person has checked it.
      </p>
    );
  return (
    <Checkbox
      name="safetyCritical"
      refusal={refusal}
      label="Safety-critical: hide the figure from learners until it is checked"
      hint="Once set, it stays."
    />
  );
}

export function Place(props: FieldsProps) {
  const fill = filler(props);
  return (
    <div className="grid gap-4 sm:grid-cols-2">
      <Select label="Side" options={choices(SIDE_WORDS)} {...fill("side")} />
      <Field
        label="Position"
        hint="Front, rear, upper, lower; empty where it does not matter."
        {...fill("position")}
      />
    </div>
  );
}

const APPLIES = ["yearFrom", "yearTo", "engine", "drive", "variant", "question"];

export function Applies(props: FieldsProps) {
  const fill = filler(props);
  return (
    <Rare title="Applies to fewer cars than the lesson" names={APPLIES} {...props}>
      <Field label="From model year" inputMode="numeric" {...fill("yearFrom")} />
      <Field label="To model year" inputMode="numeric" {...fill("yearTo")} />
      <Field label="Engine" {...fill("engine")} />
      <Field label="Drive" {...fill("drive")} />
      <Field
        label="Variant"
        hint="Option, part number or chassis range: “flanged nut”."
        {...fill("variant")}
      />
      <Field
        label="The question that settles it on the car"
        hint="“Flanged or plain nut?” Learners see all answers with it."
        {...fill("question")}
      />
    </Rare>
  );
}

export function Extras(props: FieldsProps & { noteLabel?: string; noteHint?: string }) {
  const fill = filler(props);
  return (
    <Rare title="Needs and note" names={["needs", "note"]} {...props}>
      <Field
        label="What the work needs"
        hint="A permit, a second person, a special tool."
        {...fill("needs")}
      />
      <TextArea label={props.noteLabel ?? "Note"} hint={props.noteHint} {...fill("note")} />
    </Rare>
  );
}

import { Checkbox, Field, Select, TextArea, type Refusal } from "~/components/ui/field";
import type { MarkKind } from "~/lessons/mark";
import {
  CHECK_AGAIN_WORDS,
  choices,
  CONDITION_WORDS,
  PART_RULE_WORDS,
  REUSE_WORDS,
  RUN_DOWN_WORDS,
  SIDE_WORDS,
  SIGNAL_WORD_WORDS,
  THREAD_DIRECTION_WORDS,
  TIGHTEN_AT_WORDS,
  WHEEL_LOAD_WORDS,
} from "~/lessons/mark-words";
import { Rare } from "./rare";
import { ValueField } from "./value-field";

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

function filler({ fields, refusal }: FieldsProps) {
  return (name: string) => ({ name, refusal, defaultValue: fields[name] ?? "" });
}

function SafetyCritical({ fields, refusal, safetyReason }: FieldsProps) {
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

function Place(props: FieldsProps) {
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

function Applies(props: FieldsProps) {
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

function Extras(props: FieldsProps & { noteLabel?: string; noteHint?: string }) {
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

function TorqueFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <Field label="Fastener" hint="As you say it: “lower link nut to bar”." {...fill("component")} />
      <ValueField
        label="Torque"
        hint="With its unit, as you write it: 65 ft-lb · 20 Nm, 40 Nm, +90° · 80-95 Nm · hand tight + 3/4 turn"
        dimension="torque"
        country={props.country}
        {...fill("value")}
      />
      <Place {...props} />
      <div className="grid gap-4 sm:grid-cols-2">
        <Select
          label="Condition of the threads"
          hint="As the source says it. “Not stated” prints as: do not oil."
          options={choices(CONDITION_WORDS)}
          {...fill("condition")}
        />
        <Field
          label="Lubricant or thread locker"
          hint="By name, where the condition names one."
          {...fill("conditionDetail")}
        />
        <Select label="Reuse of the fastener" options={choices(REUSE_WORDS)} {...fill("reuse")} />
        <Field
          label="Test or limit for reuse"
          hint="Where it depends: what it has to pass."
          {...fill("reuseDetail")}
        />
        <Select
          label="Tighten at"
          hint="Needed for every rubber-bushed suspension joint."
          options={choices(TIGHTEN_AT_WORDS)}
          {...fill("tightenAt")}
        />
        <Field label="Thread" hint="M12 x 1.75 or 1/2-20" {...fill("thread")} />
      </div>
      <Rare
        title="Thread, run-down, reused hardware, wheel load"
        names={["reusedValue", "propertyClass", "threadDirection", "runDown", "wheelLoad"]}
        {...props}
      >
        <Field
          label="Torque for reused hardware"
          hint="Where the source gives one; the value above is then for new."
          {...fill("reusedValue")}
        />
        <Field label="Property class or grade" hint="8.8, 10.9, grade 8" {...fill("propertyClass")} />
        <Select
          label="Thread direction"
          options={choices(THREAD_DIRECTION_WORDS)}
          {...fill("threadDirection")}
        />
        <Select
          label="Run-down torque of a locking nut"
          options={choices(RUN_DOWN_WORDS)}
          {...fill("runDown")}
        />
        <Select label="Wheel or bearing load" options={choices(WHEEL_LOAD_WORDS)} {...fill("wheelLoad")} />
      </Rare>
      <Rare
        title="Order, state, check again"
        names={["sequence", "tightenedState", "checkAgain", "checkAgainDetail"]}
        {...props}
      >
        <Field label="Tightening order of the maker" hint="In words or as numbers." {...fill("sequence")} />
        <Field
          label="State when tightened"
          hint="Engine cold, part pre-lubricated."
          {...fill("tightenedState")}
        />
        <Select
          label="Check again"
          hint="A fastener tightened by angle is set to “Never” by itself."
          options={choices(CHECK_AGAIN_WORDS)}
          {...fill("checkAgain")}
        />
        <Field label="After what distance or time" {...fill("checkAgainDetail")} />
      </Rare>
      <Applies {...props} />
      <Extras {...props} />
      <SafetyCritical {...props} />
    </>
  );
}

function ToolFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <Field label="Tool" hint="“Deep socket”, “ball joint press”." {...fill("toolName")} />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Size" hint="19 mm, 3/4 in, E18, T30" {...fill("size")} />
        <Field label="Drive" hint="1/2 in" {...fill("toolDrive")} />
      </div>
      <Field label="What for" hint="“Sway bar link nut”" {...fill("component")} />
      <TextArea
        label="Stand-in"
        hint="What fits in its place, this way only; never on a rounded, seized or safety fastener."
        {...fill("note")}
      />
      <Place {...props} />
      <Applies {...props} />
      <Rare title="Needs" names={["needs"]} {...props}>
        <Field label="What the work needs" hint="A permit, a second person." {...fill("needs")} />
      </Rare>
      <SafetyCritical {...props} />
    </>
  );
}

function MeasureFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <Field label="What is measured" hint="“Brake rotor thickness”" {...fill("component")} />
      <ValueField
        label="As specified"
        hint="24.0 mm · 24 ± 0.1 mm · 32-36 psi"
        country={props.country}
        {...fill("value")}
      />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Smallest allowed" hint="22.0 mm" {...fill("min")} />
        <Field label="Largest allowed" {...fill("max")} />
        <Field label="Wear limit" hint="Reject past it. It has no tolerance." {...fill("limit")} />
        <Field label="Measured in this recording" {...fill("measured")} />
        <Field label="State when measured" hint="Cold, unladen, engine off." {...fill("tightenedState")} />
      </div>
      <Place {...props} />
      <Applies {...props} />
      <Extras {...props} />
      <SafetyCritical {...props} />
    </>
  );
}

function PartFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <Field label="Part" hint="“Sway bar link nut”" {...fill("component")} />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Part number" {...fill("partNumber")} />
        <Field label="Quantity" hint="“2 a side”" {...fill("quantity")} />
        <Select label="New or reused" options={choices(PART_RULE_WORDS)} {...fill("partRule")} />
      </div>
      <Place {...props} />
      <Applies {...props} />
      <Extras {...props} />
    </>
  );
}

function SupplyFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <Field label="Product" hint="“Silicone grease”, “medium thread locker”" {...fill("product")} />
      <Field
        label="Where"
        hint="The part that it goes on: “sway bar bushing, inside”."
        {...fill("component")}
      />
      <Field label="How much" hint="“A film”, “3.5 L”" {...fill("quantity")} />
      <TextArea label="Note" {...fill("note")} />
      <Place {...props} />
      <Applies {...props} />
      <Rare title="Needs" names={["needs"]} {...props}>
        <Field label="What the work needs" {...fill("needs")} />
      </Rare>
    </>
  );
}

function CautionFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <Select
        label="Who or what is hurt"
        options={[
          { value: "", label: "Choose" },
          { value: "person", label: "A person" },
          { value: "car", label: "The car or a part" },
        ]}
        {...fill("hurt")}
      />
      <Select
        label="Signal word"
        hint="For a person DANGER, WARNING or CAUTION; for the car or a part NOTICE."
        options={[{ value: "", label: "Choose" }, ...choices(SIGNAL_WORD_WORDS)]}
        {...fill("signalWord")}
      />
      <TextArea label="What to do or not to do" hint="One sentence." {...fill("words")} />
      <TextArea label="Why" hint="What happens otherwise." {...fill("reason")} />
      <Field label="On which part" hint="Empty where it is about the whole step." {...fill("component")} />
      <Place {...props} />
      <Applies {...props} />
      <Extras {...props} />
    </>
  );
}

function CorrectionFields(props: FieldsProps) {
  const fill = filler(props);
  return (
    <>
      <TextArea label="What was said or shown" hint="“Fifty-six foot-pounds”" {...fill("replaces")} />
      <TextArea label="What is right" {...fill("words")} />
      <Select
        label="Which value it is about"
        options={[
          { value: "", label: "None of the values" },
          ...props.values.map(({ id, label }) => ({ value: id, label })),
        ]}
        {...fill("corrects")}
      />
      <TextArea label="Why it was wrong" {...fill("reason")} />
      <TextArea label="Note" {...fill("note")} />
    </>
  );
}

/** The fields of one kind of mark. */
export function MarkFields({ kind, ...props }: FieldsProps & { kind: MarkKind }) {
  switch (kind) {
    case "torque":
      return <TorqueFields {...props} />;
    case "tool":
      return <ToolFields {...props} />;
    case "measure":
      return <MeasureFields {...props} />;
    case "part":
      return <PartFields {...props} />;
    case "supply":
      return <SupplyFields {...props} />;
    case "caution":
      return <CautionFields {...props} />;
    case "correction":
      return <CorrectionFields {...props} />;
    default:
      return kind satisfies never;
  }
}

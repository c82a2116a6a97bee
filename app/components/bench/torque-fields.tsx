import { Field, Select } from "~/components/ui/field";
import {
  CHECK_AGAIN_WORDS,
  choices,
  CONDITION_WORDS,
  REUSE_WORDS,
  RUN_DOWN_WORDS,
  THREAD_DIRECTION_WORDS,
  TIGHTEN_AT_WORDS,
  WHEEL_LOAD_WORDS,
} from "~/lessons/mark-words";
import { Applies, Extras, Place, SafetyCritical, filler, type FieldsProps } from "./shared-fields";
import { Rare } from "./rare";
import { ValueField } from "./value-field";

export function TorqueFields(props: FieldsProps) {
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

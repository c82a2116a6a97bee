import { Field } from "~/components/ui/field";
import { Applies, Extras, Place, SafetyCritical, filler, type FieldsProps } from "./shared-fields";
import { ValueField } from "./value-field";

export function MeasureFields(props: FieldsProps) {
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

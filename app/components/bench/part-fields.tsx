import { Field, Select } from "~/components/ui/field";
import { choices, PART_RULE_WORDS } from "~/lessons/mark-words";
import { Applies, Extras, Place, filler, type FieldsProps } from "./shared-fields";

export function PartFields(props: FieldsProps) {
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

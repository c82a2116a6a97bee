import { Field, TextArea } from "~/components/ui/field";
import { Applies, Place, filler, type FieldsProps } from "./shared-fields";
import { Rare } from "./rare";

export function SupplyFields(props: FieldsProps) {
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

import { Select, TextArea } from "~/components/ui/field";
import { filler, type FieldsProps } from "./shared-fields";

export function CorrectionFields(props: FieldsProps) {
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

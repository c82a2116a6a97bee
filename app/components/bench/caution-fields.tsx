import { Field, Select, TextArea } from "~/components/ui/field";
import { choices, SIGNAL_WORD_WORDS } from "~/lessons/mark-words";
import { Applies, Extras, Place, filler, type FieldsProps } from "./shared-fields";

export function CautionFields(props: FieldsProps) {
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

import { Field, TextArea } from "~/components/ui/field";
import { Applies, Place, SafetyCritical, filler, type FieldsProps } from "./shared-fields";
import { Rare } from "./rare";

export function ToolFields(props: FieldsProps) {
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

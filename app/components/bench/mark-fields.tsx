import type { MarkKind } from "~/lessons/mark";
import { CautionFields } from "./caution-fields";
import { CorrectionFields } from "./correction-fields";
import { MeasureFields } from "./measure-fields";
import { PartFields } from "./part-fields";
import { SupplyFields } from "./supply-fields";
import { ToolFields } from "./tool-fields";
import { TorqueFields } from "./torque-fields";
import type { FieldsProps } from "./shared-fields";

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

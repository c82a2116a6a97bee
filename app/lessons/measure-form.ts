import { z } from "zod";
import { readValues, type ReadOptions } from "~/quantities/parse";
import type { TypedValue, ValueRole } from "~/quantities/value";
import { appliesFields, componentLine, readApplies, readSource, sourceFields, wrong } from "./common-fields";
import { asRow, line, tick, typedValues } from "./form-parts";
import { blankContent, type MarkContent } from "./mark-content";

const FIELDS = ["value", "min", "max", "limit", "measured"] as const;

/** One value in a field whose name says what it stands for; "min 22.0 mm" in the limit field stays a minimum. */
function single(role: ValueRole, options: ReadOptions) {
  return line(100).transform((text, context): TypedValue | null => {
    if (text === "") return null;
    const read = readValues(text, options);
    const row = read.ok ? read.values[0] : undefined;
    if (read.ok && read.values.length === 1 && row?.quantity) {
      const keeps = role === "limit" && (row.role === "min" || row.role === "max");
      return { ...row, role: keeps ? row.role : role, action: null };
    }
    context.addIssue({
      code: "custom",
      message: read.ok ? "Type one value with its unit here." : read.error,
    });
    return z.NEVER;
  });
}

/** The form of a measurement: what is specified, what still passes, what was found. */
export function measureForm(options: Pick<ReadOptions, "country">) {
  return z
    .object({
      ...appliesFields,
      ...sourceFields,
      component: componentLine("Name what is measured, like “brake rotor thickness”."),
      value: typedValues(options),
      min: single("min", options),
      max: single("max", options),
      limit: single("limit", options),
      measured: single("measured", options),
      tightenedState: line(120),
      safetyCritical: tick,
    })
    .transform((form, context) => {
      const specified = form.value.map((value) =>
        value.role === "angle" ? { ...value, role: "value" as const } : value,
      );
      if (specified.some((value) => value.role === "stage" || value.quantity === null))
        wrong(context, "value", "A measurement has no steps. Type one value, a range, or a value with ±.");
      const rows = [
        ...specified,
        ...[form.min, form.max, form.limit, form.measured].filter((value) => value !== null),
      ];
      if (rows.length === 0) wrong(context, "value", "Type at least one value with its unit, like 24.0 mm.");
      const lead = rows[0]?.quantity?.dimension;
      for (const field of FIELDS) {
        const own = field === "value" ? specified : [form[field]].filter((value) => value !== null);
        const odd = own.some(
          (value) =>
            value.quantity &&
            value.quantity.dimension !== lead &&
            !(value.role === "tolerance" && value.quantity.dimension === "ratio"),
        );
        if (odd) wrong(context, field, "This is another kind of unit than the value above it.");
      }
      const only = (role: ValueRole) => rows.filter((value) => value.role === role);
      for (const role of ["min", "max", "limit"] as const)
        if (only(role).length > 1)
          wrong(context, role, "This is given twice: in the value above and here. Keep one.");
      const min = only("min")[0]?.quantity?.si;
      const max = only("max")[0]?.quantity?.si;
      if (min !== undefined && max !== undefined && min > max)
        wrong(context, "max", "The largest allowed is below the smallest allowed.");
      const content: MarkContent = {
        ...blankContent("measure"),
        component: form.component,
        side: form.side,
        position: form.position,
        applies: readApplies(form, context),
        safetyCritical: form.safetyCritical,
        needs: form.needs,
        note: form.note,
        tightenedState: form.tightenedState,
        values: rows.map((value) => asRow({ ...value, action: null })),
      };
      return { content, source: readSource(form, context), corrects: null };
    });
}

import { z } from "zod";
import { readQuantity, type ReadOptions } from "~/quantities/parse";
import { appliesFields, readApplies } from "./common-fields";
import { asRow, line, requiredLine, tick } from "./form-parts";
import type { MarkValue } from "./mark";
import { blankContent, type MarkContent } from "./mark-content";

/** Sizes that are names, not lengths: E18, T30, PH2, IP20, XZN 10. */
const CODE = /^[a-z]{1,4}[- ]?\d{1,3}[a-z]?$/i;

const NOT_A_SIZE =
  "A tool size is a length like 19 mm or 3/4 in, or a code like E18 or T30. Write a wrench's range in the note.";

function sizeRow(role: "size" | "drive", options: Pick<ReadOptions, "country">) {
  return line(40).transform((text, context): MarkValue | null => {
    if (text === "") return null;
    const read = readQuantity(text, { ...options, dimension: "length" });
    if (read.ok) return asRow({ role, action: null, quantity: read.quantity, text });
    if (role === "size" && CODE.test(text)) return asRow({ role, action: null, quantity: null, text });
    const message = read.reason === "no-unit" || role === "drive" ? read.error : NOT_A_SIZE;
    context.addIssue({ code: "custom", message });
    return z.NEVER;
  });
}

/** The form of a tool: what to lay out before starting. A tool rests on fitting, not on a document. */
export function toolForm(options: Pick<ReadOptions, "country">) {
  return z
    .object({
      ...appliesFields,
      toolName: requiredLine("Name the tool, like “deep socket”.", 100),
      size: sizeRow("size", options),
      toolDrive: sizeRow("drive", options),
      component: line(120),
      safetyCritical: tick,
    })
    .transform((form, context) => {
      const content: MarkContent = {
        ...blankContent("tool"),
        toolName: form.toolName,
        component: form.component,
        side: form.side,
        position: form.position,
        applies: readApplies(form, context),
        safetyCritical: form.safetyCritical,
        needs: form.needs,
        note: form.note,
        values: [form.size, form.toolDrive].filter((row) => row !== null),
      };
      return { content, source: { kind: "none" } as const, corrects: null };
    });
}

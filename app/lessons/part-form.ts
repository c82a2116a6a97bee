import { z } from "zod";
import { appliesFields, componentLine, readApplies, readSource, sourceFields } from "./common-fields";
import { choice, line } from "./form-parts";
import { blankContent, type MarkContent } from "./mark-content";

/** The form of a part: what to order before starting, and whether the old one may go back. */
export function partForm() {
  return z
    .object({
      ...appliesFields,
      ...sourceFields,
      component: componentLine("Name the part, like “sway bar link nut”."),
      partNumber: line(60),
      partRule: choice(["not-stated", "replace", "reuse"]),
      quantity: line(60),
    })
    .transform((form, context) => {
      const content: MarkContent = {
        ...blankContent("part"),
        component: form.component,
        side: form.side,
        position: form.position,
        applies: readApplies(form, context),
        needs: form.needs,
        note: form.note,
        partNumber: form.partNumber,
        partRule: form.partRule,
        quantity: form.quantity,
      };
      return { content, source: readSource(form, context), corrects: null };
    });
}

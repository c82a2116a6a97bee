import { z } from "zod";
import { appliesFields, readApplies, readSource, sourceFields } from "./common-fields";
import { line, requiredLine } from "./form-parts";
import { blankContent, type MarkContent } from "./mark-content";

/** The form of a supply: grease, thread locker, cleaner, and where it goes. */
export function supplyForm() {
  return z
    .object({
      ...appliesFields,
      ...sourceFields,
      product: requiredLine("Name the product or its specification.", 120),
      component: line(120),
      quantity: line(60),
    })
    .transform((form, context) => {
      const content: MarkContent = {
        ...blankContent("supply"),
        product: form.product,
        component: form.component,
        side: form.side,
        position: form.position,
        applies: readApplies(form, context),
        needs: form.needs,
        note: form.note,
        quantity: form.quantity,
      };
      return { content, source: readSource(form, context), corrects: null };
    });
}

import { z } from "zod";
import { appliesFields, readApplies, readSource, sourceFields, wrong } from "./common-fields";
import { line, requiredLine } from "./form-parts";
import { blankContent, type MarkContent } from "./mark-content";
import { SIGNAL_WORDS_FOR_PEOPLE } from "./mark-words";

/**
 * The form of a caution. The signal words are those of ANSI Z535: DANGER, WARNING and CAUTION are for injury to a
 * person, NOTICE for damage to things.
 */
export function cautionForm() {
  return z
    .object({
      ...appliesFields,
      ...sourceFields,
      hurt: z.enum(["person", "car"], "Say who or what is hurt: a person, or the car or part."),
      signalWord: z.enum(["DANGER", "WARNING", "CAUTION", "NOTICE"], "Choose the signal word."),
      words: requiredLine("Write what to do or not to do, in one sentence.", 300),
      reason: line(300),
      component: line(120),
    })
    .transform((form, context) => {
      const forPeople = SIGNAL_WORDS_FOR_PEOPLE.includes(form.signalWord);
      if (form.hurt === "person" && !forPeople)
        wrong(
          context,
          "signalWord",
          "NOTICE is for damage. Where a person is hurt, choose DANGER, WARNING or CAUTION.",
        );
      if (form.hurt === "car" && forPeople)
        wrong(
          context,
          "signalWord",
          `${form.signalWord} is for people. Where only the car or a part is hurt, choose NOTICE.`,
        );
      const content: MarkContent = {
        ...blankContent("caution"),
        signalWord: form.signalWord,
        words: form.words,
        reason: form.reason,
        component: form.component,
        side: form.side,
        position: form.position,
        applies: readApplies(form, context),
        needs: form.needs,
        note: form.note,
      };
      return { content, source: readSource(form, context), corrects: null };
    });
}

import { z } from "zod";
import { choice, draftVersion, formId, line, localDate, modelYear, moment, requiredLine } from "./form-parts";
import type { AppliesTo, SourceKind } from "./mark";
import type { DocumentId } from "#drizzle/schema/ids";

/** Where a value was read, as chosen in the form: nowhere yet, a document of the shop, or a new one. */
export type SourceChoice =
  | Readonly<{ kind: "none" }>
  | Readonly<{ kind: "document"; documentId: DocumentId; place: string; readOn: string }>
  | Readonly<{
      kind: "new";
      document: Readonly<{ kind: SourceKind; title: string; edition: string; dated: string }>;
      place: string;
      readOn: string;
    }>;

/** What every mark's form carries: the draft's version, the moment in lesson time and the chapter. */
export const placeFields = { version: draftVersion, at: moment, chapterId: formId };

/** Where on the car, and narrower than the lesson. */
export const appliesFields = {
  side: choice(["none", "left", "right", "both"]),
  position: line(60),
  yearFrom: modelYear,
  yearTo: modelYear,
  engine: line(100),
  drive: line(60),
  variant: line(120),
  question: line(160),
  needs: line(200),
  note: line(500),
};

export const sourceFields = {
  documentId: z
    .union([z.literal(""), z.literal("new"), formId], "Choose a document of the list.")
    .default(""),
  place: line(120),
  readOn: localDate,
  newKind: choice(["maker", "part-maker", "standard", "bulletin", "shop-practice"]),
  newTitle: line(160),
  newEdition: line(60),
  newDated: line(60),
};

type Issues = z.core.$RefinementCtx;

export function wrong(context: Issues, field: string, message: string): void {
  context.addIssue({ code: "custom", path: [field], message });
}

const Applies = z.object(appliesFields);
const Sources = z.object(sourceFields);

/** Reads the narrowing, and says what does not fit together. */
export function readApplies(form: z.output<typeof Applies>, context: Issues): AppliesTo {
  const { yearFrom, yearTo, engine, drive, variant, question } = form;
  if (yearFrom !== null && yearTo !== null && yearFrom > yearTo)
    wrong(context, "yearTo", "The last year is before the first.");
  if (variant !== "" && question === "")
    wrong(
      context,
      "question",
      "Write the question that settles it on the car, like “Flanged or plain nut?”.",
    );
  if (variant === "" && question !== "")
    wrong(context, "variant", "Write which answer to the question this value is for, like “flanged nut”.");
  return { yearFrom, yearTo, engine, drive, variant, question };
}

/** Reads the source, and says what a citation lacks. */
export function readSource(form: z.output<typeof Sources>, context: Issues): SourceChoice {
  const { documentId, place, readOn, newKind, newTitle, newEdition, newDated } = form;
  const isNew = documentId === "new" || newTitle !== "";
  if (!isNew && documentId === "") {
    if (place !== "") wrong(context, "documentId", "Choose the document that this page is in.");
    return { kind: "none" };
  }
  if (isNew && newTitle === "")
    wrong(context, "newTitle", "Name the document, like “Maker's workshop manual, group 04”.");
  if (place === "") wrong(context, "place", "Name the page or section, so that a second person finds it.");
  if (readOn === "") wrong(context, "readOn", "Say on which day it was read.");
  if (isNew)
    return {
      kind: "new",
      document: { kind: newKind, title: newTitle, edition: newEdition, dated: newDated },
      place,
      readOn,
    };
  return { kind: "document", documentId: documentId as DocumentId, place, readOn };
}

export const componentLine = (sentence: string) => requiredLine(sentence, 120);

import { z } from "zod";
import type { ChapterId, MarkId } from "#drizzle/schema/ids";
import { parseForm, type FormResult } from "~/forms/parse-form";
import { cautionForm } from "./caution-form";
import { placeFields, type SourceChoice } from "./common-fields";
import { correctionForm } from "./correction-form";
import type { MarkKind } from "./mark";
import type { MarkContent } from "./mark-content";
import { measureForm } from "./measure-form";
import { partForm } from "./part-form";
import { supplyForm } from "./supply-form";
import { toolForm } from "./tool-form";
import { torqueForm } from "./torque-form";

/** A mark as written in its form. `atMs` is lesson time; `corrects` is the value that a correction is about. */
export type MarkEntry = Readonly<{
  version: number;
  atMs: number;
  chapterId: ChapterId;
  content: MarkContent;
  source: SourceChoice;
  corrects: MarkId | null;
}>;

type Written = Pick<MarkEntry, "content" | "source" | "corrects">;

function formOf(kind: MarkKind, country: string): z.ZodType<Written> {
  switch (kind) {
    case "torque":
      return torqueForm({ country });
    case "tool":
      return toolForm({ country });
    case "measure":
      return measureForm({ country });
    case "part":
      return partForm();
    case "supply":
      return supplyForm();
    case "caution":
      return cautionForm();
    case "correction":
      return correctionForm();
    default:
      return kind satisfies never;
  }
}

const Place = z.object(placeFields);

/** Reads the form of one kind; every fault has its sentence beside its field. `country` decides which pint is meant. */
export function readMarkForm(kind: MarkKind, form: FormData, country: string): FormResult<MarkEntry> {
  const place = parseForm(Place, form);
  const written = parseForm(formOf(kind, country), form);
  if (place.ok && written.ok) {
    const { at, chapterId, version } = place.value;
    return { ok: true, value: { version, atMs: at, chapterId: chapterId as ChapterId, ...written.value } };
  }
  const errors = { ...(place.ok ? {} : place.errors), ...(written.ok ? {} : written.errors) };
  return { ok: false, errors, typed: place.ok ? (written.ok ? {} : written.typed) : place.typed };
}

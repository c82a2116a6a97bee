import { eq } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import type { CitationId } from "#drizzle/schema/ids";
import { shops } from "#drizzle/schema/index";
import type { SourceChoice } from "./common-fields";
import { addCitation, addDocument, findCitation } from "./documents.server";
import { missing, refused, type DraftRefusal } from "./draft-refusal";
import { localDateOf } from "./local-date";

/**
 * The citation for what was chosen in a form. The citation that the mark already has is kept while document, page and
 * day are the same, whoever saves the form: a check that rests on it stays.
 */
export function saveSource(
  scope: Scope,
  choice: SourceChoice,
  current: CitationId | null,
  now: number,
): Readonly<{ ok: true; citationId: CitationId | null }> | DraftRefusal {
  if (choice.kind === "none") return { ok: true, citationId: null };
  const timeZone = scope.db
    .select({ zone: shops.timeZone })
    .from(shops)
    .where(eq(shops.id, scope.shopId))
    .get()?.zone;
  if (choice.readOn > localDateOf(now, timeZone ?? "UTC"))
    return refused({ readOn: "That day has not come yet." });
  const documentId = choice.kind === "new" ? addDocument(scope, choice.document, now) : choice.documentId;
  const { place, readOn } = choice;
  const kept = current && findCitation(scope, current);
  if (kept && kept.documentId === documentId && kept.place === place && kept.readOn === readOn)
    return { ok: true, citationId: current };
  const citationId = addCitation(scope, { documentId, place, readOn }, now);
  return citationId ? { ok: true, citationId } : missing("document");
}

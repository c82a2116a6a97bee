import { and, desc, eq, max } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { Scope } from "~/auth/scope.server";
import type { CitationId, DocumentId, ShopId } from "#drizzle/schema/ids";
import { citations, documents } from "#drizzle/schema/index";
import type { SourceKind } from "./mark";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

export type ShopDocument = Readonly<{
  id: DocumentId;
  kind: SourceKind;
  title: string;
  edition: string;
  dated: string;
}>;

/** The shop's documents; the one that was cited last comes first. */
export function listDocuments(scope: InShop): ShopDocument[] {
  const lastCited = max(citations.createdAt);
  return scope.db
    .select({
      id: documents.id,
      kind: documents.kind,
      title: documents.title,
      edition: documents.edition,
      dated: documents.dated,
    })
    .from(documents)
    .leftJoin(citations, eq(citations.documentId, documents.id))
    .where(eq(documents.shopId, scope.shopId))
    .groupBy(documents.id)
    .orderBy(desc(lastCited), desc(documents.createdAt), desc(documents.id))
    .all();
}

export type NewDocument = Readonly<{ kind: SourceKind; title: string; edition: string; dated: string }>;

/** Adds a document; one that the shop already has with the same kind, title, edition and date is taken instead. */
export function addDocument(scope: InShop, document: NewDocument, now: number): DocumentId {
  const same = scope.db
    .select({ id: documents.id })
    .from(documents)
    .where(
      and(
        eq(documents.shopId, scope.shopId),
        eq(documents.kind, document.kind),
        eq(documents.title, document.title),
        eq(documents.edition, document.edition),
        eq(documents.dated, document.dated),
      ),
    )
    .get();
  if (same) return same.id;
  return scope.db
    .insert(documents)
    .values({ ...document, shopId: scope.shopId, createdAt: now })
    .returning({ id: documents.id })
    .get().id;
}

/**
 * One place in a document as read by this person on a day ("2026-11-09"); the same place read on the same day by the
 * same person is one citation. Null when the document is not the shop's.
 */
export function addCitation(
  scope: Scope,
  citation: Readonly<{ documentId: DocumentId; place: string; readOn: string }>,
  now: number,
): CitationId | null {
  const document = scope.db
    .select({ id: documents.id })
    .from(documents)
    .where(and(eq(documents.shopId, scope.shopId), eq(documents.id, citation.documentId)))
    .get();
  if (!document) return null;
  const same = scope.db
    .select({ id: citations.id })
    .from(citations)
    .where(
      and(
        eq(citations.shopId, scope.shopId),
        eq(citations.documentId, citation.documentId),
        eq(citations.place, citation.place),
        eq(citations.readOn, citation.readOn),
        eq(citations.readBy, scope.userId),
      ),
    )
    .get();
  if (same) return same.id;
  return scope.db
    .insert(citations)
    .values({ ...citation, shopId: scope.shopId, readBy: scope.userId, createdAt: now })
    .returning({ id: citations.id })
    .get().id;
}

export type CitedPlace = Readonly<{ documentId: DocumentId; place: string; readOn: string }>;

/** Which document a citation is in, for the form that changes it. */
export function findCitation(scope: InShop, citationId: CitationId): CitedPlace | undefined {
  return scope.db
    .select({ documentId: citations.documentId, place: citations.place, readOn: citations.readOn })
    .from(citations)
    .where(and(eq(citations.shopId, scope.shopId), eq(citations.id, citationId)))
    .get();
}

import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import type { Database } from "~/db.server";
import type { LessonId, MarkId, ShopId } from "#drizzle/schema/ids";
import { checks, citations, documents, marks, markValues, users } from "#drizzle/schema/index";
import type { Dimension, Unit } from "~/quantities/units";
import { fingerprintOf } from "./fingerprint";
import type { Check, Mark, MarkValue, Source } from "./mark";

type InShop = Readonly<{ db: Database; shopId: ShopId }>;

/** The names of people of the shop, also of those who left. */
function namesOf(scope: InShop): Map<string, string> {
  return new Map(
    scope.db
      .select({ id: users.id, name: users.name })
      .from(users)
      .where(eq(users.shopId, scope.shopId))
      .all()
      .map((user) => [user.id, user.name]),
  );
}

/** The newest check of each mark as stored: outcome with the fingerprint that it vouches for. */
export function newestChecks(
  scope: InShop,
  markIds: readonly MarkId[],
): Map<string, Check & { fingerprint: string }> {
  const found = new Map<string, Check & { fingerprint: string }>();
  if (markIds.length === 0) return found;
  const rows = scope.db
    .select({ check: checks, by: users.name })
    .from(checks)
    .innerJoin(users, eq(users.id, checks.checkerId))
    .where(and(eq(checks.shopId, scope.shopId), inArray(checks.markId, [...markIds])))
    .orderBy(asc(checks.at), asc(checks.id))
    .all();
  for (const { check, by } of rows)
    found.set(check.markId, {
      outcome: check.outcome,
      by,
      on: check.on,
      ownWork: check.ownWork,
      reason: check.reason,
      fingerprint: check.fingerprint,
    });
  return found;
}

/** Lays a check over a mark: it counts only while it vouches for the mark as it stands. */
export function withCheck(mark: Mark, check: (Check & { fingerprint: string }) | undefined): Mark {
  const fits = check !== undefined && check.fingerprint === fingerprintOf(mark);
  const { fingerprint: _, ...plain } = check ?? { fingerprint: "" };
  const valid = fits ? (plain as Check) : null;
  if (mark.state === "pencilled") return { ...mark, check: null };
  return { ...mark, check: valid, state: valid?.outcome === "confirmed" ? "checked" : "inked" };
}

/** All marks of a lesson's draft that are not erased, in order of recording and moment. */
export function loadMarks(scope: InShop, lessonId: LessonId): Mark[] {
  const rows = scope.db
    .select({ mark: marks, citation: citations, document: documents })
    .from(marks)
    .leftJoin(citations, eq(citations.id, marks.citationId))
    .leftJoin(documents, eq(documents.id, citations.documentId))
    .where(and(eq(marks.shopId, scope.shopId), eq(marks.lessonId, lessonId), isNull(marks.erasedAt)))
    .orderBy(asc(marks.recordingId), asc(marks.atMs), asc(marks.id))
    .all();
  const ids = rows.map(({ mark }) => mark.id);
  const valueRows =
    ids.length === 0
      ? []
      : scope.db
          .select()
          .from(markValues)
          .where(and(eq(markValues.shopId, scope.shopId), inArray(markValues.markId, ids)))
          .orderBy(asc(markValues.n))
          .all();
  const values = new Map<string, typeof valueRows>();
  for (const row of valueRows) values.set(row.markId, [...(values.get(row.markId) ?? []), row]);
  const names = namesOf(scope);
  const newest = newestChecks(scope, ids);
  return rows.map(({ mark, citation, document }) => {
    const source: Source | null =
      citation && document
        ? {
            citationId: citation.id,
            kind: document.kind,
            title: document.title,
            edition: document.edition,
            dated: document.dated,
            place: citation.place,
            readOn: citation.readOn,
            readBy: citation.readBy ? (names.get(citation.readBy) ?? "") : "",
          }
        : null;
    const loaded: Mark = {
      id: mark.id,
      lessonId: mark.lessonId,
      chapterId: mark.chapterId,
      recordingId: mark.recordingId,
      atMs: mark.atMs,
      kind: mark.kind,
      state: mark.state,
      component: mark.component,
      componentKey: mark.componentKey,
      side: mark.side,
      position: mark.position,
      applies: {
        yearFrom: mark.appliesYearFrom,
        yearTo: mark.appliesYearTo,
        engine: mark.appliesEngine,
        drive: mark.appliesDrive,
        variant: mark.appliesVariant,
        question: mark.variantQuestion,
      },
      safetyCritical: mark.safetyCritical,
      needs: mark.needs,
      note: mark.note,
      values: (values.get(mark.id) ?? []).map((row): MarkValue => ({
        role: row.role,
        action: row.action,
        hardware: row.hardware,
        text: row.text,
        dimension: row.dimension as Dimension | null,
        unit: row.unit as Unit | null,
        value: row.value,
        number: row.number,
      })),
      thread: mark.thread,
      propertyClass: mark.propertyClass,
      condition: mark.condition,
      conditionDetail: mark.conditionDetail,
      reuse: mark.reuse,
      reuseDetail: mark.reuseDetail,
      tightenAt: mark.tightenAt,
      runDown: mark.runDown,
      checkAgain: mark.checkAgain,
      checkAgainDetail: mark.checkAgainDetail,
      threadDirection: mark.threadDirection,
      wheelLoad: mark.wheelLoad,
      sequence: mark.sequence,
      tightenedState: mark.tightenedState,
      toolName: mark.toolName,
      partNumber: mark.partNumber,
      partRule: mark.partRule,
      quantity: mark.quantity,
      product: mark.product,
      signalWord: mark.signalWord,
      words: mark.words,
      reason: mark.reason,
      replaces: mark.replaces,
      said: mark.said,
      source,
      check: null,
      inkedBy: mark.inkedBy ? (names.get(mark.inkedBy) ?? "") : "",
    };
    return withCheck(loaded, newest.get(mark.id));
  });
}

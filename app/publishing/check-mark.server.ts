import { createHash } from "node:crypto";
import { and, eq, inArray } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction } from "~/db.server";
import type { LessonId, MarkId, UserId } from "#drizzle/schema/ids";
import { auditLog, checks, marks } from "#drizzle/schema/index";
import type { Draft } from "~/lessons/draft";
import { fingerprintOf } from "~/lessons/fingerprint";
import { nearestLessonTime } from "~/lessons/lesson-time";
import { loadDraft } from "~/lessons/load-draft.server";
import { holdsFigure, type Mark } from "~/lessons/mark";
import { markTitle } from "~/lessons/mark-words";
import { disputedMessage, sendForCheckMessage } from "~/mail/check-message";
import { queueMail } from "~/mail/queue-mail.server";
import { shopToday } from "~/training/assign-lesson.server";
import { restsOnSource } from "./gate";
import { teamMember, whoMay, type ShopPerson } from "./who-may.server";

/**
 * Whether this person may check a mark:
 * - "yes"
 * - "own-alone": it is the person's own, and nobody else in the shop may check; recorded as self-checked.
 * - "own": it is the person's own and somebody else may check it.
 * - "no-source": a value that rests on a document names none.
 */
export type MayCheck = "yes" | "own-alone" | "own" | "no-source";

export type ForCheck = Readonly<{
  mark: Mark;
  may: MayCheck;
  /** Stands for the mark as it was read; a check of anything else is refused. */
  seal: string;
}>;

/** What a checker looked at, in 16 letters. */
function sealOf(mark: Mark): string {
  return createHash("sha256").update(fingerprintOf(mark)).digest("hex").slice(0, 16);
}

/** Marks whose figure a second person looks at: torques, measures, tools with a size. */
function isForCheck(mark: Mark): boolean {
  return (
    mark.state !== "pencilled" && holdsFigure(mark.kind) && (mark.kind !== "tool" || mark.values.length > 0)
  );
}

function authorsOf(scope: Scope, ids: readonly MarkId[]): Map<MarkId, UserId | null> {
  if (ids.length === 0) return new Map();
  const rows = scope.db
    .select({ id: marks.id, inkedBy: marks.inkedBy, createdBy: marks.createdBy })
    .from(marks)
    .where(and(eq(marks.shopId, scope.shopId), inArray(marks.id, [...ids])))
    .all();
  return new Map(rows.map((row) => [row.id, row.inkedBy ?? row.createdBy]));
}

function mayCheck(scope: Scope, mark: Mark, author: UserId | null | undefined, alone: boolean): MayCheck {
  if (author === scope.userId && !alone) return "own";
  if (restsOnSource(mark) && mark.source === null) return "no-source";
  return author === scope.userId ? "own-alone" : "yes";
}

/** Who else may check. */
function others(scope: Scope): ShopPerson[] {
  return whoMay(scope, "mark:check").filter((person) => person.id !== scope.userId);
}

export type CheckPage = Readonly<{
  draft: Draft;
  /** In the order of the lesson. */
  rows: readonly ForCheck[];
  /** Who else may check, by name. */
  others: readonly string[];
}>;

/** A lesson's marks for the check page; undefined: no such lesson in this shop. */
export function marksForCheck(scope: Scope, lessonId: LessonId): CheckPage | undefined {
  const draft = loadDraft(scope, lessonId);
  if (!draft) return undefined;
  const at = (mark: Mark) => nearestLessonTime(draft.clips, mark.recordingId, mark.atMs);
  const own = draft.marks.filter(isForCheck).toSorted((a, b) => at(a) - at(b));
  const authors = authorsOf(
    scope,
    own.map((mark) => mark.id),
  );
  const names = others(scope).map((person) => person.name);
  return {
    draft,
    others: names,
    rows: own.map((mark) => ({
      mark,
      may: mayCheck(scope, mark, authors.get(mark.id), names.length === 0),
      seal: sealOf(mark),
    })),
  };
}

export type Checked =
  | Readonly<{ ok: true }>
  | Readonly<{ ok: false; reason: "missing" }>
  | Readonly<{ ok: false; reason: "refused"; field: "" | "reason"; sentence: string }>;

const refused = (sentence: string, field: "" | "reason" = ""): Checked => ({
  ok: false,
  reason: "refused",
  field,
  sentence,
});

/**
 * Adds a second person's word on a mark: confirmed against its source, or disputed with a reason. It vouches for the
 * mark as it was read (`seal`); the same word posted twice is one row. A dispute goes to the author by mail.
 */
export function checkMark(
  scope: Scope,
  lessonId: LessonId,
  markId: MarkId,
  word: Readonly<{ outcome: "confirmed" | "disputed"; reason: string; seal: string }>,
  publicOrigin: string,
  now: number,
): Checked {
  return inTransaction(scope, (scope): Checked => {
    const draft = loadDraft(scope, lessonId);
    const mark = draft?.marks.find((found) => found.id === markId);
    if (!draft || !mark || !isForCheck(mark)) return { ok: false, reason: "missing" };
    if (sealOf(mark) !== word.seal)
      return refused(
        "This value was changed after you opened the page. Read it again as it is now, then check it.",
      );
    const author = authorsOf(scope, [markId]).get(markId);
    const may = mayCheck(scope, mark, author, others(scope).length === 0);
    if (may === "own") return refused("You wrote this value. Somebody else has to check it.");
    if (may === "no-source" && word.outcome === "confirmed")
      return refused(
        "This value names no source, so there is nothing to check it against. Add the source first.",
      );
    const reason = word.reason.trim();
    if (word.outcome === "disputed" && reason === "")
      return refused("Say what is wrong, so that the author can put it right.", "reason");

    const fingerprint = fingerprintOf(mark);
    const newest = scope.db
      .select()
      .from(checks)
      .where(and(eq(checks.shopId, scope.shopId), eq(checks.markId, markId)))
      .all()
      .toSorted((a, b) => a.at - b.at || (a.id < b.id ? -1 : 1))
      .at(-1);
    const again =
      newest?.fingerprint === fingerprint &&
      newest.outcome === word.outcome &&
      newest.checkerId === scope.userId &&
      newest.reason === reason;
    if (again) return { ok: true };

    scope.db
      .insert(checks)
      .values({
        shopId: scope.shopId,
        markId,
        fingerprint,
        citationId: mark.source?.citationId ?? null,
        checkerId: scope.userId,
        outcome: word.outcome,
        ownWork: may === "own-alone",
        reason,
        at: now,
        on: shopToday(scope, now),
      })
      .run();
    scope.db
      .update(marks)
      .set({ state: word.outcome === "confirmed" ? "checked" : "inked" })
      .where(and(eq(marks.shopId, scope.shopId), eq(marks.id, markId)))
      .run();
    writeAudit(
      scope,
      {
        action: word.outcome,
        noun: "value",
        nounId: markId,
        detail: [markTitle(mark), draft.lesson.title, reason].filter(Boolean).join(": "),
      },
      now,
    );
    const writer = author && author !== scope.userId ? teamMember(scope, author) : undefined;
    if (word.outcome === "disputed" && writer)
      queueMail(
        scope,
        disputedMessage({
          to: writer.email,
          name: writer.name,
          by: teamMember(scope, scope.userId)?.name ?? "",
          lesson: draft.lesson.title,
          value: markTitle(mark),
          reason,
          link: `${publicOrigin}/bench/lessons/${lessonId}/check#${markId}`,
        }),
        now,
      );
    return { ok: true };
  });
}

export type SentForCheck =
  | Readonly<{ ok: true; names: readonly string[] }>
  | Readonly<{ ok: false; reason: "missing" }>
  | Readonly<{ ok: false; reason: "refused"; sentence: string }>;

/**
 * Mails everybody else who may check that a lesson's values wait. The same draft is sent once: a second post tells
 * the same names and mails nobody.
 */
export function sendForCheck(
  scope: Scope,
  lessonId: LessonId,
  publicOrigin: string,
  now: number,
): SentForCheck {
  return inTransaction(scope, (scope): SentForCheck => {
    const found = marksForCheck(scope, lessonId);
    if (!found) return { ok: false, reason: "missing" };
    const waiting = found.rows.filter((row) => row.mark.state !== "checked").length;
    if (waiting === 0)
      return { ok: false, reason: "refused", sentence: "Every value is checked. There is nothing to send." };
    const people = others(scope);
    if (people.length === 0)
      return {
        ok: false,
        reason: "refused",
        sentence:
          "Nobody else in your shop may check. You may check your own values here; they are recorded as self-checked.",
      };
    const names = people.map((person) => person.name);
    const detail = `version ${found.draft.lesson.version}, ${waiting} waiting`;
    const sent = scope.db
      .select({ id: auditLog.id })
      .from(auditLog)
      .where(
        and(
          eq(auditLog.shopId, scope.shopId),
          eq(auditLog.action, "sent for check"),
          eq(auditLog.nounId, lessonId),
          eq(auditLog.detail, detail),
        ),
      )
      .get();
    if (sent) return { ok: true, names };
    for (const person of people)
      queueMail(
        scope,
        sendForCheckMessage({
          to: person.email,
          name: person.name,
          by: teamMember(scope, scope.userId)?.name ?? "",
          lesson: found.draft.lesson.title,
          waiting,
          link: `${publicOrigin}/bench/lessons/${lessonId}/check`,
        }),
        now,
      );
    writeAudit(scope, { action: "sent for check", noun: "lesson", nounId: lessonId, detail }, now);
    return { ok: true, names };
  });
}

import { and, eq, inArray, isNull, sql } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { plainText } from "~/captions/cue-text";
import { trackCues } from "~/captions/load-tracks.server";
import { inTransaction } from "~/db.server";
import type { LessonId, RevisionId } from "#drizzle/schema/ids";
import { captionTracks, lessons, revisions } from "#drizzle/schema/index";
import { isSame } from "~/lessons/compare-snapshots";
import { buildSnapshot } from "~/lessons/draft";
import { piecesOf } from "~/lessons/lesson-time";
import { SNAPSHOT_FORMAT, type Snapshot } from "~/lessons/snapshot";
import { writeQuestions } from "~/quizzes/write-questions.server";
import { isOpen, type GateLine } from "./gate";
import { beforePublishing, namedTracks } from "./load-gate.server";
import { findRevision } from "./load-revision.server";

export type Published =
  /** `already`: the draft says nothing new, so the newest revision stands (the same form posted twice). */
  | Readonly<{ ok: true; revisionId: RevisionId; n: number; already: boolean }>
  | Readonly<{ ok: false; reason: "missing" }>
  | Readonly<{ ok: false; reason: "stale"; sentence: string }>
  | Readonly<{ ok: false; reason: "stopped"; lines: readonly GateLine[] }>;

/** The words of the captions that the lesson plays, one row a cue, in place of those of the revision before. */
function writeCaptionWords(scope: Scope, snapshot: Snapshot): void {
  const { lessonId, clips } = snapshot;
  scope.db.run(sql`delete from caption_words where shop_id = ${scope.shopId} and lesson_id = ${lessonId}`);
  const pieces = piecesOf(clips);
  for (const track of snapshot.captionTracks) {
    const played = pieces.filter((piece) => piece.recordingId === track.recordingId);
    for (const cue of trackCues(scope, track.id)) {
      const piece = played.find((piece) => cue.startMs < piece.toMs && cue.endMs > piece.fromMs);
      const words = plainText(cue.text).replace(/\s+/g, " ").trim();
      if (!piece || words === "") continue;
      // A cue that begins in a cut is found where the lesson begins to play it.
      const startMs = Math.max(cue.startMs, piece.fromMs);
      scope.db.run(
        sql`insert into caption_words (words, shop_id, lesson_id, recording_id, cue_id, start_ms)
            values (${words}, ${scope.shopId}, ${lessonId}, ${track.recordingId}, ${cue.id}, ${startMs})`,
      );
    }
  }
}

/**
 * Makes the draft the next revision, in one transaction with all that follows from it: search words of the captions,
 * questions, the audit row. Nothing is written while the gate stops or when the draft moved on since the form was
 * opened. A draft that says nothing new is not published again.
 */
export function publishLesson(
  scope: Scope,
  lessonId: LessonId,
  form: Readonly<{ version: number; note: string }>,
  now: number,
): Published {
  return inTransaction(scope, (scope): Published => {
    const before = beforePublishing(scope, lessonId);
    if (!before) return { ok: false, reason: "missing" };
    const { draft, lines, tracks, former } = before;
    if (draft.lesson.version !== form.version)
      return {
        ok: false,
        reason: "stale",
        sentence:
          "This lesson was changed after you opened this page, by someone else or in another tab. Read what is published now, then publish again.",
      };
    if (former && isSame(former.comparison) && draft.lesson.withdrawnAt === null) {
      const row = findRevision(scope, lessonId, former.n);
      if (row) return { ok: true, revisionId: row.id, n: row.n, already: true };
    }
    if (!isOpen(lines)) return { ok: false, reason: "stopped", lines };

    const snapshot = buildSnapshot(draft, namedTracks(tracks));
    const n = (draft.lesson.newestRevision ?? 0) + 1;
    const { id: revisionId } = scope.db
      .insert(revisions)
      .values({
        shopId: scope.shopId,
        lessonId,
        n,
        format: SNAPSHOT_FORMAT,
        snapshot: JSON.stringify(snapshot),
        note: form.note,
        publishedBy: scope.userId,
        publishedAt: now,
      })
      .returning({ id: revisions.id })
      .get();
    if (tracks.length > 0)
      scope.db
        .update(captionTracks)
        .set({ publishedAt: now })
        .where(
          and(
            eq(captionTracks.shopId, scope.shopId),
            isNull(captionTracks.publishedAt),
            inArray(
              captionTracks.id,
              tracks.map((track) => track.id),
            ),
          ),
        )
        .run();
    scope.db
      .update(lessons)
      .set({ newestRevision: n, withdrawnAt: null })
      .where(and(eq(lessons.shopId, scope.shopId), eq(lessons.id, lessonId)))
      .run();
    writeCaptionWords(scope, snapshot);
    writeQuestions(scope, snapshot, revisionId, now);
    writeAudit(
      scope,
      {
        action: `published revision ${n} of`,
        noun: "lesson",
        nounId: lessonId,
        detail: form.note === "" ? draft.lesson.title : `${draft.lesson.title}: ${form.note}`,
      },
      now,
    );
    return { ok: true, revisionId, n, already: false };
  });
}

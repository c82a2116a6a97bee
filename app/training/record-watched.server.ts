import { and, desc, eq, sql } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { inTransaction } from "~/db.server";
import type { LessonId, RecordingId, RevisionId } from "#drizzle/schema/ids";
import { revisions, watchedStretches } from "#drizzle/schema/index";
import { lessonTime, lessonDuration } from "~/lessons/lesson-time";
import type { SnapshotClip } from "~/lessons/snapshot";

export type WatchedOrder = Readonly<{
  lessonId: LessonId;
  revisionId: RevisionId;
  stretches: readonly Readonly<{ recordingId: RecordingId; fromMs: number; toMs: number }>[];
}>;

export type WatchedResult =
  Readonly<{ ok: true; kept: number }> | Readonly<{ ok: false; status: 404 | 409 | 422; sentence: string }>;

// Players report where they stopped to the nearest frame, and files are a little longer than probed.
const EDGE_MS = 500;
// A player runs at twice the speed at most; two devices at once make four times.
const FASTEST = 4;
// What was waiting for the network arrives late and in one piece.
const GRACE_MS = 60_000;

function clipsOf(scope: Scope, order: WatchedOrder): SnapshotClip[] | undefined {
  const row = scope.db
    .select({ clips: sql<string>`json_extract(${revisions.snapshot}, '$.clips')` })
    .from(revisions)
    .where(
      and(
        eq(revisions.shopId, scope.shopId),
        eq(revisions.id, order.revisionId),
        eq(revisions.lessonId, order.lessonId),
      ),
    )
    .get();
  return row && (JSON.parse(row.clips) as SnapshotClip[]);
}

/**
 * Adds what a person played. Each stretch must lie in a clip of that revision; one that does not, or more than can
 * have been played since the last report, refuses the whole batch. Nothing is merged: rows are only ever added.
 */
export function recordWatched(scope: Scope, order: WatchedOrder, now: number): WatchedResult {
  return inTransaction(scope, (scope): WatchedResult => {
    const clips = clipsOf(scope, order);
    if (!clips) return { ok: false, status: 404, sentence: "That lesson is not in your shop's library." };
    const rows = [];
    for (const { recordingId, fromMs, toMs } of order.stretches) {
      const clip = clips.find(
        (clip) =>
          clip.recordingId === recordingId && fromMs >= clip.inMs - EDGE_MS && toMs <= clip.outMs + EDGE_MS,
      );
      if (!clip || toMs <= fromMs)
        return { ok: false, status: 422, sentence: "That stretch is not part of this lesson." };
      const inside = { fromMs: Math.max(fromMs, clip.inMs), toMs: Math.min(toMs, clip.outMs) };
      if (inside.toMs > inside.fromMs) rows.push({ recordingId, ...inside });
    }
    const last = scope.db
      .select({ at: watchedStretches.at })
      .from(watchedStretches)
      .where(
        and(
          eq(watchedStretches.shopId, scope.shopId),
          eq(watchedStretches.userId, scope.userId),
          eq(watchedStretches.lessonId, order.lessonId),
        ),
      )
      .orderBy(desc(watchedStretches.at))
      .get();
    const played = rows.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0);
    if (last && played > FASTEST * Math.max(0, now - last.at) + GRACE_MS)
      return { ok: false, status: 409, sentence: "More was reported than can have been played since." };
    for (const row of rows)
      scope.db
        .insert(watchedStretches)
        .values({
          shopId: scope.shopId,
          userId: scope.userId,
          lessonId: order.lessonId,
          revisionId: order.revisionId,
          at: now,
          ...row,
        })
        .run();
    return { ok: true, kept: rows.length };
  });
}

// So near to the end there is nothing to continue; so near to the start it is no different from the start.
const NOT_WORTH_MS = 10_000;

/** Where this person left the lesson, in lesson time; null when there is nothing to continue. */
export function whereLeft(scope: Scope, lessonId: LessonId, clips: readonly SnapshotClip[]): number | null {
  const last = scope.db
    .select({ recordingId: watchedStretches.recordingId, toMs: watchedStretches.toMs })
    .from(watchedStretches)
    .where(
      and(
        eq(watchedStretches.shopId, scope.shopId),
        eq(watchedStretches.userId, scope.userId),
        eq(watchedStretches.lessonId, lessonId),
      ),
    )
    .orderBy(desc(watchedStretches.at), sql`rowid desc`)
    .get();
  if (!last) return null;
  const at = lessonTime(clips, last.recordingId, last.toMs);
  if (at === null || at < NOT_WORTH_MS || at > lessonDuration(clips) - NOT_WORTH_MS) return null;
  return at;
}

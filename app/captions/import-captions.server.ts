import { and, eq, isNull } from "drizzle-orm";
import type { Scope } from "~/auth/scope.server";
import { writeAudit } from "~/auth/write-audit.server";
import { inTransaction } from "~/db.server";
import type { CaptionTrackId, RecordingId } from "#drizzle/schema/ids";
import { captionTracks, cues as cueRows, recordings } from "#drizzle/schema/index";
import type { Cue } from "./cue";
import { LANGUAGES, type Language } from "./languages";
import { clock, readWebVtt, showable } from "./read-webvtt";

export type ImportedCaptions =
  | Readonly<{ ok: true; trackId: CaptionTrackId; cueCount: number; warnings: readonly string[] }>
  /** No such recording in this shop. */
  | Readonly<{ ok: false; reason: "missing" }>
  /** The file was not taken; nothing was written. */
  | Readonly<{ ok: false; reason: "file"; error: string }>;

/** Rows for one INSERT, well below the number of variables that SQLite takes. */
const ROWS_AT_ONCE = 500;

function pastTheEnd(cues: readonly Cue[], durationMs: number | null): string[] {
  const late = durationMs === null ? [] : cues.filter((cue) => cue.endMs > durationMs);
  const first = late[0];
  if (!first || durationMs === null) return [];
  const which = late.length === 1 ? "One cue ends" : `${late.length} cues end`;
  return [
    `${which} after the recording does (${clock(durationMs)}), the first at ${clock(first.startMs)}. Are these the captions of this recording?`,
  ];
}

/**
 * Takes a caption file for a recording. It replaces the current track of the same language; the old one is kept as it
 * was, since a revision may show it. The same file again changes nothing.
 */
export function importCaptions(
  scope: Scope,
  recordingId: RecordingId,
  given: Readonly<{ fileName: string; language: Language; file: Uint8Array | string }>,
  now: number,
): ImportedCaptions {
  const read = readWebVtt(given.file);
  const original = typeof given.file === "string" ? given.file : new TextDecoder().decode(given.file);
  return inTransaction(scope, (scope): ImportedCaptions => {
    const recording = scope.db
      .select({ durationMs: recordings.durationMs, title: recordings.title })
      .from(recordings)
      .where(
        and(
          eq(recordings.shopId, scope.shopId),
          eq(recordings.id, recordingId),
          isNull(recordings.deletedAt),
        ),
      )
      .get();
    if (!recording) return { ok: false, reason: "missing" };
    if (!read.ok) return { ok: false, reason: "file", error: read.error };
    const shown = showable(read.cues);
    if (shown.length === 0)
      return {
        ok: false,
        reason: "file",
        error: "The file has no captions in it. Choose the file with the spoken words.",
      };

    const current = scope.db
      .select()
      .from(captionTracks)
      .where(
        and(
          eq(captionTracks.shopId, scope.shopId),
          eq(captionTracks.recordingId, recordingId),
          eq(captionTracks.language, given.language),
          isNull(captionTracks.replacedAt),
        ),
      )
      .all();
    const same = current.find((track) => track.original === original);
    if (same) return { ok: true, trackId: same.id, cueCount: shown.length, warnings: same.warnings };

    for (const track of current)
      scope.db.update(captionTracks).set({ replacedAt: now }).where(eq(captionTracks.id, track.id)).run();
    const warnings = [...read.warnings, ...pastTheEnd(shown, recording.durationMs)];
    const { id: trackId } = scope.db
      .insert(captionTracks)
      .values({
        shopId: scope.shopId,
        recordingId,
        language: given.language,
        label: LANGUAGES[given.language],
        fileName: given.fileName,
        original,
        warnings,
        createdBy: scope.userId,
        createdAt: now,
      })
      .returning({ id: captionTracks.id })
      .get();
    for (let from = 0; from < shown.length; from += ROWS_AT_ONCE)
      scope.db
        .insert(cueRows)
        .values(
          shown
            .slice(from, from + ROWS_AT_ONCE)
            .map((cue, n) => ({ shopId: scope.shopId, trackId, n: from + n, ...cue })),
        )
        .run();
    writeAudit(
      scope,
      {
        action: "imported captions of",
        noun: "recording",
        nounId: recordingId,
        detail: `${given.fileName}: ${shown.length} cues of “${recording.title}”`,
      },
      now,
    );
    return { ok: true, trackId, cueCount: shown.length, warnings };
  });
}

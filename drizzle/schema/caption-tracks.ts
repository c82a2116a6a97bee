import { foreignKey, index, integer, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { recordings } from "./recordings";
import { users } from "./users";

/** Captions of one recording in one language. Once published a track never changes: an edit makes a new one. */
export const captionTracks = sqliteTable(
  "caption_tracks",
  {
    id: id<"captionTrack">(),
    shopId: shopId(),
    recordingId: idOf<"recording">().notNull(),
    language: text().notNull().default("en"),
    label: text().notNull().default("English"),
    fileName: text().notNull(),
    /** The file as it was uploaded, so nothing is lost in reading it. */
    original: text().notNull(),
    /** JSON list of sentences shown to the instructor. */
    warnings: text({ mode: "json" }).notNull().$type<string[]>(),
    createdBy: idOf<"user">().notNull(),
    createdAt: at().notNull(),
    publishedAt: at(),
    /** Replaced by a later import. */
    replacedAt: at(),
  },
  (t) => [
    unique("caption_tracks_shop_and_id").on(t.shopId, t.id),
    foreignKey({
      columns: [t.shopId, t.recordingId],
      foreignColumns: [recordings.shopId, recordings.id],
    }).onDelete("restrict"),
    foreignKey({ columns: [t.shopId, t.createdBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("caption_tracks_recording").on(t.recordingId),
  ],
);

export const cues = sqliteTable(
  "cues",
  {
    id: id<"cue">(),
    shopId: shopId(),
    trackId: idOf<"captionTrack">().notNull(),
    n: integer().notNull(),
    startMs: integer().notNull(),
    endMs: integer().notNull(),
    /** Raw cue text with its markup. */
    text: text().notNull(),
    identifier: text().notNull().default(""),
  },
  (t) => [
    unique("cues_track_and_n").on(t.trackId, t.n),
    foreignKey({
      columns: [t.shopId, t.trackId],
      foreignColumns: [captionTracks.shopId, captionTracks.id],
    }).onDelete("cascade"),
  ],
);

import { foreignKey, index, integer, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, shopId } from "./columns";
import { shops } from "./shops";
import { users } from "./users";

export const RECORDING_STATES = [
  "uploading",
  "checking",
  "preparing",
  "ready",
  "needs-converting",
  "converting",
  "refused",
] as const;

/** An uploaded video file and what was probed from it. */
export const recordings = sqliteTable(
  "recordings",
  {
    id: id<"recording">(),
    shopId: shopId().references(() => shops.id, { onDelete: "restrict" }),
    title: text().notNull(),
    fileName: text().notNull(),
    /** As declared by the browser until completion, then as measured in storage. */
    sizeBytes: integer().notNull(),
    lastModified: integer().notNull().default(0),
    state: text({ enum: RECORDING_STATES }).notNull(),
    /** A sentence: why it was refused, or what to do so that it plays. */
    stateReason: text().notNull().default(""),
    objectKey: text().notNull().unique(),
    uploadId: text(),
    partBytes: integer().notNull(),
    /** What plays: the source itself or the converted copy. */
    playKey: text(),
    container: text(),
    videoCodec: text(),
    audioCodec: text(),
    width: integer(),
    height: integer(),
    rotation: integer(),
    durationMs: integer(),
    posterKey: text(),
    storyboardKey: text(),
    /** Sound peaks, 0–255, evenly spread over the duration, base64. */
    peaks: text(),
    uploadedBy: idOf<"user">().notNull(),
    createdAt: at().notNull(),
    readyAt: at(),
    deletedAt: at(),
  },
  (t) => [
    unique("recordings_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.uploadedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("recordings_shop").on(t.shopId, t.deletedAt),
  ],
);

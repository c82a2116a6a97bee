import { foreignKey, index, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, id, idOf, localDate, shopId } from "./columns";
import { lessons } from "./lessons";
import { revisions } from "./revisions";
import { users } from "./users";

export const SIGN_OFF_LEVELS = ["with-help", "on-own", "can-teach"] as const;
export const PRESENCE = ["all-the-time", "critical-steps"] as const;

/** A trainee asks; the instructor answers on a device of their own. */
export const signOffRequests = sqliteTable(
  "sign_off_requests",
  {
    id: id<"signOffRequest">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    userId: idOf<"user">().notNull(),
    doneOn: localDate().notNull(),
    note: text().notNull().default(""),
    createdAt: at().notNull(),
    answeredAt: at(),
    withdrawnAt: at(),
  },
  (t) => [
    unique("sign_off_requests_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.userId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("sign_off_requests_open").on(t.shopId, t.answeredAt),
    index("sign_off_requests_user").on(t.userId, t.lessonId),
  ],
);

/** An instructor saw the job done on a car. Append-only; taken back by a revocation row. */
export const signOffs = sqliteTable(
  "sign_offs",
  {
    id: id<"signOff">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    revisionId: idOf<"revision">().notNull(),
    userId: idOf<"user">().notNull(),
    signedBy: idOf<"user">().notNull(),
    requestId: idOf<"signOffRequest">(),
    level: text({ enum: SIGN_OFF_LEVELS }).notNull(),
    presence: text({ enum: PRESENCE }).notNull(),
    shownOn: localDate().notNull(),
    /** The values actually set and how it was tightened, in the instructor's words. */
    valuesSet: text().notNull().default(""),
    note: text().notNull().default(""),
    at: at().notNull(),
  },
  (t) => [
    unique("sign_offs_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({
      columns: [t.shopId, t.revisionId],
      foreignColumns: [revisions.shopId, revisions.id],
    }).onDelete("restrict"),
    foreignKey({ columns: [t.shopId, t.userId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.signedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    foreignKey({
      columns: [t.shopId, t.requestId],
      foreignColumns: [signOffRequests.shopId, signOffRequests.id],
    }).onDelete("restrict"),
    index("sign_offs_user").on(t.userId, t.lessonId),
    index("sign_offs_shop").on(t.shopId, t.at),
  ],
);

/** Takes a sign-off back, with a reason. Append-only. */
export const signOffRevocations = sqliteTable(
  "sign_off_revocations",
  {
    id: id<"signOffRevocation">(),
    shopId: shopId(),
    signOffId: idOf<"signOff">().notNull().unique(),
    revokedBy: idOf<"user">().notNull(),
    reason: text().notNull(),
    at: at().notNull(),
  },
  (t) => [
    foreignKey({ columns: [t.shopId, t.signOffId], foreignColumns: [signOffs.shopId, signOffs.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.revokedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
  ],
);

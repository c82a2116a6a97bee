import { foreignKey, index, integer, real, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, flag, id, idOf, shopId } from "./columns";
import { lessons } from "./lessons";
import { questionVersions } from "./questions";
import { revisions } from "./revisions";
import { users } from "./users";

export const ANSWER_OUTCOMES = [
  "right",
  "right-other-unit",
  "within-tolerance",
  "wrong-unit",
  "superseded",
  "other-fastener",
  "missing-angle",
  "other",
  "no-unit",
  "unreadable",
] as const;

/** One person's try at a lesson's quiz. Typed answers wait here until it is submitted. */
export const attempts = sqliteTable(
  "attempts",
  {
    id: id<"attempt">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    revisionId: idOf<"revision">().notNull(),
    userId: idOf<"user">().notNull(),
    startedAt: at().notNull(),
    submittedAt: at(),
    /** Typed so far, by question version; JSON. Kept so that a closed tab loses nothing. */
    typed: text({ mode: "json" }).notNull().$type<Record<string, { text: string; unit: string }>>(),
    rightCount: integer(),
    askedCount: integer(),
    score: real(),
    passMark: real(),
    passed: flag(),
  },
  (t) => [
    unique("attempts_shop_and_id").on(t.shopId, t.id),
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
    index("attempts_user").on(t.userId, t.lessonId),
    index("attempts_lesson").on(t.lessonId, t.submittedAt),
  ],
);

/** One graded answer. Append-only. */
export const answers = sqliteTable(
  "answers",
  {
    id: id<"answer">(),
    shopId: shopId(),
    attemptId: idOf<"attempt">().notNull(),
    questionVersionId: idOf<"questionVersion">().notNull(),
    /** As typed, with the chosen unit. */
    text: text().notNull(),
    unit: text().notNull().default(""),
    outcome: text({ enum: ANSWER_OUTCOMES }).notNull(),
    right: flag().notNull(),
    factor: real(),
    feedback: text().notNull(),
    at: at().notNull(),
  },
  (t) => [
    unique("answers_once").on(t.attemptId, t.questionVersionId),
    foreignKey({ columns: [t.shopId, t.attemptId], foreignColumns: [attempts.shopId, attempts.id] }).onDelete(
      "restrict",
    ),
    foreignKey({
      columns: [t.shopId, t.questionVersionId],
      foreignColumns: [questionVersions.shopId, questionVersions.id],
    }).onDelete("restrict"),
    index("answers_question").on(t.questionVersionId),
  ],
);

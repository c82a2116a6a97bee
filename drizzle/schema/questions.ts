import { foreignKey, index, integer, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, flag, id, idOf, shopId } from "./columns";
import { lessons } from "./lessons";
import { marks } from "./marks";
import { revisions } from "./revisions";

export const QUESTION_KINDS = ["numeric", "choice"] as const;

/** A stable question; what is asked stands in its versions. */
export const questions = sqliteTable(
  "questions",
  {
    id: id<"question">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    markId: idOf<"mark">().notNull(),
    kind: text({ enum: QUESTION_KINDS }).notNull(),
    createdAt: at().notNull(),
    retiredAt: at(),
  },
  (t) => [
    unique("questions_shop_and_id").on(t.shopId, t.id),
    unique("questions_mark_and_kind").on(t.markId, t.kind),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.markId], foreignColumns: [marks.shopId, marks.id] }).onDelete(
      "restrict",
    ),
    index("questions_lesson").on(t.lessonId),
  ],
);

/** What a question asked at one revision, with the expected values copied in. Never changed. */
export const questionVersions = sqliteTable(
  "question_versions",
  {
    id: id<"questionVersion">(),
    shopId: shopId(),
    questionId: idOf<"question">().notNull(),
    revisionId: idOf<"revision">().notNull(),
    n: integer().notNull(),
    prompt: text().notNull(),
    safetyCritical: flag().notNull().default(false),
    recordingId: idOf<"recording">().notNull(),
    /** The moment to watch, in the file. */
    atMs: integer().notNull(),
    /** What is asked, in the form the grading reads; JSON. A copy of the mark's value rows at that revision. */
    asked: text({ mode: "json" }).notNull(),
    /** For a choice: the choices in the order shown, and why each wrong one is wrong; JSON. */
    choices: text({ mode: "json" }),
  },
  (t) => [
    unique("question_versions_shop_and_id").on(t.shopId, t.id),
    unique("question_versions_once").on(t.questionId, t.revisionId),
    foreignKey({
      columns: [t.shopId, t.questionId],
      foreignColumns: [questions.shopId, questions.id],
    }).onDelete("restrict"),
    foreignKey({
      columns: [t.shopId, t.revisionId],
      foreignColumns: [revisions.shopId, revisions.id],
    }).onDelete("restrict"),
    index("question_versions_revision").on(t.revisionId, t.n),
  ],
);

import { foreignKey, index, integer, real, sqliteTable, text, unique } from "drizzle-orm/sqlite-core";
import { at, flag, id, idOf, localDate, shopId } from "./columns";
import { chapters } from "./chapters";
import { citations } from "./documents";
import { lessons } from "./lessons";
import { recordings } from "./recordings";
import { users } from "./users";

export const MARK_KINDS = ["torque", "tool", "measure", "part", "supply", "caution", "correction"] as const;
export const MARK_STATES = ["pencilled", "inked", "checked"] as const;
export const SIDES = ["none", "left", "right", "both"] as const;
export const CONDITIONS = [
  "not-stated",
  "as-supplied",
  "clean-dry",
  "oiled",
  "named-lubricant",
  "named-thread-locker",
  "pre-coated",
] as const;
export const REUSE = ["not-stated", "replace-always", "reuse", "reuse-if", "measure-and-decide"] as const;
export const TIGHTEN_AT = ["not-stated", "hanging", "ride-height", "ride-height-by-jack"] as const;
export const RUN_DOWN = ["not-stated", "included", "add-what-the-wrench-shows"] as const;
export const CHECK_AGAIN = ["not-stated", "never", "after-distance", "after-time"] as const;
export const THREAD_DIRECTIONS = ["not-stated", "right", "left"] as const;
export const WHEEL_LOADS = ["not-stated", "before-weight", "after-weight"] as const;
export const SIGNAL_WORDS = ["DANGER", "WARNING", "CAUTION", "NOTICE"] as const;
export const PART_RULES = ["not-stated", "replace", "reuse"] as const;
export const VALUE_ROLES = [
  "value",
  "min",
  "max",
  "tolerance",
  "stage",
  "angle",
  "limit",
  "size",
  "drive",
  "measured",
] as const;
export const STEP_ACTIONS = [
  "seat",
  "torque",
  "loosen",
  "back-off",
  "angle",
  "wait",
  "turn-while-tightening",
] as const;
export const HARDWARE = ["either", "new", "reused"] as const;

/** Something written down at one moment of a chapter. Ids live on through revisions. */
export const marks = sqliteTable(
  "marks",
  {
    id: id<"mark">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    chapterId: idOf<"chapter">().notNull(),
    recordingId: idOf<"recording">().notNull(),
    /** In the file of the recording. */
    atMs: integer().notNull(),
    kind: text({ enum: MARK_KINDS }).notNull(),
    state: text({ enum: MARK_STATES }).notNull(),
    version: integer().notNull().default(1),

    /** What it applies to, in words, and the same as a key of the component vocabulary. */
    component: text().notNull().default(""),
    componentKey: text().notNull().default(""),
    side: text({ enum: SIDES }).notNull().default("none"),
    position: text().notNull().default(""),
    /** Narrower than the lesson's own vehicles; empty where it is not. */
    appliesYearFrom: integer(),
    appliesYearTo: integer(),
    appliesEngine: text().notNull().default(""),
    appliesDrive: text().notNull().default(""),
    /** Option, part number or chassis range, in words: "flanged nut". Marks of one component that differ here are variants. */
    appliesVariant: text().notNull().default(""),
    /** The question that settles which variant is on the car: "Flanged or plain nut?" */
    variantQuestion: text().notNull().default(""),

    safetyCritical: flag().notNull().default(false),
    /** What the work needs: a certificate, a second person, a special tool. */
    needs: text().notNull().default(""),
    note: text().notNull().default(""),

    // torque
    thread: text().notNull().default(""),
    propertyClass: text().notNull().default(""),
    condition: text({ enum: CONDITIONS }).notNull().default("not-stated"),
    /** The lubricant or thread locker by name. */
    conditionDetail: text().notNull().default(""),
    reuse: text({ enum: REUSE }).notNull().default("not-stated"),
    /** The test of "reuse if", or how to decide. */
    reuseDetail: text().notNull().default(""),
    tightenAt: text({ enum: TIGHTEN_AT }).notNull().default("not-stated"),
    runDown: text({ enum: RUN_DOWN }).notNull().default("not-stated"),
    checkAgain: text({ enum: CHECK_AGAIN }).notNull().default("not-stated"),
    checkAgainDetail: text().notNull().default(""),
    threadDirection: text({ enum: THREAD_DIRECTIONS }).notNull().default("not-stated"),
    wheelLoad: text({ enum: WHEEL_LOADS }).notNull().default("not-stated"),
    /** The maker's tightening order, in words or as numbers. */
    sequence: text().notNull().default(""),
    /** Engine cold, pre-lubricated … in words. */
    tightenedState: text().notNull().default(""),

    // tool, part, supply
    toolName: text().notNull().default(""),
    partNumber: text().notNull().default(""),
    partRule: text({ enum: PART_RULES }).notNull().default("not-stated"),
    quantity: text().notNull().default(""),
    product: text().notNull().default(""),

    // caution, correction
    signalWord: text({ enum: SIGNAL_WORDS }),
    /** The caution's sentence, or what is right in a correction. */
    words: text().notNull().default(""),
    /** Why: what happens otherwise. */
    reason: text().notNull().default(""),
    /** What was said or shown and is wrong. */
    replaces: text().notNull().default(""),

    /** What the reader heard, and how. */
    said: text().notNull().default(""),
    readRule: text().notNull().default(""),
    confidence: real(),

    citationId: idOf<"citation">(),
    createdBy: idOf<"user">(),
    createdAt: at().notNull(),
    inkedBy: idOf<"user">(),
    inkedAt: at(),
    changedAt: at().notNull(),
    erasedAt: at(),
  },
  (t) => [
    unique("marks_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "cascade",
    ),
    foreignKey({ columns: [t.shopId, t.chapterId], foreignColumns: [chapters.shopId, chapters.id] }).onDelete(
      "restrict",
    ),
    foreignKey({
      columns: [t.shopId, t.recordingId],
      foreignColumns: [recordings.shopId, recordings.id],
    }).onDelete("restrict"),
    foreignKey({
      columns: [t.shopId, t.citationId],
      foreignColumns: [citations.shopId, citations.id],
    }).onDelete("restrict"),
    foreignKey({ columns: [t.shopId, t.createdBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.inkedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("marks_lesson").on(t.lessonId, t.recordingId, t.atMs),
    index("marks_chapter").on(t.chapterId),
    index("marks_component").on(t.shopId, t.componentKey),
  ],
);

/** One ordered row of a mark's value: "20 Nm, 40 Nm, +90°" is three. */
export const markValues = sqliteTable(
  "mark_values",
  {
    id: id<"markValue">(),
    shopId: shopId(),
    markId: idOf<"mark">().notNull(),
    n: integer().notNull(),
    role: text({ enum: VALUE_ROLES }).notNull(),
    action: text({ enum: STEP_ACTIONS }),
    hardware: text({ enum: HARDWARE }).notNull().default("either"),
    /** As typed. */
    text: text().notNull(),
    /** Null for a step without a figure: "loosen fully". */
    dimension: text(),
    unit: text(),
    /** In the unit as typed. */
    value: real(),
    /** Canonical: N·m, m, Pa, m³, degree, K … */
    number: real(),
  },
  (t) => [
    unique("mark_values_mark_and_n").on(t.markId, t.n),
    foreignKey({ columns: [t.shopId, t.markId], foreignColumns: [marks.shopId, marks.id] }).onDelete(
      "cascade",
    ),
  ],
);

/** A second person's word on a mark, against its source. Append-only; it counts while the fingerprint still fits. */
export const checks = sqliteTable(
  "checks",
  {
    id: id<"check">(),
    shopId: shopId(),
    markId: idOf<"mark">().notNull(),
    fingerprint: text().notNull(),
    citationId: idOf<"citation">(),
    checkerId: idOf<"user">().notNull(),
    outcome: text({ enum: ["confirmed", "disputed"] }).notNull(),
    /** A one-person shop may check its own, recorded as such. */
    ownWork: flag().notNull().default(false),
    reason: text().notNull().default(""),
    at: at().notNull(),
    on: localDate().notNull(),
  },
  (t) => [
    foreignKey({ columns: [t.shopId, t.markId], foreignColumns: [marks.shopId, marks.id] }).onDelete(
      "restrict",
    ),
    foreignKey({
      columns: [t.shopId, t.citationId],
      foreignColumns: [citations.shopId, citations.id],
    }).onDelete("restrict"),
    foreignKey({ columns: [t.shopId, t.checkerId], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("checks_mark").on(t.markId, t.at),
  ],
);

/** "This looks wrong": from an instructor it stops the value at once, from a trainee it warns beside it. */
export const doubts = sqliteTable(
  "doubts",
  {
    id: id<"doubt">(),
    shopId: shopId(),
    lessonId: idOf<"lesson">().notNull(),
    markId: idOf<"mark">().notNull(),
    raisedBy: idOf<"user">().notNull(),
    /** True: the plate is struck, search and quiz stop using it. */
    stops: flag().notNull(),
    reason: text().notNull(),
    at: at().notNull(),
    clearedBy: idOf<"user">(),
    clearedAt: at(),
    clearedReason: text().notNull().default(""),
  },
  (t) => [
    unique("doubts_shop_and_id").on(t.shopId, t.id),
    foreignKey({ columns: [t.shopId, t.lessonId], foreignColumns: [lessons.shopId, lessons.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.markId], foreignColumns: [marks.shopId, marks.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.raisedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    foreignKey({ columns: [t.shopId, t.clearedBy], foreignColumns: [users.shopId, users.id] }).onDelete(
      "restrict",
    ),
    index("doubts_mark").on(t.markId),
    index("doubts_open").on(t.shopId, t.clearedAt),
  ],
);

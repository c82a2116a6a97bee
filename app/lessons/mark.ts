import type { ChapterId, CitationId, LessonId, MarkId, RecordingId } from "#drizzle/schema/ids";
import type { StepAction, ValueRole } from "~/quantities/value";
import type { Dimension, Unit } from "~/quantities/units";

export type MarkKind = "torque" | "tool" | "measure" | "part" | "supply" | "caution" | "correction";
export type MarkState = "pencilled" | "inked" | "checked";
export type Phase = "prepare" | "remove" | "inspect" | "install" | "verify";
export type Side = "none" | "left" | "right" | "both";
export type Condition =
  | "not-stated"
  | "as-supplied"
  | "clean-dry"
  | "oiled"
  | "named-lubricant"
  | "named-thread-locker"
  | "pre-coated";
export type Reuse = "not-stated" | "replace-always" | "reuse" | "reuse-if" | "measure-and-decide";
export type TightenAt = "not-stated" | "hanging" | "ride-height" | "ride-height-by-jack";
export type RunDown = "not-stated" | "included" | "add-what-the-wrench-shows";
export type CheckAgain = "not-stated" | "never" | "after-distance" | "after-time";
export type ThreadDirection = "not-stated" | "right" | "left";
export type WheelLoad = "not-stated" | "before-weight" | "after-weight";
export type SignalWord = "DANGER" | "WARNING" | "CAUTION" | "NOTICE";
export type PartRule = "not-stated" | "replace" | "reuse";
export type Hardware = "either" | "new" | "reused";
export type SourceKind = "maker" | "part-maker" | "standard" | "bulletin" | "shop-practice";

/** One ordered row of a mark's value. `number` is canonical (N·m, m, Pa, m³, deg, K …); both are null for a step without a figure. */
export type MarkValue = Readonly<{
  role: ValueRole;
  action: StepAction | null;
  hardware: Hardware;
  /** As typed. */
  text: string;
  dimension: Dimension | null;
  unit: Unit | null;
  /** In the unit as typed. */
  value: number | null;
  number: number | null;
}>;

/** Where a value was read. Dates are local dates, "2026-11-09". */
export type Source = Readonly<{
  citationId: CitationId;
  kind: SourceKind;
  title: string;
  edition: string;
  dated: string;
  place: string;
  readOn: string;
  readBy: string;
}>;

/** The newest second person's word that still fits the mark's values. */
export type Check = Readonly<{
  outcome: "confirmed" | "disputed";
  by: string;
  on: string;
  /** A one-person shop checked its own: printed as "self-checked", never as "checked". */
  ownWork: boolean;
  reason: string;
}>;

/** Narrower than the lesson's own vehicles; null or "" where it is not. */
export type AppliesTo = Readonly<{
  yearFrom: number | null;
  yearTo: number | null;
  engine: string;
  drive: string;
  /** Option, part number or chassis range in words. */
  variant: string;
  /** The question that settles which variant is on the car. */
  question: string;
}>;

/** A mark with its values, source and check: the one shape that bench, snapshot, plates, search and quiz share. */
export type Mark = Readonly<{
  id: MarkId;
  lessonId: LessonId;
  chapterId: ChapterId;
  recordingId: RecordingId;
  /** In the recording's file. */
  atMs: number;
  kind: MarkKind;
  state: MarkState;
  component: string;
  componentKey: string;
  side: Side;
  position: string;
  applies: AppliesTo;
  safetyCritical: boolean;
  needs: string;
  note: string;
  values: readonly MarkValue[];
  thread: string;
  propertyClass: string;
  condition: Condition;
  conditionDetail: string;
  reuse: Reuse;
  reuseDetail: string;
  tightenAt: TightenAt;
  runDown: RunDown;
  checkAgain: CheckAgain;
  checkAgainDetail: string;
  threadDirection: ThreadDirection;
  wheelLoad: WheelLoad;
  sequence: string;
  tightenedState: string;
  toolName: string;
  partNumber: string;
  partRule: PartRule;
  quantity: string;
  product: string;
  signalWord: SignalWord | null;
  words: string;
  reason: string;
  replaces: string;
  said: string;
  source: Source | null;
  check: Check | null;
  /** Who inked it. */
  inkedBy: string;
}>;

/** The kinds that hold a figure somebody could set on a tool. */
export function holdsFigure(kind: MarkKind): boolean {
  return kind === "torque" || kind === "tool" || kind === "measure";
}

/** The kinds whose figure needs a source and a check before learners rely on it. */
export function needsSource(kind: MarkKind): boolean {
  return kind === "torque" || kind === "measure";
}

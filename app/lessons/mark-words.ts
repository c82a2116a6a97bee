import type { System } from "./draft";
import type {
  CheckAgain,
  Condition,
  Mark,
  MarkKind,
  MarkState,
  PartRule,
  Phase,
  Reuse,
  RunDown,
  Side,
  SignalWord,
  SourceKind,
  ThreadDirection,
  TightenAt,
  WheelLoad,
} from "./mark";

// What the bench prints for each choice. Pure words: this file reaches pages, so no checking library may enter it.

export const KIND_WORDS: Readonly<Record<MarkKind, string>> = {
  torque: "Torque",
  tool: "Tool",
  measure: "Measure",
  part: "Part",
  supply: "Supply",
  caution: "Caution",
  correction: "Correction",
};

export const STATE_WORDS: Readonly<Record<MarkState, string>> = {
  pencilled: "In pencil",
  inked: "Inked, not yet checked",
  checked: "Checked",
};

export const PHASE_WORDS: Readonly<Record<Phase, string>> = {
  prepare: "Prepare",
  remove: "Remove",
  inspect: "Inspect",
  install: "Install",
  verify: "Verify",
};

export const SYSTEM_WORDS: Readonly<Record<System, string>> = {
  steering: "Steering",
  suspension: "Suspension",
  brakes: "Brakes",
  wheels: "Wheels",
  engine: "Engine",
  cooling: "Cooling",
  fuel: "Fuel",
  electrical: "Electrical",
  "high-voltage": "High voltage",
  restraint: "Airbags and seat belts",
  "air-conditioning": "Air conditioning",
  driveline: "Driveline",
  body: "Body",
  workshop: "Workshop technique",
};

export const SIDE_WORDS: Readonly<Record<Side, string>> = {
  none: "No side",
  left: "Left, seen from the driver's seat",
  right: "Right, seen from the driver's seat",
  both: "Both sides alike",
};

export const CONDITION_WORDS: Readonly<Record<Condition, string>> = {
  "not-stated": "Not stated in the source",
  "as-supplied": "As supplied, do not clean off or add",
  "clean-dry": "Clean and dry",
  oiled: "Oiled",
  "named-lubricant": "Named lubricant",
  "named-thread-locker": "Named thread locker",
  "pre-coated": "Pre-coated",
};

export const REUSE_WORDS: Readonly<Record<Reuse, string>> = {
  "not-stated": "Not stated in the source",
  "replace-always": "Replace always",
  reuse: "May be reused",
  "reuse-if": "Reuse if it passes a test",
  "measure-and-decide": "Measure and decide",
};

export const TIGHTEN_AT_WORDS: Readonly<Record<TightenAt, string>> = {
  "not-stated": "Not stated in the source",
  hanging: "Hanging",
  "ride-height": "Ride height, weight on the wheels",
  "ride-height-by-jack": "Ride height, by a jack under the arm",
};

export const RUN_DOWN_WORDS: Readonly<Record<RunDown, string>> = {
  "not-stated": "Not stated in the source",
  included: "Included in the value",
  "add-what-the-wrench-shows": "Add what the wrench shows while running down",
};

export const CHECK_AGAIN_WORDS: Readonly<Record<CheckAgain, string>> = {
  "not-stated": "Not stated in the source",
  never: "Never: loosen, replace, start again",
  "after-distance": "After a distance",
  "after-time": "After a time",
};

export const THREAD_DIRECTION_WORDS: Readonly<Record<ThreadDirection, string>> = {
  "not-stated": "Not stated in the source",
  right: "Right-hand",
  left: "LEFT-HAND THREAD",
};

export const WHEEL_LOAD_WORDS: Readonly<Record<WheelLoad, string>> = {
  "not-stated": "Not stated in the source",
  "before-weight": "Before the wheel or bearing takes weight",
  "after-weight": "After the wheel stands on the ground",
};

export const PART_RULE_WORDS: Readonly<Record<PartRule, string>> = {
  "not-stated": "Not stated",
  replace: "Always new",
  reuse: "May be reused",
};

export const SOURCE_KIND_WORDS: Readonly<Record<SourceKind, string>> = {
  maker: "Maker's information",
  "part-maker": "Part maker's sheet",
  standard: "Standard",
  bulletin: "Bulletin or recall",
  "shop-practice": "Shop practice",
};

/** Which words name a danger to a person; NOTICE is for the car or a part. */
export const SIGNAL_WORDS_FOR_PEOPLE: readonly SignalWord[] = ["DANGER", "WARNING", "CAUTION"];

export const SIGNAL_WORD_WORDS: Readonly<Record<SignalWord, string>> = {
  DANGER: "DANGER: will kill or cripple if not avoided",
  WARNING: "WARNING: could kill or cripple",
  CAUTION: "CAUTION: could hurt lightly",
  NOTICE: "NOTICE: damages the car or a part",
};

/** The choices of a select, in the order written above. */
export function choices<K extends string>(words: Readonly<Record<K, string>>): { value: K; label: string }[] {
  return (Object.keys(words) as K[]).map((value) => ({ value, label: words[value] }));
}

function short(text: string): string {
  return text.length > 90 ? `${text.slice(0, 89).trimEnd()}…` : text;
}

/** What a mark is about, in a few words for a list: "Lower link nut", "Socket", "WARNING: …". */
export function markTitle(
  mark: Pick<Mark, "kind" | "component" | "toolName" | "product" | "signalWord" | "words" | "replaces">,
): string {
  switch (mark.kind) {
    case "torque":
    case "measure":
      return mark.component || "Without a component";
    case "part":
      return mark.component || "Part without a name";
    case "tool":
      return mark.toolName || "Tool without a name";
    case "supply":
      return mark.product || "Supply without a name";
    case "caution":
      return short(mark.words || "Caution without words");
    case "correction":
      return short(mark.words || mark.replaces || "Correction without words");
    default:
      return mark.kind satisfies never;
  }
}

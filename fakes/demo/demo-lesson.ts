import type {
  CheckAgain,
  Condition,
  PartRule,
  Reuse,
  RunDown,
  Side,
  SignalWord,
  TightenAt,
} from "~/lessons/mark";

/** The documents of the demo shop, by a short name. */
export type DemoSource = readonly [document: string, place: string];

type Common = {
  /** In the recording, ms. */
  at: number;
  component?: string;
  side?: Side;
  position?: string;
  source?: DemoSource;
  note?: string;
  needs?: string;
  variant?: string;
  question?: string;
  safetyCritical?: boolean;
  /** Left unchecked, so that the shop has something to check. */
  unchecked?: boolean;
};

export type DemoMark =
  | (Common & {
      kind: "torque";
      value: string;
      reusedValue?: string;
      thread?: string;
      propertyClass?: string;
      condition?: Condition;
      conditionDetail?: string;
      reuse?: Reuse;
      reuseDetail?: string;
      tightenAt?: TightenAt;
      runDown?: RunDown;
      checkAgain?: CheckAgain;
      checkAgainDetail?: string;
      sequence?: string;
      tightenedState?: string;
    })
  | (Common & { kind: "tool"; tool: string; size?: string; drive?: string })
  | (Common & { kind: "measure"; value: string; measured?: boolean; limit?: boolean })
  | (Common & { kind: "part"; part: string; number?: string; rule?: PartRule; quantity?: string })
  | (Common & { kind: "supply"; product: string })
  | (Common & { kind: "caution"; word: SignalWord; words: string; reason?: string })
  | (Common & { kind: "correction"; wrong: string; right: string });

export type DemoLesson = {
  /** File names of recording, captions and chapters. */
  job: string;
  title: string;
  summary: string;
  system: string;
  position?: string;
  /** Names of demo vehicles; none = any vehicle. */
  vehicles: readonly string[];
  /** Who recorded and inked it, by first name; the other instructor checks. */
  by: "Marta" | "Dario";
  /** Caption file that is published, when it is not the one of the job's name. */
  captions?: string;
  /** Chapters whose phase nobody has chosen yet. */
  phaseless?: readonly string[];
  /** Days before today; null: still on the bench. */
  publishedDaysAgo: number | null;
  marks: readonly DemoMark[];
};

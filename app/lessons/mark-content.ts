import type { Mark, MarkKind } from "./mark";

/** What a person writes in a mark's form: the mark without its identity, state, source and check. */
export type MarkContent = Omit<
  Mark,
  | "id"
  | "lessonId"
  | "chapterId"
  | "recordingId"
  | "atMs"
  | "state"
  | "componentKey"
  | "said"
  | "source"
  | "check"
  | "inkedBy"
>;

/** A mark of a kind with everything not stated. */
export function blankContent(kind: MarkKind): MarkContent {
  return {
    kind,
    component: "",
    side: "none",
    position: "",
    applies: { yearFrom: null, yearTo: null, engine: "", drive: "", variant: "", question: "" },
    safetyCritical: false,
    needs: "",
    note: "",
    values: [],
    thread: "",
    propertyClass: "",
    condition: "not-stated",
    conditionDetail: "",
    reuse: "not-stated",
    reuseDetail: "",
    tightenAt: "not-stated",
    runDown: "not-stated",
    checkAgain: "not-stated",
    checkAgainDetail: "",
    threadDirection: "not-stated",
    wheelLoad: "not-stated",
    sequence: "",
    tightenedState: "",
    toolName: "",
    partNumber: "",
    partRule: "not-stated",
    quantity: "",
    product: "",
    signalWord: null,
    words: "",
    reason: "",
    replaces: "",
  };
}

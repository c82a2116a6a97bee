import type { Mark, MarkValue } from "./mark";
import { SIGNAL_WORDS_FOR_PEOPLE } from "./mark-words";
import { valuesText } from "./values-text";

function yearText(year: number | null): string {
  return year === null ? "" : String(year);
}

/** A mark as its form's fields, by name: what the form was filled with, so that saving it unchanged changes nothing. */
export function markFields(mark: Mark): Record<string, string> {
  const rows = (roles: readonly MarkValue["role"][]) =>
    mark.values.filter((value) => roles.includes(value.role));
  const common = {
    component: mark.component,
    side: mark.side,
    position: mark.position,
    yearFrom: yearText(mark.applies.yearFrom),
    yearTo: yearText(mark.applies.yearTo),
    engine: mark.applies.engine,
    drive: mark.applies.drive,
    variant: mark.applies.variant,
    question: mark.applies.question,
    needs: mark.needs,
    note: mark.note,
    ...(mark.safetyCritical ? { safetyCritical: "yes" } : {}),
  };
  switch (mark.kind) {
    case "torque":
      return {
        ...common,
        value: valuesText(mark.values.filter((value) => value.hardware !== "reused")),
        reusedValue: valuesText(mark.values.filter((value) => value.hardware === "reused")),
        thread: mark.thread,
        propertyClass: mark.propertyClass,
        condition: mark.condition,
        conditionDetail: mark.conditionDetail,
        reuse: mark.reuse,
        reuseDetail: mark.reuseDetail,
        tightenAt: mark.tightenAt,
        runDown: mark.runDown,
        checkAgain: mark.checkAgain,
        checkAgainDetail: mark.checkAgainDetail,
        threadDirection: mark.threadDirection,
        wheelLoad: mark.wheelLoad,
        sequence: mark.sequence,
        tightenedState: mark.tightenedState,
      };
    case "tool":
      return {
        ...common,
        toolName: mark.toolName,
        size: valuesText(rows(["size", "value"])),
        toolDrive: valuesText(rows(["drive"])),
      };
    case "measure":
      return {
        ...common,
        value: valuesText(rows(["value", "tolerance"])),
        min: rows(["min"])[0]?.text ?? "",
        max: rows(["max"])[0]?.text ?? "",
        limit: rows(["limit"])[0]?.text ?? "",
        measured: rows(["measured"])[0]?.text ?? "",
        tightenedState: mark.tightenedState,
      };
    case "part":
      return { ...common, partNumber: mark.partNumber, partRule: mark.partRule, quantity: mark.quantity };
    case "supply":
      return { ...common, product: mark.product, quantity: mark.quantity };
    case "caution":
      return {
        ...common,
        signalWord: mark.signalWord ?? "",
        hurt:
          mark.signalWord === null
            ? ""
            : SIGNAL_WORDS_FOR_PEOPLE.includes(mark.signalWord)
              ? "person"
              : "car",
        words: mark.words,
        reason: mark.reason,
      };
    case "correction":
      return { replaces: mark.replaces, words: mark.words, reason: mark.reason, note: mark.note };
    default:
      return mark.kind satisfies never;
  }
}

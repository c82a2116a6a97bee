import type { MarkId } from "#drizzle/schema/ids";
import type { DraftChapter } from "~/lessons/draft";
import type { Condition, Mark } from "~/lessons/mark";
import { markTitle } from "~/lessons/mark-words";
import { valuesText } from "~/lessons/values-text";

/** Two marks of a lesson that cannot both be right. */
export type Contradiction = Readonly<{ markId: MarkId; sentence: string }>;

const LOCKER = /\b(?:thread ?lock(?:er|ing)?|threadlocker|locking compound)\b/i;
const GREASY = /\b(?:grease|oil|lubricant|lube|anti-?seize|copper paste|paste|wax|moly)\b/i;
const CLEANER = /\b(?:cleaner|degreaser|solvent|brake clean)\b/i;
/** For loosening; it does not stay on the thread that is tightened. */
const LOOSENING = /\b(?:penetrat\w+|release oil|rust remover|creeping oil)\b/i;

/** What the source says of the threads, against what the supply does to them. */
function disagrees(condition: Condition, product: string): boolean {
  if (LOOSENING.test(product)) return false;
  const locks = LOCKER.test(product);
  const greases = GREASY.test(product);
  switch (condition) {
    case "not-stated":
    case "clean-dry":
      return locks || greases;
    case "as-supplied":
    case "pre-coated":
      return locks || greases || CLEANER.test(product);
    case "oiled":
    case "named-lubricant":
      return locks;
    case "named-thread-locker":
      return greases;
    default:
      return condition satisfies never;
  }
}

const CONDITION_SAYS: Readonly<Record<Condition, string>> = {
  "not-stated": "thread condition not stated, so nothing is put on",
  "as-supplied": "as supplied, nothing cleaned off or added",
  "clean-dry": "threads clean and dry",
  oiled: "threads oiled",
  "named-lubricant": "a named lubricant",
  "named-thread-locker": "a named thread locker",
  "pre-coated": "pre-coated, nothing cleaned off or added",
};

function sidesMeet(a: Mark, b: Mark): boolean {
  return (
    a.side === b.side || a.side === "both" || b.side === "both" || a.side === "none" || b.side === "none"
  );
}

/** All that may rightly make two values of one fastener differ. */
function circumstances(mark: Mark): string {
  return JSON.stringify([
    mark.componentKey,
    mark.position.trim().toLowerCase(),
    mark.applies,
    mark.condition,
    mark.conditionDetail,
    mark.reuse,
    mark.tightenAt,
    mark.wheelLoad,
    mark.tightenedState.trim().toLowerCase(),
    mark.sequence,
    mark.note.trim().toLowerCase(),
  ]);
}

function figures(mark: Mark): string {
  return JSON.stringify(
    mark.values.map((value) => [value.role, value.action, value.hardware, value.number?.toPrecision(10)]),
  );
}

/**
 * Contradictions inside one lesson: a supply that goes against the stated condition of the same fastener's threads, and
 * two torques for one fastener under the same circumstances.
 */
export function findContradictions(
  marks: readonly Mark[],
  chapters: readonly Pick<DraftChapter, "id" | "phase">[],
): Contradiction[] {
  const phases = new Map(chapters.map((chapter) => [chapter.id, chapter.phase]));
  const inked = marks.filter((mark) => mark.state !== "pencilled" && mark.componentKey !== "");
  const torques = inked.filter((mark) => mark.kind === "torque");
  const supplies = inked.filter(
    (mark) => mark.kind === "supply" && !["prepare", "remove"].includes(phases.get(mark.chapterId) ?? ""),
  );
  const found: Contradiction[] = [];
  for (const torque of torques)
    for (const supply of supplies)
      if (
        supply.componentKey === torque.componentKey &&
        sidesMeet(supply, torque) &&
        disagrees(torque.condition, supply.product)
      )
        found.push({
          markId: torque.id,
          sentence: `“${markTitle(torque)}” says ${CONDITION_SAYS[torque.condition]}, and “${supply.product}” goes on the same fastener. One of the two is wrong.`,
        });
  torques.forEach((torque, n) => {
    const other = torques
      .slice(0, n)
      .find(
        (earlier) =>
          sidesMeet(earlier, torque) &&
          circumstances(earlier) === circumstances(torque) &&
          figures(earlier) !== figures(torque),
      );
    if (other)
      found.push({
        markId: torque.id,
        sentence: `“${markTitle(torque)}” is written down twice with different values: ${valuesText(other.values)} and ${valuesText(torque.values)}. Say what tells them apart, or erase one.`,
      });
  });
  return found;
}

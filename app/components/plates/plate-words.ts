import type { AppliesTo, Mark, Side, Source } from "~/lessons/mark";
import type { Showing } from "~/lessons/showing";
import { yearsWords } from "~/lessons/vehicle-words";
import { formatLocalDate, localDateAt } from "~/training/local-date";
import type { UnitPreference } from "~/quantities/format";

/** How the reader wants values: which unit first, and the shop's time zone for days. A `Viewer` fits. */
export type PlateView = Readonly<{ units: UnitPreference; timeZone: string }>;

/** A day as a shop writes it: "2026-11-12" → "12 Nov 2026". What is no date stays as it is. */
export function dayWords(day: string): string {
  return formatLocalDate(day, false);
}

/** The shop's day of a moment. */
export function momentDay(at: number, timeZone: string): string {
  return dayWords(localDateAt(at, timeZone));
}

const SIDES: Readonly<Record<Side, string>> = {
  none: "",
  left: "left side",
  right: "right side",
  both: "both sides",
};

function sentence(parts: readonly string[]): string {
  const text = parts.filter((part) => part.trim() !== "").join(", ");
  return text === "" ? "" : text.charAt(0).toUpperCase() + text.slice(1);
}

/** Where on the car: "Front, left side". Sides are seen from the driver's seat. */
export function placeWords(mark: Pick<Mark, "position" | "side">): string {
  return sentence([mark.position.trim(), SIDES[mark.side]]);
}

/** What a value is narrowed to: "Only flanged nut, 2014–2016"; "" when it fits the whole lesson. */
export function appliesWords(applies: AppliesTo): string {
  const years = yearsWords(applies.yearFrom, applies.yearTo);
  const parts = [applies.variant, years, applies.engine, applies.drive].filter((part) => part.trim() !== "");
  return parts.length === 0 ? "" : `Only: ${parts.join(", ")}`;
}

function withDetail(words: string, detail: string): string {
  return detail.trim() === "" ? words : `${words}: ${detail.trim()}`;
}

/** The state of the threads. It has no default: what the source does not state is printed as not stated. */
export function conditionWords(mark: Pick<Mark, "condition" | "conditionDetail">): string {
  const detail = mark.conditionDetail.trim();
  switch (mark.condition) {
    case "not-stated":
      return "Thread condition not stated: do not oil";
    case "as-supplied":
      return "As supplied: do not clean off or add anything";
    case "clean-dry":
      return "Threads clean and dry";
    case "oiled":
      return withDetail("Threads oiled", detail);
    case "named-lubricant":
      return `Lubricant: ${detail || "see the source"}`;
    case "named-thread-locker":
      return `Thread locker: ${detail || "see the source"}`;
    case "pre-coated":
      return "Pre-coated: do not clean off or add anything";
    default:
      return mark.condition satisfies never;
  }
}

/** What else the source says on tightening, one sentence each, in the order of the work. */
export function torqueFacts(mark: Mark): string[] {
  const facts: string[] = [];
  if (mark.thread !== "" || mark.propertyClass !== "")
    facts.push(
      sentence([
        mark.thread && `thread ${mark.thread}`,
        mark.propertyClass && `property class ${mark.propertyClass}`,
      ]),
    );
  facts.push(conditionWords(mark));
  if (mark.reuse === "replace-always" && mark.reuseDetail.trim() !== "") facts.push(mark.reuseDetail);
  if (mark.reuse === "reuse") facts.push(withDetail("The fastener may be reused", mark.reuseDetail));
  if (mark.reuse === "reuse-if") facts.push(`Reuse the fastener only if ${mark.reuseDetail || "it passes"}`);
  if (mark.reuse === "measure-and-decide")
    facts.push(withDetail("Measure the fastener, then decide on reuse", mark.reuseDetail));
  if (mark.tightenAt === "hanging") facts.push("Tighten with the wheels hanging");
  if (mark.tightenAt === "ride-height") facts.push("Tighten at ride height, weight on the wheels");
  if (mark.tightenAt === "ride-height-by-jack") facts.push("Tighten at ride height, by a jack under the arm");
  if (mark.tightenedState !== "") facts.push(sentence([mark.tightenedState]));
  if (mark.runDown === "included") facts.push("Run-down torque is included in the value");
  if (mark.runDown === "add-what-the-wrench-shows")
    facts.push("Run-down torque: add what the wrench shows while running down");
  if (mark.wheelLoad === "before-weight") facts.push("Tighten before the wheel or the bearing takes weight");
  if (mark.wheelLoad === "after-weight") facts.push("Final tightening with the wheels on the ground");
  if (mark.sequence !== "") facts.push(`Tightening order: ${mark.sequence}`);
  if (mark.checkAgain === "never") facts.push("Do not re-pull: loosen, replace, start again");
  if (mark.checkAgain === "after-distance" || mark.checkAgain === "after-time")
    facts.push(`Check again after ${mark.checkAgainDetail || "use, see the source"}`);
  return facts;
}

/** What the source leaves open, said plainly; "" when it leaves nothing open. */
export function notStatedWords(mark: Mark): string {
  const open = [
    mark.reuse === "not-stated" ? "reuse of the fastener" : "",
    mark.tightenAt === "not-stated" ? "height to tighten at" : "",
    mark.runDown === "not-stated" ? "run-down torque" : "",
    mark.checkAgain === "not-stated" ? "check again" : "",
  ].filter(Boolean);
  return open.length === 0 ? "" : `Not stated in the source: ${open.join(", ")}`;
}

const SOURCE_KINDS: Readonly<Record<Source["kind"], string>> = {
  maker: "Maker's information",
  "part-maker": "Part maker's sheet",
  standard: "Standard",
  bulletin: "Bulletin or recall",
  "shop-practice": "Shop practice",
};

/** Where a value was read: kind, title, edition, place, day and reader. Never hidden, never empty. */
export function sourceWords(source: Source | null): string {
  if (source === null) return "Source not recorded";
  const { kind, title, edition, dated, place, readOn, readBy } = source;
  const what = [title, edition, dated, place].filter((part) => part.trim() !== "").join(", ");
  const read = readOn === "" ? "" : `, read ${dayWords(readOn)}${readBy === "" ? "" : ` by ${readBy}`}`;
  return `${SOURCE_KINDS[kind]}: ${what}${read}`;
}

/** Who stands for the value. Shop practice is agreed by two, never checked. */
export function checkWords(mark: Pick<Mark, "check" | "source" | "inkedBy">, showing: Showing): string {
  const { check } = mark;
  if (check?.outcome === "disputed")
    return `Disputed ${dayWords(check.on)} by ${check.by}${check.reason === "" ? "" : `: ${check.reason}`}`;
  if (showing === "in-doubt") return "In doubt";
  if (check === null) return "Not yet checked";
  const practice = mark.source?.kind === "shop-practice";
  if (check.ownWork)
    return practice
      ? `Shop practice of one person, self-checked ${dayWords(check.on)} by ${check.by}`
      : `Self-checked ${dayWords(check.on)} by ${check.by}`;
  if (!practice) return `Checked ${dayWords(check.on)} by ${check.by}`;
  const first = mark.inkedBy !== "" && mark.inkedBy !== check.by ? `${mark.inkedBy} and ` : "";
  return `Agreed by two: ${first}${check.by}, ${dayWords(check.on)}`;
}

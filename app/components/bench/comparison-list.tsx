import { isSame, type ChapterChange, type Comparison, type MarkChange } from "~/lessons/compare-snapshots";

const MARK_WORDS: Readonly<Record<MarkChange["what"], string>> = {
  changed: "Changed",
  reworded: "Reworded",
  new: "New",
  removed: "Removed",
};

function MarkLine({ change }: { change: MarkChange }) {
  const { what, title, before, after, facts } = change;
  const says = what === "removed" ? before : after;
  return (
    <li className="border-b border-line px-4 py-3 last:border-b-0">
      <strong>{MARK_WORDS[what]}</strong>: {title}
      {before !== after && before !== "" && after !== "" ? (
        <span className="block">
          <span className="sr-only">before </span>
          <del>{before}</del> → <span className="sr-only">now </span>
          <ins className="font-semibold no-underline">{after}</ins>
        </span>
      ) : says === "" || says === title ? null : (
        <span className="block">{says}</span>
      )}
      {facts.length > 0 ? (
        <span className="block text-sm text-ink-soft">Differs: {facts.join(", ")}</span>
      ) : null}
    </li>
  );
}

function chapterWords({ what, before, after }: ChapterChange): string {
  switch (what) {
    case "new":
      return `New chapter “${after}”`;
    case "removed":
      return `Chapter “${before}” removed`;
    case "renamed":
      return `Chapter “${before}” is now “${after}”`;
    case "moved":
      return `Chapter “${after}” starts or ends elsewhere`;
    case "phase":
      return `${before} → ${after}`;
    default:
      return what satisfies never;
  }
}

/** What one revision, or the draft, shows differently from the revision before. */
export function ComparisonList({ comparison }: { comparison: Comparison }) {
  if (isSame(comparison)) return <p>Nothing that learners see is different.</p>;
  const { marks, chapters, other } = comparison;
  const asked = marks.some((change) => change.what === "changed");
  return (
    <div className="grid gap-3">
      {marks.length > 0 ? (
        <ul className="rounded border border-line bg-sheet">
          {marks.map((change) => (
            <MarkLine key={`${change.markId} ${change.what}`} change={change} />
          ))}
        </ul>
      ) : null}
      {asked ? (
        <p className="text-sm text-ink-soft">
          “Changed” means another figure, role, component, thread, condition or rule. Another spelling or unit
          of the same value is “reworded” and asks nobody again.
        </p>
      ) : null}
      {chapters.length > 0 ? (
        <ul className="list-disc pl-5">
          {chapters.map((change) => (
            <li key={`${change.chapterId} ${change.what}`}>{chapterWords(change)}</li>
          ))}
        </ul>
      ) : null}
      {other.length > 0 ? <p>Also different: {other.join(", ")}.</p> : null}
    </div>
  );
}

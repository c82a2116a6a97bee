import { useRef } from "react";
import { Form, href, useNavigation } from "react-router";
import { Button, ButtonLink } from "~/components/ui/button";
import type { Refusal } from "~/components/ui/field";
import type { Mark } from "~/lessons/mark";
import { KIND_WORDS, markTitle, STATE_WORDS } from "~/lessons/mark-words";
import { needsSource } from "~/lessons/mark";
import { formatTimecode } from "~/lessons/timecode";
import { valuesText } from "~/lessons/values-text";

function figure(mark: Mark): string {
  const reused = mark.values.filter((value) => value.hardware === "reused");
  const first = valuesText(mark.values.filter((value) => value.hardware !== "reused"));
  return reused.length > 0 ? `${first} (new), ${valuesText(reused)} (reused)` : first;
}

function stateOf(mark: Mark): string {
  if (mark.state === "checked")
    return mark.check?.ownWork ? "Self-checked" : `Checked by ${mark.check?.by ?? ""}`;
  if (mark.check?.outcome === "disputed") return `Disputed by ${mark.check.by}: ${mark.check.reason}`;
  return mark.state === "inked" && !needsSource(mark.kind) ? "Inked" : STATE_WORDS[mark.state];
}

const FRAME = {
  pencilled: "border-2 border-dashed border-line-strong bg-transparent",
  inked: "border-2 border-solid border-line-strong bg-sheet",
  checked: "border-2 border-solid border-enamel bg-sheet",
};

/** One mark in its chapter: dashed in pencil, solid in ink, with what can be done to it. */
export function MarkRow({
  mark,
  lessonId,
  version,
  atMs,
  refusal,
}: {
  mark: Mark;
  lessonId: string;
  version: number;
  /** Lesson time. */
  atMs: number;
  refusal: Refusal;
}) {
  const sending = useNavigation().state !== "idle";
  const title = markTitle(mark);
  const value = figure(mark);
  const wrong = refusal?.errors[""];
  const erase = useRef<HTMLButtonElement>(null);
  const eraseByKey = (event: React.KeyboardEvent) => {
    if (!event.shiftKey || event.key !== "Delete") return;
    event.preventDefault();
    erase.current?.click();
  };
  const act = (intent: "ink" | "erase", label: string, look: "ghost" | "quiet") => (
    <Form method="post" preventScrollReset>
      <input type="hidden" name="intent" value={intent} />
      <input type="hidden" name="markId" value={mark.id} />
      <input type="hidden" name="version" value={version} />
      <Button
        ref={intent === "erase" ? erase : null}
        onKeyDown={eraseByKey}
        look={look}
        disabled={sending}
        aria-label={`${label}: ${title}`}
      >
        {label}
      </Button>
    </Form>
  );
  return (
    <li id={`mark-${mark.id}`} className={`grid gap-2 rounded px-3 py-2 ${FRAME[mark.state]}`}>
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <span className="text-sm text-ink-soft tabular-nums">{formatTimecode(atMs)}</span>
        <span className="text-sm font-semibold">{KIND_WORDS[mark.kind]}</span>
        <span className="min-w-0 font-semibold wrap-anywhere">
          {mark.signalWord ? `${mark.signalWord}: ` : ""}
          {title}
        </span>
        {value ? (
          <span className="rounded bg-brass-tint px-2 font-figure text-xl font-semibold">{value}</span>
        ) : null}
      </div>
      <p className="text-sm text-ink-soft">
        <strong>{stateOf(mark)}</strong>
        {mark.safetyCritical ? " · Safety-critical" : ""}
        {mark.applies.variant ? ` · ${mark.applies.question} ${mark.applies.variant}` : ""}
        {mark.source
          ? ` · ${mark.source.title}, ${mark.source.place}, read ${mark.source.readOn}`
          : needsSource(mark.kind)
            ? " · No source"
            : ""}
        {mark.state === "pencilled" && mark.said ? (
          <>
            {" · Heard: "}
            <q>{mark.said}</q>
          </>
        ) : null}
      </p>
      {wrong ? (
        <p role="alert" className="text-sm font-semibold text-error">
          {wrong}
        </p>
      ) : null}
      <div className="flex flex-wrap gap-2">
        {mark.state === "pencilled" ? act("ink", "Ink", "ghost") : null}
        <ButtonLink
          look={mark.state === "pencilled" ? "quiet" : "ghost"}
          to={href("/bench/lessons/:lessonId/marks/:markId", { lessonId, markId: mark.id })}
          aria-label={`Edit: ${title}`}
          onKeyDown={eraseByKey}
        >
          Edit
        </ButtonLink>
        {act("erase", "Erase", "quiet")}
      </div>
    </li>
  );
}

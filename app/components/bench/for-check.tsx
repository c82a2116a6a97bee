import { Form, Link } from "react-router";
import { valueLine } from "~/components/plates/figures";
import {
  appliesWords,
  checkWords,
  notStatedWords,
  placeWords,
  sourceWords,
  torqueFacts,
} from "~/components/plates/plate-words";
import { Button } from "~/components/ui/button";
import { FormProblem, TextArea, type Refusal } from "~/components/ui/field";
import { Sheet } from "~/components/ui/page";
import type { Mark } from "~/lessons/mark";
import { KIND_WORDS, markTitle } from "~/lessons/mark-words";
import { valuesText } from "~/lessons/values-text";
import type { UnitPreference } from "~/quantities/format";

export type CheckRow = Readonly<{
  mark: Mark;
  may: "yes" | "own-alone" | "own" | "no-source";
  seal: string;
  /** What the button says: "I read it in the source: it is right". */
  confirm: string;
  /** The moment in lesson time, as a time code and as the address that plays it. */
  moment: Readonly<{ text: string; to: string }>;
  editTo: string;
}>;

const MAY_NOT: Readonly<Partial<Record<CheckRow["may"], string>>> = {
  own: "You wrote this one: somebody else checks it.",
  "no-source":
    "No source is named, so there is nothing to check it against. Add the source, or dispute the value.",
};

function Facts({ mark }: { mark: Mark }) {
  const facts = [
    placeWords(mark),
    appliesWords(mark.applies),
    ...(mark.kind === "torque" ? torqueFacts(mark) : []),
    mark.kind === "torque" && mark.threadDirection === "left" ? "LEFT-HAND THREAD" : "",
    mark.kind === "torque" && mark.reuse === "replace-always" ? "NEW FASTENER" : "",
    mark.kind === "torque" ? notStatedWords(mark) : "",
    mark.needs === "" ? "" : `Needs: ${mark.needs}`,
    mark.note,
  ].filter((fact) => fact !== "");
  if (facts.length === 0) return null;
  return (
    <ul className="list-disc pl-5">
      {facts.map((fact) => (
        <li key={fact}>{fact}</li>
      ))}
    </ul>
  );
}

/** One mark for a second person: all that the source has to say, and the two answers. */
export function ForCheck({
  row,
  units,
  refusal,
}: {
  row: CheckRow;
  units: UnitPreference;
  refusal: Refusal;
}) {
  const { mark, may, seal, confirm, moment, editTo } = row;
  const checked = mark.state === "checked";
  const answerable = may === "yes" || may === "own-alone";
  const hidden = (
    <>
      <input type="hidden" name="intent" value="check" />
      <input type="hidden" name="markId" value={mark.id} />
      <input type="hidden" name="seal" value={seal} />
    </>
  );
  return (
    <li id={mark.id} className="scroll-mt-4">
      <Sheet className="grid gap-3 p-5">
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <h3 className="text-xl">
            {KIND_WORDS[mark.kind]}: {markTitle(mark)}
          </h3>
          {mark.safetyCritical ? <p className="text-sm font-semibold">Safety-critical</p> : null}
        </div>
        <p>
          <span className="font-figure text-4xl leading-none font-semibold">
            {valueLine(mark.values, units)}
          </span>
          <span className="block text-sm text-ink-soft">As typed: {valuesText(mark.values)}</span>
        </p>
        <Facts mark={mark} />
        <p>
          <span className="block font-semibold">
            {mark.kind === "tool" && mark.source === null
              ? "Size noted from the recording"
              : sourceWords(mark.source)}
          </span>
          <span className="block text-sm text-ink-soft">
            {checkWords(mark, checked ? (mark.check?.ownWork ? "self-checked" : "checked") : "unchecked")}
          </span>
        </p>
        {mark.said === "" ? null : <p className="border-l-4 border-line-strong pl-3">“{mark.said}”</p>}
        <p className="flex flex-wrap gap-x-5 text-sm">
          <Link to={moment.to} className="inline-flex min-h-11 items-center font-semibold">
            Play from {moment.text}
          </Link>
          <Link to={editTo} className="inline-flex min-h-11 items-center font-semibold">
            Open the mark
          </Link>
        </p>
        {refusal ? <FormProblem refusal={refusal} /> : null}
        {MAY_NOT[may] && !checked ? <p className="font-semibold">{MAY_NOT[may]}</p> : null}
        {may === "own-alone" && !checked ? (
          <p className="text-sm">
            Nobody else in your shop may check. Your own check is recorded and printed as “self-checked”.
          </p>
        ) : null}
        {answerable && !checked ? (
          <Form method="post">
            {hidden}
            <input type="hidden" name="outcome" value="confirmed" />
            <Button look="ghost">{confirm}</Button>
          </Form>
        ) : null}
        {may === "own" ? null : (
          <details open={refusal?.typed["outcome"] === "disputed"}>
            <summary className="inline-flex min-h-11 cursor-pointer items-center font-semibold text-enamel-text underline underline-offset-4">
              Dispute it
            </summary>
            <Form method="post" className="grid gap-3 pt-2">
              {hidden}
              <input type="hidden" name="outcome" value="disputed" />
              <TextArea
                label="What is wrong?"
                name="reason"
                rows={2}
                maxLength={500}
                hint="The author gets a mail with your words. The lesson is not published again until it is settled."
                refusal={refusal}
              />
              <p>
                <Button look="ghost">Dispute this value</Button>
              </p>
            </Form>
          </details>
        )}
      </Sheet>
    </li>
  );
}

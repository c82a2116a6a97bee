import { useRef } from "react";
import { usePlayhead, useScripts } from "~/components/player/moment";
import { Button } from "~/components/ui/button";
import { Field, type Refusal } from "~/components/ui/field";
import { formatExactTimecode } from "~/lessons/timecode";

/** A time like "12:44"; where scripts run, a button takes it from the video. */
export function MomentField({
  label,
  name,
  hint,
  defaultValue,
  refusal,
}: {
  label: string;
  name: string;
  hint?: string;
  defaultValue?: string;
  refusal?: Refusal;
}) {
  const input = useRef<HTMLInputElement>(null);
  const playhead = usePlayhead();
  const scripts = useScripts();
  const setHere = () => {
    const ms = playhead?.now();
    if (input.current && ms !== null && ms !== undefined)
      input.current.value = formatExactTimecode(Math.round(ms / 10) * 10);
  };
  return (
    <div className="grid content-start gap-1">
      <Field
        ref={input}
        label={label}
        name={name}
        hint={hint}
        defaultValue={defaultValue}
        refusal={refusal}
        inputMode="text"
        autoComplete="off"
        placeholder="12:44"
      />
      {playhead && scripts ? (
        <Button look="ghost" type="button" onClick={setHere} className="justify-self-start">
          Set to the video's moment
        </Button>
      ) : null}
    </div>
  );
}

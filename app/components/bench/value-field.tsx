import { useRef, useState } from "react";
import { Field, type Refusal } from "~/components/ui/field";
import { formatQuantity, pairUnits } from "~/quantities/format";
import { readValues } from "~/quantities/parse";
import type { Dimension } from "~/quantities/units";
import type { TypedValue } from "~/quantities/value";

const ROLES: Readonly<Record<TypedValue["role"], string>> = {
  value: "",
  min: "at least ",
  max: "at most ",
  tolerance: "± ",
  stage: "",
  angle: "then ",
  limit: "limit ",
  size: "",
  drive: "",
  measured: "",
};

const ACTIONS: Readonly<Record<NonNullable<TypedValue["action"]>, string>> = {
  seat: "",
  torque: "",
  loosen: "",
  "back-off": "back off ",
  angle: "",
  wait: "wait ",
  "turn-while-tightening": "",
};

function inWords(value: TypedValue): string {
  const before = (value.action && ACTIONS[value.action]) || ROLES[value.role];
  if (!value.quantity) return value.text;
  const [first, second] = pairUnits(value.quantity, "metric");
  const own = formatQuantity(value.quantity).text;
  const other = [first, second].find((unit) => unit !== null && unit !== value.quantity?.unit);
  const sense = value.role === "min" ? "up" : value.role === "max" ? "down" : "nearest";
  return `${before}${own}${other ? ` = ${formatQuantity(value.quantity, other, sense).text}` : ""}`;
}

/** A field for values, with a line under it that says how they are read while they are typed. Bench only. */
export function ValueField({
  label,
  name,
  hint,
  defaultValue,
  refusal,
  dimension,
  country,
}: {
  label: string;
  name: string;
  hint?: string;
  defaultValue: string;
  refusal: Refusal;
  dimension?: Dimension;
  country: string;
}) {
  const input = useRef<HTMLInputElement>(null);
  const [typed, setTyped] = useState("");
  const read =
    typed.trim() === "" ? null : readValues(typed, { country, ...(dimension ? { dimension } : {}) });
  return (
    <div className="grid gap-2">
      <Field
        ref={input}
        label={label}
        name={name}
        hint={hint}
        defaultValue={defaultValue}
        refusal={refusal}
        autoComplete="off"
        onChange={(event) => setTyped(event.currentTarget.value)}
        onFocus={(event) => setTyped(event.currentTarget.value)}
      />
      <p
        aria-live="polite"
        className={read ? "border-l-4 border-enamel bg-paper px-3 py-2 text-sm" : "sr-only"}
      >
        {read ? (
          read.ok ? (
            <>
              <span className="text-ink-soft">Read as </span>
              <strong>{read.values.map(inWords).join(" · ")}</strong>
            </>
          ) : (
            read.error
          )
        ) : null}
      </p>
    </div>
  );
}

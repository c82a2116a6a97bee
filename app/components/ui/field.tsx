import { useEffect, useId, useRef } from "react";
import type { FormRefusal } from "~/forms/parse-form";

/** What a page hands its fields: the refusal of the last try, if there was one. */
export type Refusal = Pick<FormRefusal, "errors" | "typed"> | undefined;

const CONTROL =
  "min-h-11 w-full rounded border border-line-strong bg-sheet px-3 py-2 text-ink aria-invalid:border-error aria-invalid:border-2";

type Common = { label: string; name: string; hint?: React.ReactNode; refusal?: Refusal; className?: string };

function useFieldParts(name: string, hint: React.ReactNode, refusal: Refusal) {
  const id = useId();
  const error = refusal?.errors[name];
  const described = [hint ? `${id}-hint` : "", error ? `${id}-error` : ""].filter(Boolean).join(" ");
  const control = {
    id,
    name,
    ...(described ? { "aria-describedby": described } : {}),
    ...(error ? { "aria-invalid": true as const } : {}),
  };
  return { id, error, control };
}

function Around(props: {
  id: string;
  label: string;
  hint?: React.ReactNode;
  error?: string | undefined;
  className?: string;
  children: React.ReactNode;
}) {
  return (
    <div className={`grid content-start gap-1 ${props.className ?? ""}`}>
      <label htmlFor={props.id} className="text-sm font-semibold text-ink-soft">
        {props.label}
      </label>
      {props.children}
      {props.hint ? (
        <p id={`${props.id}-hint`} className="text-sm text-ink-soft">
          {props.hint}
        </p>
      ) : null}
      {props.error ? (
        <p id={`${props.id}-error`} className="text-sm font-semibold text-error">
          {props.error}
        </p>
      ) : null}
    </div>
  );
}

/** A labelled text input; shows the error beside it and keeps what was typed. */
export function Field({
  label,
  name,
  hint,
  refusal,
  className,
  defaultValue,
  ...rest
}: Common & Omit<React.ComponentProps<"input">, "name">) {
  const { id, error, control } = useFieldParts(name, hint, refusal);
  return (
    <Around id={id} label={label} hint={hint} error={error} className={className ?? ""}>
      <input className={CONTROL} defaultValue={refusal?.typed[name] ?? defaultValue} {...rest} {...control} />
    </Around>
  );
}

export function TextArea({
  label,
  name,
  hint,
  refusal,
  className,
  defaultValue,
  ...rest
}: Common & Omit<React.ComponentProps<"textarea">, "name">) {
  const { id, error, control } = useFieldParts(name, hint, refusal);
  return (
    <Around id={id} label={label} hint={hint} error={error} className={className ?? ""}>
      <textarea
        className={CONTROL}
        rows={3}
        defaultValue={refusal?.typed[name] ?? defaultValue}
        {...rest}
        {...control}
      />
    </Around>
  );
}

export type Option = Readonly<{ value: string; label: string }>;

export function Select({
  label,
  name,
  hint,
  refusal,
  className,
  defaultValue,
  options,
  ...rest
}: Common & { options: readonly Option[] } & Omit<React.ComponentProps<"select">, "name">) {
  const { id, error, control } = useFieldParts(name, hint, refusal);
  return (
    <Around id={id} label={label} hint={hint} error={error} className={className ?? ""}>
      <select className={CONTROL} defaultValue={refusal?.typed[name] ?? defaultValue} {...rest} {...control}>
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </Around>
  );
}

/** A checkbox with its sentence; its value is "yes". */
export function Checkbox({
  label,
  name,
  hint,
  refusal,
  className,
  defaultChecked,
  ...rest
}: Common & Omit<React.ComponentProps<"input">, "name">) {
  const { id, error, control } = useFieldParts(name, hint, refusal);
  const checked = refusal ? refusal.typed[name] === "yes" : defaultChecked;
  return (
    <div className={`grid gap-1 ${className ?? ""}`}>
      <div className="flex min-h-11 items-center gap-3">
        <input
          type="checkbox"
          value="yes"
          className="size-5 shrink-0 accent-enamel"
          defaultChecked={checked}
          {...rest}
          {...control}
        />
        <label htmlFor={id}>{label}</label>
      </div>
      {hint ? (
        <p id={`${id}-hint`} className="text-sm text-ink-soft">
          {hint}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} className="text-sm font-semibold text-error">
          {error}
        </p>
      ) : null}
    </div>
  );
}

/** What is wrong with the form as a whole, announced when it comes back; the first field to mend takes the focus. */
export function FormProblem({ refusal }: { refusal: Refusal }) {
  const problem = useRef<HTMLParagraphElement>(null);
  // On a phone the button stands a screen below the first field: without this, a refusal changes nothing in sight.
  useEffect(() => {
    if (!refusal || !problem.current) return;
    const field = problem.current.closest("form")?.querySelector<HTMLElement>("[aria-invalid=true]");
    for (let at = field?.closest("details"); at; at = at.parentElement?.closest("details")) at.open = true;
    const target = field ?? problem.current;
    target.focus({ preventScroll: true });
    target.scrollIntoView({ block: "center" });
  }, [refusal]);
  if (!refusal) return null;
  const whole = refusal.errors[""];
  const count = Object.keys(refusal.errors).filter((name) => name !== "").length;
  return (
    <p
      ref={problem}
      role="alert"
      tabIndex={-1}
      className="rounded border-2 border-error bg-sheet px-4 py-3 font-semibold text-error outline-none"
    >
      {whole ?? (count === 1 ? "One field needs another look." : `${count} fields need another look.`)}
    </p>
  );
}

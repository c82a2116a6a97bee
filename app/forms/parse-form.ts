import type { z } from "zod";

/** A form as checked once: the value, or what is wrong beside which field and what was typed. */
export type FormResult<T> = { ok: true; value: T } | FormRefusal;

export type FormRefusal = Readonly<{
  ok: false;
  /** Field name → sentence. "" is the form as a whole. */
  errors: Record<string, string>;
  typed: Record<string, string>;
}>;

/** Passwords are never handed back to a page. */
const NEVER_BACK = /password/i;

/** Every text field as typed; of a repeated name the last one. Files give their name. */
export function typedFields(form: FormData): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const [name, value] of form) fields[name] = typeof value === "string" ? value : value.name;
  return fields;
}

/** Checks a form against a schema; on failure hands back the sentences and what was typed. */
export function parseForm<S extends z.ZodType>(schema: S, form: FormData): FormResult<z.output<S>> {
  const fields: Record<string, unknown> = {};
  for (const name of new Set(form.keys())) {
    const values = form.getAll(name);
    fields[name] = values.length > 1 ? values : values[0];
  }
  const parsed = schema.safeParse(fields);
  if (parsed.success) return { ok: true, value: parsed.data };
  const errors: Record<string, string> = {};
  for (const issue of parsed.error.issues) errors[String(issue.path[0] ?? "")] ??= issue.message;
  return refuse(form, errors);
}

/** A refusal found after the look at the form: a taken address, a moment outside its chapter. */
export function refuse(form: FormData, errors: Record<string, string>): FormRefusal {
  const typed = typedFields(form);
  for (const name of Object.keys(typed)) if (NEVER_BACK.test(name)) delete typed[name];
  return { ok: false, errors, typed };
}

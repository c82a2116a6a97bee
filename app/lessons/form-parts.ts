import { z } from "zod";
import { readQuantity, readValues, type ReadOptions } from "~/quantities/parse";
import type { Quantity } from "~/quantities/quantity";
import type { TypedValue } from "~/quantities/value";
import type { Hardware, MarkValue } from "./mark";
import { readTimecode } from "./timecode";

// The pieces that the forms of the bench are made of. For the server and tests only: pages import no checking library.

const ONCE = "Type this once.";

/** One line of text; empty when it was not sent. */
export function line(longest = 200) {
  return z.string(ONCE).trim().max(longest, `Keep it under ${longest} characters.`).default("");
}

/** One line that has to be there. */
export function requiredLine(sentence: string, longest = 200) {
  return z.string(sentence).trim().min(1, sentence).max(longest, `Keep it under ${longest} characters.`);
}

/** Several lines of text. */
export function paragraph(longest = 2000) {
  return line(longest);
}

/** One of a closed list; absent means the first. */
export function choice<const T extends readonly [string, ...string[]]>(values: T) {
  return z.enum(values, "Choose one of the list.").default(values[0] as never);
}

/** A checkbox: "yes" or absent. */
export const tick = z
  .literal("yes", ONCE)
  .optional()
  .transform((value) => value === "yes");

/** A sortable id out of a form. */
export const formId = z
  .string("Open the page again.")
  .regex(/^[0-9A-HJKMNP-TV-Z]{26}$/, "Open the page again.");

/** The draft's version that a form was opened with. */
export const draftVersion = z.coerce.number("Open the page again.").int("Open the page again.");

/** A moment like "12:44" in ms of lesson time. */
export const moment = z.string("Type a time, like 12:44.").transform((text, context) => {
  const ms = readTimecode(text);
  if (ms !== null) return ms;
  context.addIssue({
    code: "custom",
    message:
      text.trim() === ""
        ? "Type a time, like 12:44."
        : `“${text.trim().slice(0, 20)}” is not a time. Type it like 12:44.`,
  });
  return z.NEVER;
});

/** A model year or nothing. */
export const modelYear = line(10).transform((text, context) => {
  if (text === "") return null;
  if (/^(?:19|20)\d\d$/.test(text)) return Number(text);
  context.addIssue({ code: "custom", message: "Type a year with four digits, like 2019." });
  return z.NEVER;
});

/** A local date "2026-11-09", or "". */
export const localDate = line(10).transform((text, context) => {
  const date = new Date(`${text}T00:00:00Z`);
  if (text === "" || (/^\d{4}-\d\d-\d\d$/.test(text) && date.toJSON()?.startsWith(text))) return text;
  context.addIssue({ code: "custom", message: "Type a date, like 2026-11-09." });
  return z.NEVER;
});

/** Values as technicians type them, "20 Nm, 40 Nm, +90°"; an empty text gives no rows. */
export function typedValues(options: ReadOptions) {
  return line().transform((text, context): readonly TypedValue[] => {
    if (text === "") return [];
    const read = readValues(text, options);
    if (read.ok) return read.values;
    context.addIssue({ code: "custom", message: read.error });
    return z.NEVER;
  });
}

/** One value with its unit; null for an empty text. */
export function typedQuantity(options: ReadOptions) {
  return line().transform((text, context): Quantity | null => {
    if (text === "") return null;
    const read = readQuantity(text, options);
    if (read.ok) return read.quantity;
    context.addIssue({ code: "custom", message: read.error });
    return z.NEVER;
  });
}

/** A value as read, as a row of a mark. */
export function asRow(value: TypedValue, hardware: Hardware = "either"): MarkValue {
  return {
    role: value.role,
    action: value.action,
    hardware,
    text: value.text,
    dimension: value.quantity?.dimension ?? null,
    unit: value.quantity?.unit ?? null,
    value: value.quantity?.value ?? null,
    number: value.quantity?.si ?? null,
  };
}

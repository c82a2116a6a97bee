/** Why a change of a draft was not made. Nothing was written. */
export type DraftRefusal =
  | Readonly<{
      ok: false;
      reason: "missing";
      noun: "lesson" | "chapter" | "value" | "recording" | "vehicle" | "document";
    }>
  /** The draft changed since the form was opened. */
  | Readonly<{ ok: false; reason: "stale" }>
  /** Field name → sentence; "" is the form as a whole. */
  | Readonly<{ ok: false; reason: "fields"; errors: Readonly<Record<string, string>> }>;

export const STALE =
  "This lesson was changed after you opened this form, by someone else or in another tab. What you typed is kept. Look at the lesson as it is now, then save again.";

export function missing(noun: Extract<DraftRefusal, { reason: "missing" }>["noun"]): DraftRefusal {
  return { ok: false, reason: "missing", noun };
}

export function stale(): DraftRefusal {
  return { ok: false, reason: "stale" };
}

export function refused(errors: Readonly<Record<string, string>>): DraftRefusal {
  return { ok: false, reason: "fields", errors };
}

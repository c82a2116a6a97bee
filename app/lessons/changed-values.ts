import { fingerprintOf } from "./fingerprint";
import { holdsFigure, type Mark } from "./mark";

/** What a value says, without where it was read: a newer edition that says the same changes nothing. */
function saying(mark: Mark): string {
  return fingerprintOf({ ...mark, source: null });
}

/**
 * The values of a revision that say something else than in the one before: a number, role, component, thread,
 * condition or rule differs. Another spelling or unit of the same value is no change, and neither is a new value.
 */
export function changedValues(
  before: readonly Mark[],
  after: readonly Mark[],
): Readonly<{ before: Mark; after: Mark }>[] {
  const former = new Map(before.map((mark) => [mark.id, mark]));
  return after.flatMap((mark) => {
    const old = former.get(mark.id);
    return old && holdsFigure(mark.kind) && saying(old) !== saying(mark)
      ? [{ before: old, after: mark }]
      : [];
  });
}

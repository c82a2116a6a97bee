import type { Mark } from "./mark";

/** "M12 × 1.75" and "m12x1.75" are one thread. */
function sameThread(thread: string): string {
  return thread.toLowerCase().replace(/\s+/g, "").replace(/[×*]/g, "x");
}

/**
 * What a check vouches for, as one string: values, component, thread, condition, rules and source.
 * Two marks with equal fingerprints say the same; another spelling or unit of the same value changes nothing,
 * since only canonical numbers enter (10 significant digits, well inside 1e-9 relative).
 */
export function fingerprintOf(mark: Mark): string {
  const values = mark.values.map((value) => [
    value.role,
    value.action,
    value.hardware,
    value.dimension,
    value.number === null ? null : value.number.toPrecision(10),
  ]);
  return JSON.stringify([
    mark.kind,
    values,
    mark.component.trim().toLowerCase(),
    mark.side,
    mark.position.trim().toLowerCase(),
    mark.applies,
    sameThread(mark.thread),
    mark.propertyClass,
    mark.condition,
    mark.conditionDetail,
    mark.reuse,
    mark.reuseDetail,
    mark.tightenAt,
    mark.runDown,
    mark.checkAgain,
    mark.checkAgainDetail,
    mark.threadDirection,
    mark.wheelLoad,
    mark.sequence,
    mark.tightenedState,
    mark.toolName,
    mark.partNumber,
    mark.partRule,
    mark.quantity,
    mark.product,
    mark.signalWord,
    mark.words,
    mark.replaces,
    mark.source?.citationId ?? null,
  ]);
}

/** The old fastener is scrap: its shape crossed out, and the words. */
export function NewFastener({ words = "NEW FASTENER" }: { words?: string }) {
  return (
    <p className="inline-flex items-center gap-2 font-figure text-xl leading-none font-semibold">
      <svg viewBox="0 0 40 28" className="h-8 w-11 shrink-0" fill="none" aria-hidden="true">
        {/* A bolt from the side: head, washer face, shank with thread. Crossed out on a clear edge. */}
        <path d="M2 5h9v18H2zM11 3h3v22h-3zM14 9h22l2.5 2.5v5L36 19H14z" className="fill-ink" />
        <path d="M30 9v10M34 9v10" className="stroke-sheet" strokeWidth={1.6} />
        <path d="M14 28 30 0" className="stroke-sheet" strokeWidth={6.5} />
        <path d="M14 28 30 0" className="stroke-ink" strokeWidth={3} />
      </svg>
      {words}
    </p>
  );
}

/** A left-hand thread turns the other way; said in capitals, with the turn drawn. */
export function LeftHandThread() {
  return (
    <p className="inline-flex items-center gap-2 font-figure text-xl leading-none font-semibold">
      <svg
        viewBox="0 0 28 28"
        className="h-8 w-11 shrink-0 stroke-ink"
        fill="none"
        strokeWidth={2.4}
        aria-hidden="true"
      >
        {/* Tightens against the clock. */}
        <path d="M6 8a10 10 0 1 1-1 11" />
        <path d="M5.500 1.500 5.500 8.500 12.500 8.500" />
      </svg>
      LEFT-HAND THREAD
    </p>
  );
}

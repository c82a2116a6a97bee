/** The old fastener is scrap: its shape crossed out, and the words. */
export function NewFastener({ words = "NEW FASTENER" }: { words?: string }) {
  return (
    <p className="inline-flex items-center gap-2 font-figure text-xl leading-none font-semibold">
      <svg viewBox="0 0 40 28" className="h-8 w-11 shrink-0" fill="none" aria-hidden="true">
        {/* A bolt from the side: head, washer face, shank with thread. Crossed out on a clear edge. */}
        <path
          d="M3 7h8v14H3zM11 4.500h2.500v19H11zM13.500 9.500H35l2.500 2v5l-2.500 2H13.500z"
          className="fill-ink"
        />
        <path d="M20 9.500v9M24 9.500v9M28 9.500v9M32 9.500v9" className="stroke-sheet" strokeWidth={1.4} />
        <path d="M5 27 35 1" className="stroke-sheet" strokeWidth={7} />
        <path d="M5 27 35 1" className="stroke-ink" strokeWidth={3} />
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
        viewBox="0 0 26 26"
        className="size-7 shrink-0 stroke-ink"
        fill="none"
        strokeWidth={2}
        aria-hidden="true"
      >
        <path d="M21 18.5A9.5 9.5 0 1 1 22 10" />
        <path d="m2.5 17.500.8-6.500 5 4" transform="rotate(-12 5 14)" />
      </svg>
      LEFT-HAND THREAD
    </p>
  );
}

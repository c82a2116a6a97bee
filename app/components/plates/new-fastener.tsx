/** The old fastener is scrap: its shape crossed out, and the words. */
export function NewFastener({ words = "NEW FASTENER" }: { words?: string }) {
  return (
    <p className="inline-flex items-center gap-2 font-figure text-xl leading-none font-semibold">
      <svg
        viewBox="0 0 30 26"
        className="h-7 w-8 shrink-0 stroke-ink"
        fill="none"
        strokeWidth={1.8}
        aria-hidden="true"
      >
        {/* A bolt from the side: head, washer face, shank with thread. */}
        <path d="M3 8h7v10H3zM10 6.5v13M10 10h15l2 1.5v3L25 16H10M14 10v6M17 10v6M20 10v6M23 10v6" />
        <path d="M3 24 27 2" strokeWidth={3} />
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

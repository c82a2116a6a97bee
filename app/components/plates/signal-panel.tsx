import type { SignalWord } from "~/lessons/mark";

const BANDS: Readonly<Record<SignalWord, string>> = {
  DANGER: "bg-signal-danger text-signal-sheet",
  WARNING: "bg-signal-warning text-signal-frame",
  CAUTION: "bg-signal-caution text-signal-frame",
  NOTICE: "bg-signal-notice text-signal-sheet italic",
};

/** The safety alert symbol stands for harm to people only: NOTICE goes without it (ANSI Z535.4). */
function AlertTriangle() {
  return (
    <svg viewBox="0 0 24 21" className="h-5 w-6 shrink-0 fill-current" aria-hidden="true">
      <path fillRule="evenodd" d="M12 0 24 21H0zm-1.300 6.500v7.200h2.600V6.500zm0 9v2.700h2.600v-2.700z" />
    </svg>
  );
}

/** A signal panel in its black frame: the only place where the safety colours stand. */
export function SignalPanel({
  word,
  words,
  reason = "",
  small = false,
  foot,
}: {
  word: SignalWord;
  words: string;
  reason?: string;
  /** Over the picture. */
  small?: boolean;
  foot?: React.ReactNode;
}) {
  return (
    <article
      aria-label={word}
      className="overflow-hidden rounded border-[3px] border-signal-frame bg-signal-sheet text-signal-frame outline outline-1 outline-line-strong"
    >
      <p
        className={`flex items-center gap-2 border-b-[3px] border-signal-frame px-3 py-1 font-figure leading-tight font-semibold ${small ? "text-lg" : "text-2xl"} ${BANDS[word]}`}
      >
        {word === "NOTICE" ? null : <AlertTriangle />}
        {word}
      </p>
      <div className="signal-in flex flex-wrap items-end justify-between gap-x-6 px-3 py-2">
        <div>
          <p className={`leading-snug font-semibold ${small ? "text-sm" : "text-lg"}`}>{words}</p>
          {reason === "" ? null : <p>{reason}</p>}
        </div>
        {foot === undefined ? null : <div className="flex flex-wrap gap-x-5">{foot}</div>}
      </div>
    </article>
  );
}

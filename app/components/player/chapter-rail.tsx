import { PHASE_WORDS } from "~/lessons/mark-words";
import { type Step, stepAt } from "~/lessons/steps";
import { formatTimecode } from "~/lessons/timecode";
import { useJump, usePlayer } from "./player-context";

/** P R I N V: the fourth letter of the alphabet of phases is N, because I is taken by inspect. */
export const PHASE_LETTERS = { prepare: "P", remove: "R", inspect: "I", install: "N", verify: "V" } as const;

/** The chapters in proportion to their length; the one that plays is marked. Phase by letter and word. */
export function ChapterRail({ steps, durationMs }: { steps: readonly Step[]; durationMs: number }) {
  const jump = useJump();
  const current = usePlayer((state) => stepAt(steps, state.momentMs));
  const part = usePlayer((state) => Math.round((state.momentMs / Math.max(1, durationMs)) * 500) / 5);
  return (
    <nav aria-label="Chapters" className="relative bg-graphite px-2 pt-1 pb-2">
      <ol className="flex gap-1 overflow-x-auto">
        {steps.map((step, index) => (
          <li
            key={step.chapter.id}
            className="min-w-13 basis-0"
            style={{ flexGrow: Math.max(1, step.endMs - step.startMs) }}
          >
            <button
              type="button"
              aria-current={index === current ? "step" : undefined}
              onClick={() => jump({ toMs: step.startMs, play: true })}
              className="block min-h-12 w-full rounded-sm bg-graphite-soft px-1.5 py-1 text-left text-xs text-on-graphite aria-[current=step]:bg-on-graphite aria-[current=step]:font-semibold aria-[current=step]:text-graphite"
            >
              <span className="flex items-baseline justify-between gap-1">
                <span className="font-figure text-base font-semibold">{step.n}</span>
                <span aria-hidden="true" className="rounded-sm border border-current px-1 leading-4">
                  {PHASE_LETTERS[step.chapter.phase]}
                </span>
              </span>
              <span className="block truncate">{step.chapter.title}</span>
              <span className="sr-only">
                , {PHASE_WORDS[step.chapter.phase]}, from {formatTimecode(step.startMs)}
              </span>
            </button>
          </li>
        ))}
      </ol>
      <div aria-hidden="true" className="mt-1 h-1 rounded bg-graphite-soft">
        <div className="h-1 rounded bg-brand" style={{ width: `${part}%` }} />
      </div>
    </nav>
  );
}

import { Link } from "react-router";
import type { LearnerMark } from "~/lessons/learner-lesson.server";
import { checkWords, momentDay, sourceWords, type PlateView } from "./plate-words";

/** How the metal looks: solid, hatched before its check, struck when it was stopped. */
export type Metal = "solid" | "hatched" | "struck";

const METAL: Readonly<Record<Metal, string>> = {
  solid: "plate",
  hatched: "plate plate-hatched",
  struck: "plate plate-struck",
};

/** Where the value was read and who stands for it. Stands on every plate that holds a figure. */
export function SourceLine({ of: { mark, showing } }: { of: LearnerMark }) {
  const noted = mark.kind === "tool" && mark.source === null;
  return (
    <p className="text-sm text-ink-soft">
      <span className="block">{noted ? "Size noted from the recording" : sourceWords(mark.source)}</span>
      {showing === "plain" ? null : <span className="block">{checkWords(mark, showing)}</span>}
    </p>
  );
}

/** Open doubts of others beside the value: who, when, why. */
export function Doubts({ of: { doubts }, view }: { of: LearnerMark; view: PlateView }) {
  const warnings = doubts.filter((doubt) => !doubt.stops);
  return warnings.map((doubt) => (
    <p key={doubt.doubtId} className="border-2 border-ink px-3 py-2 text-sm">
      <strong className="block">Somebody says that this looks wrong. Ask before you use it.</strong>
      {doubt.by}, {momentDay(doubt.at, view.timeZone)}: {doubt.reason}
    </p>
  ));
}

/** Shout stop: two taps from any plate. */
export function LooksWrong({ of: { mark }, name }: { of: LearnerMark; name: string }) {
  return (
    <Link
      to={`/lessons/${mark.lessonId}/values/${mark.id}/wrong`}
      className="no-print inline-flex min-h-11 items-center text-sm font-semibold lg:min-h-8"
    >
      This looks wrong<span className="sr-only">: {name}</span>
    </Link>
  );
}

/** The riveted plate around a value, with its foot: source, check, doubts and the way to say stop. */
export function PlateFrame({
  of,
  view,
  name,
  metal,
  current = false,
  ruled = false,
  lead,
  foot,
  children,
}: {
  of: LearnerMark;
  view: PlateView;
  /** What the plate is about, for people who hear it. */
  name: string;
  metal: Metal;
  current?: boolean;
  /** With a ruler's edge. */
  ruled?: boolean;
  /** Component and figure: on a wide plate they stand left of the facts. */
  lead: React.ReactNode;
  foot?: React.ReactNode;
  children?: React.ReactNode;
}) {
  return (
    <article
      aria-label={name}
      className={METAL[metal]}
      data-current={current ? "yes" : undefined}
      {...(current ? { "aria-current": "step" as const } : {})}
    >
      {ruled ? <div className="plate-ruler" aria-hidden="true" /> : null}
      <div className="plate-in">
        <div className="plate-lead">{lead}</div>
        <div className="plate-facts">
          {children}
          <Doubts of={of} view={view} />
          <SourceLine of={of} />
        </div>
        <div className="plate-foot">
          {foot}
          <LooksWrong of={of} name={name} />
        </div>
      </div>
    </article>
  );
}

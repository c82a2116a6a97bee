/** What is known of one person and one lesson. Revision numbers are of the lesson. */
export type SkillInput = Readonly<{
  /** Fraction of the newest revision's clips that was played, 0 to 1. */
  coverage: number;
  /** The shop's fraction that counts as seen. */
  watchThreshold: number;
  /** The newest revision in which a value that is asked or set changed; the first one, when none did. */
  changedAt: number;
  /** Revisions whose quiz was passed. */
  passedAt: readonly number[];
  /** Sign-offs that stand (revoked ones left out). Level "with-help" is on record but shows nothing. */
  signOffs: readonly Readonly<{
    revision: number;
    level: "with-help" | "on-own" | "can-teach";
    shownOn: string;
  }>[];
  /** On how many different days a job has to be shown. */
  shownJobs: number;
}>;

/**
 * How far a person is with a lesson. `shownCount` are the different days on which the job was shown without help.
 * `changedSince`: what was answered or shown rests on a value that has changed, and nothing newer stands for it.
 */
export type SkillState = Readonly<{
  seen: boolean;
  coverage: number;
  answered: boolean;
  shown: boolean;
  shownCount: number;
  changedSince: boolean;
}>;

export const NO_SKILL: SkillState = {
  seen: false,
  coverage: 0,
  answered: false,
  shown: false,
  shownCount: 0,
  changedSince: false,
};

// A player reports whole seconds; a hair under the threshold by rounding is the threshold.
const HAIR = 1e-6;

/**
 * The three steps of a skill. Watching alone never makes one: a change of values asks only those again who answered
 * or showed the old ones. "Answered" needs a passed quiz no older than the last changed value.
 */
export function skillState(input: SkillInput): SkillState {
  const alone = input.signOffs.filter(({ level }) => level !== "with-help");
  const shownCount = new Set(alone.map(({ shownOn }) => shownOn)).size;
  const answered = input.passedAt.some((revision) => revision >= input.changedAt);
  const shownNew = alone.some(({ revision }) => revision >= input.changedAt);
  const restsOnOld =
    input.passedAt.some((revision) => revision < input.changedAt) ||
    alone.some(({ revision }) => revision < input.changedAt);
  return {
    seen: input.coverage > 0 && input.coverage + HAIR >= input.watchThreshold,
    coverage: input.coverage,
    answered,
    shown: shownCount >= Math.max(1, input.shownJobs),
    shownCount,
    changedSince: restsOnOld && !answered && !shownNew,
  };
}

import type { SkillState } from "./skill-state";

/** How far oneself is with a lesson. The watched part is told to the person alone, never in a list of people. */
export function progressWords(skill: SkillState): string {
  const reached = [skill.seen && "seen", skill.answered && "answered", skill.shown && "shown"].filter(
    Boolean,
  );
  if (skill.shownCount > 0 && !skill.shown)
    reached.push(skill.shownCount === 1 ? "shown once" : `shown on ${skill.shownCount} days`);
  if (!skill.seen && skill.coverage >= 0.01) reached.unshift(`${Math.floor(skill.coverage * 100)} % watched`);
  const words = reached.length === 0 ? "not started" : reached.join(", ");
  return skill.changedSince ? `${words}; changed since` : words;
}

import { expect, test } from "vitest";
import { skillState, type SkillInput } from "./skill-state";

const START: SkillInput = {
  coverage: 0,
  watchThreshold: 0.9,
  changedAt: 1,
  passedAt: [],
  signOffs: [],
  shownJobs: 2,
};
const state = (input: Partial<SkillInput>) => skillState({ ...START, ...input });
const signOff = (shownOn: string, revision = 1, level: "with-help" | "on-own" | "can-teach" = "on-own") => ({
  revision,
  level,
  shownOn,
});

test("the three slots fill each for itself", () => {
  expect(state({})).toEqual({
    seen: false,
    coverage: 0,
    answered: false,
    shown: false,
    shownCount: 0,
    changedSince: false,
  });
  expect(state({ coverage: 0.9 }).seen).toBe(true);
  expect(state({ coverage: 0.89 }).seen).toBe(false);
  expect(state({ passedAt: [1] }).answered).toBe(true);
});

test("a threshold of nothing is not reached by not watching", () => {
  expect(state({ coverage: 0, watchThreshold: 0 }).seen).toBe(false);
  expect(state({ coverage: 0.01, watchThreshold: 0 }).seen).toBe(true);
});

test("a job has to be shown on different days, without help", () => {
  expect(state({ signOffs: [signOff("2026-11-02")] })).toMatchObject({ shown: false, shownCount: 1 });
  expect(state({ signOffs: [signOff("2026-11-02"), signOff("2026-11-02")] })).toMatchObject({
    shown: false,
    shownCount: 1,
  });
  expect(state({ signOffs: [signOff("2026-11-02"), signOff("2026-11-03", 1, "can-teach")] })).toMatchObject({
    shown: true,
    shownCount: 2,
  });
  expect(
    state({ signOffs: [signOff("2026-11-02", 1, "with-help"), signOff("2026-11-03", 1, "with-help")] }),
  ).toMatchObject({ shown: false, shownCount: 0 });
});

test("a changed value asks those again who answered or showed the old one", () => {
  expect(state({ changedAt: 3, passedAt: [2] })).toMatchObject({ answered: false, changedSince: true });
  expect(state({ changedAt: 3, signOffs: [signOff("2026-11-02", 2)] }).changedSince).toBe(true);
  expect(state({ changedAt: 3, passedAt: [2, 3] })).toMatchObject({ answered: true, changedSince: false });
  expect(state({ changedAt: 3, passedAt: [2], signOffs: [signOff("2026-11-20", 3)] }).changedSince).toBe(
    false,
  );
});

test("who has only watched is not asked again, and a revision without changed values asks nobody", () => {
  expect(state({ changedAt: 3, coverage: 1 })).toMatchObject({ seen: true, changedSince: false });
  expect(state({ changedAt: 1, passedAt: [1] })).toMatchObject({ answered: true, changedSince: false });
});

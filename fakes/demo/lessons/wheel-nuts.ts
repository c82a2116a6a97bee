import type { DemoLesson } from "../demo-lesson";

export const wheelNuts: DemoLesson = {
  job: "wheel-nuts",
  title: "Wheel nuts: order, stages, on the ground",
  summary: "For any vehicle. The value itself is the maker's: look it up for this car and this wheel.",
  system: "wheels",
  vehicles: [],
  by: "Dario",
  publishedDaysAgo: 30,
  marks: [
    {
      kind: "caution",
      at: 9_650,
      word: "WARNING",
      words: "Nut and seat must match: cone, ball or flat.",
      reason: "On the wrong seat a nut works loose and the wheel comes off.",
    },
    {
      kind: "caution",
      at: 19_000,
      word: "WARNING",
      words: "A torn thread or a stretched stud is replaced.",
      reason: "It breaks on the road.",
    },
    {
      kind: "caution",
      at: 26_000,
      word: "WARNING",
      words: "The car stands on its stands or lift while a wheel is off, never on a jack alone.",
    },
    {
      kind: "measure",
      at: 56_760,
      component: "First stage of the maker's value",
      value: "50 %",
      source: ["card", "line 7"],
    },
    {
      kind: "caution",
      at: 65_510,
      word: "NOTICE",
      words: "Stop at the first click. No impact gun to finish.",
    },
    {
      kind: "caution",
      at: 73_930,
      word: "WARNING",
      words: "Check again after the distance that the maker gives, with the wheels cold.",
      reason: "Paint and rust settle, and the clamp is gone.",
    },
  ],
};

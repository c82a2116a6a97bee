import type { DemoLesson } from "../demo-lesson";

export const clickWrench: DemoLesson = {
  job: "click-wrench",
  title: "Using a click wrench",
  summary: "Pick it, read it, pull it once, put it away.",
  system: "workshop",
  vehicles: [],
  by: "Marta",
  publishedDaysAgo: 45,
  marks: [
    {
      kind: "tool",
      at: 6_140,
      tool: "click wrench",
      component: "Torque wrench",
      note: "A range that puts the value between about 20 % and 100 % of full scale: a common shop rule.",
    },
    {
      kind: "measure",
      at: 10_590,
      component: "Torque wrench range used",
      value: "20 to 100 %",
      source: ["card", "line 2"],
    },
    {
      kind: "caution",
      at: 25_750,
      word: "WARNING",
      words: "Read the scale twice, the unit first.",
      reason:
        "Foot-pounds for inch-pounds is twelve times too tight; the other way round the joint is not clamped.",
    },
    {
      kind: "caution",
      at: 44_930,
      word: "NOTICE",
      words: "No impact gun and no torque stick as a final tightening.",
    },
    {
      kind: "caution",
      at: 58_370,
      word: "NOTICE",
      words: "Stop at the first click.",
      reason: "A second pull adds torque.",
    },
    {
      kind: "caution",
      at: 66_810,
      word: "WARNING",
      words: "Never loosen with it and never put a pipe on it.",
      reason: "The mechanism is damaged and lets go.",
    },
    {
      kind: "caution",
      at: 79_180,
      word: "NOTICE",
      words: "Dropped means out of use until it has been tested.",
    },
  ],
};

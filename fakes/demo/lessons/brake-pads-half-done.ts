import type { DemoLesson } from "../demo-lesson";

/** Stays on the bench: a chapter without a phase, values without a source, nothing checked. */
export const brakePads: DemoLesson = {
  job: "brake-pads-half-done",
  title: "Front brake pads",
  summary: "Pads out, measure, new pads in.",
  system: "brakes",
  position: "front",
  vehicles: ["Merrow Drift 2.4"],
  by: "Dario",
  publishedDaysAgo: null,
  phaseless: ["New pads in"],
  marks: [
    {
      kind: "caution",
      at: 6_730,
      word: "WARNING",
      words: "No compressed air on brake dust. Wet it down or use the vacuum.",
      reason: "The dust harms the lungs.",
    },
    {
      kind: "caution",
      at: 15_780,
      word: "NOTICE",
      words: "Hang the caliper from a hook, never on its hose.",
    },
    {
      kind: "measure",
      at: 24_190,
      component: "Front brake pad lining",
      value: "min 3.0 mm",
      limit: true,
      source: ["brakes", "page 14"],
      unchecked: true,
    },
    {
      kind: "measure",
      at: 28_760,
      component: "Front brake pad lining",
      value: "2.6 mm",
      measured: true,
      unchecked: true,
    },
    {
      kind: "measure",
      at: 32_390,
      component: "Front brake disc thickness",
      value: "min 22.0 mm",
      limit: true,
      source: ["brakes", "page 15"],
      unchecked: true,
    },
    { kind: "torque", at: 51_630, component: "Caliper slide pin bolts", value: "27 Nm", unchecked: true },
  ],
};

import type { DemoLesson } from "../demo-lesson";
import { brakePads } from "./brake-pads-half-done";
import { clickWrench } from "./click-wrench";
import { fossSwayBarLinks } from "./foss-sway-bar-links";
import { oilDrainFilter } from "./oil-drain-filter";
import { serpentineBelt } from "./serpentine-belt";
import { swayBarLinks } from "./sway-bar-links";
import { thermostat } from "./thermostat";
import { wheelNuts } from "./wheel-nuts";

export const DEMO_LESSONS: readonly DemoLesson[] = [
  swayBarLinks,
  serpentineBelt,
  thermostat,
  oilDrainFilter,
  fossSwayBarLinks,
  clickWrench,
  wheelNuts,
  brakePads,
];

/** The one lesson of the second shop: the same technique, that shop's own record. */
export const NORTHGATE_LESSON: DemoLesson = { ...clickWrench, publishedDaysAgo: 10 };

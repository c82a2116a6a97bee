export const LEVELS = ["with-help", "on-own", "can-teach"] as const;
export type Level = (typeof LEVELS)[number];

export const LEVEL_WORDS: Record<Level, string> = {
  "with-help": "with help",
  "on-own": "on their own",
  "can-teach": "can teach it",
};

/** "afterwards" can be chosen, so that the form can say why it cannot sign off. */
export const PRESENCES = ["all-the-time", "critical-steps", "afterwards"] as const;
export type Presence = (typeof PRESENCES)[number];

export const PRESENCE_WORDS: Record<Presence, string> = {
  "all-the-time": "I was there all the time",
  "critical-steps": "I was there at the critical steps",
  afterwards: "I saw it only afterwards",
};

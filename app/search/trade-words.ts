// Words of the trade as the search reads them. Common practice in US and UK shops, no source.

/** What a person wants to know, as far as the words tell. */
export type Intent = "torque" | "size" | "measure" | "pressure" | "capacity" | "part" | "caution" | "supply";

const list = (words: string) => words.split(/\s+/).filter(Boolean);

/** One spelling for words that two countries write differently, and for short forms. */
export const SPELLINGS: Readonly<Record<string, string>> = {
  tyre: "tire",
  aluminium: "aluminum",
  litre: "liter",
  metre: "meter",
  millimetre: "millimeter",
  centre: "center",
  colour: "color",
  calliper: "caliper",
  disc: "rotor",
  disk: "rotor",
  spanner: "wrench",
  allen: "hex",
  nearside: "left",
  offside: "right",
  petrol: "gasoline",
  gearbox: "transmission",
  bonnet: "hood",
  gaiter: "boot",
  lug: "wheel",
  antiroll: "sway",
  stabilizer: "sway",
  stabiliser: "sway",
  stab: "sway",
  bushing: "bush",
  clamp: "clip",
  motor: "engine",
  cooling: "coolant",
  top: "upper",
  bottom: "lower",
  fixing: "mounting",
  retaining: "mounting",
  securing: "mounting",
  blocker: "locker",
  trq: "torque",
  temp: "temperature",
  stat: "thermostat",
  qty: "quantity",
  no: "number",
  thru: "through",
};

/** What an intent goes by. Of several that a query names, the first here counts: a hex bolt's torque is a torque. */
export const INTENT_WORDS: Readonly<Record<Intent, readonly string[]>> = {
  torque: list("torque tight tighten tightening tightness nm ftlb lbft tq newton"),
  part: list("part number reuse reusable reused replace"),
  caution: list("caution danger dangerous warning careful hazard risk"),
  pressure: list("pressure psi kpa inflate"),
  capacity: list("capacity quart liter pint gallon volume"),
  measure: list(
    "gap clearance thickness diameter wear limit minimum maximum min max play depth length runout resistance voltage temperature interval lift rating thread",
  ),
  size: list("size socket wrench tool hex key bit driver ratchet torx crowfoot allen"),
  supply: list("grease lubricant locker sealant cleaner lube grade viscosity weight type"),
};

/** Phrases that settle an intent before single words do. */
export const INTENT_PHRASES: readonly (readonly [RegExp, Intent])[] = [
  [/\btorque (?:wrench|spanner)(?! setting)\b/i, "size"],
  [/\bhow tight\b/i, "torque"],
  [
    /\b(?:what|which)(?: (?:type|kind|sort|grade) of)? (?:oil|coolant|antifreeze|fluid|grease|sealant|lubricant)\b(?! (?:pressure|filter|capacity|level|temperature))/i,
    "supply",
  ],
  [/\bthread ?lock(?:er)?\b|\bthread ?blocker\b/i, "supply"],
];

/** "How much" and "how many" ask for a capacity where nothing else is named. */
export const HOW_MUCH = /\bhow (?:much|many)\b/i;

/** An intent that is sure of what it wants: where none of it is found, nothing else of the part answers. */
export const SURE_WORDS: Readonly<Partial<Record<Intent, readonly string[]>>> = {
  torque: INTENT_WORDS.torque,
  size: list("socket wrench ratchet"),
};

/** Words that order the answers and need not be found in them. */
export const SOFT_WORDS: ReadonlySet<string> = new Set([
  ...INTENT_WORDS.torque,
  ...INTENT_WORDS.size,
  ...INTENT_WORDS.part,
  ...INTENT_WORDS.caution,
  ...list(
    "psi kpa inflate capacity volume quart liter pint gallon minimum maximum min max limit wear grade viscosity weight type",
  ),
  ...list("mounting assembly hardware fastener kit new"),
  // A place that the value does not name is no contradiction; the opposite is (see OPPOSITES).
  ...list("front rear left right"),
]);

/** What excludes each other: who asks for the rear is not answered with the front. */
export const OPPOSITES: readonly (readonly [readonly string[], readonly string[]])[] = [
  [["front"], ["rear", "back"]],
  [["left"], ["right"]],
  [["upper"], ["lower"]],
  [
    ["inner", "inside"],
    ["outer", "outside"],
  ],
  [["intake", "inlet"], ["exhaust"]],
];

/** What narrows a value to less than the plain thing. Where nobody asked for it, the plain one comes first. */
export const NARROWER: ReadonlySet<string> = new Set(
  list("first second third stage initial partial old wrong used full fully drained recheck test"),
);

/** Words of a sentence that say nothing about what is looked for. */
export const CHAT: ReadonlySet<string> = new Set(
  list(`
    a about after again all am an and any anybody anyone are around as at be been before being between but by can cannot
    car could correct currently did do does doing done during each either every exactly factory figure find fit fits
    fitting fitted for from get gets give given go goes going good got had has have having help hi hold holds how i if in
    install installed installing into is it its job just know let like long look looking lot make many mate may me more
    much must my need needed needs not now of off ok okay on one only onto or our out over per please proper properly put
    quick really recommended refit refitting remove removed removing says set setting settings should show so some
    someone somebody spec specification specified specs still take taken takes tell than thanks that the their them then
    there these they thing this those to together too under undo up us use used uses using value values vehicle want way
    we were what whats when where which while who why will with without would yes you your
    car's it's what's change changing changed check checked checking loosen loosening come comes really thin thick far
    often soon
  `),
);

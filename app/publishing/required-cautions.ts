import type { System } from "~/lessons/draft";

/** A danger that a lesson has to name, when its work brings it up. */
export type RequiredCaution = Readonly<{
  key: string;
  /** What the missing caution is about, for the sentence: "lifting and support". */
  topic: string;
  /** Why it is asked for. */
  reason: string;
  /** True: a lesson without it is not published. False: the instructor is reminded. */
  stops: boolean;
  /** Lessons of these systems always bring it up … */
  systems: readonly System[];
  /** … unless the title says that they do not. */
  unless: RegExp | null;
  /** Words in titles, chapters, tools, parts and components that bring it up. */
  words: RegExp;
  /** Words of a caution that cover it. */
  covered: RegExp;
  /** Only a caution in this phase counts. */
  phase: "verify" | null;
}>;

/**
 * The list that a master technician asked for. Where a public rule stands behind a row it is named; the rest is common
 * practice without a source. Neither waiting times nor distances are given: those belong to the vehicle's own source.
 */
export const REQUIRED_CAUTIONS: readonly RequiredCaution[] = [
  {
    key: "lifting",
    topic: "lifting and support",
    // 29 CFR 1926.305(d)(1)(i): once raised, block or secure at once.
    reason: "A car that is raised has to stand on something that cannot sink or tip.",
    stops: true,
    systems: ["suspension", "brakes", "wheels"],
    unless: /\b(?:master cylinder|brake pedal|brake light|pedal switch|booster|servo)\b/i,
    words:
      /\b(?:jack(?:s|ed|ing)?(?: up| stand| point)|floor jack|trolley jack|axle stands?|two[- ]post|four[- ]post|hoist|on (?:the|a) (?:lift|ramp)|lift points?|raise (?:the |both |one )?(?:car|vehicle|truck|front|rear|wheels?)|lift (?:the |both |one )?(?:car|vehicle|truck|front|rear|wheels?)|under the (?:car|vehicle|truck)|drain plug|sump plug|oil pan|exhaust|subframe|cradle|drive ?shaft|axle nut|gearbox|transmission|tie rod|track rod|steering rack|ball joint)\b/i,
    covered: /\b(?:stands?|lift|hoist|ramp|locks|supports?|supported|chocks?|jack)\b/i,
    phase: null,
  },
  {
    key: "springs",
    topic: "springs under load",
    reason: "A compressed spring that gets free strikes with the weight of the car.",
    stops: true,
    systems: [],
    unless: null,
    words:
      /\b(?:coil springs?|road springs?|spring compressors?|spring seats?|strut (?:top )?mounts?|top mounts?|strut assembly|torsion bars?|leaf springs?|air springs?|valve springs?|brake shoe(?:s)?|return springs?)\b/i,
    covered: /\bsprings?\b/i,
    phase: null,
  },
  {
    key: "airbags",
    topic: "airbags and belt tensioners",
    reason: "A module that fires beside a hand or a head maims.",
    stops: true,
    systems: ["restraint"],
    unless: null,
    words:
      /\b(?:air ?bags?|srs|clock ?springs?|steering wheel (?:removal|off)|remov\w* the steering wheel|pretensioners?|seat ?belts?|belt tensioner charge)\b/i,
    covered: /\b(?:air ?bags?|srs|pretensioners?|belt tensioners?|restraint)\b/i,
    phase: null,
  },
  {
    key: "high-voltage",
    topic: "high voltage",
    reason: "The cables stay dangerous after the ignition is off; only who holds the permit opens them.",
    stops: true,
    systems: ["high-voltage"],
    unless: null,
    words:
      /\b(?:high[- ]voltage|traction battery|hybrid battery|drive battery|inverter|service (?:plug|disconnect)|orange cables?)\b/i,
    covered: /\b(?:high[- ]voltage|orange|service (?:plug|disconnect)|isolat\w+|de-?energi[sz]\w+|volts?)\b/i,
    phase: null,
  },
  {
    key: "fuel",
    topic: "fuel",
    reason: "Fuel under pressure sprays, and its vapour finds any spark.",
    stops: true,
    systems: ["fuel"],
    unless: null,
    words:
      /\b(?:fuel (?:lines?|pipes?|rails?|hoses?|pumps?|filters?|tanks?|injectors?|pressure|sender)|injectors?|petrol|gasoline)\b/i,
    covered: /\b(?:fuel|petrol|gasoline|diesel|vapou?r)\b/i,
    phase: null,
  },
  {
    key: "refrigerant",
    topic: "refrigerant",
    // 40 CFR part 82 subpart B (Clean Air Act section 609): recover first, permit needed, also for topping off.
    reason: "Refrigerant freezes skin and eyes, and may only be handled by who holds the permit for it.",
    stops: true,
    systems: ["air-conditioning"],
    unless: /\b(?:cabin (?:air )?filter|pollen filter|blower)\b/i,
    words:
      /\b(?:refrigerant|(?:ac|a\/c|air[- ]con(?:ditioning)?) (?:compressor|lines?|hoses?|condenser)|condenser|evaporator|r-?1234yf|r-?134a)\b/i,
    covered: /\b(?:refrigerant|recover\w*|r-?1234yf|r-?134a)\b/i,
    phase: null,
  },
  {
    key: "brake-dust",
    topic: "brake and clutch dust",
    // 29 CFR 1910.1001 appendix F: enclosed vacuum or low-pressure wet cleaning, no dry brushing.
    reason: "Dust of linings is not for lungs: no compressed air, no dry brush.",
    stops: true,
    systems: ["brakes"],
    unless:
      /\b(?:fluid|bleed\w*|master cylinder|brake pedal|brake light|pedal switch|booster|servo|brake (?:hoses?|lines?|pipes?))\b/i,
    words:
      /\b(?:brake pads?|disc pads?|brake shoes?|brake drums?|brake (?:rotors?|discs?|disks?)|clutch (?:discs?|disks?|plates?|kit))\b/i,
    covered: /\bdust\b/i,
    phase: null,
  },
  {
    key: "hot-work",
    topic: "hot work",
    // 29 CFR 1910.252(a): combustibles away, somebody watches during the work and after it.
    reason: "Heat and sparks set fire to what stands near, also after the work is done.",
    stops: true,
    systems: [],
    unless: null,
    words:
      /\b(?:weld(?:s|ed|er|ing)?|torch(?:es)?|blow ?lamp|oxy[- ]?acetylene|induction heater|heat gun|angle grinder|cut-?off wheel|cutting disc|plasma cutter)\b/i,
    covered: /\b(?:fire|flames?|sparks?|burns?|heat|hot|torch|weld\w*|extinguisher)\b/i,
    phase: null,
  },
  {
    key: "brake-pedal",
    topic: "“Before the wheels turn: pump the brake pedal”",
    reason: "After brake work the first push can go to the floor, and the car does not stop.",
    stops: true,
    systems: ["brakes"],
    unless: null,
    words: /(?!)/,
    covered: /\bpump\w*\b.*\bpedal\b|\bpedal\b.*\bpump\w*\b/is,
    phase: "verify",
  },
  {
    key: "hot-coolant",
    topic: "hot coolant",
    reason: "A system that is opened hot boils over and scalds.",
    stops: false,
    systems: ["cooling"],
    unless: null,
    words:
      /\b(?:radiator cap|pressure cap|coolant (?:hoses?|drain)|thermostat|water pump|coolant pump|heater core)\b/i,
    covered: /\b(?:hot|cool(?:s|ed)? down|cold|scalds?|boils?|pressure)\b/i,
    phase: null,
  },
  {
    key: "hot-exhaust",
    topic: "hot exhaust",
    reason: "Exhaust and particulate filter stay hot long after the engine is off.",
    stops: false,
    systems: [],
    unless: null,
    words:
      /\b(?:exhaust (?:manifold|pipe|flange|clamp)|down ?pipe|dpf|particulate filter|regeneration|catalytic converter|turbocharger)\b/i,
    covered: /\b(?:hot|burns?|cool(?:s|ed)? down|cold)\b/i,
    phase: null,
  },
  {
    key: "clock-spring",
    topic: "centring the steering wheel's clock spring",
    reason: "Wound off centre it tears at full lock and takes the airbag's wiring with it.",
    stops: false,
    systems: [],
    unless: null,
    words: /\b(?:clock ?springs?|spiral cable|slip ring|steering column|remov\w* the steering wheel)\b/i,
    covered: /\b(?:clock ?springs?|spiral cable|slip ring|cent(?:re|er|red|ered|ring|ering))\b/i,
    phase: null,
  },
  {
    key: "electric-park-brake",
    topic: "service mode of the electric park brake",
    reason: "Its motor closes by itself, on fingers too.",
    stops: false,
    systems: [],
    unless: null,
    words: /\b(?:electr(?:ic|onic) park(?:ing)?[- ]?brake|epb)\b/i,
    covered: /\b(?:service mode|maintenance mode|park(?:ing)?[- ]?brake|epb)\b/i,
    phase: null,
  },
  {
    key: "hybrid-start",
    topic: "silent start of hybrid and electric cars",
    reason: "The engine or the car can start by itself without a sound.",
    stops: false,
    systems: [],
    unless: null,
    words: /\b(?:hybrid|plug-?in|electric vehicle|ev)\b/i,
    covered: /\b(?:silent\w*|start by itself|key (?:out|away|off)|ready mode|switched off)\b/i,
    phase: null,
  },
  {
    key: "glass",
    topic: "glass",
    reason: "Cut or cracked glass leaves splinters, and laminated glass holds under tension.",
    stops: false,
    systems: [],
    unless: null,
    words: /\b(?:windshield|windscreen|rear window|laminated glass)\b/i,
    covered: /\b(?:glass|splinters?|gloves|glasses|goggles)\b/i,
    phase: null,
  },
];

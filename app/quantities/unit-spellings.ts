import { dimensionOf, type Dimension, type Unit } from "./units";

/** Words that could be two units: the question to ask, and the units that an answer may be. */
export type AmbiguousUnit = Readonly<{ ask: string; energy?: true; us?: Unit }>;

type Meaning = Unit | AmbiguousUnit;

function isAmbiguous(meaning: Meaning): meaning is AmbiguousUnit {
  return typeof meaning === "object";
}

// Joiners (space . - · * ×) are taken out before look-up, so "ft. lbs", "ft-lbs" and "ft·lbs" are all "ftlbs".
const SPELLINGS: Partial<Record<Unit, string>> = {
  "N·m": "nm nms newtonmeter newtonmeters newtonmetre newtonmetres nmeter nmeters nmetre nmetres",
  "lbf·ft":
    "ftlb ftlbs ftlbf ftlbsf lbft lbsft lbfft lbffeet lbfeet lbsfeet footpound footpounds feetpound feetpounds footlb footlbs footlbf feetlb feetlbs ftpound ftpounds poundfoot poundfeet poundsfoot poundsfeet poundft poundsft lbfoot lbsfoot footpoundforce footpoundsforce poundforcefoot poundforcefeet poundsforcefeet ft/lb ft/lbs foot/pound foot/pounds lb/ft lbs/ft lbf/ft ft# #ft",
  "lbf·in":
    "inlb inlbs inlbf inlbsf lbin lbsin lbfin lbsfin inchpound inchpounds inchespounds inchlb inchlbs inchlbf inpound inpounds poundinch poundinches poundsinch poundsinches poundin poundsin lbinch lbsinch lbinches lbfinch poundforceinch inchpoundforce in/lb in/lbs inch/pound inch/pounds in# #in",
  "ozf·in": "ozin inoz ozfin inozf ounceinch ounceinches inchounce inchounces inounce inounces ozinch inchoz",
  "kgf·m":
    "kgm kgfm mkg mkgf kpm mkp kgmeter kgmeters kgmetre kgmetres kilogrammeter kilogrammeters kilogrammetre kilogrammetres kilogramforcemeter kilogramforcemetre meterkilogram meterkilograms metrekilogram metrekilograms meterkilo metrekilo",
  "kgf·cm": "kgcm kgfcm cmkg cmkgf kpcm kilogramcentimeter kilogramcentimetre",
  "daN·m": "danm mdan decanewtonmeter decanewtonmetre decanewtonmeters decanewtonmetres",
  "cN·m": "cnm centinewtonmeter centinewtonmetre centinewtonmeters centinewtonmetres",

  mm: "mm mms millimeter millimeters millimetre millimetres",
  cm: "cm cms centimeter centimeters centimetre centimetres",
  m: "m meter meters metre metres",
  µm: "µm um micron microns micrometer micrometers micrometre micrometres",
  km: "km kms kilometer kilometers kilometre kilometres",
  in: "in ins inch inches \" ''",
  ft: "ft foot feet",
  thou: "thou thous thousandth thousandths",
  mi: "mi mile miles",

  deg: "° deg degs degree degrees °deg",
  turn: "turn turns rev revs revolution revolutions",
  arcmin: "arcmin arcmins arcminute arcminutes minutesofarc",

  kPa: "kpa kilopascal kilopascals",
  Pa: "pa pascal pascals",
  bar: "bar bars barg",
  psi: "psi psig lb/in2 lbs/in2 lbf/in2 lb/in² lbf/in² poundspersquareinch",
  MPa: "mpa megapascal megapascals",
  mbar: "mbar mbars millibar millibars mb",
  hPa: "hpa hectopascal hectopascals",
  "kgf/cm²": "kg/cm2 kg/cm² kgf/cm2 kgf/cm² kp/cm2 kp/cm² ksc kgcm2 kgcm² kgfcm2 kgfcm²",
  inHg: 'inhg inchesofmercury inchofmercury inchesmercury "hg',
  mmHg: "mmhg millimetersofmercury millimetresofmercury",
  "N/mm²": "n/mm2 n/mm²",

  "m³": "m³ m3",
  L: "l litre litres liter liters ltr ltrs lt",
  mL: "ml mls millilitre millilitres milliliter milliliters cc ccm cm3 cm³",

  "°C": "°c c degc degreec degreesc celsius centigrade degcelsius degreescelsius degreecelsius degreescentigrade °celsius ℃",
  "°F": "°f f degf degreef degreesf fahrenheit degfahrenheit degreesfahrenheit degreefahrenheit °fahrenheit ℉",
  K: "kelvin",
  "Δ°C": "δ°c δc",
  "Δ°F": "δ°f δf",
  ΔK: "δk",

  g: "g gram grams gramme grammes gr gm gms",
  kg: "kg kgs kilo kilos kilogram kilograms kilogramme kilogrammes",
  lb: "lb lbs pound pounds #",
  oz: "oz ozs ounce ounces ozav",
  N: "n newton newtons",
  kN: "kn kilonewton kilonewtons",
  lbf: "lbf lbsf poundforce poundsforce",
  kgf: "kgf kp",

  V: "v volt volts vdc vac",
  mV: "mv millivolt millivolts",
  A: "a amp amps ampere amperes",
  mA: "ma milliamp milliamps",
  Ω: "ω ohm ohms",
  mΩ: "milliohm milliohms",
  kΩ: "kω kohm kohms kiloohm kiloohms kilohm kilohms",
  MΩ: "megohm megohms megaohm megaohms",
  s: "s sec secs second seconds",
  min: "min mins minute minutes",
  h: "h hr hrs hour hours",
  "m/s": "m/s mps",
  "km/h": "km/h kmh kph kmph kmhr km/hr kilometersperhour kilometresperhour kmperhour",
  mph: "mph mi/h milesperhour mileperhour",
  rpm: "rpm r/min rev/min revs/min revolutionsperminute revsperminute",
  "%": "% percent pct",
};

const MIL: AmbiguousUnit = { ask: "“mil” can be millimetres or thousandths of an inch: mm or thou?" };
const ENERGY: AmbiguousUnit = {
  ask: "A joule is energy, not torque: lbf·ft, lbf·in or N·m?",
  energy: true,
};

// Looked up as typed, before upper and lower case are thrown together.
const AS_TYPED: Readonly<Record<string, Meaning>> = {
  mΩ: "mΩ",
  MΩ: "MΩ",
  mohm: "mΩ",
  Mohm: "MΩ",
  mOhm: "mΩ",
  MOhm: "MΩ",
  MOHM: "MΩ",
  K: "K",
  ΔK: "ΔK",
  MV: { ask: "MV: mV or V?" },
  mPa: { ask: "mPa: MPa or kPa?" },
  mbar: "mbar",
};

const MEANINGS: ReadonlyMap<string, Meaning> = buildMeanings();

function buildMeanings(): Map<string, Meaning> {
  const map = new Map<string, Meaning>();
  for (const [unit, spellings] of Object.entries(SPELLINGS) as [Unit, string][])
    for (const spelling of spellings.split(" ")) map.set(spelling, unit);
  for (const word of ["mil", "mils"]) map.set(word, MIL);
  for (const word of ["j", "kj", "joule", "joules", "kilojoule", "kilojoules"]) map.set(word, ENERGY);
  map.set("mω", { ask: "Is that mΩ or MΩ?" });
  const volumes = {
    qt: "qt qts quart quarts",
    pt: "pt pts pint pints",
    gal: "gal gals gallon gallons",
    "fl oz": "floz flozs fluidounce fluidounces flounce flounces",
  };
  for (const [symbol, spellings] of Object.entries(volumes)) {
    const [us, imperial] = [`US ${symbol}`, `imp ${symbol}`] as [Unit, Unit];
    const ask: AmbiguousUnit = {
      ask: `“${symbol}” differs by a fifth: US ${symbol} or imperial ${symbol}?`,
      us,
    };
    for (const spelling of spellings.split(" ")) {
      map.set(spelling, ask);
      for (const country of ["us", "usa", "american", "usliquid"])
        for (const key of [country + spelling, spelling + country]) map.set(key, us);
      for (const country of ["imp", "imperial", "uk", "british"])
        for (const key of [country + spelling, spelling + country]) map.set(key, imperial);
    }
  }
  return map;
}

/** What a unit word without joiners means, or null when it is none. */
export function meaningOf(key: string): Meaning | null {
  if (Object.hasOwn(AS_TYPED, key)) return AS_TYPED[key] ?? null;
  return MEANINGS.get(key.toLowerCase()) ?? null;
}

/** A unit word found in normal text. */
export type UnitFound = Readonly<{ meaning: Meaning; word: string; start: number; end: number }>;

export { isAmbiguous };

const isLetter = (c: string | undefined): boolean =>
  c !== undefined && ((c >= "a" && c <= "z") || (c >= "A" && c <= "Z") || "µΩΔ℃℉".includes(c));
// "m in" is no minute and "m a" no milliampere: these units are one word.
const ONE_WORD: ReadonlySet<Dimension> = new Set(["length", "time", "mass", "voltage", "current"]);

function mayBeSplit(meaning: Meaning): boolean {
  return isAmbiguous(meaning) || !ONE_WORD.has(dimensionOf(meaning));
}

const JOINERS = " .-·*×_";
const MOST_WORDS = 5;

/**
 * The longest unit spelling that starts at i of normal text (after spaces), or null.
 * At most five words are looked at, so the time does not grow with the text.
 */
export function readUnitAt(s: string, i: number): UnitFound | null {
  let start = i;
  while (s[start] === " ") start++;
  let [pos, key, words] = [start, "", 0];
  let best: UnitFound | null = null;
  while (words < MOST_WORDS) {
    let end = pos;
    const first = s[pos];
    if (isLetter(first)) {
      while (isLetter(s[end])) end++;
      // cm², mm³ and the like; "cm2" only behind a slash or for a volume, never "19 mm 2".
      const power = s[end];
      if (power === "²" || power === "³") end++;
      else if ((power === "2" || power === "3") && /^(?:[cm]?m|in)$/i.test(s.slice(pos, end))) {
        const after = s[end + 1];
        if (after === undefined || !/[\d./,-]/.test(after)) end++;
      }
    } else if (first === "°" || first === "%" || first === "#") end++;
    else if (first === '"') end++;
    else if (first === "'" && s[pos + 1] === "'") end += 2;
    else break;
    key += s.slice(pos, end);
    words++;
    const meaning = meaningOf(key);
    if (meaning && (words === 1 || mayBeSplit(meaning)))
      best = { meaning, word: s.slice(start, end), start, end };
    let next = end;
    while (next < end + 4 && JOINERS.includes(s[next] ?? "\n")) next++;
    if (s[next] === "/") {
      key += "/";
      next++;
      if (s[next] === " ") next++;
    }
    pos = next;
  }
  if (best && /[A-Za-z]$/.test(best.word) && isLetter(s[best.end])) return null;
  return best;
}

const QUESTIONS: Readonly<Record<Dimension, string>> = {
  torque: "lbf·ft, lbf·in or N·m?",
  length: "mm or in?",
  angle: "degrees or turns?",
  pressure: "psi, kPa or bar?",
  stress: "MPa?",
  volume: "L, US qt or imperial qt?",
  temperature: "°C or °F?",
  "temperature-difference": "°C or °F?",
  mass: "g, kg, oz or lb?",
  force: "N, kN or lbf?",
  voltage: "V or mV?",
  current: "A or mA?",
  resistance: "Ω, kΩ or MΩ?",
  time: "s, min or h?",
  speed: "km/h or mph?",
  "rotation-speed": "rpm?",
  ratio: "%?",
};

/** Which units to offer when a value of a dimension was typed without one. */
export function unitQuestion(dimension: Dimension): string {
  return QUESTIONS[dimension];
}

const SHORT_OF_TORQUE: Partial<Record<Unit, string>> = {
  lb: "ft-lb or in-lb?",
  lbf: "ft-lb or in-lb?",
  ft: "ft-lb?",
  in: "in-lb?",
  oz: "ozf·in?",
  kg: "kgf·m or kgf·cm?",
  kgf: "kgf·m or kgf·cm?",
  N: "N·m?",
  m: "N·m or kgf·m?",
};

const NAMES: Readonly<Record<Dimension, string>> = {
  torque: "a torque",
  length: "a length",
  angle: "an angle",
  pressure: "a pressure",
  stress: "a stress",
  volume: "a volume",
  temperature: "a temperature",
  "temperature-difference": "a temperature difference",
  mass: "a mass",
  force: "a force",
  voltage: "a voltage",
  current: "a current",
  resistance: "a resistance",
  time: "a time",
  speed: "a speed",
  "rotation-speed": "a speed of rotation",
  ratio: "a percentage",
};

/** A dimension as a technician reads it: "a torque". */
export function nameOf(dimension: Dimension): string {
  return NAMES[dimension];
}

/** What to say when a unit of another dimension was typed: "65 lb is no torque: ft-lb or in-lb?" */
export function wrongDimension(typed: string, unit: Unit, is: Dimension, wanted: Dimension): string {
  if (wanted === "torque" && SHORT_OF_TORQUE[unit])
    return `${typed} is not a torque yet: ${SHORT_OF_TORQUE[unit]}`;
  return `${typed} is ${NAMES[is]}, not ${NAMES[wanted]}: ${QUESTIONS[wanted]}`;
}

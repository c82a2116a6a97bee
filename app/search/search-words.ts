/** One spelling for words that two countries write differently, and for trade short forms. Common practice, no source. */
const SPELLINGS: Readonly<Record<string, string>> = {
  tyre: "tire",
  aluminium: "aluminum",
  litre: "liter",
  metre: "meter",
  centre: "center",
  colour: "color",
  disc: "rotor",
  disk: "rotor",
  spanner: "wrench",
  allen: "hex",
  nearside: "left",
  offside: "right",
  petrol: "gasoline",
  gearbox: "transmission",
  bonnet: "hood",
  lug: "wheel",
  lugs: "wheel",
  antiroll: "sway",
  stabilizer: "sway",
  stabiliser: "sway",
  bushing: "bush",
  trq: "torque",
};

/** Words that are often run together. */
const COMPOUNDS: Readonly<Record<string, string>> = {
  swaybar: "sway bar",
  antirollbar: "anti roll bar",
  droplink: "drop link",
  wheelnut: "wheel nut",
  lugnut: "lug nut",
  sparkplug: "spark plug",
  glowplug: "glow plug",
  drainplug: "drain plug",
  sumpplug: "sump plug",
  balljoint: "ball joint",
  tierod: "tie rod",
  trackrod: "track rod",
  brakepad: "brake pad",
  oilfilter: "oil filter",
  handbrake: "hand brake",
  driveshaft: "drive shaft",
};

const KEEP_S = /(?:ss|us|is|abs|gas|chassis)$/;

function singular(word: string): string {
  if (word.length < 4 || KEEP_S.test(word)) return word;
  if (word.endsWith("ies")) return `${word.slice(0, -3)}y`;
  if (/(?:ch|sh|x)es$/.test(word)) return word.slice(0, -2);
  return word.endsWith("s") ? word.slice(0, -1) : word;
}

/** A word as the index and the query both see it. */
export function searchWord(word: string): string {
  const plain = singular(word.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase());
  return SPELLINGS[plain] ?? plain;
}

/** The words of a text: letters and digits, nothing else. At most 60, so that a hostile text costs nothing. */
export function searchWords(text: string): string[] {
  const found = text.slice(0, 2000).match(/[\p{L}\p{N}]+(?:[.,][0-9]+)?/gu) ?? [];
  return found.slice(0, 60).flatMap((word) => {
    const compound = COMPOUNDS[word.toLowerCase()] ?? COMPOUNDS[word.toLowerCase().replace(/s$/, "")];
    return compound ? compound.split(" ").map(searchWord) : searchWord(word);
  });
}

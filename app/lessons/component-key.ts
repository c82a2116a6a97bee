import { COMPONENTS, type Component } from "./components";

/** Words that change nothing about which part is meant. */
const NOISE = new Set(
  "a an the of to at on in for with from and or my your its it is this that assembly assy lh rh left right nearside offside driver passenger side".split(
    " ",
  ),
);

/** One spelling for the words that stand around a component. */
const PLAIN: Readonly<Record<string, string>> = {
  top: "upper",
  bottom: "lower",
  fr: "front",
  rr: "rear",
  back: "rear",
  rearward: "rear",
  frontward: "front",
  mount: "mounting",
  fixing: "mounting",
  retaining: "mounting",
  securing: "mounting",
  fitting: "mounting",
  jam: "lock",
  locking: "lock",
  setscrew: "bolt",
  capscrew: "bolt",
  bushing: "bush",
};

/** Words of the vocabulary that end in s without being a plural. */
const SINGULAR_S = new Set([
  "bellows",
  "abs",
  "gas",
  "bus",
  "chassis",
  "glass",
  "brass",
  "cross",
  "dual-mass",
]);

function singular(word: string): string {
  if (word.length < 4 || SINGULAR_S.has(word) || word.endsWith("ss")) return word;
  if (word.endsWith("ies")) return `${word.slice(0, -3)}y`;
  if (/(?:ch|sh|x)es$/.test(word)) return word.slice(0, -2);
  return word.endsWith("s") ? word.slice(0, -1) : word;
}

function wordsOf(text: string): string[] {
  return text
    .normalize("NFKD")
    .toLowerCase()
    .replace(/[’']s\b/g, "")
    .replace(/\block(?=nuts?\b)/g, "lock ")
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== "")
    .map(singular);
}

type Name = Readonly<{ words: readonly string[]; component: Component }>;

// Longest first: "sway bar link" is read before "sway bar".
const NAMES: readonly Name[] = COMPONENTS.flatMap((component) =>
  component.names.map((name): Name => ({ words: wordsOf(name), component })),
).toSorted((a, b) => b.words.length - a.words.length || b.words.join(" ").length - a.words.join(" ").length);

const NAMES_BY_FIRST = new Map<string, Name[]>();
for (const name of NAMES) {
  const first = name.words[0] ?? "";
  NAMES_BY_FIRST.set(first, [...(NAMES_BY_FIRST.get(first) ?? []), name]);
}

function nameAt(words: readonly string[], at: number): Name | undefined {
  return NAMES_BY_FIRST.get(words[at] ?? "")?.find((name) =>
    name.words.every((word, n) => words[at + n] === word),
  );
}

type Read = Readonly<{ components: readonly Component[]; rest: readonly string[] }>;

function read(text: string): Read {
  const words = wordsOf(text);
  const components: Component[] = [];
  const rest: string[] = [];
  for (let at = 0; at < words.length;) {
    const name = nameAt(words, at);
    if (name) {
      components.push(name.component);
      at += name.words.length;
    } else {
      const word = words[at] ?? "";
      if (!NOISE.has(word)) rest.push(PLAIN[word] ?? word);
      at += 1;
    }
  }
  return { components, rest };
}

function distinct(words: readonly string[]): string[] {
  return [...new Set(words)].toSorted();
}

/**
 * One key for every way to name the same thing: "Lower drop link nut", "Nut, sway-bar link, bottom" and
 * `componentKey("sway bar link nut", "lower")` are equal. Components first, then what else was said, each in
 * alphabetical order: "sway-bar-link+lower+nut". Left and right do not enter, a mark keeps its side apart.
 * Empty text gives "".
 */
export function componentKey(words: string, position = ""): string {
  const { components, rest } = read(`${words} ${position}`);
  return [...distinct(components.map((component) => component.key)), ...distinct(rest)].join("+");
}

/** The components of the vocabulary that are named in these words, in the order of the words. */
export function componentsIn(words: string): Component[] {
  return [...new Set(read(words).components)];
}

/** Joints without rubber: an arm's ball joint, or a bolt into the knuckle, is not twisted by the height. */
const RIGID = new Set(["ball-joint", "knuckle", "wheel-hub", "wheel-bearing"]);

/** True when these words name a rubber-bushed suspension joint: the height at which it is tightened must be known. */
export function isBushedJoint(words: string): boolean {
  const named = componentsIn(words);
  return named.some((component) => component.bushed) && !named.some((component) => RIGID.has(component.key));
}

/** Every other name of the components in these words, for search: "drop link" also finds "sway bar link". */
export function otherNames(words: string): string[] {
  return [...new Set(componentsIn(words).flatMap((component) => component.names))];
}

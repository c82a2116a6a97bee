// What people at the car type, over the four narrated jobs of tests/corpus/dev (invented narrations, our own), and the
// answer that has to come first. Written from the annotations alone. Other names, short forms and the usual slips of
// the finger are common practice, no source.

/**
 * `component`: words that the component of the first answer must have. `texts`: its value as written, one of these;
 * where a query leaves open which one is meant, both may stand first. `in`: words of the lesson's title.
 */
export type Asked = Readonly<{
  query: string;
  kind: string;
  component: string;
  texts: readonly string[];
  in: string;
}>;

const LINKS = "sway bar links";
const BELT = "Serpentine belt";
const STAT = "Thermostat";
const OIL = "Engine oil";

const rows = (
  list: readonly (readonly [query: string, kind: string, component: string, texts: string, lesson: string])[],
): Asked[] =>
  list.map(([query, kind, component, texts, lesson]) => ({
    query,
    kind,
    component,
    texts: texts === "" ? [] : texts.split(" | "),
    in: lesson,
  }));

export const ANSWERED: Readonly<Record<string, readonly Asked[]>> = {
  "as the job names it": rows([
    ["sway bar link torque", "torque", "sway bar link nut", "43 lbf·ft | 47 lbf·ft", LINKS],
    ["sway bar link upper nut torque", "torque", "sway bar link upper nut", "43 lbf·ft", LINKS],
    ["sway bar link lower nut torque", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["wheel nuts first stage torque", "torque", "wheel nuts first stage", "45 lbf·ft", LINKS],
    ["wheel nuts final torque", "torque", "wheel nuts final", "92 lbf·ft", LINKS],
    ["tensioner mounting bolts torque", "torque", "tensioner mounting bolts", "33 lbf·ft", BELT],
    ["idler pulley bolt torque", "torque", "idler pulley bolt", "22 lbf·ft + 90 deg | 22 lbf·ft + 90 °", BELT],
    ["splash shield screws torque", "torque", "splash shield screws", "18 lbf·in", BELT],
    ["thermostat housing bolts torque", "torque", "housing bolts final", "10 N·m", STAT],
    ["housing bolts first stage", "torque", "housing bolts first stage", "4 N·m", STAT],
    ["top hose clip torque", "torque", "top hose clip", "3 N·m", STAT],
    ["drain plug torque", "torque", "drain plug", "18 lbf·ft", OIL],
    ["skid plate bolts torque", "torque", "skid plate bolts", "80 lbf·in", OIL],
    ["front tire pressure", "measure", "front tire pressure", "35 psi", LINKS],
    ["sway bar diameter", "measure", "sway bar diameter", "23 mm", LINKS],
    ["belt rib depth limit", "measure", "belt rib depth", "min 1.7 mm", BELT],
    ["pulley misalignment", "measure", "pulley misalignment", "max 1 mm", BELT],
    ["charging voltage", "measure", "charging voltage", "13.8 V - 14.8 V", BELT],
    ["serpentine belt length", "measure", "serpentine belt length", "2110 mm | 83 in", BELT],
    ["thermostat opening temperature", "measure", "thermostat opening temperature", "88 °C", STAT],
    ["thermostat fully open temperature", "measure", "thermostat fully open temperature", "102 °C", STAT],
    ["coolant capacity", "measure", "coolant capacity", "5.2 L", STAT],
    ["housing face flatness", "measure", "housing face flatness", "max 0.1 mm", STAT],
    ["bleed screw turns", "measure", "bleed screw", "2 turn", STAT],
    ["coolant cap rating", "measure", "coolant cap rating", "1.4 bar", STAT],
    ["engine oil capacity", "measure", "engine oil capacity", "8 US qt", OIL],
    ["oil pressure hot idle", "measure", "oil pressure hot idle", "min 20 psi", OIL],
    ["oil pressure cold idle", "measure", "oil pressure cold idle", "42 psi", OIL],
    ["oil change interval", "measure", "oil change interval", "5000 mi", OIL],
    ["serpentine belt part number", "part", "serpentine belt", "6R-2110", BELT],
    ["sway bar link part number", "part", "sway bar link", "HL-7031-40", LINKS],
    ["oil filter part number", "part", "oil filter", "HL-2209", OIL],
  ]),
  "by another name": rows([
    ["anti-roll bar drop link torque", "torque", "sway bar link nut", "43 lbf·ft | 47 lbf·ft", LINKS],
    ["anti roll bar link lower nut", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["drop link lower nut", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["stabilizer link upper nut torque", "torque", "sway bar link upper nut", "43 lbf·ft", LINKS],
    ["stabiliser bar link bottom nut torque", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["ARB link torque", "torque", "sway bar link nut", "43 lbf·ft | 47 lbf·ft", LINKS],
    ["end link top nut torque", "torque", "sway bar link upper nut", "43 lbf·ft", LINKS],
    ["anti-roll bar diameter", "measure", "sway bar diameter", "23 mm", LINKS],
    ["sump plug torque", "torque", "drain plug", "18 lbf·ft", OIL],
    ["oil drain plug torque", "torque", "drain plug", "18 lbf·ft", OIL],
    ["sump plug spanner size", "tool", "drain plug", "15 mm", OIL],
    ["front tyre pressure", "measure", "front tire pressure", "35 psi", LINKS],
    ["aux belt length", "measure", "serpentine belt length", "2110 mm | 83 in", BELT],
    ["drive belt part number", "part", "serpentine belt", "6R-2110", BELT],
    ["accessory belt length", "measure", "serpentine belt length", "2110 mm | 83 in", BELT],
    ["antifreeze capacity", "measure", "coolant capacity", "5.2 L", STAT],
    ["thermostat housing fixing bolts torque", "torque", "housing bolts final", "10 N·m", STAT],
    ["motor oil capacity", "measure", "engine oil capacity", "8 US qt", OIL],
    ["trq drain plug", "torque", "drain plug", "18 lbf·ft", OIL],
    ["hose clamp nut driver", "tool", "hose clips", "7 mm", STAT],
  ]),
  "misspelt or run together": rows([
    ["swaybar link torque", "torque", "sway bar link nut", "43 lbf·ft | 47 lbf·ft", LINKS],
    ["sway bar lnik torque", "torque", "sway bar link nut", "43 lbf·ft | 47 lbf·ft", LINKS],
    ["stabalizer link lower nut torque", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["antirollbar link upper nut", "torque", "sway bar link upper nut", "43 lbf·ft", LINKS],
    ["drainplug torque", "torque", "drain plug", "18 lbf·ft", OIL],
    ["drian plug torqe", "torque", "drain plug", "18 lbf·ft", OIL],
    ["sumpplug tourque", "torque", "drain plug", "18 lbf·ft", OIL],
    ["tensionner bolt torque", "torque", "tensioner mounting bolts", "33 lbf·ft", BELT],
    ["idelr pulley torque", "torque", "idler pulley bolt", "22 lbf·ft + 90 deg | 22 lbf·ft + 90 °", BELT],
    ["serpintine belt length", "measure", "serpentine belt length", "2110 mm | 83 in", BELT],
    ["thermostadt housing torque", "torque", "housing bolts final", "10 N·m", STAT],
    ["termostat opening temprature", "measure", "thermostat opening temperature", "88 °C", STAT],
    ["coolent capacity", "measure", "coolant capacity", "5.2 L", STAT],
    ["front tire presure", "measure", "front tire pressure", "35 psi", LINKS],
    ["skidplate bolts torque", "torque", "skid plate bolts", "80 lbf·in", OIL],
  ]),
  "as a question": rows([
    ["how tight is the drain plug", "torque", "drain plug", "18 lbf·ft", OIL],
    ["how tight should the tensioner bolts be?", "torque", "tensioner mounting bolts", "33 lbf·ft", BELT],
    ["what do I torque the skid plate bolts to", "torque", "skid plate bolts", "80 lbf·in", OIL],
    ["what size socket for the lower nut", "tool", "lower link nut", "17 mm", LINKS],
    ["what size socket for the lower link nut", "tool", "lower link nut", "17 mm", LINKS],
    ["what spanner for the upper link nut", "tool", "upper link nut", "15 mm", LINKS],
    ["what size hex key holds the link stud", "tool", "sway bar link stud", "5 mm", LINKS],
    ["what size socket for the drain plug", "tool", "drain plug", "15 mm", OIL],
    ["which bit for the splash shield screws", "tool", "splash shield screws", "T30", BELT],
    ["what size socket fits the idler pulley bolt", "tool", "idler pulley bolt", "16 mm", BELT],
    ["which socket for the undertray screws", "tool", "undertray screws", "8 mm", STAT],
    ["what size are the skid plate bolts", "tool", "skid plate bolts", "10 mm", OIL],
    ["how much oil does it take", "measure", "engine oil capacity", "8 US qt", OIL],
    ["how many quarts of oil", "measure", "engine oil capacity", "8 US qt", OIL],
    ["how much coolant does it hold", "measure", "coolant capacity", "5.2 L", STAT],
    ["how many turns do I open the bleed screw", "measure", "bleed screw", "2 turn", STAT],
    ["when does the thermostat open", "measure", "thermostat opening temperature", "88 °C", STAT],
    ["what pressure for the front tires", "measure", "front tire pressure", "35 psi", LINKS],
    ["how thin can the belt ribs get", "measure", "belt rib depth", "min 1.7 mm", BELT],
    ["which thread locker on the tensioner bolts", "supply", "tensioner mounting bolts", "", BELT],
    ["do I reuse the idler pulley bolt", "part", "idler pulley bolt", "", BELT],
    ["is coolant poisonous", "caution", "coolant", "", STAT],
    ["can I use an impact gun on the link nut", "caution", "impact gun link nut", "", LINKS],
  ]),
  "by its value": rows([
    ["43 ft lb", "torque", "sway bar link upper nut", "43 lbf·ft", LINKS],
    ["58 Nm", "torque", "sway bar link upper nut", "43 lbf·ft", LINKS],
    ["47 lbf·ft", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["64 newton metres", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["45 Nm tensioner", "torque", "tensioner mounting bolts", "33 lbf·ft", BELT],
    ["24 Nm", "torque", "drain plug", "18 lbf·ft", OIL],
    // Who has the figure that was taken back gets the right one.
    ["12 Nm housing bolts", "torque", "housing bolts final", "10 N·m", STAT],
    ["18 ft-lb drain plug", "torque", "drain plug", "18 lbf·ft", OIL],
    ["125 Nm", "torque", "wheel nuts final", "92 lbf·ft", LINKS],
    ["136 Nm", "torque", "wheel lug nuts", "100 lbf·ft", BELT],
    ["9 Nm", "torque", "skid plate bolts", "80 lbf·in", OIL],
    ["89 inch pounds", "torque", "housing bolts final", "10 N·m", STAT],
    ["10 mm", "tool", "bolts", "10 mm", ""],
    ["10mm socket", "tool", "bolts", "10 mm", ""],
    ["17 mm socket", "tool", "lower link nut", "17 mm", LINKS],
    ["15 mm wrench", "tool", "", "15 mm", ""],
    ["19 mm", "tool", "wheel nuts", "19 mm", LINKS],
    ["13/16 socket", "tool", "wheel lug nuts", "0.8125 in", BELT],
    ["T30", "tool", "splash shield screws", "T30", BELT],
    ["35 psi", "measure", "front tire pressure", "35 psi", LINKS],
    ["2.4 bar", "measure", "front tire pressure", "35 psi", LINKS],
    ["1.1 bar", "measure", "pressure test", "1.1 bar", STAT],
    ["88 °C", "measure", "thermostat opening temperature", "88 °C", STAT],
    ["88 degrees thermostat", "measure", "thermostat opening temperature", "88 °C", STAT],
    ["7.6 litres", "measure", "engine oil capacity", "8 US qt", OIL],
    ["5.2 l coolant", "measure", "coolant capacity", "5.2 L", STAT],
    ["6R-2110", "part", "serpentine belt", "6R-2110", BELT],
    ["HL-7031-40", "part", "sway bar link", "HL-7031-40", LINKS],
    ["HL2209", "part", "oil filter", "HL-2209", OIL],
  ]),
  "side and place": rows([
    ["left link play", "measure", "left link play", "1.8 mm", LINKS],
    ["right link ball stud play", "measure", "right link ball stud play", "0.9 mm", LINKS],
    ["bottom link nut torque", "torque", "sway bar link lower nut", "47 lbf·ft", LINKS],
    ["lower housing bolt length", "measure", "lower housing bolt length", "45 mm", STAT],
  ]),
  "by a beginning": rows([
    ["tensioner mount", "torque", "tensioner mounting bolts", "33 lbf·ft", BELT],
    ["charging volt", "measure", "charging voltage", "13.8 V - 14.8 V", BELT],
    ["drain plug tor", "torque", "drain plug", "18 lbf·ft", OIL],
  ]),
  "for a named vehicle": rows([
    ["Meridian wheel nut torque", "torque", "wheel nuts final", "92 lbf·ft", LINKS],
    ["lug nut torque Merrow Drift", "torque", "wheel lug nuts", "100 lbf·ft", BELT],
    ["2015 Merrow Drift wheel nuts how tight", "torque", "wheel lug nuts", "100 lbf·ft", BELT],
    ["Tessaly Pike 5.3 oil capacity", "measure", "engine oil capacity", "8 US qt", OIL],
  ]),
};

/** Nothing in the library answers these; a guess would be worse than none. */
export const UNANSWERED: readonly string[] = [
  // Parts that no lesson has.
  "glow plug torque",
  "head bolt torque",
  "cylinder head bolt torque",
  "brake caliper bracket bolt torque",
  "spark plug gap",
  "spark plug torque",
  "rear shock absorber bolt torque",
  "transmission fluid capacity",
  "crankshaft pulley bolt torque",
  "water pump bolt torque",
  "alternator bolt torque",
  "lower control arm bolt torque",
  "ball joint nut torque",
  "axle nut torque",
  "flywheel bolt torque",
  "valve cover bolts torque",
  "exhaust manifold nuts torque",
  "fuel filter torque",
  "brake disc minimum thickness",
  "what size socket for the oxygen sensor",
  "how much gearbox oil",
  // The part is there, what is asked is not.
  "coolant temperature sensor torque",
  "serpentine belt torque",
  // The other end of the car.
  "rear tire pressure",
  "rear sway bar link torque",
  // Another vehicle.
  "Aldren Foss drain plug torque",
  "Meridian drain plug torque",
  "oil capacity Cassel Wren",
  "2019 Merrow Drift lug nut torque",
  // Figures that were said and taken back, or were never right.
  "74 lbf·ft",
  "150 lbf·ft",
  "65 lbf·ft",
];

/** With this vehicle chosen, the first answer, or none. */
export const FOR_VEHICLE: readonly Readonly<{ model: string; query: string; text: string | null }>[] = [
  { model: "Meridian", query: "wheel nut torque", text: "92 lbf·ft" },
  { model: "Drift", query: "wheel nut torque", text: "100 lbf·ft" },
  { model: "Wren", query: "wheel nut torque", text: null },
  { model: "Pike", query: "drain plug torque", text: "18 lbf·ft" },
  { model: "Drift", query: "drain plug torque", text: null },
  { model: "Wren", query: "coolant capacity", text: "5.2 L" },
  { model: "Pike", query: "coolant capacity", text: null },
  { model: "Wren", query: "10 mm socket", text: "10 mm" },
  { model: "Drift", query: "what size socket for the drain plug", text: null },
];

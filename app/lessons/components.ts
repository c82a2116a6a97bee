/** The systems that components are listed under. */
export type ComponentGroup =
  | "steering"
  | "suspension"
  | "brakes"
  | "wheels"
  | "engine"
  | "cooling"
  | "fuel"
  | "electrical"
  | "driveline"
  | "restraint"
  | "air-conditioning"
  | "body";

/**
 * One component by every name it goes by in US and UK shops; the first is what we print.
 * `bushed`: carried in rubber that winds up when it is tightened hanging, so the height at which it is
 * tightened has to be known.
 */
export type Component = Readonly<{
  key: string;
  group: ComponentGroup;
  names: readonly string[];
  bushed: boolean;
}>;

function listed(group: ComponentGroup, entries: Readonly<Record<string, readonly string[]>>, bushed = false) {
  return Object.entries(entries).map(([key, names]): Component => ({ key, group, names, bushed }));
}

/**
 * The built-in vocabulary. Trade usage in US and UK English (common practice, no source).
 * Names are lower case and singular; plurals, hyphens and word order are dealt with by `componentKey`.
 */
export const COMPONENTS: readonly Component[] = [
  ...listed("steering", {
    "tie-rod-end": [
      "outer tie rod end",
      "tie rod end",
      "outer tie rod",
      "track rod end",
      "outer track rod end",
    ],
    "inner-tie-rod": ["inner tie rod", "inner tie rod end", "inner track rod", "axial rod", "rack end"],
    "tie-rod-lock-nut": [
      "tie rod lock nut",
      "tie rod jam nut",
      "track rod lock nut",
      "track rod end lock nut",
    ],
    "steering-rack": ["steering rack", "rack and pinion", "steering gear"],
    "steering-box": ["steering box", "steering gearbox"],
    "steering-wheel": ["steering wheel"],
    "steering-column": ["steering column"],
    "steering-shaft": ["intermediate shaft", "steering shaft", "steering coupling", "lower steering shaft"],
    "power-steering-pump": ["power steering pump"],
    "power-steering-fluid": ["power steering fluid"],
    "pitman-arm": ["pitman arm", "drop arm"],
    "idler-arm": ["idler arm"],
    "drag-link": ["drag link", "center link", "centre link"],
    "clock-spring": ["clock spring", "clockspring", "spiral cable", "slip ring"],
    "steering-boot": ["steering rack boot", "rack boot", "steering gaiter", "rack gaiter", "bellows boot"],
  }),
  ...listed("suspension", {
    "sway-bar-link": [
      "sway bar link",
      "sway bar end link",
      "stabilizer link",
      "stabilizer bar link",
      "stabiliser link",
      "stabiliser bar link",
      "anti roll bar link",
      "anti roll bar drop link",
      "antiroll bar link",
      "roll bar link",
      "arb link",
      "drop link",
      "end link",
    ],
    "sway-bar": [
      "sway bar",
      "stabilizer bar",
      "stabiliser bar",
      "anti roll bar",
      "antiroll bar",
      "anti sway bar",
      "roll bar",
      "stabilizer",
      "stabiliser",
    ],
    "ball-joint": ["ball joint"],
    knuckle: ["steering knuckle", "knuckle", "hub carrier", "upright", "swivel hub", "stub axle carrier"],
    "coil-spring": ["coil spring", "road spring"],
    "spring-seat": ["spring seat", "spring pad", "spring isolator"],
    "strut-mount": ["strut mount", "top mount", "strut top mount", "upper strut mount", "strut bearing"],
    // Bolted rigid to the knuckle; only its top turns in rubber.
    strut: ["strut", "strut assembly", "macpherson strut", "suspension strut"],
    "bump-stop": ["bump stop", "jounce bumper", "jounce stop"],
    "air-spring": ["air spring", "air bag spring", "air suspension bag"],
    "torsion-bar": ["torsion bar"],
  }),
  ...listed(
    "suspension",
    {
      "sway-bar-bushing": [
        "sway bar bushing",
        "sway bar bush",
        "stabilizer bushing",
        "anti roll bar bush",
        "anti roll bar bushing",
        "d bush",
      ],
      "control-arm": ["control arm", "wishbone", "a arm", "suspension arm", "track control arm"],
      "control-arm-bushing": [
        "control arm bushing",
        "control arm bush",
        "arm bushing",
        "arm bush",
        "wishbone bush",
        "wishbone bushing",
      ],
      "trailing-arm": ["trailing arm", "radius arm", "trailing link"],
      "lateral-link": ["lateral link", "lateral arm", "camber arm", "toe link", "toe arm"],
      "panhard-rod": ["panhard rod", "panhard bar", "track bar"],
      "shock-absorber": ["shock absorber", "shock", "damper"],
      "leaf-spring": ["leaf spring"],
      "spring-shackle": ["spring shackle", "shackle"],
      "axle-beam": ["axle beam", "twist beam", "torsion beam", "rear axle beam"],
      subframe: ["subframe", "cradle", "crossmember", "cross member", "engine cradle"],
    },
    true,
  ),
  ...listed("brakes", {
    "brake-caliper": ["brake caliper", "brake calliper", "caliper", "calliper"],
    "caliper-bracket": [
      "caliper bracket",
      "caliper carrier",
      "calliper carrier",
      "calliper bracket",
      "brake caliper bracket",
      "brake caliper carrier",
      "torque plate",
      "anchor bracket",
    ],
    "caliper-slide-pin": [
      "caliper slide pin",
      "slide pin",
      "guide pin",
      "caliper guide pin",
      "caliper pin",
      "slider pin",
    ],
    "brake-pad": ["brake pad", "disc pad", "disk pad"],
    "brake-rotor": ["brake rotor", "rotor", "brake disc", "brake disk", "disc", "disk"],
    "brake-drum": ["brake drum", "drum"],
    "brake-shoe": ["brake shoe"],
    "wheel-cylinder": ["wheel cylinder"],
    "brake-hose": ["brake hose", "flexi hose", "brake flex hose"],
    "brake-line": ["brake line", "brake pipe"],
    "bleeder-screw": ["bleeder screw", "bleeder", "bleed screw", "bleed nipple", "bleeder valve"],
    "master-cylinder": ["master cylinder", "brake master cylinder"],
    "brake-booster": ["brake booster", "brake servo", "vacuum booster"],
    "brake-fluid": ["brake fluid"],
    "parking-brake": ["parking brake", "handbrake", "hand brake", "emergency brake", "park brake", "e brake"],
    "parking-brake-cable": ["parking brake cable", "handbrake cable", "hand brake cable"],
    "wheel-speed-sensor": ["wheel speed sensor", "abs sensor"],
    "backing-plate": ["backing plate", "back plate", "dust shield", "splash shield"],
    "brake-pedal": ["brake pedal"],
  }),
  ...listed("wheels", {
    "wheel-nut": ["wheel nut", "lug nut", "road wheel nut"],
    "wheel-bolt": ["wheel bolt", "lug bolt"],
    "wheel-stud": ["wheel stud", "lug stud"],
    wheel: ["wheel", "road wheel", "rim"],
    tire: ["tire", "tyre"],
    "valve-stem": ["valve stem", "tire valve", "tyre valve"],
    "tire-pressure-sensor": ["tire pressure sensor", "tyre pressure sensor", "tpms sensor"],
    "wheel-bearing": ["wheel bearing", "hub bearing"],
    "wheel-hub": ["wheel hub", "hub", "hub assembly"],
    "axle-nut": [
      "axle nut",
      "hub nut",
      "driveshaft nut",
      "drive shaft nut",
      "spindle nut",
      "cv axle nut",
      "stake nut",
    ],
  }),
  ...listed("engine", {
    "oil-drain-plug": ["oil drain plug", "drain plug", "sump plug", "oil pan plug", "sump drain plug"],
    "oil-filter": ["oil filter"],
    "oil-filter-cap": ["oil filter cap", "oil filter housing cap", "oil filter housing"],
    "oil-pan": ["oil pan", "sump", "oil sump"],
    "engine-oil": ["engine oil", "motor oil"],
    "valve-cover": ["valve cover", "rocker cover", "cam cover", "camshaft cover"],
    "cylinder-head": ["cylinder head", "head"],
    "cylinder-head-bolt": ["cylinder head bolt", "head bolt"],
    "head-gasket": ["head gasket", "cylinder head gasket"],
    "spark-plug": ["spark plug", "sparking plug"],
    "glow-plug": ["glow plug", "heater plug"],
    "ignition-coil": ["ignition coil", "coil pack", "coil on plug"],
    "timing-belt": ["timing belt", "cam belt", "cambelt"],
    "timing-chain": ["timing chain", "cam chain"],
    "belt-tensioner": ["belt tensioner", "tensioner", "timing belt tensioner"],
    "drive-belt": [
      "serpentine belt",
      "drive belt",
      "auxiliary belt",
      "aux belt",
      "accessory belt",
      "alternator belt",
      "fan belt",
    ],
    "crankshaft-pulley": [
      "crankshaft pulley",
      "crank pulley",
      "harmonic balancer",
      "crankshaft damper",
      "vibration damper",
    ],
    camshaft: ["camshaft", "cam"],
    "camshaft-sprocket": ["camshaft sprocket", "cam sprocket", "camshaft gear"],
    "engine-mount": ["engine mount", "motor mount", "engine mounting"],
    "intake-manifold": ["intake manifold", "inlet manifold"],
    "exhaust-manifold": ["exhaust manifold", "exhaust header"],
    "exhaust-pipe": ["exhaust pipe", "downpipe", "down pipe"],
    muffler: ["muffler", "silencer", "exhaust box"],
    "oxygen-sensor": ["oxygen sensor", "o2 sensor", "lambda sensor"],
    turbocharger: ["turbocharger", "turbo"],
    "air-filter": ["air filter", "air cleaner"],
    "throttle-body": ["throttle body"],
    flywheel: ["flywheel", "dual mass flywheel", "flexplate"],
    "rocker-arm": ["rocker arm", "rocker"],
    "main-bearing-cap": ["main bearing cap", "main cap"],
    "connecting-rod-cap": ["connecting rod cap", "rod cap", "big end cap", "con rod cap"],
  }),
  ...listed("cooling", {
    "water-pump": ["water pump", "coolant pump"],
    thermostat: ["thermostat"],
    "thermostat-housing": ["thermostat housing", "water outlet", "coolant outlet"],
    radiator: ["radiator"],
    "radiator-hose": ["radiator hose", "top hose", "bottom hose", "coolant hose"],
    "radiator-cap": ["radiator cap", "pressure cap", "expansion tank cap", "coolant cap"],
    coolant: ["coolant", "antifreeze"],
    "cooling-fan": ["cooling fan", "radiator fan"],
    "expansion-tank": ["expansion tank", "coolant reservoir", "header tank", "overflow tank"],
    "coolant-temperature-sensor": ["coolant temperature sensor", "coolant temp sensor", "ect sensor"],
  }),
  ...listed("fuel", {
    "fuel-pump": ["fuel pump", "petrol pump", "lift pump"],
    "fuel-filter": ["fuel filter", "petrol filter"],
    "fuel-rail": ["fuel rail", "injector rail"],
    "fuel-injector": ["fuel injector", "injector"],
    "fuel-tank": ["fuel tank", "gas tank", "petrol tank"],
    "fuel-line": ["fuel line", "fuel pipe", "petrol pipe"],
    "high-pressure-fuel-pump": ["high pressure fuel pump", "injection pump", "hpfp"],
  }),
  ...listed("electrical", {
    battery: ["battery", "12 v battery"],
    "battery-terminal": ["battery terminal", "battery clamp", "battery cable clamp"],
    alternator: ["alternator", "generator"],
    starter: ["starter", "starter motor"],
    "ground-strap": ["ground strap", "ground cable", "earth strap", "earth lead", "ground lead"],
    headlamp: ["headlamp", "headlight"],
    fuse: ["fuse"],
    "wiper-arm": ["wiper arm"],
    "knock-sensor": ["knock sensor"],
    "crankshaft-sensor": [
      "crankshaft position sensor",
      "crankshaft sensor",
      "crank sensor",
      "crank position sensor",
    ],
  }),
  ...listed("driveline", {
    axle: ["cv axle", "half shaft", "halfshaft", "axle shaft", "drive axle"],
    driveshaft: ["driveshaft", "drive shaft", "propshaft", "prop shaft", "propeller shaft"],
    "cv-boot": ["cv boot", "axle boot", "cv gaiter", "driveshaft gaiter"],
    "universal-joint": ["universal joint", "u joint", "uj"],
    differential: ["differential", "diff"],
    "differential-fluid": ["differential fluid", "diff oil", "axle oil", "gear oil"],
    transmission: ["transmission", "gearbox"],
    "transmission-fluid": ["transmission fluid", "gearbox oil", "atf"],
    "transmission-mount": ["transmission mount", "gearbox mount", "gearbox mounting"],
    "transmission-pan": ["transmission pan", "gearbox sump"],
    clutch: ["clutch", "clutch disc", "clutch disk", "clutch plate"],
    "clutch-pressure-plate": ["pressure plate", "clutch pressure plate", "clutch cover"],
    "release-bearing": ["release bearing", "throwout bearing", "throw out bearing", "thrust bearing"],
    "slave-cylinder": ["slave cylinder", "clutch slave cylinder"],
    "transfer-case": ["transfer case", "transfer box"],
    "torque-converter": ["torque converter"],
  }),
  ...listed("restraint", {
    airbag: ["airbag", "air bag", "airbag module", "driver airbag"],
    "seat-belt": ["seat belt", "seatbelt", "belt retractor", "seat belt retractor"],
    "seat-belt-anchor": ["seat belt anchor", "seat belt anchorage"],
    seat: ["seat", "seat rail", "seat frame"],
  }),
  ...listed("air-conditioning", {
    "ac-compressor": [
      "ac compressor",
      "a c compressor",
      "air conditioning compressor",
      "air con compressor",
      "compressor",
    ],
    condenser: ["condenser", "ac condenser"],
    "cabin-filter": ["cabin filter", "pollen filter", "cabin air filter"],
    refrigerant: ["refrigerant"],
  }),
  ...listed("body", {
    hood: ["hood", "bonnet"],
    "trunk-lid": ["trunk lid", "trunk", "boot lid", "decklid"],
    fender: ["fender", "wing"],
    "fender-liner": ["fender liner", "wheel arch liner", "inner fender"],
    bumper: ["bumper", "bumper cover"],
    windshield: ["windshield", "windscreen"],
    undertray: ["undertray", "engine undertray", "belly pan", "splash guard"],
    door: ["door", "door hinge"],
  }),
];

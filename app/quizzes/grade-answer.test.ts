import { expect, test } from "vitest";
import { seeded } from "../../tests/support/seeded";
import { convertNumber } from "~/quantities/convert";
import { formatQuantity } from "~/quantities/format";
import { readQuantity } from "~/quantities/parse";
import { unitsOf, type Dimension, type Unit } from "~/quantities/units";
import {
  asksAgain,
  countsAsRight,
  gradeAnswer,
  type Asked,
  type GradeSettings,
  type Outcome,
} from "./grade-answer";

// The expected outcomes follow the grading rule of the product; the shop confusions in them are common practice.
const LINK_NUT: Asked = {
  text: "65 ft-lb",
  kind: "torque",
  value: 65,
  unit: "lbf·ft",
  others: [{ component: "the upper nut", value: 52, unit: "lbf·ft" }],
  superseded: [{ value: 70, unit: "lbf·ft" }],
};
const LOWER_NUT: Asked = { text: "88 Nm", kind: "torque", value: 88, unit: "N·m" };
const OWN_TOLERANCE: Asked = { text: "88 ± 4 Nm", kind: "torque", value: 88, unit: "N·m", tolerance: 4 };
const SMALL: Asked = { text: "89 in-lb", kind: "torque", value: 89, unit: "lbf·in" };
const OLD_KGM: Asked = { text: "9 kgm", kind: "torque", value: 9, unit: "kgf·m" };
const RANGE: Asked = { text: "80-95 Nm", kind: "torque", min: 80, max: 95, unit: "N·m" };
const MAX_TORQUE: Asked = { text: "max 9 Nm", kind: "torque", max: 9, unit: "N·m" };
const MIN_TORQUE: Asked = { text: "at least 120 Nm", kind: "torque", min: 120, unit: "N·m" };
const ANGLE: Asked = { text: "30 Nm + 90°", kind: "torque", value: 30, unit: "N·m", angleDeg: 90 };
const STAGES: Asked = {
  text: "20 Nm, 40 Nm, +90°",
  kind: "torque",
  unit: "N·m",
  stages: [
    { value: 20, unit: "N·m" },
    { value: 40, unit: "N·m" },
    { value: 90, unit: "deg" },
  ],
};
const TURN: Asked = { text: "hand tight + 3/4 turn", kind: "torque", value: 0.75, unit: "turn" };
const BACK_OFF: Asked = { text: "40 Nm, back off 180°, 20 Nm + 60°", kind: "torque", unit: "N·m" };
const LIMIT_AS_VALUE: Asked = { text: "min 22.0 mm", kind: "measure", value: 22, unit: "mm" };
const SOCKET: Asked = {
  text: "19 mm",
  kind: "tool",
  value: 19,
  unit: "mm",
  others: [{ component: "the upper nut", value: 17, unit: "mm" }],
  superseded: [{ value: 18, unit: "mm" }],
};
const INCH_SOCKET: Asked = { text: "3/4", kind: "tool", value: 0.75, unit: "in" };
const SMALL_HEX: Asked = { text: "5/16", kind: "tool", value: 0.3125, unit: "in" };
const SPANNER: Asked = { text: "1-5/16", kind: "tool", value: 1.3125, unit: "in" };
const ROTOR: Asked = { text: "min 22.0 mm", kind: "measure", min: 22, unit: "mm" };
const LIMIT: Asked = { text: "wear limit 1.5 mm", kind: "measure", unit: "mm" };
const CLOSE_ANGLE: Asked = { text: "30 Nm + 90° ± 2°", kind: "torque", value: 30, unit: "N·m", angleDeg: 90 };
const RUNOUT: Asked = { text: "max 0.05 mm", kind: "measure", max: 0.05, unit: "mm" };
const GAP: Asked = { text: "0.035 in", kind: "measure", value: 0.035, unit: "in" };
const BAR: Asked = { text: "24.0 mm", kind: "measure", value: 24, unit: "mm" };
const PLUG_GAP: Asked = { text: "0.6-0.8 mm", kind: "measure", min: 0.6, max: 0.8, unit: "mm" };
const FRACTION: Asked = { text: "1-5/16 in", kind: "measure", value: 1.3125, unit: "in" };
const TYRE: Asked = { text: "32 psi", kind: "measure", value: 32, unit: "psi" };
const OIL: Asked = { text: "5.0 US qt", kind: "measure", value: 5, unit: "US qt" };
const FLUID: Asked = { text: "5 imp pt", kind: "measure", value: 5, unit: "imp pt" };
const HOT: Asked = { text: "195 °F", kind: "measure", value: 195, unit: "°F" };
const COLD: Asked = { text: "-18 °C", kind: "measure", value: -18, unit: "°C" };
const TOE: Asked = { text: "0°10'", kind: "measure", value: 10, unit: "arcmin" };
const GAS: Asked = { text: "450 g", kind: "measure", value: 450, unit: "g" };
const VOLTS: Asked = { text: "12.6 V", kind: "measure", value: 12.6, unit: "V" };

const TABLE: readonly (readonly [Asked, string, Outcome, number?])[] = [
  // equal, and equal in another unit
  [LINK_NUT, "65 ft-lb", "right"],
  [LINK_NUT, "65 lb-ft", "right"],
  [LINK_NUT, "65 foot pounds", "right"],
  [LINK_NUT, "65.0 ft.lbs", "right"],
  [LINK_NUT, "88 Nm", "right-other-unit"],
  [LINK_NUT, "88.1 Nm", "right-other-unit"],
  [LINK_NUT, "88.13 N·m", "right-other-unit"],
  [LINK_NUT, "780 in-lb", "right-other-unit"],
  [LINK_NUT, "9.0 kgm", "right-other-unit"],
  [LINK_NUT, "8.8 daNm", "right-other-unit"],
  [LINK_NUT, "65.2 ft-lb", "right"],
  [LINK_NUT, "65.4 ft-lb", "within-tolerance"],
  [LINK_NUT, "67 ft-lb", "within-tolerance"],
  [LINK_NUT, "67.6 ft-lb", "within-tolerance"],
  [LINK_NUT, "62.4 ft-lb", "within-tolerance"],
  [LINK_NUT, "67.7 ft-lb", "other"],
  [LINK_NUT, "62.3 ft-lb", "other"],
  [LINK_NUT, "90 Nm", "within-tolerance"],
  [LINK_NUT, "9 daNm", "within-tolerance"],
  [LINK_NUT, "65 ft-lb (88 Nm)", "right"],
  [LINK_NUT, "88 Nm / 65 ft-lb", "right-other-unit"],
  [LINK_NUT, "about 65 ft-lb", "right"],
  // right number, wrong unit
  [LINK_NUT, "65 in-lb", "wrong-unit", 12],
  [LINK_NUT, "65 Nm", "wrong-unit", 1.3558179483314003],
  [LINK_NUT, "88 ft-lb", "wrong-unit", 1.3558179483314003],
  [LINK_NUT, "88 in-lb", "wrong-unit", 8.850745791327183],
  [LINK_NUT, "780 ft-lb", "wrong-unit", 12],
  [LINK_NUT, "780 Nm", "wrong-unit", 8.850745791327183],
  [LINK_NUT, "65 kgm", "wrong-unit", 7.233013851209894],
  [LINK_NUT, "65 oz-in", "wrong-unit", 192],
  [LOWER_NUT, "88 ft-lb", "wrong-unit", 1.3558179483314003],
  [LOWER_NUT, "88 in-lb", "wrong-unit", 8.850745791327183],
  [LOWER_NUT, "65 Nm", "wrong-unit", 1.3558179483314003],
  [LOWER_NUT, "9 Nm", "wrong-unit", 9.80665],
  [LOWER_NUT, "9.0 Nm", "wrong-unit", 9.80665],
  [LOWER_NUT, "65 ft-lb", "right-other-unit"],
  [LOWER_NUT, "88 kgf-cm", "wrong-unit", 10.197162129779283],
  [SMALL, "89 ft-lb", "wrong-unit", 12],
  [SMALL, "10 Nm", "right-other-unit"],
  [SMALL, "10.1 Nm", "right-other-unit"],
  [SMALL, "7.4 ft-lb", "right-other-unit"],
  [SMALL, "7.42 ft-lb", "right-other-unit"],
  [SMALL, "7 ft-lb", "other"],
  [SMALL, "89 Nm", "wrong-unit", 8.850745791327183],
  [OLD_KGM, "88 Nm", "right-other-unit"],
  [OLD_KGM, "65 ft-lb", "right-other-unit"],
  [OLD_KGM, "9 kgm", "right"],
  [OLD_KGM, "9 Nm", "wrong-unit", 9.80665],
  [OLD_KGM, "9 kgf-cm", "wrong-unit", 100],
  [OLD_KGM, "9 daNm", "right-other-unit"],
  // superseded and another fastener, before tolerance and wrong unit
  [LINK_NUT, "70 ft-lb", "superseded"],
  [LINK_NUT, "95 Nm", "superseded"],
  [LINK_NUT, "72 ft-lb", "other"],
  [LINK_NUT, "52 ft-lb", "other-fastener"],
  [LINK_NUT, "70.5 Nm", "other-fastener"],
  [LINK_NUT, "71 Nm", "other-fastener"],
  [{ ...LINK_NUT, superseded: [{ value: 66, unit: "lbf·ft" }] }, "66 ft-lb", "superseded"],
  [{ ...LINK_NUT, superseded: [{ value: 65, unit: "lbf·ft" }] }, "65 ft-lb", "right"],
  [
    { ...LOWER_NUT, others: [{ component: "the upper nut", value: 65, unit: "N·m" }] },
    "65 Nm",
    "other-fastener",
  ],
  // other
  [LINK_NUT, "100 ft-lb", "other"],
  [LINK_NUT, "0 ft-lb", "other"],
  [LINK_NUT, "60-70 ft-lb", "other"],
  [LINK_NUT, "65 ft-lb + 90°", "other"],
  [LINK_NUT, "20 ft-lb then 65 ft-lb", "other"],
  [LINK_NUT, "back off 65°", "no-unit"],
  // no unit: asked again
  [LINK_NUT, "65", "no-unit"],
  [LINK_NUT, "65 lbs", "no-unit"],
  [LINK_NUT, "65 pounds", "no-unit"],
  [LINK_NUT, "65#", "no-unit"],
  [LINK_NUT, "65 mm", "no-unit"],
  [LINK_NUT, "65 psi", "no-unit"],
  [LINK_NUT, "65 ft", "no-unit"],
  [LINK_NUT, "88 J", "no-unit"],
  [LINK_NUT, "9 kg", "no-unit"],
  [LINK_NUT, "65°", "no-unit"],
  [LINK_NUT, "60-70", "no-unit"],
  [LINK_NUT, "3/4", "no-unit"],
  [LINK_NUT, ".625", "no-unit"],
  // unreadable: asked again
  [LINK_NUT, "", "unreadable"],
  [LINK_NUT, "   ", "unreadable"],
  [LINK_NUT, "dunno", "unreadable"],
  [LINK_NUT, "snug", "unreadable"],
  [LINK_NUT, "-65 ft-lb", "unreadable"],
  [LINK_NUT, "65 ft-lb or 70 ft-lb", "unreadable"],
  [LINK_NUT, "65 ft-lb, 70 ft-lb", "unreadable"],
  [LINK_NUT, "65 ft-lb 100 Nm", "unreadable"],
  [LINK_NUT, "1,000 ft-lb", "unreadable"],
  [LINK_NUT, `65 ft-lb${" ".repeat(200)}`, "unreadable"],
  [GAP, "35 mil", "unreadable"],
  [SOCKET, "19 mil", "unreadable"],
  // the mark's own tolerance, edges included
  [OWN_TOLERANCE, "92 Nm", "within-tolerance"],
  [OWN_TOLERANCE, "84 Nm", "within-tolerance"],
  [OWN_TOLERANCE, "92.1 Nm", "other"],
  [OWN_TOLERANCE, "83.9 Nm", "other"],
  [OWN_TOLERANCE, "67.8 ft-lb", "within-tolerance"],
  [OWN_TOLERANCE, "68 ft-lb", "other"],
  [OWN_TOLERANCE, "65 ft-lb", "right-other-unit"],
  [{ text: "88 Nm ±5%", kind: "torque", value: 88, unit: "N·m" }, "92.4 Nm", "within-tolerance"],
  [{ text: "88 Nm ±5%", kind: "torque", value: 88, unit: "N·m" }, "92.5 Nm", "other"],
  [{ text: "22.00 mm", kind: "measure", value: 22, unit: "mm", tolerance: 0.02 }, "0.87 in", "other"],
  [
    { text: "22.00 mm", kind: "measure", value: 22, unit: "mm", tolerance: 0.02 },
    "22.02 mm",
    "within-tolerance",
  ],
  // ranges
  [RANGE, "80-95 Nm", "right"],
  [RANGE, "88 Nm", "right"],
  [RANGE, "80 Nm", "right"],
  [RANGE, "95 Nm", "right"],
  [RANGE, "59-70 ft-lb", "right-other-unit"],
  [RANGE, "65 ft-lb", "right-other-unit"],
  [RANGE, "70 ft-lb", "right-other-unit"],
  [RANGE, "95.4 Nm", "right"],
  [RANGE, "97 Nm", "other"],
  [RANGE, "78 Nm", "other"],
  [RANGE, "110 Nm", "other"],
  [RANGE, "80-100 Nm", "other"],
  [RANGE, "82-93 Nm", "within-tolerance"],
  [RANGE, "80-95 ft-lb", "wrong-unit", 1.3558179483314003],
  [RANGE, "88 ft-lb", "wrong-unit", 1.3558179483314003],
  [RANGE, "88 in-lb", "wrong-unit", 8.850745791327183],
  [RANGE, "80-95", "no-unit"],
  [PLUG_GAP, "0.7 mm", "right"],
  [PLUG_GAP, "0.028 in", "right-other-unit"],
  [PLUG_GAP, "0.024-0.031 in", "right-other-unit"],
  [PLUG_GAP, "0.024-0.032 in", "within-tolerance"],
  [PLUG_GAP, "0.85 mm", "within-tolerance"],
  [PLUG_GAP, "0.86 mm", "other"],
  [PLUG_GAP, "0.9 mm", "other"],
  [PLUG_GAP, "0.7 in", "wrong-unit", 25.4],
  // limits
  [MAX_TORQUE, "9 Nm", "right"],
  [MAX_TORQUE, "max 9 Nm", "right"],
  [MAX_TORQUE, "8.7 Nm", "within-tolerance"],
  [MAX_TORQUE, "9.2 Nm", "other"],
  [MAX_TORQUE, "8.5 Nm", "other"],
  [MAX_TORQUE, "80 in-lb", "right-other-unit"],
  [MAX_TORQUE, "79 in-lb", "right-other-unit"],
  [MAX_TORQUE, "82 in-lb", "other"],
  [MAX_TORQUE, "min 9 Nm", "other"],
  [MAX_TORQUE, "9 ft-lb", "wrong-unit", 1.3558179483314003],
  [MIN_TORQUE, "122 Nm", "within-tolerance"],
  [MIN_TORQUE, "118 Nm", "other"],
  [MIN_TORQUE, "max 120 Nm", "other"],
  [ROTOR, "22.0 mm", "right"],
  [ROTOR, "min 22 mm", "right"],
  [ROTOR, "22.0 mm minimum", "right"],
  [ROTOR, "21.9 mm", "other"],
  [ROTOR, "21.99 mm", "other"],
  [ROTOR, "22.1 mm", "other"],
  [ROTOR, "max 22.0 mm", "other"],
  [ROTOR, "0.867 in", "right-other-unit"],
  [ROTOR, "0.8662 in", "right-other-unit"],
  [ROTOR, "0.866 in", "other"],
  [ROTOR, "867 thou", "right-other-unit"],
  [ROTOR, "2.20 cm", "right-other-unit"],
  [ROTOR, "22 in", "wrong-unit", 25.4],
  [ROTOR, "22", "no-unit"],
  [LIMIT, "1.5 mm", "right"],
  [LIMIT, "1.4 mm", "other"],
  [LIMIT, "1.53 mm", "other"],
  [LIMIT, "0.0591 in", "right-other-unit"],
  [LIMIT, "0.06 in", "other"],
  [RUNOUT, "0.05 mm", "right"],
  [RUNOUT, "0.06 mm", "other"],
  [RUNOUT, "0.0019 in", "right-other-unit"],
  [RUNOUT, "0.002 in", "other"],
  [RUNOUT, "50 µm", "right-other-unit"],
  // angles and stages
  [ANGLE, "30 Nm + 90°", "right"],
  [ANGLE, "30 Nm + 90", "right"],
  [ANGLE, "30 Nm then 90 degrees", "right"],
  [ANGLE, "30 Nm 90°", "right"],
  [ANGLE, "30 Nm + 1/4 turn", "right-other-unit"],
  [ANGLE, "22 ft-lb + 90°", "right-other-unit"],
  [ANGLE, "30 Nm + 95°", "within-tolerance"],
  [ANGLE, "30 Nm + 85°", "within-tolerance"],
  [ANGLE, "30 Nm + 96°", "other"],
  [ANGLE, "31 Nm + 90°", "within-tolerance"],
  [ANGLE, "30 Nm", "missing-angle"],
  [ANGLE, "31 Nm", "missing-angle"],
  [ANGLE, "22 ft-lb", "missing-angle"],
  [ANGLE, "30 ft-lb + 90°", "wrong-unit", 1.3558179483314003],
  [ANGLE, "30 ft-lb", "wrong-unit", 1.3558179483314003],
  [ANGLE, "40 Nm", "other"],
  [ANGLE, "40 Nm + 90°", "other"],
  [ANGLE, "30 Nm + 180°", "other"],
  [ANGLE, "90°", "other"],
  [ANGLE, "30 Nm + 90° + 90°", "other"],
  [ANGLE, "30 + 90", "no-unit"],
  [ANGLE, "30", "no-unit"],
  [{ ...ANGLE, superseded: [{ value: 35, unit: "N·m" }] }, "35 Nm", "superseded"],
  [{ ...ANGLE, superseded: [{ value: 35, unit: "N·m" }] }, "35 Nm + 90°", "superseded"],
  [CLOSE_ANGLE, "30 Nm + 92°", "within-tolerance"],
  [CLOSE_ANGLE, "30 Nm + 93°", "other"],
  [STAGES, "20 Nm, 40 Nm, +90°", "right"],
  [STAGES, "20 Nm then 40 Nm + 90", "right"],
  [STAGES, "15 ft-lb, 30 ft-lb + 90°", "right-other-unit"],
  [STAGES, "20 Nm, 41 Nm, +90°", "within-tolerance"],
  [STAGES, "15 ft-lb, 29.5 ft-lb + 90°", "right-other-unit"],
  [STAGES, "20 Nm, 40 Nm", "missing-angle"],
  [STAGES, "40 Nm + 90°", "other"],
  [STAGES, "20 Nm, 50 Nm, +90°", "other"],
  [STAGES, "40 Nm, 20 Nm, +90°", "other"],
  [STAGES, "20, 40 Nm, +90°", "no-unit"],
  [TURN, "3/4 turn", "right"],
  [TURN, "hand tight + 3/4 turn", "right"],
  [TURN, "270°", "right-other-unit"],
  [TURN, "1/2 turn", "other"],
  [TURN, "270", "no-unit"],
  [BACK_OFF, "40 Nm, back off 180°, 20 Nm + 60°", "right"],
  [BACK_OFF, "40 Nm, back off 1/2 turn, 20 Nm + 60", "right-other-unit"],
  [BACK_OFF, "40 Nm, back off 180°, 20 Nm", "missing-angle"],
  [BACK_OFF, "40 Nm, 20 Nm + 60°", "other"],
  [BACK_OFF, "40 Nm + 180°, 20 Nm + 60°", "other"],
  [BACK_OFF, "40 Nm, back off 90°, 20 Nm + 60°", "other"],
  [TURN, "back off 3/4 turn", "other"],
  [LIMIT_AS_VALUE, "21.96 mm", "other"],
  // tool sizes
  [SOCKET, "19 mm", "right"],
  [SOCKET, "19", "right"],
  [SOCKET, "19mm socket", "right"],
  [SOCKET, "19.0 mm", "right"],
  [SOCKET, "1.9 cm", "right-other-unit"],
  [SOCKET, "3/4", "right-other-unit"],
  [SOCKET, "3/4 in", "right-other-unit"],
  [SOCKET, "0.748 in", "right-other-unit"],
  [SOCKET, "0.75 in", "right-other-unit"],
  [SOCKET, "19.1 mm", "other"],
  [SOCKET, "18 mm", "superseded"],
  [SOCKET, "17 mm", "other-fastener"],
  [SOCKET, "17", "other-fastener"],
  [SOCKET, "19 in", "other"],
  [SOCKET, "19.5", "no-unit"],
  [SOCKET, "19 Nm", "no-unit"],
  [INCH_SOCKET, "3/4", "right"],
  [INCH_SOCKET, '3/4"', "right"],
  [INCH_SOCKET, ".75 in", "right"],
  [INCH_SOCKET, "750 thou", "right"],
  [INCH_SOCKET, "19.05 mm", "right-other-unit"],
  [INCH_SOCKET, "19 mm", "other"],
  [INCH_SOCKET, "19", "no-unit"],
  [INCH_SOCKET, "0.75", "no-unit"],
  [SMALL_HEX, "8 mm", "right-other-unit"],
  [SMALL_HEX, "7.94 mm", "right-other-unit"],
  [SPANNER, "1 5/16", "right"],
  [SPANNER, "33.34 mm", "right-other-unit"],
  [SPANNER, "33.3 mm", "other"],
  [SPANNER, "1.31 in", "other"],
  [{ kind: "tool", value: 24, unit: "mm" }, "15/16", "other"],
  [{ kind: "tool", value: 13, unit: "mm" }, "1/2", "other"],
  [{ kind: "tool", value: 8, unit: "mm" }, "5/16", "other"],
  // lengths
  [GAP, "0.035 in", "right"],
  [GAP, ".035 in", "right"],
  [GAP, "35 thou", "right"],
  [GAP, "0.89 mm", "right-other-unit"],
  [GAP, "0.889 mm", "right-other-unit"],
  [GAP, "0.9 mm", "within-tolerance"],
  [GAP, "0.0355 in", "within-tolerance"],
  [GAP, "0.036 in", "other"],
  [GAP, "0.035 mm", "wrong-unit", 25.4],
  [GAP, "0.35 in", "other"],
  [GAP, "35 mm", "wrong-unit", 1000 / 25.4],
  [GAP, ".035", "no-unit"],
  [GAP, "0.035", "no-unit"],
  [GAP, "-0.035 in", "unreadable"],
  [BAR, "24.0 mm", "right"],
  [BAR, "24 mm", "right"],
  [BAR, "0.945 in", "right-other-unit"],
  [BAR, "0.94 in", "other"],
  [BAR, "15/16", "other"],
  [BAR, "24.05 mm", "within-tolerance"],
  [BAR, "24.1 mm", "other"],
  [FRACTION, "1.3125 in", "right"],
  [FRACTION, "33.34 mm", "right-other-unit"],
  [FRACTION, "1-5/16", "right"],
  [FRACTION, "1.3 in", "other"],
  // pressure, volume, mass, temperature and the rest
  [TYRE, "32 psi", "right"],
  [TYRE, "220 kPa", "right-other-unit"],
  [TYRE, "221 kPa", "right-other-unit"],
  [TYRE, "2.2 bar", "right-other-unit"],
  [TYRE, "33 psi", "other"],
  [TYRE, "32.9 psi", "within-tolerance"],
  [TYRE, "32 kPa", "wrong-unit", 6.894757293168361],
  [TYRE, "32 bar", "wrong-unit", 14.503773773020923],
  [TYRE, "2.2 psi", "wrong-unit", 14.503773773020923],
  [TYRE, "32 lbs", "no-unit"],
  [OIL, "5 US qt", "right"],
  [OIL, "4.7 L", "right-other-unit"],
  [OIL, "4.73 L", "right-other-unit"],
  [OIL, "4.8 L", "within-tolerance"],
  [OIL, "5.0 L", "wrong-unit", 1.0566882094325938],
  [OIL, "5 imp qt", "wrong-unit", 1.2009499255398],
  [OIL, "5 qt", "unreadable"],
  [FLUID, "2.84 L", "right-other-unit"],
  [FLUID, "5 US pt", "wrong-unit", 1.2009499255398],
  [GAS, "450 g", "right"],
  [GAS, "0.45 kg", "right-other-unit"],
  [GAS, "15.9 oz", "right-other-unit"],
  [GAS, "450 oz", "wrong-unit", 28.349523125],
  [GAS, "450 mL", "no-unit"],
  [HOT, "195 °F", "right"],
  [HOT, "91 °C", "right-other-unit"],
  [HOT, "90.6 °C", "right-other-unit"],
  [HOT, "92 °C", "within-tolerance"],
  [HOT, "195 °C", "wrong-unit"],
  [HOT, "190 °F", "other"],
  [HOT, "195", "no-unit"],
  [HOT, "195 degrees", "no-unit"],
  [COLD, "-18 °C", "right"],
  [COLD, "−18 C", "right"],
  [COLD, "-0.4 °F", "right-other-unit"],
  [COLD, "0 °F", "within-tolerance"],
  [COLD, "18 °C", "other"],
  [COLD, "-18 °F", "wrong-unit"],
  [TOE, "0°10'", "right"],
  [TOE, "10'", "right"],
  [TOE, "0.17°", "right-other-unit"],
  [TOE, "0°20'", "other"],
  [TOE, "10°", "wrong-unit", 60],
  [VOLTS, "12.6 V", "right"],
  [VOLTS, "12600 mV", "right-other-unit"],
  [VOLTS, "12.65 V", "within-tolerance"],
  [VOLTS, "12.6 mV", "wrong-unit", 1000],
];

test("the table has at least 150 typed answers", () => {
  expect(TABLE.length).toBeGreaterThanOrEqual(150);
});

test.each(TABLE.map(([asked, answer, outcome, factor]) => ({ asked, answer, outcome, factor })))(
  "$answer for $asked.text is $outcome",
  ({ asked, answer, outcome, factor }) => {
    const grade = gradeAnswer(asked, answer);
    expect(grade.outcome).toBe(outcome);
    if (factor === undefined) expect(grade).not.toHaveProperty("factor");
    else expect(grade.factor).toBeCloseTo(factor, 9);
    expect(grade.text).not.toMatch(/NaN|undefined|null/);
    expect(grade.text.length).toBeGreaterThan(5);
  },
);

const text = (asked: Asked, answer: string) => gradeAnswer(asked, answer).text.replaceAll("\u2009", " ");

test("feedback speaks as the shop does", () => {
  expect(text(LINK_NUT, "65 in-lb")).toBe(
    "Right number, wrong unit. 65 lbf·in is 7.3 N·m, twelve times too loose. The joint is not clamped.",
  );
  expect(text(SMALL, "89 ft-lb")).toBe(
    "Right number, wrong unit. 89 lbf·ft is 121 N·m, twelve times too tight. The fastener can break or strip its thread.",
  );
  expect(text(LINK_NUT, "65")).toBe("65 has no unit: lbf·ft, lbf·in or N·m?");
  expect(text(LINK_NUT, "65 lbs")).toBe("65 lbs is not a torque yet: ft-lb or in-lb?");
  expect(text(LINK_NUT, "88 Nm")).toBe("Right. 88 N·m is 65 lbf·ft.");
  expect(text(LINK_NUT, "70 ft-lb")).toBe(
    "70 lbf·ft was the value before it was corrected. It is 65 lbf·ft now.",
  );
  expect(text(LINK_NUT, "52 ft-lb")).toBe("52 lbf·ft belongs to the upper nut. Here it is 65 lbf·ft.");
  expect(text(ANGLE, "30 Nm")).toBe("The angle is missing. The value is 30 N·m + 90°.");
  expect(text(ROTOR, "21.9 mm")).toBe("21.9 mm would let a worn part pass. Reject it below 22.0 mm.");
  expect(text(SOCKET, "3/4")).toBe(
    "19 mm is the size. A 3/4 in tool stands in on it, this way only: six-point, and never on a rounded, seized or safety-critical fastener.",
  );
});

test("what asks again gives nothing away, and a default tolerance is never shown", () => {
  for (const [asked, answer, outcome] of TABLE) {
    const said = gradeAnswer(asked, answer).text;
    if (asksAgain(outcome) && asked === LINK_NUT && !answer.includes("65")) expect(said).not.toContain("65");
    expect(said).not.toMatch(/±|tolerance|%/);
  }
});

test("right, right in another unit and within tolerance count as right; unread and unitless cost no try", () => {
  const outcomes = (["right", "right-other-unit", "within-tolerance"] as const).map(countsAsRight);
  expect(outcomes).toEqual([true, true, true]);
  for (const wrong of ["wrong-unit", "superseded", "other-fastener", "missing-angle", "other"] as const) {
    expect(countsAsRight(wrong)).toBe(false);
    expect(asksAgain(wrong)).toBe(false);
  }
  for (const again of ["no-unit", "unreadable"] as const) {
    expect(asksAgain(again)).toBe(true);
    expect(countsAsRight(again)).toBe(false);
  }
});

test("the shop's country decides the pint and its own tolerance the band", () => {
  const us: GradeSettings = { country: "US" };
  expect(gradeAnswer(OIL, "5 qt", us).outcome).toBe("right");
  expect(gradeAnswer(FLUID, "5 pt", us).outcome).toBe("wrong-unit");
  expect(gradeAnswer(FLUID, "5 pt", { country: "GB" }).outcome).toBe("unreadable");
  expect(gradeAnswer(LINK_NUT, "67 ft-lb", { tolerance: { torque: 0.01 } }).outcome).toBe("other");
  expect(gradeAnswer(LINK_NUT, "68 ft-lb", { tolerance: { torque: 0.05 } }).outcome).toBe("within-tolerance");
});

test("a question without numbers takes them from its text", () => {
  const asked: Asked = { text: "20 Nm, 40 Nm, +90°", kind: "torque", unit: "N·m" };
  expect(gradeAnswer(asked, "20 Nm, 40 Nm, +90°").outcome).toBe("right");
  expect(gradeAnswer(asked, "20 Nm, 40 Nm").outcome).toBe("missing-angle");
  expect(gradeAnswer({ text: "min 22.0 mm", kind: "measure", unit: "mm" }, "21.9 mm").outcome).toBe("other");
});

const ASKABLE: readonly Dimension[] = ["torque", "pressure", "volume", "length", "mass", "voltage", "speed"];

test("any equivalent unit, shown as the plates show it, is right: 4,000 random values", () => {
  const random = seeded(20261);
  let compared = 0;
  for (let i = 0; i < 4000; i++) {
    const dimension = ASKABLE[i % ASKABLE.length] as Dimension;
    const units = unitsOf(dimension).filter((unit) => unit !== "m³");
    const [unit, typed] = [0, 1].map(() => units[Math.floor(random() * units.length)]) as [Unit, Unit];
    const places = Math.floor(random() * 3);
    const figure = (random() * 10 ** (1 + Math.floor(random() * 2)) + 1).toFixed(places);
    const read = readQuantity(`${figure} ${unit}`);
    if (!read.ok) throw new Error(read.error);
    const asked: Asked = { text: read.quantity.text, kind: "measure", value: Number(figure), unit };
    const shown = formatQuantity(read.quantity, typed).text;
    // A unit so large that the value vanishes in it is not how anybody would say it.
    if (convertNumber(read.quantity.value, unit, typed) < 1e-6) continue;
    const grade = gradeAnswer(asked, shown);
    // A two-digit value can come out further off, in two digits of another unit, than the rule lets pass.
    const back = readQuantity(shown);
    const off = back.ok ? Math.abs(back.quantity.si / read.quantity.si - 1) : 1;
    const narrow = ["mass", "voltage", "speed"].includes(dimension) ? 0.005 : 0.02;
    if (off > narrow && dimension !== "length") continue;
    expect(countsAsRight(grade.outcome), `${shown} for ${asked.text}: ${grade.outcome}`).toBe(true);
    compared++;
  }
  expect(compared).toBeGreaterThan(3500);
});

test("any limit, rounded away from danger as the plates do it, is right", () => {
  const random = seeded(5);
  for (let i = 0; i < 1500; i++) {
    const units = ["mm", "in", "thou", "cm"] as const;
    const unit = units[i % 4] as Unit;
    const typed = units[Math.floor(random() * 4)] as Unit;
    const figure = (random() * 40 + 1).toFixed(1 + (i % 2));
    const read = readQuantity(`${figure} ${unit}`);
    if (!read.ok) throw new Error(read.error);
    for (const [key, sense, worse] of [
      ["min", "up", -1],
      ["max", "down", 1],
    ] as const) {
      const asked: Asked = { text: `${key} ${figure} ${unit}`, kind: "measure", [key]: Number(figure), unit };
      const shown = formatQuantity(read.quantity, typed, sense).text;
      expect(countsAsRight(gradeAnswer(asked, shown).outcome), `${shown} for ${asked.text}`).toBe(true);
      const exactly = convertNumber(Number(figure), unit, typed);
      const passesWorn = `${(exactly * (1 + worse * 0.004)).toFixed(6)} ${typed}`;
      expect(countsAsRight(gradeAnswer(asked, passesWorn).outcome), `${passesWorn} for ${asked.text}`).toBe(
        false,
      );
    }
  }
});

test("any rounding of a torque to two digits or more that stays within the tolerance is right", () => {
  const random = seeded(8);
  for (let i = 0; i < 2000; i++) {
    const value = Number((random() * 190 + 10).toFixed(1));
    const unit = (["N·m", "lbf·ft", "lbf·in", "kgf·m"] as const)[i % 4] as Unit;
    const exactly = convertNumber(value, "N·m", unit);
    const places = i % 3;
    const figure = exactly.toFixed(places);
    if (figure.replace(/^0\.?0*|\./g, "").length < 2) continue;
    const asked: Asked = { kind: "torque", value, unit: "N·m" };
    if (Math.abs(Number(figure) / exactly - 1) > 0.04) continue;
    const grade = gradeAnswer(asked, `${figure} ${unit}`);
    expect(["right", "right-other-unit"], `${figure} ${unit} for ${value} N·m`).toContain(grade.outcome);
  }
});

test("a number twelve times too big or too small is never right", () => {
  for (let value = 10; value <= 200; value += 0.5) {
    const asked: Asked = { kind: "torque", value, unit: "lbf·ft" };
    for (const answer of [`${value} in-lb`, `${value * 12} ft-lb`]) {
      const grade = gradeAnswer(asked, answer);
      expect(grade.outcome).toBe("wrong-unit");
      expect(grade.factor).toBeCloseTo(12, 9);
    }
  }
});

test("no random answer throws, whatever is asked", () => {
  const random = seeded(77);
  const questions = [...new Set(TABLE.map(([asked]) => asked))];
  const pieces = [
    ..."0123456789.,/-+±°'\" ()%",
    "Nm",
    "ft-lb",
    "in",
    "mm",
    " then ",
    "min ",
    "max ",
    "turn",
    "½",
    "qt",
  ];
  for (let i = 0; i < 10000; i++) {
    let answer = "";
    for (let j = Math.floor(random() * 10); j >= 0; j--)
      answer += pieces[Math.floor(random() * pieces.length)];
    const grade = gradeAnswer(questions[i % questions.length] as Asked, answer);
    expect(grade.text, answer).not.toMatch(/NaN|undefined|Infinity/);
  }
});

test("a question with a unit that nobody knows is said, not thrown", () => {
  const grade = gradeAnswer({ kind: "measure", value: 3, unit: "bananas" }, "3 mm");
  expect(grade.outcome).toBe("unreadable");
  expect(grade.text).toContain("bananas");
});

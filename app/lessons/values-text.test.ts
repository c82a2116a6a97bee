import { expect, test } from "vitest";
import { readValues } from "~/quantities/parse";
import { valuesText } from "./values-text";

test("rows written as one line read back to the same rows", () => {
  for (const typed of [
    "65 ft-lb",
    "20 Nm, 40 Nm, +90°",
    "30 Nm + 90° + 90°",
    "80-95 Nm",
    "50 to 60 ft-lb then 90°",
    "hand tight + 3/4 turn",
    "1/4 turn past contact",
    "back off 180°",
    "40 Nm, back off 180°, 20 Nm + 60°",
    "loosen, then 20 Nm + 60°",
    "40 Nm, loosen fully, 20 Nm, 90°",
    "20 Nm, wait 5 min, 40 Nm",
    "turn while tightening 30 Nm",
    "snug",
    "max 3 Nm",
    "min 22.0 mm",
    "22.0 mm or more",
    "limit 0.3 mm",
    "24 ± 0.1 mm",
    "88 Nm ± 5 Nm",
    "1-5/16",
    '3/4"',
    "0,8 mm",
    "65 ft-lb (88 Nm)",
  ]) {
    const read = readValues(typed);
    if (!read.ok) throw new Error(`${typed}: ${read.error}`);
    const again = readValues(valuesText(read.values));
    if (!again.ok) throw new Error(`${typed} → ${valuesText(read.values)}: ${again.error}`);
    const rows = (values: typeof read.values) =>
      values.map((value) => [value.role, value.action, value.text, value.quantity?.si, value.quantity?.unit]);
    expect(rows(again.values), `${typed} → ${valuesText(read.values)}`).toEqual(rows(read.values));
  }
});

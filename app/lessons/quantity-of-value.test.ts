import { expect, test } from "vitest";
import { readValues } from "~/quantities/parse";
import { quantityOfValue } from "./quantity-of-value";

// The parser is the judge: what it read out of a text must come back out of the stored row.
test.each([
  "65 lbf·ft",
  "88.0 Nm",
  "0.035 in",
  ".035 in",
  "1-5/16 in",
  "3/4 in",
  "30 Nm + 90°",
  "20 Nm, 40 Nm, + 90°",
  "80-95 Nm",
  "24.0 mm ± 0.1 mm",
  "min 22.0 mm",
  "220 kPa",
  "1/4 turn past contact",
  "6 US qt",
  "95 °C",
])("%s keeps its precision", (text) => {
  const read = readValues(text);
  if (!read.ok) throw new Error(read.error);
  for (const { role, action, quantity, text: typed } of read.values) {
    const row = {
      role,
      action,
      hardware: "either" as const,
      text: typed,
      dimension: quantity?.dimension ?? null,
      unit: quantity?.unit ?? null,
      value: quantity?.value ?? null,
      number: quantity?.si ?? null,
    };
    const back = quantityOfValue(row);
    if (quantity === null) expect(back).toBeNull();
    else
      expect(back).toMatchObject({
        value: quantity.value,
        unit: quantity.unit,
        places: quantity.places,
        si: quantity.si,
        significant: quantity.significant,
      });
  }
});

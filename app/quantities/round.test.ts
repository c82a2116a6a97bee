import { expect, test } from "vitest";
import rows from "../../tests/reference/rounding.json";
import { formatQuantity } from "./format";
import { readQuantity } from "./parse";
import { relativeRoundingError, roundFigure, roundToSignificant, sumAsGiven } from "./round";
import { convertNumber } from "./convert";
import { isUnit } from "./units";

type Row = {
  input: {
    value?: number;
    value_text?: string;
    from?: string;
    to?: string;
    what?: string;
    sig_digits?: number;
    kind?: string;
    decimals?: number;
    rule?: string;
  };
  expected: string | number;
  tolerance: number;
  source: string;
  verified: boolean;
};

test.each(rows as Row[])("rounding $input gives $expected (verified: $verified; $source)", (row) => {
  const { input, expected } = row;
  if (input.value !== undefined && input.from && input.to && isUnit(input.from) && isUnit(input.to)) {
    const read = readQuantity(`${input.value} ${input.from}`);
    if (!read.ok) throw new Error(read.error);
    if (input.kind === "max limit") {
      const exactly = convertNumber(input.value, input.from, input.to);
      expect(roundFigure(exactly, input.decimals ?? 0, "down")).toBe(expected);
      expect(formatQuantity(read.quantity, input.to, "down").figure).toBe(expected);
    } else expect(formatQuantity(read.quantity, input.to).figure).toBe(expected);
    return;
  }
  const text = input.value_text ?? "";
  if (input.what) {
    const percent = relativeRoundingError(text) * 100;
    expect(Math.abs(percent - Number(expected))).toBeLessThanOrEqual(row.tolerance);
  } else if (input.sig_digits) expect(roundToSignificant(text, input.sig_digits)).toBe(expected);
  else expect(sumAsGiven(text.split(" + "))).toBe(expected);
});

test("half goes to the even digit, and a decimal half is a half exactly", () => {
  expect(roundFigure(0.125, 2)).toBe("0.12");
  expect(roundFigure(0.135, 2)).toBe("0.14");
  expect(roundFigure(1.005, 2)).toBe("1.00");
  expect(roundFigure(2.675, 2)).toBe("2.68");
  expect(roundFigure(-0.4, 0)).toBe("0");
  expect(roundToSignificant("9.996", 3)).toBe("10.0");
});

test("up and down never pass the value, also below nought", () => {
  expect(roundFigure(83.7, 0, "up")).toBe("84");
  expect(roundFigure(92.5, 0, "down")).toBe("92");
  expect(roundFigure(-1.25, 1, "up")).toBe("-1.2");
  expect(roundFigure(-1.25, 1, "down")).toBe("-1.3");
  expect(roundFigure(84, 0, "up")).toBe("84");
});

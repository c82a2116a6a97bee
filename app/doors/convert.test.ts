import { spawnSync } from "node:child_process";
import { expect, test } from "vitest";

function door(name: string, ...args: string[]) {
  const run = spawnSync("node_modules/.bin/tsx", [`app/doors/${name}.ts`, ...args], { encoding: "utf8" });
  return { status: run.status, out: JSON.parse(run.stdout) as Record<string, unknown> };
}

test("the convert door prints value, unit and text", () => {
  const { status, out } = door("convert", "65 ft-lb", "N·m");
  expect(status).toBe(0);
  // 1 lbf·ft = 1.3558179483314 N·m (exact definitions in GNU units 2.22)
  expect(out.value as number).toBeCloseTo(65 * 1.3558179483314, 9);
  expect(out).toMatchObject({ unit: "N·m", text: "88\u2009N·m" });
});

test("the convert door refuses with a sentence, a place and exit 1", () => {
  expect(door("convert", "65 lbs", "N·m")).toEqual({
    status: 1,
    out: { error: "65 lbs is not a torque yet: ft-lb or in-lb?", at: 3 },
  });
  expect(door("convert", "65 ft-lb").status).toBe(1);
});

test("the grade door prints outcome, factor and text", () => {
  const asked = { text: "65 ft-lb", kind: "torque", value: 65, unit: "lbf·ft" };
  const { status, out } = door("grade", JSON.stringify({ asked, answer: "65 in-lb" }));
  expect(status).toBe(0);
  expect(out).toMatchObject({ outcome: "wrong-unit", factor: 12 });
  expect(door("grade", "not json")).toEqual({ status: 1, out: { error: "The argument is not JSON." } });
  expect(door("grade", JSON.stringify({ asked: { value: 1, unit: "bananas" }, answer: "1" })).status).toBe(1);
});

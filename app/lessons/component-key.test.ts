import { expect, test } from "vitest";
import { componentKey, componentsIn, isBushedJoint, otherNames } from "./component-key";
import { COMPONENTS } from "./components";

// The pairs of names below are common practice in US and UK shops, no source.

test("sway bar link, anti-roll bar link, stabiliser link and drop link are one component", () => {
  const key = componentKey("Sway bar link");
  for (const name of [
    "anti-roll bar link",
    "Anti roll bar drop links",
    "Stabiliser link",
    "drop link",
    "End-link",
  ])
    expect(componentKey(name), name).toBe(key);
});

test("other US and UK pairs meet in one key", () => {
  for (const [us, uk] of [
    ["lug nut", "wheel nut"],
    ["tie rod end", "track rod end"],
    ["control arm bushing", "wishbone bush"],
    ["brake rotor", "brake disc"],
    ["caliper bracket bolts", "calliper carrier bolt"],
    ["oil drain plug", "sump plug"],
    ["valve cover", "rocker cover"],
    ["parking brake", "handbrake"],
    ["transmission pan", "gearbox sump"],
    ["hood", "bonnet"],
    ["tire", "tyre"],
    ["serpentine belt", "auxiliary belt"],
    ["ground strap", "earth strap"],
  ] as const)
    expect(componentKey(us), `${us} = ${uk}`).toBe(componentKey(uk));
});

test("word order, plurals, hyphens, possessives and the word assembly change nothing", () => {
  expect(componentKey("Lower link nut, sway-bar")).toBe(componentKey("sway bar lower link nut"));
  expect(componentKey("Nuts, lower drop link")).toBe("sway-bar-link+lower+nut");
  expect(componentKey("the wheel bearing’s hub assembly")).toBe(componentKey("hub wheel bearing"));
});

test("a position said in the words or in its own field is the same place", () => {
  expect(componentKey("sway bar link nut", "lower")).toBe(componentKey("bottom sway bar link nut"));
});

test("upper and lower are different fasteners; left and right are not part of the key", () => {
  expect(componentKey("lower ball joint nut")).not.toBe(componentKey("upper ball joint nut"));
  expect(componentKey("left wheel nut")).toBe(componentKey("right wheel nut"));
});

test("a bar, its link and its bushing are three things", () => {
  expect(
    new Set([componentKey("sway bar"), componentKey("sway bar link"), componentKey("sway bar bush")]).size,
  ).toBe(3);
});

test("locknut, lock nut and jam nut are one", () => {
  expect(componentKey("tie rod locknuts")).toBe(componentKey("track rod end lock nut"));
  expect(componentKey("widget locknut")).toBe(componentKey("jam nut of the widget"));
});

test("words outside the vocabulary still give one key in any order", () => {
  expect(componentKey("Widget clamp")).toBe("clamp+widget");
  expect(componentKey("clamp of the widget")).toBe("clamp+widget");
  expect(componentKey("  ")).toBe("");
});

test("rubber-bushed joints are known by any of their names", () => {
  expect(isBushedJoint("Lower wishbone pivot bolt")).toBe(true);
  expect(isBushedJoint("damper lower bolt")).toBe(true);
  expect(isBushedJoint("Arm bushing bolt")).toBe(true);
  expect(isBushedJoint("rocker arm bushing")).toBe(false);
  expect(isBushedJoint("lug nut")).toBe(false);
  expect(isBushedJoint("Lower control arm ball joint nut")).toBe(false);
  expect(isBushedJoint("Trailing arm to hub carrier bolt")).toBe(false);
  expect(isBushedJoint("Strut to knuckle bolts")).toBe(false);
});

test("upper and lower stay two fasteners", () => {
  expect(componentKey("upper control arm bolt")).not.toBe(componentKey("lower control arm bolt"));
  expect(componentKey("control arm bolt", "lower")).toBe(componentKey("lower control arm bolt"));
});

test("every other name can be listed for search", () => {
  expect(otherNames("drop link nut")).toContain("sway bar link");
  expect(componentsIn("brake disc to hub screw").map((component) => component.key)).toEqual([
    "brake-rotor",
    "wheel-hub",
  ]);
});

test("the vocabulary holds over 120 components; keys and names are used once", () => {
  expect(COMPONENTS.length).toBeGreaterThanOrEqual(120);
  const keys = COMPONENTS.map((component) => component.key);
  expect(new Set(keys).size).toBe(keys.length);
  const names = COMPONENTS.flatMap((component) => component.names);
  expect(names.filter((name, n) => names.indexOf(name) !== n)).toEqual([]);
});

test("each name in the vocabulary is read as its own component", () => {
  for (const component of COMPONENTS)
    for (const name of component.names)
      expect(
        componentsIn(name).map((found) => found.key),
        name,
      ).toEqual([component.key]);
});

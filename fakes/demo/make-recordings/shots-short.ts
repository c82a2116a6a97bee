import type { Recording } from "./recording";
import { layOut, shopCard, wipe } from "./scenes/bench";
import { brake, jackAndStands, nutSeats, wheelStar } from "./scenes/chassis";
import { fill } from "./scenes/engine";
import { caliper } from "./scenes/gauges";
import { withPlate } from "./scenes/paint";
import { clickPull, nutAndWrench, wrenchScale } from "./scenes/wrenches";

export const CLICK_WRENCH: Recording = {
  job: "click-wrench",
  captions: "click-wrench.vtt",
  voice: { name: "en-us+f3", words: 165 },
  shots: [
    [0, clickPull()],
    [6_140, wrenchScale({ unit: "the range of the wrench" })],
    [15_230, shopCard({ lines: ["Torque wrench", "next test", "not dropped", "works this way"] })],
    [22_280, wrenchScale()],
    [30_800, wrenchScale({ unit: "turn, then lock" })],
    [36_400, shopCard({ lines: ["The unit", "The figure", "Read back"] })],
    [41_630, nutAndWrench({ size: "", way: "on", hand: true, caption: "by hand until it seats" })],
    [48_910, clickPull({ second: true })],
    [62_100, clickPull({ crowfoot: "square" })],
    [66_810, nutAndWrench({ size: "", way: "off", never: true, caption: "never to loosen" })],
    [71_100, wrenchScale({ unit: "down to the lowest mark, not below", down: true })],
    [79_180, shopCard({ lines: ["Dropped", "Out of use", "until tested"] })],
    [83_540, clickPull({ second: true })],
  ],
  sounds: [
    { atMs: 56_400, seconds: 0.2, kind: "click" },
    { atMs: 88_800, seconds: 0.2, kind: "click" },
  ],
};

export const WHEEL_NUTS: Recording = {
  job: "wheel-nuts",
  captions: "wheel-nuts.vtt",
  voice: { name: "en-us+m3", words: 165 },
  shots: [
    [0, wheelStar()],
    [5_900, shopCard({ lines: ["This vehicle", "This wheel", "Value, unit, source"] })],
    [9_650, nutSeats],
    [13_380, wipe({ tool: "cloth", face: "hub face, wheel face" })],
    [19_000, nutSeats],
    [24_700, wheelStar({ hand: true })],
    [36_660, wheelStar({ numbers: true })],
    [52_350, jackAndStands({ from: "down" })],
    [56_760, wheelStar({ numbers: true, stage: "first stage: about half" })],
    [60_830, wheelStar({ numbers: true, stage: "last stage: full value" })],
    [65_510, clickPull({ second: true })],
    [70_020, jackAndStands({ from: "down" })],
    [73_930, wheelStar({ stage: "check again" })],
  ],
  sounds: [{ atMs: 69_200, seconds: 0.2, kind: "click" }],
};

export const BRAKE_PADS: Recording = {
  job: "brake-pads-half-done",
  captions: "brake-pads-half-done.vtt",
  voice: { name: "en-us+m3", words: 165 },
  shots: [
    [0, jackAndStands({ from: "push" })],
    [6_730, layOut([{ name: "wet it down" }, { name: "or use|the vacuum" }])],
    [11_440, brake("out")],
    [15_780, brake("hang")],
    [19_430, brake("out")],
    [23_890, caliper({ shape: "pad", what: "pad lining, min 3.0 mm" })],
    [28_760, caliper({ shape: "pad", what: "pad lining, min 3.0 mm", readout: "2.6 mm" })],
    [32_390, caliper({ shape: "disc", what: "disc, min 22.0 mm" })],
    [36_360, caliper({ shape: "disc", what: "disc, min 22.0 mm", readout: "24.6 mm" })],
    [42_630, brake("piston")],
    [47_210, brake("fit")],
    [51_630, withPlate(brake("fit"), "Slide pin bolts", "27 N·m", "20 lbf·ft")],
    [59_490, brake("pump")],
    [64_080, fill({ vessel: "tank", still: true })],
  ],
  sounds: [{ atMs: 57_300, seconds: 0.2, kind: "click" }],
};

import { expect, test } from "vitest";
import { evenTickLabel, tickLabel } from "../../src/show/tick-label.js";

test("ticks of a logarithmic axis each take their own prefix", () => {
  expect([1e-12, 1e-9, 5e-8, 1, 1e3].map(tickLabel("V/√Hz"))).toEqual([
    "1 pV/√Hz",
    "1 nV/√Hz",
    "50 nV/√Hz",
    "1 V/√Hz",
    "1 kV/√Hz",
  ]);
  expect([0.1, 1, 10_000].map(tickLabel("Hz"))).toEqual(["0.1 Hz", "1 Hz", "10 kHz"]);
});

test("densities of ratios take no prefix: there is no millippm", () => {
  expect([0.05, 0.3].map(tickLabel("ppm/√Hz"))).toEqual(["0.05 ppm/√Hz", "0.3 ppm/√Hz"]);
});

test("ticks of a linear axis share the prefix of the largest", () => {
  const label = evenTickLabel("V");
  expect([-5e-7, 0, 5e-7, 1e-6, 1.5e-6].map((value) => label(value, 1.5e-6))).toEqual([
    "−0.5 µV",
    "0 µV",
    "0.5 µV",
    "1 µV",
    "1.5 µV",
  ]);
  expect([0, 250, 1000].map((value) => label(value, 1000))).toEqual(["0 kV", "0.25 kV", "1 kV"]);
});

test("units without prefix and axes at zero stay plain", () => {
  expect(evenTickLabel("ppm")(-0.5, 2)).toBe("−0.5 ppm");
  expect(evenTickLabel("")(3, 5)).toBe("3");
  expect(evenTickLabel("V")(0, 0)).toBe("0 V");
});

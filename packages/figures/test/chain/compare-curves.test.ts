import { butterworthLowPass, curveFromPoints, polyline, powerLaws, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { compareCurves } from "../../src/chain/compare-curves.js";
import { namedSpectrum } from "../../src/chain/named-spectrum.js";
import { demoPaths, demoTruth } from "./support/demo-truth.js";

const band = { fromHz: 1, toHz: 101 };
const white = (floor: number) => whiteFlicker({ floor, cornerHz: 0 });

test("the amplifiers of the demonstration through its filter: A1 before J1", () => {
  const comparison = compareCurves(
    [
      { name: "J1", spectrum: demoTruth.J1 },
      { name: "A1", spectrum: demoTruth.A1 },
    ],
    {
      fromHz: 0.1,
      toHz: Number.POSITIVE_INFINITY,
      weighting: butterworthLowPass({ order: 2, cutoffHz: 5 }),
      spotsHz: [1000],
    },
  );
  expect(comparison.rows.map(({ name, rank }) => [name, rank])).toEqual([
    ["A1", 1],
    ["J1", 2],
  ]);
  expectRelative(comparison.rows[0]?.rms ?? 0, demoPaths.bridge_channel_rti["A1"] as number, 3e-6);
  expectRelative(comparison.rows[1]?.rms ?? 0, demoPaths.bridge_channel_rti["J1 instead"] as number, 3e-6);
  expectRelative(comparison.rows[0]?.densities[0] ?? 0, 7.20007e-9, 1e-6);
  expect(JSON.parse(JSON.stringify(comparison))).toStrictEqual(comparison);
});

test("equal candidates stay in the order given", () => {
  const names = ["c", "a", "b"];
  const { rows } = compareCurves(
    names.map((name) => ({ name, spectrum: white(1e-9) })),
    band,
  );
  expect(rows.map(({ name }) => name)).toEqual(names);
});

test("references of different voltage compare behind their gains", () => {
  const { rows } = compareCurves(
    [
      { name: "5 V", spectrum: white(150e-9), gain: 1 / 5 },
      { name: "2.5 V", spectrum: white(100e-9), gain: 1 / 2.5 },
    ],
    band,
  );
  expect(rows[0]?.name).toBe("5 V");
  expectRelative(rows[1]?.overBest ?? 0, 40 / 30, 1e-14);
});

test("with a source resistance the total is e² + (i·R)² + 4kTR", () => {
  const currentNoise = powerLaws([{ coefficient: 4e-24, exponent: 0 }], { unit: "A" });
  const { rows, notes } = compareCurves([{ spectrum: white(3e-9), currentNoise }], {
    ...band,
    sourceOhms: 2e3,
    kelvin: 300,
  });
  const density = 9e-18 + 4e-24 * 4e6 + 4 * 1.380649e-23 * 300 * 2e3;
  expectRelative(rows[0]?.rms ?? 0, Math.sqrt(100 * density), 1e-14);
  expect(notes[0]).toContain("300 K");
});

describe("ties", () => {
  const curve = (density: number) =>
    polyline(
      curveFromPoints(
        [1, 101].map((frequency) => ({ frequency, density })),
        { unit: "V", pointUncertainty: 0.1 },
      ),
    );

  test("a distance within twice the uncertainty of the ratio is called a tie", () => {
    const at = (ratio: number) =>
      compareCurves(
        [
          { name: "one", spectrum: curve(1e-9) },
          { name: "other", spectrum: curve(ratio * 1e-9) },
        ],
        band,
      ).rows[1];
    const row = at(1.02);
    const limit = Math.exp(2 * Math.SQRT2 * (row?.standardUncertainty ?? 0));
    expect(at(1 + 0.95 * (limit - 1))?.tiedWithBest).toBe(true);
    expect(at(1 + 1.05 * (limit - 1))?.tiedWithBest).toBe(false);
  });

  test("exact models tie with nothing but themselves", () => {
    const { rows } = compareCurves(
      [
        { name: "a", spectrum: white(1e-9) },
        { name: "b", spectrum: white(1.0001e-9) },
      ],
      band,
    );
    expect(rows.map(({ tiedWithBest }) => tiedWithBest)).toEqual([true, false]);
  });
});

test("what a spectrum assumes is printed with it", () => {
  const { rows } = compareCurves([{ spectrum: namedSpectrum(white(1e-9), "typical", ["A typical curve."]) }], band);
  expect(rows[0]).toMatchObject({ name: "typical", notes: ["A typical curve."] });
});

test.each([
  ["none", [], /at least one/],
  [
    "two of one name",
    [
      { spectrum: white(1), name: "a" },
      { spectrum: white(2), name: "a" },
    ],
    /different names/,
  ],
  ["two units", [{ spectrum: white(1) }, { spectrum: whiteFlicker({ floor: 1, cornerHz: 0, unit: "g" }) }], /one unit/],
  ["a voltage for a current", [{ spectrum: white(1), currentNoise: white(1) }], /A\/√Hz/],
  ["a misspelt key", [{ spectrum: white(1), curent: white(1) }], /knows no option/],
] as const)("refuses %s", (_, candidates, message) => {
  expect(() => compareCurves(candidates, band)).toThrow(message);
});

import { bandNoise, curveFromPoints, firstOrderLowPass, NoiseError, polyline, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { expectedPeakToPeak } from "../../src/convert/expected-peak-to-peak.js";
import type { BasisVerdict } from "../../src/judge/basis-verdict.js";
import type { CheckOptions } from "../../src/judge/check-options.js";
import { checkStatedFigure, type StatedFigureCheck } from "../../src/judge/check-stated-figure.js";
import type { FigureView } from "../../src/judge/figure-views.js";

const law = whiteFlicker({ floor: 70e-9, cornerHz: 55 });
const curve = curveFromPoints(
  Array.from({ length: 33 }, (_, k) => {
    const frequency = 0.01 * 10 ** (k / 4);
    return { frequency, density: Math.sqrt(law.powerDensityAt(frequency)), uncertainty: 0.03 };
  }),
  { unit: "V" },
);
const band = { fromHz: 0.1, toHz: 10 };
const rms = bandNoise(polyline(curve), band).rms;
const stated = (value: number) => `${(value * 1e6).toPrecision(6)} µV peak-to-peak, 0.1 Hz to 10 Hz`;

const basisOf = ({ bases }: StatedFigureCheck, wanted: string): BasisVerdict =>
  bases.find(({ basis }) => basis === wanted) ?? bases[0];

test("convention and record, brick wall and usual filter stand side by side", () => {
  const check = checkStatedFigure(curve, stated(6.6 * rms));
  expect(check.views.map(({ basis, filter }) => `${basis}, ${filter}`)).toEqual([
    "convention, brick wall",
    "convention, usual filter",
    "record, brick wall",
    "record, usual filter",
  ]);
  const [convention, , record] = check.views;
  expectRelative(convention?.predicted ?? 0, 6.6 * rms, 1e-12);
  expectRelative(
    record?.predicted ?? 0,
    expectedPeakToPeak(polyline(curve), { ...band, recordSeconds: 10 }).mean,
    1e-12,
  );
});

test("the tolerance is the root of squares of points, rounding, spread of the records and unknown filter", () => {
  const check = checkStatedFigure(curve, "6.9 µV peak-to-peak, 0.1 Hz to 10 Hz");
  const record = basisOf(check, "record");
  const { points, rounding, records, filter, total } = record.tolerance;
  expectRelative(rounding, 0.05 / 6.9 / Math.sqrt(3), 1e-9);
  expectRelative(total, Math.hypot(points, rounding, records, filter), 1e-12);
  const [brick, usual] = check.views.filter(({ basis }) => basis === "record") as [FigureView, FigureView];
  expectRelative(filter, 0.5 * Math.abs(Math.log(usual.predicted / brick.predicted)), 1e-9);
  expectRelative(record.expanded.relative, 1.959963984540054 * total, 1e-12);
  expectRelative(record.smallestFactorSeen, Math.exp((1.959963984540054 + 1.6448536269514722) * total), 1e-12);
});

test("more records spread less and reach further; a known filter costs nothing", () => {
  const of = (options: CheckOptions) =>
    checkStatedFigure(curve, stated(6.6 * rms), { basis: "record", ...options }).bases[0];
  expect(of({ records: 20 }).tolerance.records).toBeLessThan(of({}).tolerance.records);
  expect(of({ records: 20 }).predicted).toBeGreaterThan(1.1 * of({}).predicted);
  expect(of({ weighting: "brick wall" }).tolerance.filter).toBe(0);
  const weighting = firstOrderLowPass({ cutoffHz: 5 });
  expect(of({ weighting, sampleRateHz: 100 }).tolerance.filter).toBe(0);
});

describe("what would reconcile a figure half as large, each taken alone", () => {
  const half = 3.3 * rms;
  const check = checkStatedFigure(curve, stated(half), { weighting: "brick wall" });
  const needed = (basis: string, what: string): number =>
    basisOf(check, basis).reconcilers.find((one) => one.what === what)?.needed ?? Number.NaN;

  test("a factor of 3.3, or a lower edge from which 6.6 × RMS is as stated", () => {
    expect(check.verdict).toBe("stated lower");
    expectRelative(needed("convention", "peak-to-peak factor"), 3.3, 1e-5);
    const edge = needed("convention", "lower edge");
    expectRelative(6.6 * bandNoise(polyline(curve), { fromHz: edge, toHz: 10 }).rms, half, 1e-4);
  });

  test("a corner or an exponent that halves the RMS of the model", () => {
    const model = (cornerHz: number, exponent: number) =>
      bandNoise(whiteFlicker({ floor: 70e-9, cornerHz, exponent }), band).rms;
    expectRelative(model(needed("convention", "corner"), 1), 0.5 * model(55, 1), 1e-3);
    expectRelative(model(55, needed("convention", "exponent")), 0.5 * model(55, 1), 1e-3);
  });

  test("a shorter record", () => {
    const seconds = needed("record", "record length");
    expect(seconds).toBeLessThan(5);
    const shown = expectedPeakToPeak(polyline(curve), { ...band, recordSeconds: seconds }).mean;
    expectRelative(shown, half, 0.01);
  });

  test("nothing where they agree", () => {
    const agreeing = checkStatedFigure(curve, stated(6.6 * rms), { basis: "convention" });
    expect([agreeing.verdict, agreeing.bases[0].reconcilers.length]).toEqual(["agrees", 0]);
  });
});

test("a density and an RMS have one basis each", () => {
  const density = checkStatedFigure(curve, "70 nV/√Hz at 10 kHz");
  expect([density.bases[0].basis, density.verdict, density.unit]).toEqual(["density", "agrees", "V/√Hz"]);
  const total = checkStatedFigure(curve, "2.5 µV RMS, 10 Hz to 1 kHz");
  expect(total.bases.map(({ basis }) => basis)).toEqual(["rms"]);
  expect(total.summary).toMatch(/the RMS of the band/);
});

describe("refusals", () => {
  test.each<[CheckOptions, RegExp]>([
    [{ basis: "guess" as never }, /basis must be "convention" or "record"; got "guess"/],
    [{ weighting: "bench" as never }, /must be "brick wall"; got "bench"/],
    [{ recordSeconds: 0 }, /recordSeconds/],
    [{ records: 1.5 }, /records/],
    [{ filter: 1 } as never, /filter/],
  ])("%o", (options, message) => {
    const run = () => checkStatedFigure(curve, stated(1e-6), options);
    expect(run).toThrow(NoiseError);
    expect(run).toThrow(message);
  });

  test("a band beyond the points", () => {
    expect(() => checkStatedFigure(curve, "5 µV peak-to-peak, 0.001 Hz to 10 Hz")).toThrow(/beyond/);
  });
});

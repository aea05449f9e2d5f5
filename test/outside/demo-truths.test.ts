import { readFileSync } from "node:fs";
import {
  bandNoise,
  butterworthLowPass,
  fitBandFigures,
  fitCurve,
  polyline,
  readCurve,
  scaleSpectrum,
} from "@quietband/core";
import { checkStatedFigure } from "@quietband/figures";
import { describe, expect, test } from "vitest";
import { demoCurve } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

// Source: fixtures/demo/true-answers.json and README.md: truths of the INVENTED parts, made with numpy and scipy.
interface Truth {
  readonly polyline_0p1_10: number;
  readonly polyline_10_1k: number;
  readonly points: readonly (readonly [number, number])[];
}

const truths = JSON.parse(
  readFileSync(new URL("../../fixtures/demo/true-answers.json", import.meta.url), "utf8"),
) as Readonly<Record<string, Truth>>;
const names = ["R1", "A1", "J1", "X1"] as const;

describe("the typed curves", () => {
  test.each(names)("%s reads to its points", (name) => {
    const { points } = readCurve(demoCurve(name));
    for (const [index, [frequency, density]] of (truths[name]?.points ?? []).entries()) {
      expectRelative(points[index]?.frequency ?? 0, frequency, 1e-12);
      expectRelative(points[index]?.density ?? 0, density, 1e-5);
    }
  });

  test.each(names)("%s: the polyline gives its band noise, J1 and X1 going on below with exponent 1", (name) => {
    const below = name === "J1" || name === "X1" ? 1 : ("refuse" as const);
    const spectrum = polyline(readCurve(demoCurve(name)), { beyond: { below } });
    expectRelative(bandNoise(spectrum, { fromHz: 0.1, toHz: 10 }).rms, truths[name]?.polyline_0p1_10 ?? 0, 2e-5);
    expectRelative(bandNoise(spectrum, { fromHz: 10, toHz: 1000 }).rms, truths[name]?.polyline_10_1k ?? 0, 2e-5);
  });
});

describe("the sensible fits of fixtures/demo/README.md", () => {
  test.each([
    ["R1", { toHz: 1000, exponent: "free" }, [71.65e-9, 53.19, 1.045], [0.0378, 0.142, 0.0222], 0.36],
    ["R1", { toHz: 1000, exponent: 1 }, [69.06e-9, 67.9, 1], [0.0354, 0.0887], 0.75],
    ["A1", { toHz: 1e4, exponent: 1 }, [7.126e-9, 0.02417, 1], [0.0178, 0.536], 0.19],
    [
      "J1",
      { toHz: 1e5, exponent: "free", misreadings: "downweight" },
      [4.933e-9, 78.75, 0.919],
      [0.0255, 0.168, 0.0374],
      0.87,
    ],
  ] as const)("%s %o", (name, options, [floor, corner, exponent], [ofFloor, ofCorner, ofExponent], perDegree) => {
    const fit = fitCurve(readCurve(demoCurve(name)), { model: "floorAndFlicker", ...options });
    expectRelative(fit.floor ?? 0, floor, 1e-3);
    expectRelative(fit.cornerHz ?? 0, corner, 1e-3);
    expectRelative(fit.exponent ?? 0, exponent, 1e-3);
    expectRelative(fit.standardErrors.floor ?? 0, ofFloor, 5e-3);
    expectRelative(fit.standardErrors.cornerHz ?? 0, ofCorner, 5e-3);
    if (ofExponent !== undefined) expectRelative(fit.standardErrors.exponent ?? 0, ofExponent, 5e-3);
    expect(Math.abs(fit.chiSquarePerDegree - perDegree)).toBeLessThan(0.006);
  });
});

test("the tilt channel agrees with a dense sum on a logarithmic grid, made here", () => {
  const points = truths["R1"]?.points ?? [];
  const steps = 400_000;
  const [low, high] = [Math.log(0.1), Math.log(20_000)];
  let sum = 0;
  let segment = 0;
  for (let k = 0; k < steps; k += 1) {
    const x = low + ((high - low) * (k + 0.5)) / steps;
    while (segment < points.length - 2 && x > Math.log(points[segment + 1]?.[0] ?? 0)) segment += 1;
    const [[f1 = 1, e1 = 1] = [], [f2 = 1, e2 = 1] = []] = [points[segment], points[segment + 1]];
    const share = (x - Math.log(f1)) / Math.log(f2 / f1);
    const density = Math.exp(Math.log(e1) + share * Math.log(e2 / e1));
    sum += (density ** 2 * 0.25 * Math.exp(x)) / (1 + (Math.exp(x) / 5) ** 4);
  }
  const spectrum = scaleSpectrum(polyline(readCurve(demoCurve("R1"))), 0.5);
  const weighting = butterworthLowPass({ order: 2, cutoffHz: 5 });
  const noise = bandNoise(spectrum, { fromHz: 0.1, toHz: 20_000, weighting });
  expectRelative(noise.power, (sum * (high - low)) / steps, 1e-8);
});

describe("stated figures", () => {
  const checkOf = (name: (typeof names)[number], text: string, relativeTo?: number) =>
    checkStatedFigure(readCurve(demoCurve(name)), text, { beyond: { below: 1 }, relativeTo });

  test("R1 agrees as a 10 s record and is lower than 6.6 × RMS", () => {
    const check = checkOf("R1", "7.2 µV peak-to-peak, 0.1 Hz to 10 Hz");
    expect(check.verdict).toBe("agrees");
    expect(check.bases.map(({ basis, verdict }) => `${basis}: ${verdict}`)).toEqual([
      "record: agrees",
      "convention: stated lower",
    ]);
    expect(check.summary).toMatch(
      /^agrees with the range of one record of 10 s, 7\.00 µV; lower than 6\.6 × RMS, 8\.25 µV, by 13 %$/,
    );
  });

  test("A1 and J1 agree, X1 is stated lower by a factor 2 as a record and by more by convention", () => {
    expect(checkOf("A1", "0.14 µV peak-to-peak, 0.1 Hz to 10 Hz").verdict).toBe("agrees");
    expect(checkOf("J1", "0.47 µV peak-to-peak, 0.1 Hz to 10 Hz").verdict).toBe("agrees");
    const check = checkOf("X1", "2,4 ppm peak-to-peak, 0,1 Hz to 10 Hz", 5);
    expect([check.verdict, check.bases[0].basis]).toEqual(["stated lower", "record"]);
    expect(1 / check.bases[0].ratio).toBeGreaterThan(1.9);
    expect(1 / check.bases[0].ratio).toBeLessThan(2.1);
  });

  test("each view lies where the simulation of the truth does, within what the points' scatter makes", () => {
    for (const name of ["R1", "A1", "J1", "X1"] as const) {
      const { mc_range10s_brick: brick, mc_range10s_fixture: fixture } = truths[name] as unknown as Record<
        string,
        { readonly mean: number; readonly spread: number }
      >;
      const stated = name === "X1" ? "12 µV peak-to-peak, 0.1 Hz to 10 Hz" : "1 µV peak-to-peak, 0.1 Hz to 10 Hz";
      const views = checkOf(name, stated).views.filter(({ basis }) => basis === "record");
      for (const [index, simulated] of [brick, fixture].entries()) {
        expectRelative(views[index]?.predicted ?? 0, simulated?.mean ?? 0, 0.035);
        expectRelative((views[index]?.spread ?? 0) * (views[index]?.predicted ?? 0), simulated?.spread ?? 0, 0.1);
      }
    }
  });

  test("floor and corner from the two stated figures alone, by factor 6.6 and 6.0, as the demo page says", () => {
    const solved = (rms: number, peakToPeak: number, peakToPeakFactor: number) =>
      fitBandFigures(
        [
          { fromHz: 0.1, toHz: 10, peakToPeak, peakToPeakFactor },
          { fromHz: 10, toHz: 1000, rms },
        ],
        { unit: "V", exponent: 1 },
      );
    const page = [
      [6.6, 75.39e-9, 43.3],
      [6.0, 73.68e-9, 55.5],
    ] as const;
    for (const [factor, floor, corner] of page) {
      const fit = solved(2.6e-6, 7.2e-6, factor);
      expectRelative(fit.floor ?? 0, floor, 1e-4);
      expectRelative(fit.cornerHz ?? 0, corner, 1e-3);
    }
    // A1: no nonnegative corner reproduces the pair by 6.6; a factor known to ± 0.3 leaves an upper limit
    const chopper = fitBandFigures(
      [
        {
          fromHz: 0.1,
          toHz: 10,
          peakToPeak: 0.14e-6,
          peakToPeakFactor: 6.6,
          peakToPeakFactorUncertainty: 0.3,
          roundingHalfUnit: 5e-9,
        },
      ],
      { unit: "V", exponent: 1, densities: [{ frequency: 1000, density: 7.2e-9, roundingHalfUnit: 0.05e-9 }] },
    );
    expect([chopper.model, chopper.cornerLimit?.side]).toEqual(["floor", "below"]);
    expect(chopper.cornerLimit?.hz).toBeLessThan(1);
  });

  test("J1 says that half of its band rests on an assumed exponent", () => {
    const check = checkStatedFigure(readCurve(demoCurve("J1")), "0.47 µV peak-to-peak, 0.1 Hz to 10 Hz", {
      beyond: { below: 1 },
    });
    expect(check.shareInsidePoints).toBeGreaterThan(0.5);
    expect(check.shareInsidePoints).toBeLessThan(0.54);
    expect(check.notes.some((note) => note.startsWith("Below 1 Hz"))).toBe(true);
  });

  test("a figure in another unit, or with no band, is refused", () => {
    const curve = readCurve(demoCurve("R1"));
    expect(() => checkStatedFigure(curve, "7 nA RMS, 0.1 Hz to 10 Hz")).toThrow(/is in A, the curve in V/);
    expect(() => checkStatedFigure(curve, "2 ppm peak-to-peak, 0.1 Hz to 10 Hz")).toThrow(/relativeTo/);
    expect(() => checkStatedFigure(curve, "very quiet")).toThrow(/Expected a stated figure such as/);
  });
});

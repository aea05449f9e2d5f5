import { describe, expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import type { BandFigure } from "../../src/fit/band-figure.js";
import { type BandFiguresOptions, fitBandFigures } from "../../src/fit/fit-band-figures.js";
import { OutOfDomainError } from "../../src/ground/errors.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";
import { cascade } from "../../src/weighting/cascade.js";
import { firstOrderHighPass } from "../../src/weighting/first-order-high-pass.js";
import { secondOrderLowPass } from "../../src/weighting/second-order-low-pass.js";

const half = 0.005e-6;
const totals: readonly BandFigure[] = [
  { fromHz: 0.1, toHz: 10, rms: 1.17e-6, roundingHalfUnit: half },
  { fromHz: 0.1, toHz: 100, rms: 2.06e-6, roundingHalfUnit: half },
];

// Common practice, no source: a pair of band totals of one part.
describe("two totals, 1.17 µV in 0.1 Hz to 10 Hz and 2.06 µV in 0.1 Hz to 100 Hz", () => {
  const fit = fitBandFigures(totals, { unit: "V", exponent: 1 });

  test("solve to one floor and one corner, as elimination by hand gives them", () => {
    // 9.9·P + ln 100·K = 1.17², 99.9·P + ln 1000·K = 2.06²; the corner is K/P
    const [a, b] = [1.17e-6 ** 2, 2.06e-6 ** 2];
    const [c, d] = [Math.log(100), Math.log(1000)];
    const floor = (a * d - b * c) / (9.9 * d - 99.9 * c);
    const corner = (9.9 * b - 99.9 * a) / (9.9 * d - 99.9 * c) / floor;
    expectRelative(fit.floor ?? 0, Math.sqrt(floor), 1e-13);
    expectRelative(fit.cornerHz ?? 0, corner, 1e-12);
    expect([fit.floor?.toPrecision(4), fit.cornerHz?.toPrecision(3)]).toEqual(["1.605e-7", "9.39"]);
  });

  test("reproduce both totals to the last digit", () => {
    for (const { fromHz, toHz, rms } of totals) expectRelative(bandNoise(fit, { fromHz, toHz }).rms, rms ?? 0, 4e-15);
    for (const { residualDb } of fit.figures) expect(Math.abs(residualDb)).toBeLessThan(1e-13);
  });

  test("say what the rounding of the totals alone leaves: 9.1 Hz to 9.7 Hz", () => {
    expect(fit.rounding?.cornerHz.map((hz) => hz.toPrecision(2))).toEqual(["9.1", "9.7"]);
    expect(fit.notes).toContain("The rounding of the figures alone leaves a corner of 9.1 Hz to 9.7 Hz.");
    const corners = [-1, 1].flatMap((one) =>
      [-1, 1].map(
        (other) =>
          fitBandFigures(
            [
              { fromHz: 0.1, toHz: 10, rms: 1.17e-6 + one * half },
              { fromHz: 0.1, toHz: 100, rms: 2.06e-6 + other * half },
            ],
            { unit: "V", exponent: 1 },
          ).cornerHz ?? 0,
      ),
    );
    expectRelative(fit.rounding?.cornerHz[0] ?? 0, Math.min(...corners), 1e-9);
    expectRelative(fit.rounding?.cornerHz[1] ?? 0, Math.max(...corners), 1e-9);
  });

  test("enter with half a unit over √3 (JCGM 100, 4.3.7), and their errors are what that makes of floor and corner", () => {
    for (const { stated, uncertainty } of fit.figures) expectRelative(uncertainty, half / Math.sqrt(3) / stated, 1e-12);
    const [one, other] = fit.costs;
    expectRelative(fit.standardErrors.cornerHz ?? 0, Math.hypot(one?.cornerHz ?? 0, other?.cornerHz ?? 0), 1e-9);
    expectRelative(fit.standardErrors.floor ?? 0, Math.hypot(one?.floor ?? 0, other?.floor ?? 0), 1e-9);
  });

  test("with the exponent only expected to be near 1, the answer says that it costs most", () => {
    const loose = fitBandFigures(totals, { unit: "V" });
    expectRelative(loose.cornerHz ?? 0, fit.cornerHz ?? 1, 1e-9);
    expect(loose.costs[0]?.cause).toBe("exponent");
    expect(loose.findings.map(({ code }) => code)).toEqual(["exponent-assumed", "rounding-leaves", "largest-cost"]);
  });
});

const truth = { floor: 40e-9, cornerHz: 25, exponent: 1.15 };
const exact = whiteFlicker(truth);
const rmsOf = (fromHz: number, toHz: number) => bandNoise(exact, { fromHz, toHz }).rms;

test("three figures, a spot density and a curve, noiseless, give floor, corner and a free exponent back", () => {
  const figures = [
    { fromHz: 0.1, toHz: 10, rms: rmsOf(0.1, 10) },
    { fromHz: 1, toHz: 100, rms: rmsOf(1, 100) },
    { fromHz: 10, toHz: 1e4, peakToPeak: 6.6 * rmsOf(10, 1e4), peakToPeakFactor: 6.6 },
  ];
  const densities = [{ frequency: 1e3, density: Math.sqrt(exact.powerDensityAt(1e3)) }];
  const curve = curveFromPoints(
    [3, 30, 300].map((frequency) => ({ frequency, density: Math.sqrt(exact.powerDensityAt(frequency)) })),
    { unit: "V" },
  );
  for (const given of [{ figures }, { figures: figures.slice(0, 2), densities }, { figures: [], curve }] as const) {
    const { figures: bands, ...rest } = given;
    const fit = fitBandFigures(bands, { unit: "V", exponent: "free", ...rest });
    expectRelative(fit.floor ?? 0, truth.floor, 1e-8);
    expectRelative(fit.cornerHz ?? 0, truth.cornerHz, 1e-7);
    expectRelative(fit.exponent ?? 0, truth.exponent, 1e-8);
  }
});

test("a figure measured through a real filter is taken through that filter", () => {
  const weighting = cascade(
    firstOrderHighPass({ cutoffHz: 0.1 }),
    secondOrderLowPass({ naturalHz: 10, q: Math.SQRT1_2 }),
  );
  const band = { fromHz: 1e-3, toHz: 1e4, weighting };
  const figures = [
    { ...band, rms: bandNoise(exact, band).rms },
    { fromHz: 10, toHz: 1e3, rms: rmsOf(10, 1e3) },
  ];
  const fit = fitBandFigures(figures, { unit: "V", exponent: truth.exponent });
  expectRelative(fit.cornerHz ?? 0, truth.cornerHz, 1e-9);
  const without = fitBandFigures([{ fromHz: 0.1, toHz: 10, rms: figures[0]?.rms ?? 0 }, ...figures.slice(1)], {
    unit: "V",
    exponent: truth.exponent,
  });
  expect(Math.abs((without.cornerHz ?? 0) / truth.cornerHz - 1)).toBeGreaterThan(0.02);
});

test("the convention alone, 6.6 or 6.0, moves a corner by a third", () => {
  const cornerBy = (peakToPeakFactor: number) =>
    fitBandFigures(
      [
        { fromHz: 0.1, toHz: 10, peakToPeak: 3e-6, peakToPeakFactor },
        { fromHz: 10, toHz: 1e3, rms: 2.9e-6 },
      ],
      { unit: "V", exponent: 1 },
    ).cornerHz ?? 0;
  expect(cornerBy(6.0) / cornerBy(6.6)).toBeGreaterThan(1.3);
  expect(cornerBy(6.0) / cornerBy(6.6)).toBeLessThan(1.5);
});

test("standard errors and costs are what scattered figures scatter by", () => {
  const normal = normalFrom(uniformFrom(5));
  const bands = [
    { fromHz: 0.1, toHz: 10, uncertainty: 0.02 },
    { fromHz: 10, toHz: 1e4, uncertainty: 0.01 },
  ];
  const fitWith = (errors: readonly number[]) =>
    fitBandFigures(
      bands.map((band, i) => ({ ...band, rms: rmsOf(band.fromHz, band.toHz) * Math.exp(errors[i] ?? 0) })),
      { unit: "V", exponent: truth.exponent },
    );
  const stated = fitWith([0, 0]);
  const scatterOf = (draw: () => readonly number[]): number => {
    const logs = Array.from({ length: 1500 }, () => Math.log(fitWith(draw()).cornerHz ?? 0));
    const mean = logs.reduce((sum, value) => sum + value, 0) / logs.length;
    return Math.sqrt(logs.reduce((sum, value) => sum + (value - mean) ** 2, 0) / logs.length);
  };
  // 1500 draws know a scatter to 2 %
  expectRelative(
    stated.standardErrors.cornerHz ?? 0,
    scatterOf(() => [0.02 * normal(), 0.01 * normal()]),
    0.08,
  );
  const [largest] = stated.costs;
  expect(largest?.figure).toBe("0.1 Hz to 10 Hz");
  expectRelative(
    largest?.cornerHz ?? 0,
    scatterOf(() => [0.02 * normal(), 0]),
    0.08,
  );
});

describe("figures that show no corner", () => {
  const wide = (rms: number): readonly BandFigure[] => [
    { fromHz: 0.1, toHz: 10, rms: 1e-6, uncertainty: 0.03 },
    { fromHz: 0.1, toHz: 1e3, rms, uncertainty: 0.003 },
  ];
  const white = Math.sqrt(999.9 / 9.9) * 1e-6;

  test("give a floor and how far the corner can go; that limit misfits by 1.645 standard deviations", () => {
    const fit = fitBandFigures(wide(white * 1.02), { unit: "V", exponent: 1 });
    expect([fit.model, fit.cornerHz, fit.cornerLimit?.side]).toEqual(["floor", 0, "below"]);
    expect(fit.notes?.join(" ")).toMatch(/show no corner: below 0\.\d+ Hz at 95 %/);
    const model = whiteFlicker({ floor: 1e-9, cornerHz: fit.cornerLimit?.hz ?? 1, exponent: 1 });
    const ratio = bandNoise(model, { fromHz: 0.1, toHz: 1e3 }).rms / bandNoise(model, { fromHz: 0.1, toHz: 10 }).rms;
    const off = (r: number) => (Math.log(white * 1.02e6) - Math.log(r)) / Math.hypot(0.03, 0.003);
    expectRelative(off(ratio) ** 2, off(white * 1e6) ** 2 + 1.6448536269514722 ** 2, 1e-4);
  });

  test("are refused beyond their own uncertainty, with the inequality that fails", () => {
    const run = () => fitBandFigures(wide(white * 1.2), { unit: "V", exponent: 1 });
    expect(run).toThrow(OutOfDomainError);
    expect(run).toThrow(
      /"0\.1 Hz to 1000 Hz" over "0\.1 Hz to 10 Hz" must lie between 1\.41 and 10 \(floor alone 10, 1\/f\^1 alone 1\.41\), and it is 12\.1 ±/,
    );
  });

  test("three figures of which every two could stand are refused by the one that is furthest off", () => {
    const figures: readonly BandFigure[] = [
      { fromHz: 1, toHz: 2, rms: 1e-6, uncertainty: 0.01 },
      { fromHz: 10, toHz: 20, rms: 3.1e-6, uncertainty: 0.01 },
      { fromHz: 1, toHz: 1.5, rms: 0.74e-6, uncertainty: 0.01 },
    ];
    const run = () => fitBandFigures(figures, { unit: "V", exponent: 1 });
    expect(run).toThrow(OutOfDomainError);
    expect(run).toThrow(/together: a floor comes nearest, and "1 Hz to 1\.5 Hz" is a factor 1\.04 off, 3\.69 of/);
  });

  test("or no floor: the 1/f part alone, and how low the corner can be", () => {
    const fit = fitBandFigures(wide(Math.SQRT2 * 1e-6 * 0.99), { unit: "V", exponent: 1 });
    expect([fit.model, fit.floor, fit.cornerLimit?.side]).toEqual(["flicker", undefined, "above"]);
    expectRelative(bandNoise(fit, { fromHz: 0.1, toHz: 10 }).rms, 1e-6, 0.02);
  });
});

describe("bad input is refused in one sentence", () => {
  const [first, second] = totals as [BandFigure, BandFigure];
  test.each<[readonly BandFigure[], BandFiguresOptions, RegExp]>([
    [totals, {}, /needs the unit of the figures/],
    [[first], { unit: "V" }, /need at least 2 figures; got 1/],
    [totals, { unit: "V", exponent: "free" }, /need at least 3 figures; got 2; give the exponent/],
    [
      [first, { ...second, peakToPeak: 1 }],
      { unit: "V" },
      /figures\[1\] must state either rms or peakToPeak .* got both/,
    ],
    [[first, { fromHz: 1, toHz: 2 }], { unit: "V" }, /got neither/],
    [[first, { fromHz: 1, toHz: 2, peakToPeak: 1e-6 }], { unit: "V" }, /needs the peakToPeakFactor/],
    [[first, { ...second, peakToPeakFactor: 6.6 }], { unit: "V" }, /takes no peakToPeakFactor/],
    [[first, { ...second, rms: -1 }], { unit: "V" }, /figures\[1\]\.rms must be a positive/],
    [[first, { ...second, uncertainty: 0 }], { unit: "V" }, /above 0 and at most 1/],
    [[first, { ...second, uncertainty: 1.5 }], { unit: "V" }, /got 1\.5/],
    [[first, { ...second, roundingHalfUnit: 3e-6 }], { unit: "V" }, /smaller than the figure/],
    [[first, { ...second, fromHz: 200 }], { unit: "V" }, /above fromHz = 200/],
    [[first, { ...second, filter: 1 } as never], { unit: "V" }, /no option "filter"/],
    [totals, { unit: "V", exponent: 5 }, /at most 4/],
    [totals, { unit: "V", densities: [{ frequency: 0, density: 1 }] }, /densities\[0\]\.frequency/],
  ])("%#", (figures, options, message) => {
    const run = () => fitBandFigures(figures, options);
    expect(run).toThrow(OutOfDomainError);
    expect(run).toThrow(message);
  });
});

import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitCurve } from "../../src/fit/fit-curve.js";
import type { FitOptions } from "../../src/fit/fit-options.js";
import { OutOfDomainError } from "../../src/ground/errors.js";

const decades = (low: number, high: number, count: number): number[] =>
  Array.from({ length: count }, (_, k) => low * (high / low) ** (k / (count - 1)));
const curveOf = (frequencies: readonly number[], powerAt: (hz: number) => number, unit = "V") =>
  curveFromPoints(
    frequencies.map((frequency) => ({ frequency, density: Math.sqrt(powerAt(frequency)) })),
    { unit, pointUncertainty: 0.03 },
  );

describe("noiseless curves give their parameters back", () => {
  test.each([
    [1e-12, 1e-3],
    [5e-9, 40],
    [1, 1e3],
    [1e3, 1e6],
  ])("floor %d, corner %d Hz", (floor, corner) => {
    const curve = curveOf(decades(corner * 1e-3, corner * 1e3, 25), (hz) => floor ** 2 * (1 + (corner / hz) ** 1.2));
    const fit = fitCurve(curve, { model: "floorAndFlicker", exponent: "free" });
    expectRelative(fit.floor ?? 0, floor, 1e-9);
    expectRelative(fit.cornerHz ?? 0, corner, 1e-9);
    expectRelative(fit.exponent ?? 0, 1.2, 1e-9);
  });

  test("floor alone, a power law alone, random walk below and a rise above", () => {
    const frequencies = decades(0.1, 1e5, 31);
    expectRelative(
      fitCurve(
        curveOf(frequencies, () => 25e-18),
        { model: "floor" },
      ).floor ?? 0,
      5e-9,
      1e-12,
    );
    expectRelative(
      fitCurve(
        curveOf(frequencies, (hz) => 1e-14 / hz ** 1.3),
        { model: "flicker", exponent: "free" },
      ).exponent ?? 0,
      1.3,
      1e-9,
    );
    const walk = (hz: number): number => 25e-18 * (1 + 300 / hz + (2 / hz) ** 2);
    const withWalk = fitCurve(curveOf(frequencies, walk), { model: "floorFlickerRandomWalk", exponent: 1 });
    expectRelative(withWalk.cornerHz ?? 0, 300, 1e-8);
    const rise = (hz: number): number => 25e-18 * (1 + 30 / hz + (hz / 2e4) ** 2);
    expectRelative(
      fitCurve(curveOf(frequencies, rise), { model: "floorFlickerRise", exponent: 1 }).floor ?? 0,
      5e-9,
      1e-8,
    );
  });

  test("a Lorentzian beside floor and 1/f integrates as what it was made of", () => {
    const trap = (hz: number): number => 25e-18 * (1 + 10 / hz + 3 / (1 + (hz / 150) ** 2));
    const fit = fitCurve(curveOf(decades(0.1, 1e5, 41), trap), { model: "floorFlickerLorentzian", exponent: 1 });
    const exact = 25e-18 * (999 + 10 * Math.log(1000) + 3 * 150 * (Math.atan(1000 / 150) - Math.atan(1 / 150)));
    expectRelative(bandNoise(fit, { fromHz: 1, toHz: 1000 }).power, exact, 1e-7);
  });
});

describe("it claims nothing that the points do not show", () => {
  test("a corner outside the points steps down and says why", () => {
    const flat = fitCurve(curveOf(decades(10, 1e5, 20), (hz) => 25e-18 * (1 + 1e-4 / hz)));
    expect([flat.model, flat.cornerHz]).toEqual(["floor", 0]);
    expect(flat.findings.map(({ code }) => code)).toContain("stepped-down");
    const steep = fitCurve(curveOf(decades(0.1, 10, 20), (hz) => 25e-18 * (1 + 1e7 / hz)));
    expect(steep.model).toBe("flicker");
  });

  test("three points do not carry floor, corner and a free exponent", () => {
    const curve = curveOf([1, 30, 1000], (hz) => 25e-18 * (1 + 40 / hz));
    expect(fitCurve(curve, { exponent: "free" }).model).not.toBe("floorAndFlicker");
  });

  test("points above the model at the top are named, with the range to fit instead", () => {
    const curve = curveOf(decades(0.1, 1e5, 25), (hz) => 25e-18 * (1 + 40 / hz) * (hz > 1.5e4 ? 1.6 : 1));
    const fit = fitCurve(curve, { model: "floorAndFlicker" });
    expect(fit.findings.find(({ code }) => code === "rises-at-the-top")?.message).toMatch(
      /up lie above the model: this curve rises there; fit up to/,
    );
  });
});

test("the fit is a spectrum: its band noise carries an uncertainty, and goes on beyond the points only when told", () => {
  const curve = curveOf(decades(1, 1e4, 17), (hz) => 25e-18 * (1 + 40 / hz));
  const fit = fitCurve(curve);
  expect(bandNoise(fit, { fromHz: 1, toHz: 100 }).standardUncertainty).toBeGreaterThan(0.001);
  expect(() => bandNoise(fit, { fromHz: 0.1, toHz: 100 })).toThrow(OutOfDomainError);
  const on = bandNoise(fitCurve(curve, { beyond: { below: 1 } }), { fromHz: 0.1, toHz: 100 });
  expect(on.outsidePoints.below).toBeGreaterThan(0.1);
  expect(on.uncertaintyParts?.map(({ name }) => name)).toEqual(["fit", "exponent below the points"]);
});

describe("bad options are refused in one sentence", () => {
  const curve = curveOf(decades(1, 1e4, 17), (hz) => 25e-18 * (1 + 40 / hz));

  test.each<[FitOptions, RegExp]>([
    [{ exponent: 0 }, /above 0 and at most 4/],
    [{ exponent: 4.1 }, /got 4.1/],
    [{ exponent: { mean: 1, standardUncertainty: 0 } }, /standardUncertainty/],
    [{ fromHz: 10, toHz: 5 }, /from fromHz up to a higher toHz/],
    [{ fromHz: 1.1, toHz: 1.2 }, /at least two points/],
    [{ model: "spline" as never }, /model must be one of/],
    [{ misreadings: "hide" as never }, /misreadings must be one of report, downweight/],
    [{ expnent: 1 } as never, /no option "expnent"/],
  ])("%o", (options, message) => {
    expect(() => fitCurve(curve, options)).toThrow(message);
    expect(() => fitCurve(curve, options)).toThrow(OutOfDomainError);
  });
});

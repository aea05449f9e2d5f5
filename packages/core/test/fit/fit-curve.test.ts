import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitCurve } from "../../src/fit/fit-curve.js";
import type { FitModelName, FitOptions } from "../../src/fit/fit-options.js";
import { NoiseError, OutOfDomainError } from "../../src/ground/errors.js";

const decades = (low: number, high: number, count: number): number[] =>
  Array.from({ length: count }, (_, k) => low * (high / low) ** (k / (count - 1)));
const curveOf = (frequencies: readonly number[], powerAt: (hz: number) => number, unit = "V") =>
  curveFromPoints(
    frequencies.map((frequency) => ({ frequency, density: Math.sqrt(powerAt(frequency)) })),
    { unit, pointUncertainty: 0.03 },
  );

describe("noiseless curves of every model give their parameters back to 1e-9", () => {
  // frequencies in units of the corner, power densities in units of the floor's
  const laws: Readonly<Record<Exclude<FitModelName, "floor">, (x: number) => number>> = {
    flicker: (x) => x ** -1.2,
    floorAndFlicker: (x) => 1 + x ** -1.2,
    floorFlickerRandomWalk: (x) => 1 + x ** -1.2 + (0.03 / x) ** 2,
    floorFlickerLorentzian: (x) => 1 + x ** -1.2 + 6 / (1 + (x / 9) ** 2),
    floorFlickerRise: (x) => 1 + x ** -1.2 + (x / 60) ** 2,
  };
  const levels = [1e-12, 5e-9, 1, 1e3];
  const corners = [1e-3, 0.7, 40, 3e4, 1e6];
  const cases = (Object.keys(laws) as (keyof typeof laws)[]).flatMap((model) =>
    corners.flatMap((corner) => levels.map((level) => [model, corner, level] as const)),
  );

  test.each(cases)("%s, corner %d Hz, level %d", (model, corner, level) => {
    const points = decades(corner * 1e-4, corner * 1e4, 49);
    const curve = curveOf(points, (hz) => level * level * laws[model](hz / corner));
    const fit = fitCurve(curve, { model, exponent: "free" });
    expectRelative(fit.exponent ?? 0, 1.2, 1e-9);
    for (const hz of [points[0] ?? 0, corner / 30, corner, 30 * corner, points.at(-1) ?? 0])
      expectRelative(Math.sqrt(fit.powerDensityAt(hz)), level * Math.sqrt(laws[model](hz / corner)), 1e-9);
    if (model === "flicker") return;
    expectRelative(fit.floor ?? 0, level, 1e-9);
    expectRelative(fit.cornerHz ?? 0, corner, 1e-9);
  });

  test.each(levels)("a floor of %d alone", (level) => {
    expectRelative(
      fitCurve(
        curveOf(decades(0.1, 1e5, 31), () => level * level),
        { model: "floor" },
      ).floor ?? 0,
      level,
      1e-12,
    );
  });
});

test("a Lorentzian beside floor and 1/f integrates as what it was made of", () => {
  const trap = (hz: number): number => 25e-18 * (1 + 10 / hz + 3 / (1 + (hz / 150) ** 2));
  const fit = fitCurve(curveOf(decades(0.1, 1e5, 41), trap), { model: "floorFlickerLorentzian", exponent: 1 });
  const exact = 25e-18 * (999 + 10 * Math.log(1000) + 3 * 150 * (Math.atan(1000 / 150) - Math.atan(1 / 150)));
  expectRelative(bandNoise(fit, { fromHz: 1, toHz: 1000 }).power, exact, 1e-9);
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

test("two suspects side by side at the top are called a bend, with the range to fit instead", () => {
  const frequencies = decades(0.1, 1e4, 16);
  const curve = curveOf(frequencies, (hz) => 25e-18 * (1 + 40 / hz) * (hz > 8e3 ? 0.2 : hz > 4e3 ? 2.8 : 1));
  expect(fitCurve(curve).findings.find(({ code }) => code === "bends-at-the-top")?.message).toMatch(
    /^The suspected points are the last ones, from 4640 Hz up: .* fit up to 2150 Hz\?$/,
  );
});

test("points that scatter no more than stated take the normal factor, others Student's", () => {
  const frequencies = decades(1, 1e4, 12);
  const still = fitCurve(curveOf(frequencies, (hz) => 25e-18 * (1 + 40 / hz)));
  expect([still.coverage.k.toFixed(3), still.coverage.basis.slice(0, 13)]).toEqual(["1.960", "normal factor"]);
  const rough = fitCurve(
    curveOf(frequencies, (hz) => 25e-18 * (1 + 40 / hz) * (Math.round(3 * Math.log10(hz)) % 2 === 0 ? 1.15 : 0.85)),
  );
  // 12 points and a prior for three parameters: t of 10 degrees
  expect([rough.degreesOfFreedom, rough.coverage.k.toFixed(3)]).toEqual([10, "2.228"]);
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

describe("points that cannot be fitted are refused before they reach the fit", () => {
  const points = (uncertainty: number, step = 1) =>
    [1, 2, 3].map((k) => ({ frequency: 10 + step * k, density: 1e-9, uncertainty }));

  test.each([
    [points(0), /uncertainty/],
    [points(1.01), /uncertainty/],
    [points(Number.NaN), /uncertainty/],
    [points(0.05, 0), /at least two points at different frequencies; got 1/],
  ])("%#", (given, message) => {
    expect(() => fitCurve(curveFromPoints(given, { unit: "V" }))).toThrow(message);
    expect(() => fitCurve(curveFromPoints(given, { unit: "V" }))).toThrow(NoiseError);
  });
});

describe("bad options are refused in one sentence", () => {
  const curve = curveOf(decades(1, 1e4, 17), (hz) => 25e-18 * (1 + 40 / hz));

  test.each<[FitOptions, RegExp]>([
    [{ exponent: 0 }, /above 0 and at most 4/],
    [{ exponent: 4.1 }, /got 4.1/],
    [{ exponent: { mean: 1, standardUncertainty: 0 } }, /standardUncertainty/],
    [{ fromHz: 10, toHz: 5 }, /from fromHz up to a higher toHz/],
    [{ fromHz: 1.1, toHz: 1.2 }, /at least two points/],
    [{ exponent: Number.NaN }, /got NaN/],
    [{ model: "floor", exponent: 1 }, /has no 1\/f part, so exponent says nothing/],
    [{ model: "spline" as never }, /model must be one of/],
    [{ misreadings: "hide" as never }, /misreadings must be one of report, downweight/],
    [{ expnent: 1 } as never, /no option "expnent"/],
  ])("%o", (options, message) => {
    expect(() => fitCurve(curve, options)).toThrow(message);
    expect(() => fitCurve(curve, options)).toThrow(OutOfDomainError);
  });
});

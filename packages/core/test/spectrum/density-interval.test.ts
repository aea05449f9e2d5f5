import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitCurve } from "../../src/fit/fit-curve.js";
import { OutOfDomainError } from "../../src/ground/errors.js";
import { densityInterval } from "../../src/spectrum/density-interval.js";
import { polyline } from "../../src/spectrum/polyline.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";

const curve = curveFromPoints(
  [1, 10, 100].map((frequency, k) => ({ frequency, density: 1e-8, uncertainty: 0.03 * (k + 1) })),
  { unit: "V", commonUncertainty: 0.04 },
);

test("at a point of a polyline it is that point's uncertainty and the axis's, between two both share", () => {
  const { frequencies, lower, upper, k } = densityInterval(polyline(curve));
  const at = (hz: number) => frequencies.findIndex((frequency) => Math.abs(frequency / hz - 1) < 1e-9);
  const spread = (index: number) => Math.log((upper[index] ?? 0) / (lower[index] ?? 0)) / (2 * k);
  expectRelative(spread(at(1)), Math.hypot(0.03, 0.04), 1e-9);
  expectRelative(spread(at(100)), Math.hypot(0.09, 0.04), 1e-9);
  expectRelative(spread(at(Math.sqrt(10))), Math.hypot(0.5 * 0.03, 0.5 * 0.06, 0.04), 1e-9);
});

test("a floor alone is known as its mean is, everywhere; few degrees of freedom widen it", () => {
  const fit = fitCurve(curve, { model: "floor" });
  const { lower, upper, k } = densityInterval(fit, { fromHz: 1, toHz: 50 });
  const u = Math.hypot(fit.standardErrors.floor ?? 0, 0.04);
  for (const [index, low] of lower.entries()) expectRelative(Math.log((upper[index] ?? 0) / low) / (2 * k), u, 1e-9);
  expectRelative(densityInterval(fit, { degreesOfFreedom: 2 }).k, 4.302652729749462, 1e-9);
});

test("refuses a spectrum without uncertainty, a range outside its support and a probability of 1", () => {
  expect(() => densityInterval(whiteFlicker({ floor: 1e-9, cornerHz: 1 }))).toThrow(/a fit or a polyline; got none/);
  expect(() => densityInterval(polyline(curve), { toHz: 1e3 })).toThrow(OutOfDomainError);
  expect(() => densityInterval(polyline(curve), { coverageProbability: 1 })).toThrow(/below 1/);
});

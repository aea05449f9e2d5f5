import { bandNoise, curveFromPoints, OutOfDomainError, polyline, powerLaws, whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { observationNoise } from "../../src/chain/observation-noise.js";

test("for 1/f noise a record of T seconds is the band from 0.400/T, e^(3/2−γ)/2π", () => {
  const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
  const edge = Math.exp(1.5 - 0.5772156649015329) / (2 * Math.PI);
  const rows = observationNoise(flicker, { toHz: 10 });
  expect(rows.map(({ seconds }) => seconds)).toEqual([10, 60, 600, 3600, 86400]);
  for (const { seconds, rms, aboveInverse } of rows) {
    const expected = bandNoise(flicker, { fromHz: edge / seconds, toHz: 10 }).rms;
    expectRelative(rms, expected, 20 / seconds / 1000);
    expect(aboveInverse).toBeLessThan(rms);
  }
});

test("white noise does not depend on how long one looks, but for the mean that is taken off", () => {
  const white = whiteFlicker({ floor: 1e-6, cornerHz: 0 });
  for (const { seconds, rms } of observationNoise(white, { toHz: 100, seconds: [10, 1000] }))
    expectRelative(rms * rms, 1e-12 * (100 - 0.5 / seconds), 1e-4 / seconds);
});

test("noise that is not said to go on below its points is refused", () => {
  const points = [1, 100].map((frequency) => ({ frequency, density: 1e-6 }));
  const curve = polyline(curveFromPoints(points, { unit: "V" }));
  expect(() => observationNoise(curve, { toHz: 10 })).toThrow(OutOfDomainError);
  expect(() => observationNoise(curve, { toHz: 10 })).toThrow(/beyond/);
});

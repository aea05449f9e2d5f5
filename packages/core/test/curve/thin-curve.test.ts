import { expect, test } from "vitest";
import { uniformFrom } from "../../../../test/support/random.js";
import { relativeError } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import type { Curve } from "../../src/curve/curve.js";
import { thinCurve } from "../../src/curve/thin-curve.js";
import { polyline } from "../../src/spectrum/polyline.js";

const uniform = uniformFrom(8);
const traced = (count: number, noise: number): Curve => ({
  unit: "V",
  label: "",
  points: Array.from({ length: count }, (_, k) => {
    const frequency = 0.1 * 10 ** ((6 * k) / (count - 1));
    const density = 70e-9 * Math.sqrt(1 + 50 / frequency) * (1 + noise * (uniform() - 0.5));
    return { frequency, density, uncertainty: 0.01, inFit: true };
  }),
  uncertaintyIs: "given",
  commonUncertainty: 0,
  source: [],
});

test("a trace of 1e5 vertices keeps the rms of every octave within the tolerance, with few points", () => {
  for (const [noise, most] of [
    [0, 60],
    [1e-3, 200],
  ] as const) {
    const curve = traced(100_000, noise);
    const thin = thinCurve(curve);
    expect(thin.points.length).toBeLessThan(most);
    expect([thin.points[0], thin.points.at(-1)]).toEqual([curve.points[0], curve.points.at(-1)]);
    const [whole, few] = [polyline(curve), polyline(thin)];
    for (let fromHz = 0.1; fromHz * 2 <= 1e5; fromHz *= 2) {
      const band = { fromHz, toHz: 2 * fromHz };
      // rms without uncertainty: the trace has 1e5 points
      const plain = { ...whole, sensitivities: [] };
      expect(relativeError(bandNoise(few, band).rms, bandNoise(plain, band).rms)).toBeLessThanOrEqual(1.0001e-3);
    }
  }
});

test("straight stretches keep their ends only, corners stay", () => {
  const points = [1, 2, 3, 4, 5, 6].map((k) => ({
    frequency: 10 ** k,
    density: k <= 3 ? 10 ** (-6 - k) : 1e-9,
    uncertainty: 0.05,
    inFit: true,
  }));
  const thin = thinCurve({ ...traced(2, 0), points });
  expect(thin.points.map(({ frequency }) => frequency)).toEqual([10, 1000, 1e6]);
});

test("a tolerance that is none is refused", () => {
  expect(() => thinCurve(traced(3, 0), { tolerance: 0 })).toThrow(/tolerance must be above 0 and at most 0.5; got 0/);
});

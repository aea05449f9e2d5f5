import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { pointCost } from "../../src/band/point-cost.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { polyline } from "../../src/spectrum/polyline.js";
import { butterworthLowPass } from "../../src/weighting/butterworth-low-pass.js";

const points = [0.1, 0.4, 1, 5, 20, 100, 1000].map((frequency, k) => ({
  frequency,
  density: 1e-8 * Math.sqrt(1 + 10 / frequency),
  uncertainty: 0.02 + 0.01 * (k % 3),
}));
const curve = curveFromPoints(points, { unit: "V" });
const band = { fromHz: 0.2, toHz: 300 };

test("the shares of independent points add up to all of the variance", () => {
  const costs = pointCost(curve, band);
  expectRelative(
    costs.reduce((sum, { share }) => sum + share, 0),
    1,
    1e-9,
  );
  const u = bandNoise(polyline(curve), band).standardUncertainty ?? 0;
  expectRelative(Math.hypot(...costs.map(({ relative }) => relative)), u, 1e-9);
});

test("each is what moving the point by its own uncertainty does to the RMS, also through a filter", () => {
  for (const weighting of [undefined, butterworthLowPass({ order: 2, cutoffHz: 3 })]) {
    const costs = pointCost(curve, { ...band, weighting });
    for (const [index, { relative }] of costs.entries()) {
      const rms = (way: number): number => {
        const moved = points.map((point, at) =>
          at === index ? { ...point, density: point.density * Math.exp(way * 1e-3 * point.uncertainty) } : point,
        );
        return bandNoise(polyline(curveFromPoints(moved, { unit: "V" })), { ...band, weighting }).rms;
      };
      // the response is integrated to 1e-6, so a point that hardly counts is known to that of the whole
      expect(Math.abs(relative - Math.log(rms(1) / rms(-1)) / 2e-3)).toBeLessThan(2e-6);
    }
  }
});

test("an error that all points share leaves less than all to the points", () => {
  const shared = curveFromPoints(points, { unit: "V", commonUncertainty: 0.05 });
  const sum = pointCost(shared, band).reduce((total, { share }) => total + share, 0);
  const own = pointCost(curve, band).reduce((total, { relative }) => total + relative ** 2, 0);
  expectRelative(sum, own / (own + 0.05 ** 2), 1e-9);
});

test("a band beyond the points is refused unless told", () => {
  expect(() => pointCost(curve, { fromHz: 0.01, toHz: 1 })).toThrow(/beyond/);
  expect(pointCost(curve, { fromHz: 0.01, toHz: 1, beyond: { below: 1 } })[0]?.share).toBeGreaterThan(0.05);
});

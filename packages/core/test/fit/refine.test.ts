import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitModel } from "../../src/fit/fit-model.js";
import type { FitModelName } from "../../src/fit/fit-options.js";
import { choosePoints } from "../../src/fit/fit-points.js";
import { refine } from "../../src/fit/refine.js";
import { linearLeastSquares } from "../../src/numerics/linear-least-squares.js";

const points = choosePoints(
  curveFromPoints(
    Array.from({ length: 30 }, (_, k) => {
      const frequency = 0.1 * 10 ** (k / 5);
      const wiggle = 1 + 0.04 * Math.sin(5 * k);
      return {
        frequency,
        density: 5e-9 * wiggle * Math.sqrt(1 + 30 / frequency + (frequency / 3e4) ** 2),
        uncertainty: 0.02 + 0.001 * (k % 7),
      };
    }),
    { unit: "V" },
  ),
  0,
  Number.POSITIVE_INFINITY,
);

test.each<FitModelName>(["flicker", "floorAndFlicker", "floorFlickerRise", "floorFlickerLorentzian"])(
  "%s: the covariance with the scale put back is that of the whole Jacobian, prior and all",
  (name) => {
    const model = fitModel(name, { kind: "prior", mean: 1, standardUncertainty: 0.15 });
    const { parameters, covariance } = refine(model, points);
    const columns = parameters.length + 1;
    const slopes = new Float64Array(parameters.length);
    const rows = Array.from(points.x, (x, i) => {
      model.shapeAt(x, parameters, slopes);
      return [1, ...slopes].map((slope) => 0.5 * (points.weight[i] ?? 0) * slope);
    });
    rows.push(Array.from({ length: columns }, (_, c) => (c === model.exponentAt + 1 ? 1 / 0.15 : 0)));
    const whole = linearLeastSquares(Float64Array.from(rows.flat()), new Float64Array(rows.length), columns)?.inverse;
    for (const [index, value] of (covariance ?? []).flat().entries()) expectRelative(value, whole?.[index] ?? 0, 1e-6);
  },
);

test("slopes over all points are those at one, and those of differences", () => {
  for (const name of ["flicker", "floorAndFlicker", "floorFlickerRandomWalk", "floorFlickerLorentzian"] as const) {
    const model = fitModel(name, { kind: "free" });
    const parameters = model.parameters.map((parameter, p) => (parameter === "exponent" ? 1.2 : 1 + 0.7 * p));
    const size = parameters.length;
    const [shape, slopes] = [new Float64Array(points.x.length), new Float64Array(points.x.length * size)];
    model.shapeOver(points.x, parameters, shape, slopes);
    const own = new Float64Array(size);
    for (const [i, x] of points.x.entries()) {
      expectRelative(model.shapeAt(x, parameters, own), shape[i] ?? 0, 1e-15);
      for (let p = 0; p < size; p += 1) {
        const moved = (by: number) => parameters.map((value, q) => (q === p ? value + by : value));
        const difference = model.shapeAt(x, moved(1e-5), own) - model.shapeAt(x, moved(-1e-5), own);
        expect(Math.abs((slopes[i * size + p] ?? 0) - difference / 2e-5)).toBeLessThan(1e-6 * (1 + Math.abs(x)));
      }
    }
  }
});

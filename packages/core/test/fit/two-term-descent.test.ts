import { describe, expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitModel } from "../../src/fit/fit-model.js";
import type { ResolvedExponent } from "../../src/fit/fit-options.js";
import { choosePoints } from "../../src/fit/fit-points.js";
import { twoTermDescent } from "../../src/fit/two-term-descent.js";
import { dampedLeastSquares } from "../../src/numerics/damped-least-squares.js";

const normal = normalFrom(uniformFrom(3));
const points = choosePoints(
  curveFromPoints(
    Array.from({ length: 40 }, (_, k) => {
      const frequency = 0.1 * 10 ** (k / 7);
      const density = 5e-9 * Math.sqrt(1 + (30 / frequency) ** 1.1) * Math.exp(0.05 * normal());
      return { frequency, density, uncertainty: 0.03 + 0.01 * (k % 4) };
    }),
    { unit: "V" },
  ),
);
const start = [2, 0.8];

const exponents: readonly ResolvedExponent[] = [
  { kind: "fixed", value: 1.2 },
  { kind: "free" },
  { kind: "prior", mean: 1, standardUncertainty: 0.15 },
];

describe("it ends where the general engine ends that has the scale as one more parameter and never squares the condition", () => {
  test.each(exponents)("$kind", (exponent) => {
    const model = fitModel("floorAndFlicker", exponent);
    const size = model.parameters.length;
    const prior = exponent.kind === "prior" ? 1 : 0;
    const slopes = new Float64Array(size);
    const general = dampedLeastSquares(
      (parameters, residuals, jacobian) => {
        for (const [i, x] of points.x.entries()) {
          const w = points.weight[i] ?? 0;
          const shape = model.shapeAt(x, parameters.subarray(1), slopes);
          residuals[i] = w * (0.5 * ((parameters[0] ?? 0) + shape) - (points.y[i] ?? 0));
          jacobian.set([0.5 * w, ...slopes.map((slope) => 0.5 * w * slope)], i * (size + 1));
        }
        if (exponent.kind !== "prior") return;
        residuals[40] = ((parameters[2] ?? 0) - exponent.mean) / exponent.standardUncertainty;
        jacobian.set([0, 0, 1 / exponent.standardUncertainty], 40 * (size + 1));
      },
      [-38, ...start.slice(0, size)],
      40 + prior,
    );
    const found = twoTermDescent(model, points, start);
    expect([found.converged, general.converged]).toEqual([true, true]);
    expectRelative(found.sumOfSquares, general.sumOfSquares, 1e-12);
    for (let p = 0; p < size; p += 1) {
      expectRelative(found.parameters[p] ?? 0, general.parameters[p + 1] ?? 0, 1e-6);
      for (let q = 0; q < size; q += 1)
        expectRelative(found.inverse?.[p * size + q] ?? 0, general.inverse?.[(p + 1) * (size + 1) + q + 1] ?? 0, 1e-5);
    }
  });
});

test("points that show no corner leave corner and exponent without covariance, or a search that has not ended", () => {
  const flat = choosePoints(
    curveFromPoints(
      [1, 10, 100, 1000].map((frequency) => ({ frequency, density: 1e-9 })),
      { unit: "V" },
    ),
  );
  const { inverse, converged } = twoTermDescent(fitModel("floorAndFlicker", { kind: "free" }), flat, [-20, 1]);
  expect(converged && inverse !== undefined && Math.max(...inverse) < 1e3).toBe(false);
});

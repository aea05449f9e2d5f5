import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { dampedLeastSquares, type ResidualFunction } from "../../src/numerics/damped-least-squares.js";

// NIST sets through this engine: test/outside/least-squares.test.ts.

/** The valley of H. H. Rosenbrock, Computer Journal 3 (1960) 175, minimum 0 at (1, 1), from his start (−1.2, 1). */
const valley: ResidualFunction = ({ 0: a = 0, 1: b = 0 }, residuals, jacobian) => {
  residuals.set([10 * (b - a * a), 1 - a]);
  jacobian.set([-20 * a, 10, -1, 0]);
};

test("Rosenbrock's valley is followed to its end, in any units of the parameters", () => {
  for (const unit of [1, 1e-9, 1e12]) {
    const scaled: ResidualFunction = ({ 0: a = 0, 1: b = 0 }, residuals, jacobian) => {
      valley(Float64Array.from([a, b / unit]), residuals, jacobian);
      jacobian[1] = (jacobian[1] ?? 0) / unit;
    };
    const { parameters, converged, inverse } = dampedLeastSquares(scaled, [-1.2, unit], 2);
    expect(converged).toBe(true);
    expectRelative(parameters[0] ?? 0, 1, 1e-12);
    expectRelative(parameters[1] ?? 0, unit, 1e-12);
    // JᵀJ = [[401, −200], [−200, 100]] at (1, 1): its inverse is [[1, 2], [2, 4.01]]
    expectRelative(inverse?.[0] ?? 0, 1, 1e-9);
    expectRelative(inverse?.[3] ?? 0, 4.01 * unit * unit, 1e-9);
  }
});

test("a parameter that nothing depends on stays where it was and leaves no covariance", () => {
  const blind: ResidualFunction = ({ 0: a = 0 }, residuals, jacobian) => {
    residuals.set([a - 3, 2 * (a - 3)]);
    jacobian.set([1, 0, 2, 0]);
  };
  const { parameters, inverse } = dampedLeastSquares(blind, [0, 5], 2);
  expectRelative(parameters[0] ?? 0, 3, 1e-12);
  expect(parameters[1]).toBe(5);
  expect(inverse).toBeUndefined();
});

test("a search cut short says that it has not converged", () => {
  expect(dampedLeastSquares(valley, [-1.2, 1], 2, { mostSteps: 3 }).converged).toBe(false);
});

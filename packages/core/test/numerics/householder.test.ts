import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { backSubstitute, inverseOfSquare, triangularise } from "../../src/numerics/householder.js";

test("a 3 by 2 system with a solution in whole numbers is solved, and (AᵀA)⁻¹ is that of the integers", () => {
  // AᵀA = [[14, 32], [32, 77]], determinant 54
  const a = Float64Array.from([1, 4, 2, 5, 3, 6]);
  const b = Float64Array.from([1 * 7 - 4 * 2, 2 * 7 - 5 * 2, 3 * 7 - 6 * 2]);
  const diagonal = new Float64Array(2);
  expect(triangularise(a, b, 3, diagonal)).toBe(true);
  const x = new Float64Array(2);
  backSubstitute(a, diagonal, b, x);
  expectRelative(x[0] ?? 0, 7, 1e-14);
  expectRelative(x[1] ?? 0, -2, 1e-14);
  const inverse = inverseOfSquare(a, diagonal);
  for (const [index, value] of [77 / 54, -32 / 54, -32 / 54, 14 / 54].entries())
    expectRelative(inverse[index] ?? 0, value, 1e-14);
});

test("a dependent column is told, whatever the columns' units, and the triangle is still complete", () => {
  const a = Float64Array.from([1e-9, 2e-9, 1e6, 2e-9, 4e-9, 5e6, 3e-9, 6e-9, -1e6]);
  const diagonal = new Float64Array(3);
  expect(triangularise(a, new Float64Array(3), 3, diagonal)).toBe(false);
  expect(Math.abs(diagonal[2] ?? 0)).toBeGreaterThan(1e6);
  expect(triangularise(Float64Array.from([0, 0]), new Float64Array(2), 2, new Float64Array(1))).toBe(false);
});

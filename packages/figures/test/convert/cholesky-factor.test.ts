import { expect, test } from "vitest";
import { choleskyFactor } from "../../src/convert/cholesky-factor.js";

test("the factor times itself is the matrix; a column without power of its own is none", () => {
  const matrix = [
    [4, 2, -2],
    [2, 10, 2],
    [-2, 2, 6],
  ];
  const factor = choleskyFactor(matrix.map((row) => Float64Array.from(row)));
  expect(factor.map((row) => Array.from(row))).toEqual([
    [2, 0, 0],
    [1, 3, 0],
    [-1, 1, 2],
  ]);
  const flat = choleskyFactor([Float64Array.from([1, 1]), Float64Array.from([1, 1])]);
  expect(flat.map((row) => Array.from(row))).toEqual([
    [1, 0],
    [1, 0],
  ]);
});

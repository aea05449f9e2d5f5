import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { latinHypercube } from "../../src/convert/latin-hypercube.js";
import { principalPaths } from "../../src/convert/principal-paths.js";

test("a cosine of random phase is two components, and its records have no mean", () => {
  const structure = Float64Array.from({ length: 60 }, (_, lag) => 1 - Math.cos((2 * Math.PI * lag) / 12));
  const paths = principalPaths(structure, 3) ?? [];
  expect(paths.length).toBeGreaterThan(2047);
  for (const path of paths.slice(0, 20))
    expect(Math.abs(path.reduce((sum, value) => sum + value, 0))).toBeLessThan(1e-9);
  const square = paths.reduce((sum, path) => sum + (path[7] ?? 0) ** 2, 0) / paths.length;
  expectRelative(square, 1, 0.03);
  expect(principalPaths(structure, 1)).toBeUndefined();
});

test("a hypercube takes every cell of the normal law once, and the values of each row are their own", () => {
  const [one = new Float64Array(), other = new Float64Array()] = latinHypercube(2, 1000);
  expect(new Set(one).size).toBe(1000);
  expect(Array.from(one.toSorted())).toEqual(Array.from(other.toSorted()));
  expectRelative(one.reduce((sum, value) => sum + value * value, 0) / 1000, 1, 0.01);
  expect(Math.abs(one.reduce((sum, value, index) => sum + value * (other[index] ?? 0), 0)) / 1000).toBeLessThan(0.1);
});

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { slowPaths } from "../../src/convert/slow-paths.js";

/** A random walk of unit steps: γ(k) = k/2. */
const walk = Float64Array.from({ length: 24 }, (_, lag) => lag / 2);

test("paths have no mean, and together the mean square of their covariance", () => {
  const { paths, points, power } = slowPaths(walk, 256);
  expect([paths.length, points]).toEqual([256, 24]);
  for (const path of paths) expect(Math.abs(path.reduce((sum, value) => sum + value, 0))).toBeLessThan(1e-9);
  // about its own mean a walk of n unit steps has (n² − 1)/(6n)
  expectRelative(power, (24 * 24 - 1) / (6 * 24), 1e-6);
  const drawn = paths.reduce((sum, path) => sum + path.reduce((own, value) => own + value * value, 0) / points, 0);
  expectRelative(drawn / paths.length, power, 0.02);
});

test("steps of a path scatter as the structure function says", () => {
  const { paths } = slowPaths(walk, 512);
  const square = paths.reduce((sum, path) => sum + ((path[13] ?? 0) - (path[5] ?? 0)) ** 2, 0) / paths.length;
  expectRelative(square, 8, 0.12);
});

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { largestOf } from "../../src/convert/largest-of.js";

test("the largest of several dice", () => {
  const values = Float64Array.from([1, 2, 3, 4, 5, 6]);
  const chances = values.map(() => 1 / 6);
  const one = { mean: 3.5, standardDeviation: Math.sqrt(35 / 12) };
  expect(largestOf({ values, chances }, 1, one)).toEqual(one);
  // of two dice: Σ k·(2k − 1)/36 = 161/36
  expectRelative(largestOf({ values, chances }, 2, one).mean, 161 / 36, 1e-12);
  expect(largestOf({ values, chances }, 1e6, one).mean).toBeGreaterThan(5.4);
});

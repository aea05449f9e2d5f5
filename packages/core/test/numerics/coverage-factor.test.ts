import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { coverageFactor } from "../../src/numerics/coverage-factor.js";

// Source: scipy.stats.t.ppf and norm.ppf, scipy 1.17.1.
test.each([
  [0.95, 1, 12.706204736174694],
  [0.95, 2, 4.302652729749462],
  [0.95, 5, 2.5705818356363146],
  [0.95, 10, 2.228138851986274],
  [0.95, 30, 2.0422724563012378],
  [0.95, 200, 1.9718962236339088],
  [0.99, 7, 3.4994832973504924],
  [0.95, Number.POSITIVE_INFINITY, 1.959963984540054],
])("%d coverage with %d degrees of freedom", (probability, degrees, factor) => {
  expectRelative(coverageFactor(probability, degrees), factor, 1e-11);
});

test("one degree of freedom is Cauchy's law: tan(π/2·p)", () => {
  for (const p of [0.1, 0.5, 0.9]) expectRelative(coverageFactor(p, 1), Math.tan((Math.PI / 2) * p), 1e-12);
  expect(coverageFactor(0.5, 3)).toBeLessThan(coverageFactor(0.6, 3));
});

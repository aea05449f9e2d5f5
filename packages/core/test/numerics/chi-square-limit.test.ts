import { expect, test } from "vitest";
import { relativeError } from "../../../../test/support/relative.js";
import { chiSquareLimit } from "../../src/numerics/chi-square-limit.js";

// Source: scipy.stats.chi2.ppf(0.95, ν), scipy 1.17.1.
test.each([
  [1, 3.841458820694124, 0.025],
  [2, 5.991464547107979, 0.01],
  [3, 7.814727903251179, 0.006],
  [10, 18.307038053275146, 0.001],
  [30, 43.77297182574219, 0.001],
])("%d degrees of freedom", (degrees, quantile, tolerance) => {
  expect(relativeError(chiSquareLimit(degrees), quantile)).toBeLessThan(tolerance);
});

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { wholePower } from "../../src/numerics/whole-power.js";

test("it is the product of n equal factors, 1 for none, and leaves the range of doubles without NaN", () => {
  for (const x of [0.3, 1, 1.7, -2.5])
    for (let n = 0; n < 30; n += 1) expectRelative(wholePower(x, n), x ** n, n * 2.3e-16);
  expect(wholePower(0, 0)).toBe(1);
  expect(wholePower(0, 24)).toBe(0);
  expect(wholePower(1e20, 24)).toBe(Number.POSITIVE_INFINITY);
  expect(wholePower(1e-20, 24)).toBe(0);
  expect(wholePower(Number.POSITIVE_INFINITY, 2)).toBe(Number.POSITIVE_INFINITY);
});

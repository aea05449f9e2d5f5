import fc from "fast-check";
import { expect, test } from "vitest";
import { productError } from "../../src/numerics/product-error.js";

test("a product and its error are exact, checked in whole numbers", () => {
  const whole = fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 });
  fc.assert(
    fc.property(whole, whole, whole, whole, (a, b, c, d) => {
      const [x, y] = [a * 2 ** 21 + (b & 0x1fffff), c * 2 ** 21 + (d & 0x1fffff)];
      expect(BigInt(x * y) + BigInt(productError(x, y))).toBe(BigInt(x) * BigInt(y));
    }),
    { seed: 1971, numRuns: 1000 },
  );
});

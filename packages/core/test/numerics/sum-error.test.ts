import fc from "fast-check";
import { expect, test } from "vitest";
import { sumError } from "../../src/numerics/sum-error.js";

test("a sum and its error are exact, in either order, checked in whole numbers", () => {
  const size = fc.tuple(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }), fc.integer({ min: 0, max: 90 }));
  fc.assert(
    fc.property(size, size, ([a, p], [b, q]) => {
      const [x, y] = [a * 2 ** p, b * 2 ** q];
      expect(BigInt(x + y) + BigInt(sumError(x, y))).toBe(BigInt(x) + BigInt(y));
      expect(sumError(y, x) === sumError(x, y)).toBe(true);
    }),
    { seed: 1969, numRuns: 1000 },
  );
});

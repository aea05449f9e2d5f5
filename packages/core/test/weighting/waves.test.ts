import fc from "fast-check";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { evenSinePower, multiplyWaves, wave } from "../../src/weighting/waves.js";
import type { Wave } from "../../src/weighting/weighting.js";

function valueAt(waves: readonly Wave[], hz: number): number {
  return waves.reduce(
    (sum, { seconds, cosine, sine }) =>
      sum + cosine * Math.cos(2 * Math.PI * hz * seconds) + sine * Math.sin(2 * Math.PI * hz * seconds),
    0,
  );
}

const someWaves = fc.array(
  fc.tuple(fc.integer({ min: 0, max: 9 }), fc.integer({ min: -9, max: 9 }), fc.integer({ min: -9, max: 9 })),
  { minLength: 1, maxLength: 6 },
);

test("a product of waves has the product of their values, with one wave a delay", () => {
  fc.assert(
    fc.property(someWaves, someWaves, fc.double({ min: 0, max: 5, noNaN: true }), (one, other, hz) => {
      const [first, second] = [one, other].map((list) => list.map(([k, c, s]) => wave(k * 0.1, c, k === 0 ? 0 : s)));
      const product = multiplyWaves(first ?? [], second ?? []);
      const size = 200 * 36;
      expect(Math.abs(valueAt(product, hz) - valueAt(first ?? [], hz) * valueAt(second ?? [], hz)) / size).toBeLessThan(
        1e-14,
      );
      const delays = product.map(({ seconds }) => Math.round(seconds * 10));
      expect(new Set(delays).size).toBe(delays.length);
    }),
    { seed: 1822, numRuns: 500 },
  );
});

test("a power of a sine is its waves", () => {
  for (let order = 1; order <= 12; order += 1)
    for (const turns of [0.05, 0.31, 0.5, 1.77])
      expect(Math.abs(valueAt(evenSinePower(order, 1), turns) - Math.sin(Math.PI * turns) ** (2 * order))).toBeLessThan(
        4e-15,
      );
});

test("its mean is the one of Wallis: (2N − 1)!!/(2N)!!", () => {
  let mean = 1;
  for (let order = 1; order <= 12; order += 1) {
    mean *= (2 * order - 1) / (2 * order);
    expectRelative(evenSinePower(order, 1)[0]?.cosine ?? Number.NaN, mean, 1e-15);
  }
});

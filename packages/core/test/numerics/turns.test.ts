import fc from "fast-check";
import { expect, test } from "vitest";
import { turnsOf } from "../../src/numerics/turns.js";

const unit = 1n << 1200n;

/** A double as an exact multiple of 2^−1200. */
function exactly(value: number): bigint {
  const exponent = Math.max(Math.floor(Math.log2(Math.abs(value))) - 60, -1000);
  const whole = BigInt(value / 2 ** exponent);
  return exponent >= 0 ? whole * (1n << BigInt(exponent)) * unit : (whole * unit) / (1n << BigInt(-exponent));
}

/** The rest of a·b beyond its nearest whole number, by whole numbers of any length. */
function slowly(a: number, b: number): number {
  const product = (exactly(a) * exactly(b)) / unit;
  const rest = ((product % unit) + unit) % unit;
  const nearest = 2n * rest > unit ? rest - unit : rest;
  return Number(nearest / (1n << 1000n)) / 2 ** 200;
}

test("the rest of a product is right to an ulp of itself, however many turns there are", () => {
  const size = fc.tuple(fc.double({ min: 0.5, max: 1, noNaN: true }), fc.integer({ min: -40, max: 80 }));
  fc.assert(
    fc.property(size, size, ([a, p], [b, q]) => {
      const [first, second] = [a * 2 ** p, b * 2 ** q];
      const [found, expected] = [turnsOf(first, second), slowly(first, second)];
      // half a turn forth is half a turn back
      const apart = Math.abs(found - expected);
      expect(Math.min(apart, 1 - apart)).toBeLessThanOrEqual(3e-16 * Math.abs(expected));
    }),
    { seed: 314, numRuns: 2000 },
  );
});

test("it is within half a turn, and zero where the phase is out of reach of doubles", () => {
  expect(turnsOf(1e9 + 0.25, 1)).toBe(0.25);
  expect(turnsOf(0.1, 3)).toBe(-slowly(0.1, -3));
  for (const [a, b] of [
    [1e305, 1e-305],
    [1e200, 1e200],
    [1e308, 10],
  ] as const)
    expect(Math.abs(turnsOf(a, b))).toBeLessThanOrEqual(0.5);
});

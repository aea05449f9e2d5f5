import fc from "fast-check";
import { expect, test } from "vitest";
import { turnsAtRate } from "../../src/weighting/turns-at-rate.js";

test("whole turns leave exactly, checked in whole numbers", () => {
  fc.assert(
    fc.property(
      fc.maxSafeInteger(),
      fc.integer({ min: 1, max: 2 ** 30 }),
      fc.integer({ min: 0, max: 40 }),
      (a, b, e) => {
        const hz = Math.abs(a) * 2 ** e;
        const rest = Number(BigInt(hz) % BigInt(b));
        expect(turnsAtRate(hz, b)).toBe((rest > 0.5 * b ? rest - b : rest) / b);
      },
    ),
    { seed: 48, numRuns: 1000 },
  );
});

test("half a turn is half a turn, and whole ones are none", () => {
  expect(turnsAtRate(500, 1000)).toBe(0.5);
  expect(turnsAtRate(1500, 1000)).toBe(0.5);
  expect(turnsAtRate(7000, 1000)).toBe(0);
  expect(turnsAtRate(999, 1000)).toBe(-0.001);
});

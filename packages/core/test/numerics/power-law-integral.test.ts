import fc from "fast-check";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { logRatio, powerLawIntegral, powerLawIntegralError } from "../../src/numerics/power-law-integral.js";

test("whole exponents give the textbook integrals", () => {
  const over = (exponent: number, from: number, to: number): number =>
    powerLawIntegral({ at: 1, level: 1, exponent }, from, to);
  expectRelative(over(0, 2, 5), 3, 4e-16);
  expectRelative(over(1, 0.1, 10), 2 * Math.LN10, 4e-16);
  expectRelative(over(2, 0.5, 4), 1.75, 4e-16);
  expectRelative(over(-2, 0, 3), 9, 4e-16);
  expectRelative(over(0.5, 0, 4), 4, 4e-16);
  expectRelative(over(3, 2, Number.POSITIVE_INFINITY), 0.125, 4e-16);
});

test("an exponent beside 1 keeps every digit", () => {
  // ∫ x^(−1+e) dx = L + e·M/2 + ..., L = ln 100, M = ln²10 − ln²0.1 = 0, next term e²·(ln³10 − ln³0.1)/6
  const exponent = 1 - 2 ** -40;
  const e = 2 ** -40;
  const expected = 2 * Math.LN10 + (e * e * 2 * Math.LN10 ** 3) / 6;
  expectRelative(powerLawIntegral({ at: 1, level: 1, exponent }, 0.1, 10), expected, 4e-16);
});

test("an integral that diverges is infinite, so that nobody takes it for a number", () => {
  expect(powerLawIntegral({ at: 1, level: 1, exponent: 1 }, 0, 1)).toBe(Number.POSITIVE_INFINITY);
  expect(powerLawIntegral({ at: 1, level: 1, exponent: 1 }, 1, Number.POSITIVE_INFINITY)).toBe(
    Number.POSITIVE_INFINITY,
  );
});

test("a narrow band is its width times the density", () => {
  const from = 1024;
  const to = 1024 * (1 + 2 ** -40);
  expectRelative(powerLawIntegral({ at: 1024, level: 3, exponent: 1.7 }, from, to), 3 * (to - from), 2e-12);
  expectRelative(logRatio(1, 1 + 2 ** -50), 2 ** -50, 1e-15);
});

test("adjacent bands add up within the stated error, whatever the exponent", () => {
  fc.assert(
    fc.property(
      fc.double({ min: -4, max: 4, noNaN: true }),
      fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
      fc.double({ min: 1.001, max: 1e4, noNaN: true }),
      fc.double({ min: 1.001, max: 1e4, noNaN: true }),
      (exponent, from, first, second) => {
        const term = { at: from, level: 2.5e-18, exponent };
        const middle = from * first;
        const to = middle * second;
        const whole = powerLawIntegral(term, from, to);
        const sum = powerLawIntegral(term, from, middle) + powerLawIntegral(term, middle, to);
        const allowed = powerLawIntegralError(term, from, to) + powerLawIntegralError(term, middle, to);
        return Math.abs(sum / whole - 1) <= allowed;
      },
    ),
    { seed: 11, numRuns: 2000 },
  );
});

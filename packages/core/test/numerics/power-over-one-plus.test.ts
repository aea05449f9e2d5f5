import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative, relativeError } from "../../../../test/support/relative.js";
import { powerOverOnePlus } from "../../src/numerics/power-over-one-plus.js";

interface Row {
  readonly s: number;
  readonly from: number;
  readonly to: number | "inf";
  readonly value: string;
}

// fixtures/reference/make-power-over-one-plus.py: mpmath, 2F1 against quadrature
const { plain } = JSON.parse(
  readFileSync(new URL("../../../../fixtures/reference/power-over-one-plus.json", import.meta.url), "utf8"),
) as { readonly plain: readonly Row[] };

/** Half an ulp of the reference once it is a double. */
const ofReference = 1.2e-16;

describe("against 60-digit values", () => {
  test.each(plain)("s = $s from $from to $to", ({ s, from, to, value }) => {
    const found = powerOverOnePlus(s, from, to === "inf" ? Number.POSITIVE_INFINITY : to);
    const error = relativeError(found.value, Number(value));
    expect(error).toBeLessThanOrEqual(2e-15);
    expect(error, "the bound is true").toBeLessThanOrEqual(found.error / found.value + ofReference);
    expect(found.error, "and close").toBeLessThanOrEqual(1e-13 * found.value);
  });
});

test("narrow stretches keep a bound of a few ulp", () => {
  for (const s of [-2, 0, 0.5, 3])
    for (const from of [1e-3, 0.7, 1, 20]) {
      const { value, error } = powerOverOnePlus(s, from, from * (1 + 2 ** -20));
      expect(error).toBeLessThan(3e-15 * value);
    }
});

test("known integrals: π/sin(πs) over everything, logarithms at s = 0 and s = 1, the arc tangent at s = ½", () => {
  const over = (s: number, from: number, to: number): number => powerOverOnePlus(s, from, to).value;
  expectRelative(over(0.3, 0, Number.POSITIVE_INFINITY), Math.PI / Math.sin(0.3 * Math.PI), 1e-15);
  expectRelative(over(0, 0.2, Number.POSITIVE_INFINITY), Math.log1p(5), 1e-15);
  expectRelative(over(1, 0, 0.2), Math.log1p(0.2), 1e-15);
  expectRelative(over(0.5, 0, 9), 2 * Math.atan(3), 1e-15);
});

test("adjacent stretches add up, and t → 1/t is the mirror image s → 1 − s", () => {
  fc.assert(
    fc.property(
      fc.double({ min: -3, max: 4, noNaN: true }),
      fc.double({ min: -12, max: 12, noNaN: true }),
      fc.double({ min: 1e-6, max: 15, noNaN: true }),
      fc.double({ min: 1e-6, max: 15, noNaN: true }),
      (s, logFrom, first, second) => {
        const [from, middle] = [Math.exp(logFrom), Math.exp(logFrom + first)];
        const to = middle * Math.exp(second);
        fc.pre(middle > from && to > middle);
        const whole = powerOverOnePlus(s, from, to);
        const sum = powerOverOnePlus(s, from, middle).value + powerOverOnePlus(s, middle, to).value;
        expectRelative(sum, whole.value, 4e-15);
        // 1/from rounds, which counts |s| + 1 times, and more where the stretch is narrow
        const narrow = 1 + 1 / Math.min(1, to / from - 1);
        expectRelative(
          powerOverOnePlus(1 - s, 1 / to, 1 / from).value,
          whole.value,
          2e-15 * (2 + Math.abs(s)) * narrow,
        );
      },
    ),
    { seed: 5, numRuns: 400 },
  );
});

test("what diverges is infinite", () => {
  expect(powerOverOnePlus(0, 0, 1).value).toBe(Number.POSITIVE_INFINITY);
  expect(powerOverOnePlus(1, 1, Number.POSITIVE_INFINITY).value).toBe(Number.POSITIVE_INFINITY);
});

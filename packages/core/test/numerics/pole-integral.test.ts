import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { edgeOf } from "../../../../test/support/vectors.js";
import { type Complex, sizeOf, times } from "../../src/numerics/complex.js";
import { poleIntegrals, type SquarePole } from "../../src/numerics/pole-integral.js";
import { poleStretch } from "../../src/numerics/pole-stretch.js";

interface Row {
  readonly s: number;
  readonly b: readonly [number, number];
  readonly from: number;
  readonly to: number | "inf";
  readonly values: readonly (readonly [string, string])[];
}

// fixtures/reference/make-rational-integral.py: mpmath, 2F1 at 120 digits
const { poles } = JSON.parse(
  readFileSync(new URL("../../../../fixtures/reference/rational-integral.json", import.meta.url), "utf8"),
) as { readonly poles: readonly Row[] };

function poleAt(b: Complex): SquarePole {
  return { b, c: times(b, b), ln: Math.log(sizeOf(b)), angle: Math.atan2(b.im, b.re) };
}

describe("∫ X^(s−1)/(X+c)^m dX for m = 1, 2, 3 against 120-digit values, the bound being true", () => {
  test.each(poles)("s = $s, b = $b, $from to $to", ({ s, b, from, to, values }) => {
    const high = edgeOf(to);
    const width = from === 0 || high === Number.POSITIVE_INFINITY ? Number.POSITIVE_INFINITY : Math.log(high / from);
    const stretch = poleStretch(s, from, high, width);
    if (stretch === undefined) throw new Error("handed over");
    const found = poleIntegrals(poleAt({ re: b[0], im: b[1] }), stretch, 3);
    if (found === undefined) throw new Error("handed over");
    for (const [m, [re, im]] of values.entries()) {
      const value = found.values[m] as Complex;
      const expected = { re: Number(re), im: Number(im) };
      const error = Math.hypot(value.re - expected.re, value.im - expected.im);
      expect(error).toBeLessThanOrEqual((found.errors[m] as number) + 1.2e-16 * sizeOf(expected));
    }
  });
});

test("wide stretches over a blunt pole are right to a few ulp", () => {
  // ∫₀^∞ X^(−1/2)/(X + b²) dX = π/b
  const stretch = poleStretch(0.5, 0, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY);
  if (stretch === undefined) throw new Error("handed over");
  const { values, errors } = poleIntegrals(poleAt({ re: 0.6, im: 0.8 }), stretch, 2) ?? { values: [], errors: [] };
  expect(Math.hypot((values[0]?.re ?? 0) - 0.6 * Math.PI, (values[0]?.im ?? 0) + 0.8 * Math.PI)).toBeLessThan(1e-15);
  expect(errors[0]).toBeLessThan(1e-14);
});

test("an edge on a resonance of Q = 1e5 is handed over", () => {
  const stretch = poleStretch(0.5, 1, 10, Math.LN10);
  if (stretch === undefined) throw new Error("handed over early");
  expect(poleIntegrals(poleAt({ re: 5e-6, im: 1 }), stretch, 1)).toBeUndefined();
});

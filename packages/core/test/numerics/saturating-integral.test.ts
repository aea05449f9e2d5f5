import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative, relativeError } from "../../../../test/support/relative.js";
import { type BandCase, edgeOf, referenceCases, spectrumOf, weightingOf } from "../../../../test/support/vectors.js";
import { integrateAdaptive } from "../../src/numerics/adaptive.js";
import { type PowerLawTerm, termAt } from "../../src/numerics/power-law.js";
import { type Saturation, saturatingIntegral } from "../../src/numerics/saturating-integral.js";

interface Row {
  readonly term: PowerLawTerm;
  readonly gain: Saturation;
  readonly from: number;
  readonly to: number | "inf";
  readonly value: string;
}

// fixtures/reference/make-power-over-one-plus.py: mpmath, 2F1 against quadrature
const { saturating } = JSON.parse(
  readFileSync(new URL("../../../../fixtures/reference/power-over-one-plus.json", import.meta.url), "utf8"),
) as { readonly saturating: readonly Row[] };

/** Half an ulp of the reference once it is a double. */
const ofReference = 1.2e-16;

function made(term: PowerLawTerm, gain: Saturation, from: number, to: number): { value: number; error: number } {
  const found = saturatingIntegral(term, gain, from, to);
  if (found === undefined) throw new Error("handed over");
  return found;
}

describe("against 60-digit values: deep stop bands, narrow bands, steep steps, exponents beside 1, far edges", () => {
  test.each(saturating)("$term.exponent, $gain.order, $from to $to", ({ term, gain, from, to, value }) => {
    const found = made(term, gain, from, edgeOf(to));
    const error = relativeError(found.value, Number(value));
    const exponent = Math.abs(term.exponent);
    expect(error).toBeLessThanOrEqual(4e-15 + 1e-16 * exponent);
    expect(error, "the bound is true").toBeLessThanOrEqual(found.error / found.value + ofReference);
    expect(found.error / found.value, "and close").toBeLessThanOrEqual(1e-13 * (1 + exponent / 40));
  });
});

describe("first-order and Butterworth cases of bands.json", () => {
  const cases = referenceCases<BandCase>("bands.json").filter(
    ({ weighting }) => weightingOf(weighting)?.saturating !== undefined,
  );
  test("there are four kinds of them", () => expect(cases).toHaveLength(44));

  test.each(cases)("$id", ({ spectrum, weighting, band, power, condition }) => {
    const gain = weightingOf(weighting)?.saturating;
    if (gain === undefined) throw new Error("not saturating");
    const shape = { cutoff: gain.cutoffHz, order: gain.order, numeratorOrder: gain.numeratorOrder };
    let sum = 0;
    let bound = 0;
    for (const piece of spectrumOf(spectrum).pieces ?? []) {
      const [low, high] = [Math.max(band[0], piece.from), Math.min(edgeOf(band[1]), piece.to)];
      if (!(high > low)) continue;
      for (const term of piece.terms) {
        const part = made(term, shape, low, high);
        sum += part.value;
        bound += part.error;
      }
    }
    const error = relativeError(sum, Number(power));
    expect(error).toBeLessThanOrEqual(4e-15 * Math.max(1, condition));
    expect(error, "the bound is true").toBeLessThanOrEqual(bound / sum + 2 * ofReference);
  });
});

const anyGain = fc
  .record({
    order: fc.integer({ min: 1, max: 12 }),
    high: fc.boolean(),
    logCutoff: fc.double({ min: -5, max: 20, noNaN: true }),
  })
  .map(({ order, high, logCutoff }) => ({ cutoff: Math.exp(logCutoff), order, numeratorOrder: high ? order : 0 }));

test("adjacent bands add up and agree with the adaptive integrator", () => {
  fc.assert(
    fc.property(
      anyGain,
      fc.double({ min: -1, max: 3, noNaN: true }),
      fc.double({ min: -6, max: 6, noNaN: true }),
      fc.double({ min: 1e-3, max: 10, noNaN: true }),
      fc.double({ min: 1e-3, max: 10, noNaN: true }),
      (gain, exponent, offset, first, second) => {
        const from = gain.cutoff * Math.exp(offset);
        const [middle, to] = [from * Math.exp(first), from * Math.exp(first + second)];
        const term = { at: gain.cutoff, level: 1e-15, exponent };
        const whole = made(term, gain, from, to);
        const parts = [made(term, gain, from, middle), made(term, gain, middle, to)] as const;
        const [sum, bound] = [parts[0].value + parts[1].value, parts[0].error + parts[1].error];
        expect(Math.abs(sum - whole.value)).toBeLessThanOrEqual(bound + whole.error);
        const panels = integrateAdaptive(
          (nodes, values) => {
            for (let k = 0; k < nodes.length; k += 1) {
              const x = nodes[k] as number;
              const u = x / gain.cutoff;
              const rest =
                gain.numeratorOrder === 0 ? 1 / (1 + u ** (2 * gain.order)) : 1 / (1 + u ** (-2 * gain.order));
              values[k] = termAt(term, x) * rest;
            }
          },
          [from, ...[gain.cutoff].filter((x) => x > from && x < to), to],
        );
        expectRelative(whole.value, panels.value, 1e-12);
      },
    ),
    { seed: 11, numRuns: 300 },
  );
});

test("scaling every x scales the integral, and a level beyond the range of doubles at the anchor does no harm", () => {
  const at = (scale: number): number =>
    made(
      { at: 10 * scale, level: 1e-18, exponent: 1.3 },
      { cutoff: 1e3 * scale, order: 3, numeratorOrder: 0 },
      scale,
      1e6 * scale,
    ).value;
  expectRelative(at(2 ** 40), at(1) * 2 ** 40, 1e-15);
  // 1e300 at 1 and 1e-300 at 10: the band near 5.5 sees about 1e-144
  const steep = { at: 1, level: 1e300, exponent: 600 };
  const band = made(steep, { cutoff: 5, order: 2, numeratorOrder: 0 }, 5.4, 5.6);
  const near = made(
    { at: 5.4, level: 1e300 * 5.4 ** -300 * 5.4 ** -300, exponent: 600 },
    { cutoff: 5, order: 2, numeratorOrder: 0 },
    5.4,
    5.6,
  );
  expect(Math.abs(band.value - near.value)).toBeLessThanOrEqual(band.error + near.error);
});

test("what diverges or leaves the range of doubles is left to the caller; no level is no power", () => {
  const white = { at: 1, level: 1, exponent: 0 };
  const low = { cutoff: 1, order: 1, numeratorOrder: 0 };
  expect(saturatingIntegral({ ...white, exponent: 1 }, low, 0, 1)).toBeUndefined();
  expect(saturatingIntegral(white, { ...low, numeratorOrder: 1 }, 1, Number.POSITIVE_INFINITY)).toBeUndefined();
  expect(saturatingIntegral({ ...white, exponent: 400 }, low, 100, 200)).toBeUndefined();
  expect(saturatingIntegral({ ...white, level: 0 }, low, 0, 1)).toEqual({ value: 0, error: 0 });
});

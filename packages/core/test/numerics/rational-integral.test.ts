import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative, relativeError } from "../../../../test/support/relative.js";
import { type BandCase, edgeOf, referenceCases, spectrumOf, weightingOf } from "../../../../test/support/vectors.js";
import { integrateAdaptive } from "../../src/numerics/adaptive.js";
import type { BoundedValue } from "../../src/numerics/bounded-value.js";
import {
  type PartialFractions,
  preparePartialFractions,
  type RationalShape,
} from "../../src/numerics/partial-fractions.js";
import { type PowerLawPiece, type PowerLawTerm, termAt } from "../../src/numerics/power-law.js";
import { rationalIntegral } from "../../src/numerics/rational-integral.js";

/** Half an ulp of the reference once it is a double. */
const ofReference = 1.2e-16;
const white: PowerLawTerm = { at: 1, level: 1, exponent: 0 };

function prepared(shape: RationalShape): PartialFractions {
  const found = preparePartialFractions(shape);
  if (found === undefined) throw new Error("no partial fractions");
  return found;
}

function expectBounded(found: BoundedValue, expected: string, tolerance: number): void {
  const error = relativeError(found.value, Number(expected));
  expect(error).toBeLessThanOrEqual(tolerance);
  expect(error, "the bound is true").toBeLessThanOrEqual(found.error / found.value + ofReference);
  expect(found.error / found.value, "and close").toBeLessThanOrEqual(1e-13);
}

interface Row {
  readonly family: readonly unknown[];
  readonly term: PowerLawTerm;
  readonly shape: {
    readonly gain: number;
    readonly zerosAtOrigin: number;
    readonly zeros: readonly (readonly [number, number])[];
    readonly poles: readonly (readonly [number, number])[];
  };
  readonly from: number;
  readonly to: number | "inf";
  readonly value: string;
}

// fixtures/reference/make-rational-integral.py: mpmath, partial fractions at 120 digits against quadrature
const { gains } = JSON.parse(
  readFileSync(new URL("../../../../fixtures/reference/rational-integral.json", import.meta.url), "utf8"),
) as { readonly gains: readonly Row[] };

test("filters whose poles are given: what is answered is right and bounded, and most of it is answered", () => {
  const places = (pairs: readonly (readonly [number, number])[]): { re: number; im: number }[] =>
    pairs.map(([re, im]) => ({ re, im }));
  let answered = 0;
  for (const { term, shape, from, to, value } of gains) {
    const { gain, zerosAtOrigin } = shape;
    const fractions = prepared({ gain, zerosAtOrigin, zeros: places(shape.zeros), poles: places(shape.poles) });
    const found = rationalIntegral(term, fractions, from, edgeOf(to));
    if (found === undefined) continue;
    answered += 1;
    expectBounded(found, value, 1e-14);
  }
  console.info(`rational gains: ${answered} of ${gains.length} cases answered in closed form`);
  expect(answered / gains.length).toBeGreaterThan(0.8);
});

function sumOfPieces(
  pieces: readonly PowerLawPiece[],
  fractions: PartialFractions,
  from: number,
  to: number,
): BoundedValue | undefined {
  let value = 0;
  let error = 0;
  for (const piece of pieces)
    for (const term of piece.terms) {
      const [low, high] = [Math.max(from, piece.from), Math.min(to, piece.to)];
      if (!(high > low) || term.level === 0) continue;
      const part = rationalIntegral(term, fractions, low, high);
      if (part === undefined) return undefined;
      value += part.value;
      error += part.error;
    }
  return { value, error };
}

describe("bands.json through filters as they are designed", () => {
  const cases = referenceCases<BandCase>("bands.json").filter(
    ({ weighting }) => weightingOf(weighting)?.rational !== undefined,
  );

  test("what is answered is right within the case's condition, its bound includes the rounding of the design", () => {
    let answered = 0;
    for (const { spectrum, weighting, band, power, condition } of cases) {
      const rational = weightingOf(weighting)?.rational;
      const fractions = rational && preparePartialFractions(rational);
      if (fractions === undefined) continue;
      const found = sumOfPieces(spectrumOf(spectrum).pieces ?? [], fractions, band[0], edgeOf(band[1]));
      if (found === undefined) continue;
      answered += 1;
      expectBounded(found, power, 2e-14 * Math.max(1, condition));
    }
    console.info(`bands.json: ${answered} of ${cases.length} rational cases answered by partial fractions alone`);
    expect(cases.length).toBeGreaterThan(120);
    expect(answered / cases.length).toBeGreaterThan(0.7);
  });
});

interface NoiseBandwidthCase {
  readonly id: string;
  readonly weighting: BandCase["weighting"];
  readonly integral: string;
}

describe("white noise to ∞ through every low-pass of enbw.json is answered", () => {
  const cases = referenceCases<NoiseBandwidthCase>("enbw.json").filter(
    ({ weighting }) => weightingOf(weighting)?.rational !== undefined,
  );

  test.each(cases)("$id", ({ weighting, integral }) => {
    const rational = weightingOf(weighting)?.rational;
    if (rational === undefined) throw new Error("not rational");
    const found = rationalIntegral(white, prepared(rational), 0, Number.POSITIVE_INFINITY);
    if (found === undefined) throw new Error("handed over");
    expectBounded(found, integral, 3e-15);
  });
});

test("known integrals: π/2·Q of a resonance, π/4 of a double pole, 3π/16 of a triple one", () => {
  const over = (shape: RationalShape): number =>
    rationalIntegral(white, prepared(shape), 0, Number.POSITIVE_INFINITY)?.value ?? 0;
  for (const q of [0.6, 1, 7, 100]) {
    const [re, im] = [-0.5 / q, Math.sqrt((1 - 0.5 / q) * (1 + 0.5 / q))];
    const poles = [
      { re, im },
      { re, im: -im },
    ];
    expectRelative(over({ gain: 1, zerosAtOrigin: 0, zeros: [], poles }), (Math.PI / 2) * q, 2e-15);
  }
  const equal = (count: number): RationalShape => ({
    gain: 1,
    zerosAtOrigin: 0,
    zeros: [],
    poles: Array.from({ length: count }, () => ({ re: -1, im: 0 })),
  });
  expectRelative(over(equal(2)), Math.PI / 4, 2e-15);
  expectRelative(over(equal(3)), (3 * Math.PI) / 16, 2e-15);
});

const resonator: RationalShape = {
  gain: 0.04,
  zerosAtOrigin: 1,
  zeros: [],
  poles: [
    { re: -0.1, im: 0.99 },
    { re: -0.1, im: -0.99 },
  ],
};

test("1/f through a band-pass from 0 to ∞, where no single index converges, is the sum of two halves", () => {
  const found = rationalIntegral({ ...white, exponent: 1 }, prepared(resonator), 0, Number.POSITIVE_INFINITY);
  // ∫ x dx/((x²+c)(x²+c̄)) = arg(c)/(2 Im c), c = (0.1 + 0.99i)²
  const imaginary = 2 * 0.1 * 0.99;
  const expected = (0.04 * (2 * Math.atan2(0.99, 0.1))) / (2 * imaginary);
  expectRelative(found?.value ?? 0, expected, 2e-15);
  for (const exponent of [1 - 1e-12, 1 + 1e-12, 1 + 1e-7]) {
    const beside = rationalIntegral({ ...white, exponent }, prepared(resonator), 0, Number.POSITIVE_INFINITY);
    expectRelative(beside?.value ?? 0, expected, 2e-7);
    expect(beside?.error).toBeLessThan(1e-13 * expected);
  }
});

test("the bound covers what four ulp on each component of the poles do, also with an edge on the resonance", () => {
  const shape = (damping: number, shift: number): RationalShape => {
    const [re, im] = [-(1 / 60) * (1 + damping), 1 + shift];
    const poles = [
      { re, im },
      { re, im: -im },
    ];
    return { gain: 1, zerosAtOrigin: 1, zeros: [], poles };
  };
  const ulps = 4 * Number.EPSILON;
  for (const [from, to] of [
    [0.5, 1],
    [0.01, 1.01],
    [0, Number.POSITIVE_INFINITY],
  ] as const) {
    const meant = rationalIntegral(white, prepared(shape(0, 0)), from, to);
    if (meant === undefined) throw new Error("handed over");
    for (const [damping, shift] of [
      [ulps, 0],
      [0, ulps],
      [-ulps, -ulps],
    ] as const) {
      const given = rationalIntegral(white, prepared(shape(damping, shift)), from, to);
      expect(Math.abs((given?.value ?? 0) - meant.value)).toBeLessThanOrEqual(meant.error);
    }
  }
});

test("adjacent bands add up, and both agree with the adaptive integrator", () => {
  const gainAt = (x: number): number => {
    const off = (1 - x) * (1 + x) + (0.1 ** 2 + 0.99 ** 2 - 1);
    return (0.04 * x * x) / (off * off + 0.04 * x * x);
  };
  const fractions = prepared(resonator);
  let answered = 0;
  fc.assert(
    fc.property(
      fc.double({ min: -3.5, max: 6, noNaN: true }),
      fc.double({ min: -7, max: 3, noNaN: true }),
      fc.double({ min: 0.05, max: 8, noNaN: true }),
      fc.double({ min: 0.05, max: 8, noNaN: true }),
      (exponent, offset, first, second) => {
        const term = { at: 10, level: 1e-17, exponent };
        const [from, middle, to] = [Math.exp(offset), Math.exp(offset + first), Math.exp(offset + first + second)];
        const whole = rationalIntegral(term, fractions, from, to);
        const [below, above] = [
          rationalIntegral(term, fractions, from, middle),
          rationalIntegral(term, fractions, middle, to),
        ];
        if (whole === undefined || below === undefined || above === undefined) return;
        answered += 1;
        const bound = whole.error + below.error + above.error;
        expect(Math.abs(below.value + above.value - whole.value)).toBeLessThanOrEqual(bound);
        const panels = integrateAdaptive(
          (nodes, values) => {
            for (let k = 0; k < nodes.length; k += 1)
              values[k] = termAt(term, nodes[k] as number) * gainAt(nodes[k] as number);
          },
          [from, ...[0.8, 1, 1.25].filter((x) => x > from && x < to), to],
        );
        expectRelative(whole.value, panels.value, 1e-12);
      },
    ),
    { seed: 3, numRuns: 300 },
  );
  expect(answered).toBeGreaterThan(200);
});

test("scaling every x by a power of two scales the integral exactly", () => {
  const at = (scale: number): number => {
    const poles = resonator.poles.map(({ re, im }) => ({ re: re * scale, im: im * scale }));
    const shape = { ...resonator, gain: 0.04 * scale ** 2, poles };
    return (
      rationalIntegral({ at: 3 * scale, level: 1e-17, exponent: 1.2 }, prepared(shape), 0.1 * scale, 50 * scale)
        ?.value ?? 0
    );
  };
  expect(at(2 ** 30)).toBe(at(1) * 2 ** 30);
  expect(at(2 ** -30)).toBe(at(1) * 2 ** -30);
});

test("what is badly conditioned is handed over, not answered badly", () => {
  const fractions = prepared(resonator);
  const term = { at: 1, level: 1, exponent: 1 };
  // a narrow band is a difference of equals, an edge in the flank of a sharp resonance has no digits
  expect(rationalIntegral(term, fractions, 0.5, 0.5 * (1 + 1e-6))).toBeUndefined();
  const sharp = prepared({
    ...resonator,
    poles: [
      { re: -1e-4, im: 1 },
      { re: -1e-4, im: -1 },
    ],
  });
  expect(rationalIntegral(term, sharp, 1 - 1e-4, 2)).toBeUndefined();
  expect(rationalIntegral({ ...term, exponent: 40 }, fractions, 0.5, 2)).toBeUndefined();
  expect(rationalIntegral(term, prepared({ ...resonator, zerosAtOrigin: 0 }), 0, 1)).toBeUndefined();
  expect(rationalIntegral({ ...term, level: 0 }, fractions, 0, 1)).toEqual({ value: 0, error: 0 });
});

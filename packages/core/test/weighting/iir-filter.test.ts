import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise, firFilter, iirFilter, noiseBandwidth, powerLaws } from "../../src/index.js";

/** Σ h² of the impulse response, run until it has died out: the power gain of white samples. */
function responsePower(numerator: readonly number[], denominator: readonly number[], length: number): number {
  const response: number[] = [];
  let power = 0;
  for (let k = 0; k < length; k += 1) {
    let value = numerator[k] ?? 0;
    for (let i = 1; i < denominator.length && i <= k; i += 1)
      value -= (denominator[i] as number) * (response[k - i] as number);
    value /= denominator[0] as number;
    response.push(value);
    power += value * value;
  }
  return power;
}

const filters = [
  { numerator: [0.125], denominator: [1, -0.875], length: 400 },
  { numerator: [1, -1], denominator: [2, -1.9], length: 1000 },
  { numerator: [0.2, 0.3, 0.1], denominator: [1, -1.2, 0.8], length: 500 },
  { numerator: [1], denominator: [1, -1.9975, 0.9981], length: 50_000 },
  { numerator: [1], denominator: [1, 0.4, 0.999], length: 100_000 },
];

describe("a recursive filter", () => {
  test.each(filters)("passes the power of its impulse response, $denominator", ({ numerator, denominator, length }) => {
    const made = iirFilter({ numerator, denominator, sampleRateHz: 1000 });
    const white = powerLaws([{ coefficient: 1 / 500, exponent: 0 }]);
    const expected = responsePower(numerator, denominator, length);
    expectRelative(bandNoise(white, { fromHz: 0, toHz: 500, weighting: made }).power, expected, 2e-11);
  });

  test("passes the same in every period, however many a band holds", () => {
    for (const { numerator, denominator } of filters) {
      const weighting = iirFilter({ numerator, denominator, sampleRateHz: 1000 });
      const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
      const one = bandNoise(white, { fromHz: 0, toHz: 500, weighting });
      const many = bandNoise(white, { fromHz: 0, toHz: 1e6, weighting });
      expectRelative(many.power / 2000, one.power, 2 * (one.numericalError + many.numericalError));
      expect(many.numericalError).toBeLessThan(1e-11);
    }
  });

  test("without recursion is a filter of taps", () => {
    const taps = [0.3, -0.1, 0.7];
    const recursive = iirFilter({ numerator: taps, denominator: [2], sampleRateHz: 48e3 });
    const plain = firFilter({ taps, sampleRateHz: 48e3 });
    for (const hz of [0, 1, 1234.5, 23_999, 24_000, 1e6])
      expectRelative(recursive.powerGainAt(hz), plain.powerGainAt(hz) / 4, 1e-15);
  });

  test("has a knot at every resonance, so that an integrator finds it", () => {
    const angle = 1.234;
    const radius = 1 - 1e-7;
    const denominator = [1, -2 * radius * Math.cos(angle), radius * radius];
    const { knots } = iirFilter({ numerator: [1], denominator, sampleRateHz: 2 * Math.PI });
    expect(Math.min(...knots.map((hz) => Math.abs(hz - angle)))).toBeLessThan(1e-8);
  });

  test("keeps an average over a million samples to its digits", () => {
    const slow = 2 ** -20;
    const average = iirFilter({ numerator: [slow], denominator: [1, slow - 1], sampleRateHz: 1 });
    expectRelative(noiseBandwidth(average).hz, (0.5 * slow) / (2 - slow), 1e-13);
  });

  test("with a pole an ulp inside the unit circle, or a cluster beside it, still has knots", () => {
    const beside = iirFilter({ numerator: [1], denominator: [1, Number.EPSILON / 2 - 1], sampleRateHz: 1 });
    expect(beside.knots.length).toBeGreaterThan(10);
    const cluster = iirFilter({
      numerator: [1],
      denominator: [1, -3.96, 5.8806, -3.881196, 0.96059601],
      sampleRateHz: 1,
    });
    expect(cluster.knots.every((hz) => hz > 0 && hz <= 1)).toBe(true);
  });

  test("is refused with a pole a hair outside the unit circle, taken with one a hair inside", () => {
    const given = (pole: number): (() => unknown) => {
      return () => iirFilter({ numerator: [1], denominator: [1, -pole], sampleRateHz: 1 });
    };
    expect(given(1 - 1e-12)).not.toThrow();
    expect(given(1)).toThrow("unit circle");
    expect(given(1 + 1e-12)).toThrow("unit circle");
  });
});

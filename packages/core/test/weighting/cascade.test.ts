import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import {
  averageOfReadings,
  bandNoise,
  butterworthLowPass,
  cascade,
  firFilter,
  firstOrderHighPass,
  firstOrderLowPass,
  gain,
  gainTable,
  movingAverage,
  polesAndZeros,
  powerLaws,
  sincDecimator,
  telephoneWeighting,
} from "../../src/index.js";

const low = firstOrderLowPass({ cutoffHz: 1000 });
const high = firstOrderHighPass({ cutoffHz: 10 });

describe("a cascade", () => {
  test("of one weighting is that weighting", () => {
    expect(cascade(low)).toBe(low);
  });

  test("of cascades is flat", () => {
    const third = movingAverage({ seconds: 0.1 });
    const nested = cascade(cascade(low, high), third);
    expect(nested.factors).toEqual([low, high, third]);
    expect(nested.factors).toEqual(cascade(low, cascade(high, third)).factors);
    expect(nested.name).toBe(cascade(low, high, third).name);
  });

  test("adds exponents and joins knots", () => {
    const both = cascade(low, high, butterworthLowPass({ order: 3, cutoffHz: 500 }));
    expect([both.lowExponent, both.highExponent]).toEqual([-2, 8]);
    expect(both.knots).toEqual([10, 500, 1000]);
  });

  test("of poles and zeros is poles and zeros, with its factors' power", () => {
    const notch = polesAndZeros({
      poles: [
        { re: -3, im: 50 },
        { re: -3, im: -50 },
      ],
      zeros: [
        { re: 0, im: 50 },
        { re: 0, im: -50 },
      ],
      atHz: 1e-3,
    });
    const made = cascade(low, high, notch, gain({ factor: 3 }));
    expect(made.rational?.poles).toHaveLength(4);
    expect(made.rational?.zeros).toHaveLength(2);
    expect(made.rational?.zerosAtOrigin).toBe(1);
    const flicker = powerLaws([{ coefficient: 1, exponent: 1 }]);
    const white = cascade(low, high, notch);
    const band = { fromHz: 1, toHz: 1e4 };
    expectRelative(
      bandNoise(flicker, { ...band, weighting: made }).power,
      9 * bandNoise(flicker, { ...band, weighting: white }).power,
      1e-13,
    );
  });

  test("of tables and plain gains is a table on the frequencies all have", () => {
    const measured = gainTable([
      { frequencyHz: 100, gainDb: 0 },
      { frequencyHz: 1e5, gainDb: -60 },
    ]);
    const made = cascade(telephoneWeighting(), measured, gain({ factor: 2 }));
    expect(made.support).toEqual([100, 6000]);
    expect(made.pieces?.[0]?.from).toBe(100);
    expectRelative(made.powerGainAt(1000), 4 * 10 ** 0.1 * 0.01, 1e-14);
    const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
    expect(bandNoise(white, { fromHz: 300, toHz: 3400, weighting: made }).status).toBe("exact");
  });

  test("of lobes counts each lobe of both, equal delays merged", () => {
    const average = movingAverage({ seconds: 0.02 });
    const twice = cascade(average, average);
    const delays = twice.lobes?.parts[0]?.waves.map(({ seconds }) => seconds);
    expect(delays).toEqual([0, 0.02, 0.04]);
    // ∫ sinc⁴ = 2/(3T) over all frequencies, 1/(3T) one-sided
    const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
    const found = bandNoise(white, { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting: twice });
    expectRelative(found.power, 1 / (3 * 0.02), 1e-13);
  });

  test("of taps in a row is the filter of their product, in delays too", () => {
    const rate = 44_100;
    const one = firFilter({ taps: [1, 2, 3], sampleRateHz: rate });
    const other = firFilter({ taps: [0.5, -0.25, 0.125, 1], sampleRateHz: rate });
    const product = firFilter({ taps: [0.5, 0.75, 1.125, 0.5, 2.375, 3], sampleRateHz: rate });
    const made = cascade(one, other);
    expect(made.repeatsHz).toBe(rate);
    const waves = made.lobes?.parts[0]?.waves ?? [];
    const expected = product.lobes?.parts[0]?.waves ?? [];
    expect(waves).toHaveLength(expected.length);
    for (const [index, { seconds, cosine }] of waves.entries()) {
      expectRelative(seconds, expected[index]?.seconds ?? Number.NaN, 1e-15);
      expectRelative(cosine, expected[index]?.cosine ?? Number.NaN, 1e-14);
    }
  });

  test("repeats where its factors do", () => {
    const decimator = sincDecimator({ order: 3, ratio: 64, modulatorRateHz: 1e6 });
    const after = firFilter({ taps: [0.5, 0.5], sampleRateHz: 1e6 / 64 });
    expect(cascade(decimator, after).repeatsHz).toBe(1e6);
    expect(cascade(after, decimator, gain({ factor: 2 })).repeatsHz).toBe(1e6);
    expect(cascade(gain({ factor: 2 }), after).repeatsHz).toBe(1e6 / 64);
    expect(cascade(decimator, averageOfReadings({ count: 3, periodSeconds: 0.7e-6 })).repeatsHz).toBeUndefined();
    expect(cascade(decimator, low).repeatsHz).toBeUndefined();
  });

  test("is refused without a weighting, or without common frequencies", () => {
    expect(() => cascade()).toThrow("at least one weighting");
    const far = gainTable([
      { frequencyHz: 1e4, gainDb: 0 },
      { frequencyHz: 1e5, gainDb: 0 },
    ]);
    expect(() => cascade(telephoneWeighting(), far)).toThrow("share none");
  });
});

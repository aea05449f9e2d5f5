import { firstOrderLowPass, functionSpectrum, powerLaws, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { averagingLimit } from "../../src/chain/averaging-limit.js";

const smooth = (terms: readonly (readonly [number, number])[]) =>
  functionSpectrum((hz) => terms.reduce((sum, [level, exponent]) => sum + level * hz ** -exponent, 0), {
    knots: [0.01, 0.1, 1],
    lowExponent: Math.max(...terms.map(([, exponent]) => exponent)),
    highExponent: Math.min(...terms.map(([, exponent]) => exponent)),
  });

describe("a floor with a 1/f part", () => {
  test.each([1e-2, 0.3, 60])(
    "of corner %d Hz stops paying at 1/(4 ln 2 · corner), and √2 is left to gain",
    (cornerHz) => {
      const limit = averagingLimit(whiteFlicker({ floor: 10e-9, cornerHz }));
      expectRelative(limit.stopsPaying?.seconds ?? 0, 1 / (4 * Math.LN2 * cornerHz), 1e-10);
      const floor = 10e-9 * Math.sqrt(2 * Math.LN2 * cornerHz);
      expectRelative(limit.stopsPaying?.deviation ?? 0, floor * Math.SQRT2, 1e-10);
      expect(limit.least.atEnd).toBe(true);
      expectRelative(limit.least.deviation, floor, 0.02);
    },
  );

  test("also where only a function of frequency is known", () => {
    const limit = averagingLimit(
      smooth([
        [1e-16, 0],
        [1e-17, 1],
      ]),
      { seconds: [0.1, 1, 10, 100] },
    );
    expectRelative(limit.stopsPaying?.seconds ?? 0, 10 / (4 * Math.LN2), 1e-5);
  });
});

test("random walk turns it: the least deviation is where white and random walk make the same", () => {
  // floor²/(2τ) = (2π²/3)·K·τ
  const [white, walk] = [1e-16, 1e-20];
  const limit = averagingLimit(
    powerLaws([
      { coefficient: white, exponent: 0 },
      { coefficient: walk, exponent: 2 },
    ]),
  );
  const best = Math.sqrt((white * 3) / (4 * Math.PI ** 2 * walk));
  expectRelative(limit.least.seconds, best, 1e-9);
  expectRelative(limit.least.deviation, Math.sqrt(white / best), 1e-9);
  expect(limit.least.atEnd).toBe(false);
  expect(limit.text).toContain("stops paying");
});

test("white noise pays throughout, 1/f noise nowhere", () => {
  const white = averagingLimit(powerLaws([{ coefficient: 1e-16, exponent: 0 }]));
  expect(white).not.toHaveProperty("stopsPaying");
  expect(white.text).toContain("pays throughout");
  const flicker = averagingLimit(powerLaws([{ coefficient: 1e-16, exponent: 1 }]));
  expect(flicker).not.toHaveProperty("stopsPaying");
  expect(flicker.text).toContain("pays nowhere");
});

test("in time: half the mean square difference of neighbouring averages of white noise and a random walk", () => {
  const rate = 100;
  const normal = normalFrom(uniformFrom(21));
  let walk = 0;
  const samples = Array.from({ length: 2 ** 19 }, () => {
    walk += 0.02 * normal();
    return normal() + walk;
  });
  const deviation = (seconds: number): number => {
    const width = Math.round(seconds * rate);
    const averages = Array.from({ length: Math.floor(samples.length / width) }, (_, block) => {
      let sum = 0;
      for (let k = 0; k < width; k += 1) sum += samples[block * width + k] as number;
      return sum / width;
    });
    let square = 0;
    for (let k = 1; k < averages.length; k += 1) square += ((averages[k] as number) - (averages[k - 1] as number)) ** 2;
    return Math.sqrt(square / 2 / (averages.length - 1));
  };
  // White of variance 1 at this rate: 2/rate. Steps of 0.02: variance grows as 0.02²·rate·t, S = 2·0.02²·rate/(2πf)².
  const spectrum = powerLaws([
    { coefficient: 2 / rate, exponent: 0 },
    { coefficient: (2 * 0.02 ** 2 * rate) / (2 * Math.PI) ** 2, exponent: 2 },
  ]);
  const { rows } = averagingLimit(spectrum, { seconds: [0.2, 0.5, 1, 2] });
  for (const row of rows) expectRelative(deviation(row.seconds), row.deviation, 0.03);
});

test("a weighting before the average and band edges count", () => {
  const spectrum = powerLaws([{ coefficient: 1e-16, exponent: 0 }]);
  const [row] = averagingLimit(spectrum, {
    seconds: [1e-3, 1],
    weighting: firstOrderLowPass({ cutoffHz: 1 }),
  }).rows;
  // Averages much shorter than the filter's time: half the mean square step of first-order noise over τ, ≈ 2π f_c τ/3·2 of it.
  const variance = 1e-16 * (Math.PI / 2);
  const x = 2 * Math.PI * 1e-3;
  expectRelative((row?.deviation ?? 0) ** 2, variance * (2 / 3) * x, 0.01);
  expect(averagingLimit(spectrum, { seconds: [1, 2], toHz: 0.1 }).rows[0]?.deviation).toBeLessThan(
    averagingLimit(spectrum, { seconds: [1, 2] }).rows[0]?.deviation ?? 0,
  );
});

test("times that do not ascend, or one alone, are refused", () => {
  const spectrum = whiteFlicker({ floor: 1, cornerHz: 1 });
  expect(() => averagingLimit(spectrum, { seconds: [2, 1] })).toThrow(/ascend/);
  expect(() => averagingLimit(spectrum, { seconds: [1] })).toThrow(/at least two/);
  expect(() => averagingLimit(spectrum, { seconds: [0, 1] })).toThrow(/positive/);
});

import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import {
  aWeighting,
  besselLowPass,
  butterworthBandPass,
  chebyshevLowPass,
  polesAndZeros,
  programmeWeighting,
  resonator,
  secondOrderLowPass,
  type Weighting,
} from "../../src/index.js";

const named: readonly Weighting[] = [
  besselLowPass({ order: 7, cutoffHz: 20 }),
  butterworthBandPass({ order: 4, lowCutoffHz: 300, highCutoffHz: 3400 }),
  chebyshevLowPass({ order: 6, rippleDb: 1, edgeHz: 50 }),
  secondOrderLowPass({ naturalHz: 30, q: 4 }),
  resonator({ centreHz: 30, q: 0.2 }),
  aWeighting(),
  programmeWeighting(),
];

describe("a filter by its poles and zeros", () => {
  test.each(named.map((made) => [made.name, made] as const))("is the one they were taken from: %s", (_, made) => {
    const { poles = [], zeros = [], zerosAtOrigin = 0, gain = 0 } = made.rational ?? {};
    const atHz = 123.4;
    const rebuilt = polesAndZeros({ poles, zeros, zerosAtOrigin, atHz, powerGain: made.powerGainAt(atHz) });
    for (const hz of [1e-3, 1, 17, 29.99, 80, 500, 1e5]) {
      expectRelative(rebuilt.powerGainAt(hz), made.powerGainAt(hz), 3e-13, `at ${hz} Hz`);
    }
    expectRelative(rebuilt.rational?.gain ?? 0, gain, 1e-12);
    expect([rebuilt.lowExponent, rebuilt.highExponent]).toEqual([made.lowExponent, made.highExponent]);
  });

  test("has the gain it was given where it was given", () => {
    const made = polesAndZeros({ poles: [{ re: -3, im: 0 }], zeros: [{ re: -7, im: 0 }], atHz: 11, powerGain: 0.3 });
    expect(made.powerGainAt(11)).toBe(0.3);
    expectRelative(made.powerGainAt(0), (0.3 * (49 / 9) * (121 + 9)) / (121 + 49), 1e-15);
  });

  test("counts zeros listed at 0 Hz as zeros there", () => {
    const made = polesAndZeros({ poles: [{ re: -3, im: 0 }], zeros: [{ re: 0, im: 0 }], atHz: 3 });
    expect(made.lowExponent).toBe(-2);
    expect(made.powerGainAt(0)).toBe(0);
    expectRelative(made.powerGainAt(6), 1.6, 1e-15);
  });

  test("keeps a pair that the product of many places would carry out of range", () => {
    const poles = Array.from({ length: 40 }, () => ({ re: -1e9, im: 0 }));
    const zeros = Array.from({ length: 39 }, () => ({ re: -1e10, im: 0 }));
    const made = polesAndZeros({ poles, zeros, atHz: 1 });
    expectRelative(made.powerGainAt(1e9), 2 ** -40 * 1.01 ** 39, 1e-13);
  });
});

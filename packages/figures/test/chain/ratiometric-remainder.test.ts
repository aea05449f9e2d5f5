import {
  aWeighting,
  bandNoise,
  butterworthLowPass,
  cascade,
  firstOrderHighPass,
  firstOrderLowPass,
  secondOrderLowPass,
  whiteFlicker,
} from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { ratiometricRemainder } from "../../src/chain/ratiometric-remainder.js";
import { referencePathNoise } from "../../src/chain/reference-path-noise.js";

const excitation = whiteFlicker({ floor: 380e-9, cornerHz: 22 });
const path = {
  spectrum: excitation,
  referenceVolts: 5,
  input: { kind: "dc", volts: 5 },
  fromHz: 0.1,
  toHz: 1000,
} as const;

test("equal paths leave nothing, over any band", () => {
  for (const filter of [undefined, butterworthLowPass({ order: 3, cutoffHz: 20 })]) {
    const nothing = ratiometricRemainder({ signal: filter, reference: filter });
    const found = referencePathNoise({ ...path, referenceWeighting: nothing });
    expect(found.rms).toBe(0);
    expect(bandNoise(excitation, { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting: nothing }).rms).toBe(0);
  }
});

test("a first-order filter on one side alone leaves a high-pass at its cutoff", () => {
  const cutoffHz = 30;
  const high = firstOrderHighPass({ cutoffHz });
  for (const paths of [{ signal: firstOrderLowPass({ cutoffHz }) }, { reference: firstOrderLowPass({ cutoffHz }) }]) {
    const left = ratiometricRemainder(paths);
    for (const hz of [1e-9, 0.1, 30, 1e4, 1e12]) expectRelative(left.powerGainAt(hz), high.powerGainAt(hz), 1e-14);
    expect([left.lowExponent, left.highExponent]).toEqual([-2, 0]);
  }
});

test("two first-order filters leave (f₁ − f₂)f over their product", () => {
  const left = ratiometricRemainder({
    signal: firstOrderLowPass({ cutoffHz: 100 }),
    reference: firstOrderLowPass({ cutoffHz: 90 }),
  });
  for (const hz of [1e-6, 1, 95, 1e7]) {
    const expected = (hz * (1 / 100 - 1 / 90)) ** 2 / (1 + (hz / 100) ** 2) / (1 + (hz / 90) ** 2);
    expectRelative(left.powerGainAt(hz), expected, 1e-13);
  }
  expect([left.lowExponent, left.highExponent]).toEqual([-2, 2]);
});

describe("against complex numbers written out", () => {
  // H = 1/(1 + ju/q − u²), and e^(−2πjfτ) in front of the signal's.
  const at = (hz: number, naturalHz: number, q: number): readonly [number, number] => {
    const u = hz / naturalHz;
    const [re, im] = [1 - u * u, u / q];
    const size = re * re + im * im;
    return [re / size, -im / size];
  };
  test.each([0, 1e-5, 2e-3])("second orders of different q, a delay of %d s", (delaySeconds) => {
    const left = ratiometricRemainder({
      signal: secondOrderLowPass({ naturalHz: 40, q: 0.9 }),
      reference: secondOrderLowPass({ naturalHz: 55, q: 0.4 }),
      delaySeconds,
    });
    for (const hz of [0.3, 12, 47, 800]) {
      const [a, b] = at(hz, 40, 0.9);
      const turn = 2 * Math.PI * hz * delaySeconds;
      const [c, d] = at(hz, 55, 0.4);
      const re = a * Math.cos(turn) + b * Math.sin(turn) - c;
      const im = b * Math.cos(turn) - a * Math.sin(turn) - d;
      expectRelative(left.powerGainAt(hz), re * re + im * im, 1e-10);
    }
  });

  test("a delay alone is a sample difference, down to where e^−jθ − 1 would cancel", () => {
    const left = ratiometricRemainder({ delaySeconds: 1e-6 });
    for (const hz of [1e-3, 1, 1e5])
      expectRelative(left.powerGainAt(hz), 4 * Math.sin(Math.PI * hz * 1e-6) ** 2, 1e-13);
  });
});

test("with equal filters on both sides the noise of a common source is what the difference of their parts leaves", () => {
  const tolerance = 1.01;
  const left = ratiometricRemainder({
    signal: cascade(firstOrderLowPass({ cutoffHz: 10 }), firstOrderLowPass({ cutoffHz: 1e3 })),
    reference: firstOrderLowPass({ cutoffHz: 10 * tolerance }),
  });
  const one = referencePathNoise({ ...path, referenceWeighting: firstOrderLowPass({ cutoffHz: 10 }) });
  const ratio = referencePathNoise({ ...path, referenceWeighting: left });
  expect(ratio.rms / one.rms).toBeLessThan(0.03);
});

test("paths without a phase or without a gain at 0 Hz are refused", () => {
  expect(() => ratiometricRemainder({ signal: aWeighting(), reference: firstOrderLowPass({ cutoffHz: 1 }) })).toThrow(
    /gain at 0 Hz|phase/,
  );
  expect(() => ratiometricRemainder({ signal: firstOrderHighPass({ cutoffHz: 1 }) })).toThrow(/gain at 0 Hz/);
  expect(() => ratiometricRemainder({ delaySeconds: -1 })).toThrow(/delaySeconds/);
});

import {
  bandNoise,
  movingAverage,
  powerLaws,
  recordMeanRemoved,
  telephoneWeighting,
  twoSampleVariance,
} from "@quietband/core";
import { describe, expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

/** Euler's constant. */
const gamma = 0.5772156649015329;
const infinity = Number.POSITIVE_INFINITY;

describe("the two-sample variance of NIST SP 1065, section 7.1 (seen); its names are those of frequency noise", () => {
  const tau = 0.37;
  const h = 2.5e-12;
  const variance = (exponent: number, toHz: number): number =>
    bandNoise(powerLaws([{ coefficient: h, exponent }]), {
      fromHz: 0,
      toHz,
      weighting: twoSampleVariance({ seconds: tau }),
    }).power;

  test("white FM is white voltage noise: h/(2τ)", () => expectRelative(variance(0, infinity), h / (2 * tau), 1e-13));
  test("flicker FM: 2 ln 2 · h, whatever τ", () => expectRelative(variance(1, infinity), 2 * Math.LN2 * h, 1e-13));
  test("random walk FM: (2π²/3) τ h", () =>
    expectRelative(variance(2, infinity), ((2 * Math.PI ** 2) / 3) * tau * h, 1e-13));
  test("white PM up to f_h: 3 f_h h/(4π²τ²), over whole lobes", () => {
    const edge = 400 / tau;
    expectRelative(variance(-2, edge), (3 * edge * h) / (4 * Math.PI ** 2 * tau ** 2), 1e-12);
  });
  test("flicker PM up to f_h: h(1.038 + 3 ln(2πf_hτ))/(4π²τ²), asymptotic in f_hτ; the constant is 3γ − ln 2", () => {
    const edge = 4000 / tau;
    const constant = published<{ readonly noise: string; readonly publishedConstant?: number }>(
      "allan_power_law",
    ).values.find(({ noise }) => noise === "flicker PM")?.publishedConstant;
    const scaled = (variance(-1, edge) * 4 * Math.PI ** 2 * tau ** 2) / h - 3 * Math.log(2 * Math.PI * edge * tau);
    expect(Math.abs(scaled - (constant ?? 0))).toBeLessThan(5.1e-4);
    expect(Math.abs(scaled - (3 * gamma - Math.LN2))).toBeLessThan(1e-7);
  });
});

test("for 1/f noise a mean-removed record equals a lower edge of e^(3/2−γ)/(2πT) = 0.400/T (sine integrals)", () => {
  const flicker = powerLaws([{ coefficient: 1e-14, exponent: 1 }]);
  const seconds = 10;
  const toHz = 1e5;
  const record = bandNoise(flicker, { fromHz: 0, toHz, weighting: recordMeanRemoved({ seconds }) }).power;
  const edge = toHz * Math.exp(-record / 1e-14);
  expectRelative(edge * seconds, Math.exp(1.5 - gamma) / (2 * Math.PI), 1e-9);
  expect((edge * seconds).toFixed(3)).toBe("0.400");
});

test("averaging stops paying for floor plus 1/f where white and 1/f parts are equal: 1/(4 ln 2 · f_c) = 0.361/f_c", () => {
  const cornerHz = 3;
  const atRest = 1 / (4 * Math.LN2 * cornerHz);
  const weighting = twoSampleVariance({ seconds: atRest });
  const through = (exponent: number, coefficient: number): number =>
    bandNoise(powerLaws([{ coefficient, exponent }]), { fromHz: 0, toHz: infinity, weighting }).power;
  expectRelative(through(0, 1), through(1, cornerHz) / 1, 1e-12);
  expect((atRest * cornerHz).toFixed(3)).toBe("0.361");
});

test("white noise through a moving average of T: 1/(2T)", () => {
  const white = powerLaws([{ coefficient: 4e-16, exponent: 0 }]);
  const { power } = bandNoise(white, { fromHz: 0, toHz: infinity, weighting: movingAverage({ seconds: 0.02 }) });
  expectRelative(power, 4e-16 * 25, 1e-14);
});

test("telephone-weighted white noise reads 2.5 dB below its band and 3.6 dB below 4 kHz (ITU-T practice, from memory)", () => {
  const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
  const weighted = bandNoise(white, { fromHz: 300, toHz: 3400, weighting: telephoneWeighting() }).power;
  const rows = published<{ readonly reference: string; readonly publishedDb: number }>(
    "psophometric_white_noise_factor",
  ).values;
  const shown = [3100, 4000].map((width) => 10 * Math.log10(weighted / width));
  for (const [index, db] of shown.entries())
    expect(Math.abs(db - (rows[index]?.publishedDb ?? 0))).toBeLessThanOrEqual(0.05);
});

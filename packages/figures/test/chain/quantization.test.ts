import { bandNoise, OutOfDomainError, sumSpectra, toneSkirt, whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { quantization } from "../../src/chain/quantization.js";

const rounding = quantization({ lsb: 3e-6, sampleRateHz: 2000 });

test("has LSB/√12 in all, LSB/√(6·rate) per root hertz, and nothing above half the rate", () => {
  const all = { fromHz: 0, toHz: Number.POSITIVE_INFINITY };
  expectRelative(bandNoise(rounding, all).rms, 3e-6 / Math.sqrt(12), 1e-15);
  expectRelative(Math.sqrt(rounding.powerDensityAt(10)), 3e-6 / Math.sqrt(12e3), 1e-15);
  expect(rounding.powerDensityAt(1001)).toBe(0);
  expect(bandNoise(rounding, { fromHz: 2000, toHz: 3000 }).rms).toBe(0);
});

test("adds to other spectra and through skirts on exact routes", () => {
  const sum = sumSpectra(rounding, whiteFlicker({ floor: 1e-9, cornerHz: 1 }));
  const found = bandNoise(sum, { fromHz: 1, toHz: 1e4 });
  expect(found.status).toBe("exact");
  expectRelative(found.power, (9e-12 / 12e3) * 999 + 1e-18 * (9999 + Math.log(1e4)), 1e-14);
  const skirt = toneSkirt(rounding, { toneHz: 3000, amplitude: 1, reference: 1 });
  expectRelative(bandNoise(skirt, { fromHz: 0, toHz: 9e3 }).power, (0.5 * 9e-12) / 12, 1e-13);
});

test("says that it does not hold where other noise is below half a step", () => {
  const said = (otherRms: number): string => quantization({ lsb: 1, sampleRateHz: 1, otherRms }).assumptions.join(" ");
  expect(said(0.49)).toContain("does not hold");
  expect(said(0.51)).not.toContain("does not hold");
  expect(quantization({ lsb: 1, sampleRateHz: 1 }).assumptions[0]).toContain("at least half a step");
});

test("in time: rounding of noise of one step has a variance of LSB²/12 and is white; of a tenth of a step it has not", () => {
  const errorsOf = (rms: number): number[] => {
    const normal = normalFrom(uniformFrom(11));
    return Array.from({ length: 200_000 }, () => {
      const value = 0.3 + rms * normal();
      return Math.round(value) - value;
    });
  };
  const variance = (values: readonly number[]): number => {
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
  };
  expectRelative(variance(errorsOf(1)), 1 / 12, 0.01);
  expect(variance(errorsOf(0.1)) * 12).toBeLessThan(0.4);
});

test.each([
  { lsb: 0, sampleRateHz: 1 },
  { lsb: 1, sampleRateHz: 0 },
  { lsb: 1, sampleRateHz: Number.NaN },
])("refuses %o", (options) => {
  expect(() => quantization(options)).toThrow(OutOfDomainError);
});

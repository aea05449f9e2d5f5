import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { converterFigures } from "../../src/convert/converter-figures.js";
import { idealConverterSnrDb, quantizationNoiseRms } from "../../src/convert/ideal-converter.js";
import { referenceLimitedSnrDb } from "../../src/convert/reference-limited-snr-db.js";
import { rmsForEffectiveBits, rmsForEffectiveResolution, rmsForNoiseFreeBits } from "../../src/convert/rms-for-bits.js";

const range = { rangePeakToPeak: 5 };

test("an ideal converter has its own bits as effective bits and 6.02 N + 1.76 dB (Bennett 1948, IEEE 1241)", () => {
  for (const bits of [8, 16, 24]) {
    const rms = quantizationNoiseRms({ ...range, bits });
    const figures = converterFigures({ rms, ...range });
    expectRelative(figures.noiseLimitedEffectiveBits, bits, 1e-14);
    expectRelative(figures.snrDb, idealConverterSnrDb(bits), 1e-13);
  }
});

test("noise and distortion of one power take 3.01 dB from the SNR: SINAD, and half a bit", () => {
  const rms = 1e-4;
  const plain = converterFigures({ rms, ...range });
  const both = converterFigures({ rms, ...range, distortionDb: -plain.snrDb });
  expectRelative(both.sinadDb ?? 0, plain.snrDb - 3.010299956639812, 1e-13);
  expectRelative(both.effectiveBits ?? 0, plain.noiseLimitedEffectiveBits - 0.5, 1e-12);
  // IEEE 1241: (SINAD − 1.76)/6.02 for a full-scale sine
  expectRelative(both.effectiveBits ?? 0, ((both.sinadDb ?? 0) - 10 * Math.log10(1.5)) / (20 * Math.log10(2)), 1e-12);
});

test("noise-free bits lie log2 of the factor below the effective resolution, counts are their power of two", () => {
  const { noiseFreeBits, effectiveResolutionBits, noiseFreeCounts } = converterFigures({
    rms: 1e-6,
    ...range,
    factor: 6,
  });
  expectRelative(effectiveResolutionBits - noiseFreeBits, Math.log2(6), 1e-12);
  expectRelative(noiseFreeCounts, 5 / 6e-6, 1e-12);
});

test("the inverse forms give the RMS that leaves so many bits", () => {
  for (const bits of [12, 18.5]) {
    const of = (rms: number) => converterFigures({ rms, ...range });
    expectRelative(of(rmsForNoiseFreeBits(bits, range)).noiseFreeBits, bits, 1e-13);
    expectRelative(of(rmsForEffectiveBits(bits, range)).noiseLimitedEffectiveBits, bits, 1e-13);
    expectRelative(of(rmsForEffectiveResolution(bits, range)).effectiveResolutionBits, bits, 1e-13);
  }
});

test("2.5 V over 10 µV of reference noise is 107.96 dB", () => {
  expectRelative(referenceLimitedSnrDb({ referenceVolts: 2.5, noiseRms: 10e-6 }), 107.95880017344075, 1e-14);
});

describe("refusals", () => {
  test.each([
    [{ rms: 0, ...range }, /rms must be/],
    [{ rms: 3, ...range }, /must not exceed half the range, 2\.5/],
    [{ rms: 1e-6, rangePeakToPeak: 0 }, /largest minus smallest input/],
    [{ rms: 1e-6, ...range, distortionDb: 3 }, /dB not above 0; got 3/],
    [{ rms: 1e-6, ...range, bits: 0 }, /bits must be a whole number from 1 to 64/],
    [{ rms: 1e-6, ...range, bit: 16 }, /knows no option "bit"/],
  ])("%o", (options, message) => {
    expect(() => converterFigures(options as never)).toThrow(message);
  });
});

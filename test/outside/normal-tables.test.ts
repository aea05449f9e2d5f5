import {
  converterFigures,
  crestFactorFor,
  idealConverterSnrDb,
  levelDbu,
  levelDbv,
  peakToPeak,
  peakToPeakFactorFor,
  rangeOfNormals,
  rmsFromDbu,
  rmsFromPeakToPeak,
  shareOutside,
} from "@quietband/figures";
import { describe, expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";
import { referenceCases } from "../support/vectors.js";

interface GaussCase {
  readonly id: string;
  readonly given: "tail" | "coverage";
  readonly tail?: number;
  readonly coverage?: number;
  readonly peakToPeakOverRms: string;
  readonly inverse: { readonly peakToPeakOverRms: number; readonly tail: string };
}

// Source: fixtures/reference/gauss.json and range.json (mpmath, 50 digits).
test.each(referenceCases<GaussCase>("gauss.json"))("factor and share of $id, down to 1e-16", (given) => {
  if (given.tail !== undefined)
    expectRelative(peakToPeakFactorFor({ shareOutside: given.tail }), Number(given.peakToPeakOverRms), 1e-14);
  expectRelative(shareOutside(given.inverse.peakToPeakOverRms), Number(given.inverse.tail), 1e-13);
});

test.each(
  referenceCases<{ readonly n: number; readonly mean: string; readonly standardDeviation: string }>("range.json"),
)("range of $n normals", ({ n, mean, standardDeviation }) => {
  const found = rangeOfNormals(n);
  expectRelative(found.mean, Number(mean), 1e-11);
  expectRelative(found.standardDeviation, Number(standardDeviation), 1e-11);
});

describe("handbook tables", () => {
  test("d2 and d3 of the range (control-chart tables, seen)", () => {
    for (const { n, d2, d3 } of published<{ n: number; d2: number; d3: number }>("range_d2_d3").values) {
      const found = rangeOfNormals(n);
      expect(Math.abs(found.mean - d2)).toBeLessThanOrEqual(5.1e-4);
      expect(Math.abs(found.standardDeviation - d3)).toBeLessThanOrEqual(5.1e-4);
    }
  });

  test("Tippett's mean ranges (Biometrika 17, 1925; from memory)", () => {
    for (const row of published<{ n: number; published: number }>("tippett1925_mean_range").values)
      expect(Math.abs(rangeOfNormals(row.n).mean - row.published)).toBeLessThanOrEqual(5.3e-6);
  });

  test("peak-to-peak multiples against percent outside, and crest factors: two different quantities (from memory)", () => {
    for (const row of published<{
      peakToPeakOverRms: number;
      exactPercentOutside: number;
      publishedPercentOutside: number;
      agrees: boolean;
    }>("peak_to_peak_multiples").values) {
      const percent = 100 * shareOutside(row.peakToPeakOverRms);
      expectRelative(percent, row.exactPercentOutside, 1e-12);
      if (row.agrees) expect(Math.abs(percent / row.publishedPercentOutside - 1)).toBeLessThan(0.06);
    }
    for (const row of published<{ percentOfTimeExceeded: number; published: number }>("crest_factor").values)
      expect(
        Math.abs(crestFactorFor({ shareOutside: row.percentOfTimeExceeded / 100 }) - row.published),
      ).toBeLessThanOrEqual(0.05);
  });

  test("normal quantiles (mostly seen)", () => {
    for (const row of published<{ p: number; published: number }>("normal_quantiles").values)
      expect(
        Math.abs(0.5 * peakToPeakFactorFor({ shareOutside: 2 * (1 - row.p) }) - row.published),
      ).toBeLessThanOrEqual(5.1e-4);
  });

  test("dB references: 0 dBu is √0.6 V (partly seen)", () => {
    expectRelative(rmsFromDbu(0), Math.sqrt(0.6), 1e-15);
    expectRelative(rmsFromDbu(4), 1.228, 5e-4);
    expect(Math.abs(levelDbu(0.31622776601683794) + 7.78)).toBeLessThan(0.005);
    expect(levelDbv(1)).toBe(0);
  });

  test("6.02 N + 1.76 dB (seen); the rule is 0.015 dB low at 24 bits", () => {
    for (const { bits, exactDb } of published<{ bits: number; exactDb: number }>("quantisation_snr").values) {
      expectRelative(idealConverterSnrDb(bits), exactDb, 1e-13);
      expect(Math.abs(idealConverterSnrDb(bits) - (6.02 * bits + 1.76))).toBeLessThan(0.016);
    }
  });
});

describe("facts of the trade (common practice, no source)", () => {
  test("7.5 µV peak-to-peak at the factor 6.6 is 1.14 µV RMS, ±3.3 σ leaves 0.0967 % outside", () => {
    expect((rmsFromPeakToPeak(7.5e-6) * 1e6).toFixed(2)).toBe("1.14");
    expect((100 * shareOutside(6.6)).toFixed(4)).toBe("0.0967");
    expectRelative(peakToPeak(1e-6).peakToPeak, 6.6e-6, 1e-15);
  });

  test("effective resolution is log2(range/σ), noise-free bits log2(range/(6.6 σ)): 2.72 bits apart, and nothing exceeds N", () => {
    const figures = converterFigures({ rms: 1e-6, rangePeakToPeak: 5, bits: 24 });
    expectRelative(figures.effectiveResolutionBits - figures.noiseFreeBits, Math.log2(6.6), 1e-12);
    const quiet = converterFigures({ rms: 1e-12, rangePeakToPeak: 5, bits: 16 });
    expect(quiet.noiseFreeBits).toBe(16);
    expect(quiet.limitedByBits).toContain("noiseFreeBits");
  });

  test("levels refuse a peak-to-peak value", () => {
    expect(() => levelDbv(peakToPeak(1e-6) as never)).toThrow(/must be an RMS value/);
  });
});

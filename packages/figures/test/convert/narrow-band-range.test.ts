import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { narrowBandRanges } from "../../src/convert/narrow-band-range.js";
import { recordDensity } from "../../src/convert/record-density.js";

const band = (fromHz: number, toHz: number, recordSeconds: number) =>
  recordDensity(() => 1 / (toHz - fromHz), { fromHz, toHz, recordSeconds, fastestHz: toHz, knots: [] });
const meanOf = (values: Float64Array): number => values.reduce((sum, value) => sum + value, 0) / values.length;

test("of a band far narrower than one over the record the envelope stands still: twice Rayleigh's mean, √(2π) σ", () => {
  const ranges = narrowBandRanges(band(9.9999, 10.0001, 50), 50, 1) ?? new Float64Array();
  // 2048 draws with a spread of 0.52 of the mean know it to 1.2 %
  expectRelative(meanOf(ranges), Math.sqrt(2 * Math.PI), 0.03);
  expect(Array.from(ranges)).toEqual(Array.from(ranges.toSorted()));
});

test("a wider band reaches further; the same call gives the same ranges", () => {
  const [still, moving] = [band(9.9999, 10.0001, 50), band(9.96, 10.04, 50)].map((density) =>
    narrowBandRanges(density, 50, 0.999),
  );
  expect(meanOf(moving ?? new Float64Array())).toBeGreaterThan(1.3 * meanOf(still ?? new Float64Array()));
  expect(narrowBandRanges(band(9.96, 10.04, 50), 50, 0.999)).toEqual(moving);
});

test("a band that is not narrow, holds many envelopes or few turns is left to up-crossings", () => {
  expect(narrowBandRanges(band(9.96, 10.04, 50), 50, 0.9)).toBeUndefined();
  expect(narrowBandRanges(band(9, 11, 50), 50, 0.99)).toBeUndefined();
  expect(narrowBandRanges(band(0.0099, 0.0101, 50), 50, 1)).toBeUndefined();
});

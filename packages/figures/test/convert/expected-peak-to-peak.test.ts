import { firstOrderLowPass, NoiseError, powerLaws, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { type ExpectedPeakToPeakOptions, expectedPeakToPeak } from "../../src/convert/expected-peak-to-peak.js";
import { rangeOfNormals } from "../../src/convert/range-of-normals.js";

const white = powerLaws([{ coefficient: 1e-14, exponent: 0 }]);
const record: ExpectedPeakToPeakOptions = { fromHz: 0.1, toHz: 10, recordSeconds: 10 };

test("white noise sampled at twice its band has the range of independent normals (Tippett 1925)", () => {
  const found = expectedPeakToPeak(white, { fromHz: 0, toHz: 50, recordSeconds: 2, sampleRateHz: 100 });
  expectRelative(found.multipleOfRms, rangeOfNormals(200).mean, 5e-6);
  expectRelative(found.spread / found.rms, rangeOfNormals(200).standardDeviation, 5e-6);
  // Tippett's 5.49209 for 200, from memory
  expectRelative(found.multipleOfRms, 5.49209, 5e-6);
});

test("Rice's rate of a flat band is 0.577 of its width for a low-pass and the convention stands beside the record", () => {
  const found = expectedPeakToPeak(white, record);
  expectRelative(found.upCrossingRateHz ?? 0, Math.sqrt((10 ** 3 - 0.1 ** 3) / 3 / 9.9), 1e-9);
  expectRelative(found.convention.peakToPeak, 6.6 * found.rms, 1e-14);
  expect(found.convention.convention).toMatch(/6\.6/);
  expect(found.basis).toBe("up-crossings of Gaussian noise, one record of 10 s, a continuous trace");
});

test("scaling the noise scales the range; a faster clock and a slower noise in step change nothing", () => {
  const mixed = whiteFlicker({ floor: 1, cornerHz: 3 });
  const one = expectedPeakToPeak(mixed, record);
  const scaled = expectedPeakToPeak(whiteFlicker({ floor: 1e-9, cornerHz: 3 }), record);
  expectRelative(scaled.mean, 1e-9 * one.mean, 1e-9);
  expectRelative(scaled.spread, 1e-9 * one.spread, 1e-9);
  const slowed = expectedPeakToPeak(whiteFlicker({ floor: 1, cornerHz: 3e-3 }), {
    fromHz: 1e-4,
    toHz: 1e-2,
    recordSeconds: 1e4,
  });
  expectRelative(slowed.multipleOfRms, one.multipleOfRms, 1e-6);
});

test("records of any length have a mean that grows and a spread that shrinks, slowly", () => {
  const found = [1, 3, 10, 100, 1e4, 1e6].map((recordSeconds) =>
    expectedPeakToPeak(white, { fromHz: 1, toHz: 1e3, recordSeconds, records: 3 }),
  );
  for (const [index, { mean, spread }] of found.entries()) {
    expect(mean).toBeGreaterThan(found[index - 1]?.mean ?? 0);
    expect(spread).toBeLessThan(found[index - 1]?.spread ?? Number.POSITIVE_INFINITY);
    expect(spread).toBeGreaterThan(0.01 * mean);
  }
});

test("the same call gives the same digits", () => {
  expect(expectedPeakToPeak(white, record)).toEqual(expectedPeakToPeak(white, record));
});

test("the largest of several records is larger and scatters less", () => {
  const [one, ten, hundred] = [1, 10, 100].map((records) => expectedPeakToPeak(white, { ...record, records }));
  expect((ten?.mean ?? 0) / (one?.mean ?? 0)).toBeGreaterThan(1.1);
  expect(hundred?.mean).toBeGreaterThan(ten?.mean ?? 0);
  expect(hundred?.spread).toBeLessThan(ten?.spread ?? 0);
  expect(ten?.basis).toMatch(/the largest of 10 records of 10 s/);
});

test("what is slower than the record shifts it and hardly widens it", () => {
  const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
  const short = { toHz: 10, recordSeconds: 1 };
  const from1 = expectedPeakToPeak(flicker, { ...short, fromHz: 0.01 });
  const from2 = expectedPeakToPeak(flicker, { ...short, fromHz: 1e-6 });
  expectRelative(from2.mean, from1.mean, 0.002);
  expect(from2.rms / from1.rms).toBeGreaterThan(1.4);
  expect(from2.multipleOfRms).toBeLessThan(from1.multipleOfRms);
});

test("down to 0 Hz the RMS of 1/f noise is infinite and the record's own is given, with a note", () => {
  const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
  const found = expectedPeakToPeak(flicker, { ...record, fromHz: 0 });
  expect(found.notes.join(" ")).toMatch(/From 0 Hz the RMS of this noise is infinite/);
  expectRelative(found.mean, expectedPeakToPeak(flicker, { ...record, fromHz: 1e-5 }).mean, 0.002);
});

test("a coupling capacitor takes the slow part away", () => {
  const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
  const dc = expectedPeakToPeak(flicker, { ...record, fromHz: 0.01 });
  const coupled = expectedPeakToPeak(flicker, { ...record, fromHz: 0.01, coupling: { highPassHz: 1 } });
  expect(coupled.mean).toBeLessThan(0.9 * dc.mean);
  expect(expectedPeakToPeak(flicker, { ...record, coupling: "highPassed" }).rms).toBeLessThan(dc.rms);
});

describe("refusals", () => {
  const weighting = firstOrderLowPass({ cutoffHz: 10 });
  test.each<[Partial<ExpectedPeakToPeakOptions>, RegExp]>([
    [{ fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting }, /sampleRateHz is required here/],
    [{ recordSeconds: 0 }, /recordSeconds must be/],
    [{ recordSeconds: 0.01, sampleRateHz: 100 }, /must hold 2 to 1e15 samples/],
    [{ records: 0 }, /records/],
    [{ coupling: "ac" as never }, /coupling must be "dc", "highPassed"/],
    [{ length: 3 } as never, /length/],
    [{ fromHz: 20 }, /above fromHz = 20/],
  ])("%o", (given, message) => {
    expect(() => expectedPeakToPeak(white, { ...record, ...given })).toThrow(NoiseError);
    expect(() => expectedPeakToPeak(white, { ...record, ...given })).toThrow(message);
  });
});

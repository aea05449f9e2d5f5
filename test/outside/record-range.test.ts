import { powerLaws, spectralMoment } from "@quietband/core";
import { expectedPeakToPeak } from "@quietband/figures";
import { describe, expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
const flicker = powerLaws([{ coefficient: 1, exponent: 1 }]);

// Source: S. O. Rice, Bell Syst. Tech. J. 23 (1944) and 24 (1945), from memory (fixtures/published/rice_zero_crossings.json).
describe("Rice's rates", () => {
  const exact = (name: RegExp): number =>
    published<{ readonly name: string; readonly exact: number }>("rice_zero_crossings").values.find((row) =>
      name.test(row.name),
    )?.exact ?? Number.NaN;
  const record = { recordSeconds: 100 };

  test("an ideal low-pass crosses zero 1.155 times its width a second, upwards half as often", () => {
    const found = expectedPeakToPeak(white, { fromHz: 0, toHz: 1, ...record }).upCrossingRateHz ?? 0;
    expectRelative(2 * found, exact(/^zeros per second, ideal low-pass/), 1e-12);
    expect((2 * found).toFixed(3)).toBe("1.155");
  });

  test("its maxima come 0.775 times its width a second: √(m₄/m₂)", () => {
    const moment = (order: 2 | 4) => spectralMoment(white, order, { fromHz: 0, toHz: 1 }).value;
    const rate = Math.sqrt(moment(4) / moment(2));
    expectRelative(rate, exact(/^maxima/), 1e-12);
    expect(rate.toFixed(3)).toBe("0.775");
  });

  test("a band of an octave, and 1/f noise over two decades", () => {
    const octave = expectedPeakToPeak(white, { fromHz: 1, toHz: 2, ...record }).upCrossingRateHz ?? 0;
    expectRelative(2 * octave, exact(/ideal band-pass/), 1e-12);
    const slow = expectedPeakToPeak(flicker, { fromHz: 0.1, toHz: 10, ...record }).upCrossingRateHz ?? 0;
    expectRelative(2 * slow, exact(/1\/f/), 1e-12);
  });
});

// Source: A. G. Davenport, Proc. ICE 28 (1964) 187, formula seen; Poisson means by quadrature (davenport_peak_factor.json).
test.each(
  published<{ readonly nuT: number; readonly davenport: number; readonly poissonExact: number }>(
    "davenport_peak_factor",
  ).values.filter(({ nuT }) => nuT >= 100 && nuT <= 1e4),
)("$nuT up-crossings: half the range of a record is the Poisson mean, below Davenport's asymptote", (row) => {
  // a low-pass of 1 Hz crosses upwards 1/√3 times a second
  const range = expectedPeakToPeak(white, { fromHz: 0, toHz: 1, recordSeconds: row.nuT * Math.sqrt(3) });
  const peak = range.multipleOfRms / 2;
  expectRelative(peak, row.poissonExact, 0.012);
  expect(peak).toBeLessThan(row.davenport);
});

test("for orientation (common practice, no source): near 6.0, 5.6 and 7.4 × RMS, and one RC pole by its sample rate", () => {
  const band = { fromHz: 0.1, toHz: 10 };
  expectRelative(expectedPeakToPeak(white, { ...band, recordSeconds: 10 }).multipleOfRms, 6.0, 0.02);
  expectRelative(expectedPeakToPeak(flicker, { ...band, recordSeconds: 10 }).multipleOfRms, 5.6, 0.02);
  expectRelative(expectedPeakToPeak(white, { ...band, recordSeconds: 100 }).multipleOfRms, 7.4, 0.02);
});

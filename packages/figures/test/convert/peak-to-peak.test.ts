import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { crestFactor, crestFactorFor } from "../../src/convert/crest-factor.js";
import { peakToPeak } from "../../src/convert/peak-to-peak.js";
import { peakToPeakFactorFor } from "../../src/convert/peak-to-peak-factor-for.js";
import { rmsFromPeakToPeak } from "../../src/convert/rms-from-peak-to-peak.js";
import { shareOutside } from "../../src/convert/share-outside.js";

test("the crest factor is peak over RMS and half of the peak-to-peak factor", () => {
  expectRelative(crestFactor(3.3, 1), 3.3, 1e-15);
  expectRelative(2 * crestFactorFor({ shareOutside: 1e-3 }), peakToPeakFactorFor({ shareOutside: 1e-3 }), 1e-15);
});

test("there and back, by factor or by share, and from the record itself", () => {
  const made = peakToPeak(2e-6, { shareOutside: 1e-3 });
  // 0.1 % lies outside ±3.2905 σ: any table of the normal law
  expect(made.factor.toFixed(3)).toBe("6.581");
  expectRelative(rmsFromPeakToPeak(made), 2e-6, 1e-15);
  expectRelative(rmsFromPeakToPeak(made.peakToPeak, { shareOutside: 1e-3 }), 2e-6, 1e-15);
  expect(made.convention).toBe("6.581 × RMS, 0.1 % of the time outside");
});

test("shares near 0 are taken from inside, where 1 − share would lose them", () => {
  expectRelative(peakToPeakFactorFor({ shareInside: 1e-12 }), 2e-12 * Math.sqrt(Math.PI / 2), 1e-9);
  expectRelative(shareOutside(peakToPeakFactorFor({ shareInside: 0.3 })), 0.7, 1e-14);
});

test.each([
  [() => peakToPeak(1, { factor: 6, shareOutside: 0.1 }), /not both/],
  [() => peakToPeak(1, { factor: 0 }), /factor, peak-to-peak \/ RMS/],
  [() => peakToPeakFactorFor({ shareOutside: 1 }), /above 0 and below 1/],
  [() => peakToPeakFactorFor({}), /exactly one/],
  [() => shareOutside(-1), /not negative/],
  [() => rmsFromPeakToPeak(peakToPeak(1), { factor: 6 }), /no second convention/],
  [() => crestFactor(0, 1), /peak must be/],
])("%# is refused", (run, message) => {
  expect(run).toThrow(message);
});

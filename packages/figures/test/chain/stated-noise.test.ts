import { OutOfDomainError, whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { noiseBudget } from "../../src/chain/noise-budget.js";
import { statedNoise } from "../../src/chain/stated-noise.js";

test("7.5 µV peak-to-peak is 1.14 µV RMS at the factor 6.6 (common practice, no source)", () => {
  expect(statedNoise({ peakToPeak: 7.5e-6 }).rms.toPrecision(3)).toBe("0.00000114");
  expectRelative(statedNoise({ peakToPeak: 6e-6, convention: { factor: 6 } }).rms, 1e-6, 1e-15);
});

test("a budget takes it as it is and says where its band differs", () => {
  const stated = statedNoise({ rms: 1e-6, fromHz: 0.1, toHz: 10, name: "reference" });
  const noise = { source: whiteFlicker({ floor: 1e-9, cornerHz: 0 }), name: "amplifier" };
  const notes = (fromHz: number, toHz: number): string => {
    const budget = noiseBudget({ sources: [{ source: stated }, noise], fromHz, toHz });
    expectRelative(budget.shares[0]?.rms ?? 0, 1e-6, 1e-15);
    return budget.shares[0]?.notes.join(" ") ?? "";
  };
  expect(notes(0.1, 80)).toContain("0.1 Hz to 10 Hz; the budget's band is 0.1 Hz to 80 Hz");
  expect(notes(0.1, 10)).not.toContain("budget's band");
});

test.each([
  {},
  { rms: 1, peakToPeak: 6.6 },
  { rms: 0 },
  { rms: 1, convention: { factor: 6 } },
  { rms: 1, fromHz: 1 },
  { rms: 1, fromHz: 2, toHz: 1 },
  { rms: 1, standardUncertainty: -0.1 },
])("refuses %o", (options) => {
  expect(() => statedNoise(options)).toThrow(OutOfDomainError);
});

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { powerLaws } from "../../src/spectrum/power-laws.js";

test("terms add up, and the steepest one rules each end", () => {
  const spectrum = powerLaws(
    [
      { coefficient: 4e-16, exponent: 0 },
      { coefficient: 3e-14, exponent: 1 },
      { coefficient: 2e-13, exponent: 2 },
    ],
    { unit: "A" },
  );
  expect(spectrum.unit).toBe("A");
  expectRelative(spectrum.powerDensityAt(2), 4e-16 + 1.5e-14 + 5e-14, 4e-16);
  expect([spectrum.lowExponent, spectrum.highExponent]).toEqual([2, 0]);
});

test("a term without power does not decide convergence", () => {
  const spectrum = powerLaws([
    { coefficient: 1, exponent: 0.5 },
    { coefficient: 0, exponent: 3 },
  ]);
  expect(spectrum.lowExponent).toBe(0.5);
});

test("negative coefficients and empty sums are refused", () => {
  expect(() => powerLaws([{ coefficient: -1, exponent: 0 }])).toThrow(/coefficient of term 0/);
  expect(() => powerLaws([])).toThrow(/at least one term/);
  expect(() => powerLaws([{ coefficient: 1, exponent: Number.NaN }])).toThrow(/exponent of term 0/);
});

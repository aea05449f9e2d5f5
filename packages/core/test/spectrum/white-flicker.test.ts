import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { OutOfDomainError } from "../../src/ground/errors.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";

test("at the corner the density is √2 above the floor, whatever the exponent", () => {
  for (const exponent of [0.8, 1, 1.3, 2])
    expectRelative(
      Math.sqrt(whiteFlicker({ floor: 5e-9, cornerHz: 37, exponent }).powerDensityAt(37)),
      5e-9 * Math.SQRT2,
      4e-16,
    );
});

test("density falls ten times the exponent in dB a decade, far below the corner", () => {
  const spectrum = whiteFlicker({ floor: 1e-9, cornerHz: 1e6, exponent: 1.4 });
  const fall = 10 * Math.log10(spectrum.powerDensityAt(1e-6) / spectrum.powerDensityAt(1e-5));
  expectRelative(fall, 14, 1e-12);
});

test("what is no floor, corner or exponent is refused by name", () => {
  expect(() => whiteFlicker({ floor: 0, cornerHz: 1 })).toThrow(
    /floor must be a positive finite number of V\/√Hz; got 0/,
  );
  expect(() => whiteFlicker({ floor: 1, cornerHz: -1 })).toThrow(OutOfDomainError);
  expect(() => whiteFlicker({ floor: 1, cornerHz: 1, exponent: Number.NaN })).toThrow(
    /exponent must be a finite number/,
  );
});

import { bandNoise, OutOfDomainError } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { resistorExcessNoise } from "../../src/chain/resistor-excess-noise.js";

test("0 dB is 1 µV RMS a decade for each volt, in any decade", () => {
  const excess = resistorExcessNoise({ volts: 3, noiseIndexDb: 0 });
  for (const fromHz of [1e-3, 1, 1e5])
    expectRelative(bandNoise(excess, { fromHz, toHz: 10 * fromHz }).rms, 3e-6, 1e-14);
  const better = resistorExcessNoise({ volts: 3, noiseIndexDb: -40 });
  expectRelative(bandNoise(better, { fromHz: 1, toHz: 10 }).rms, 3e-8, 1e-14);
});

test.each([
  { volts: 0, noiseIndexDb: 0 },
  { volts: 1, noiseIndexDb: Number.NaN },
])("refuses %o", (options) => {
  expect(() => resistorExcessNoise(options)).toThrow(OutOfDomainError);
});

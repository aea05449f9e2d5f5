import { whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { referencePathNoise } from "../../src/chain/reference-path-noise.js";
import { skirtInBin } from "../../src/chain/skirt-in-bin.js";

const base = {
  spectrum: whiteFlicker({ floor: 100e-9, cornerHz: 20 }),
  referenceVolts: 2.5,
  toneHz: 1000,
  amplitude: 2,
  binHz: 2,
};

test("a bin is the band of the skirt, on either side", () => {
  for (const offsetHz of [-50, 5, 3000]) {
    const { rms } = skirtInBin({ ...base, offsetHz });
    const band = referencePathNoise({
      spectrum: base.spectrum,
      referenceVolts: 2.5,
      input: { kind: "sine", amplitude: 2, frequencyHz: 1000 },
      fromHz: 1000 + offsetHz - 1,
      toHz: 1000 + offsetHz + 1,
      leaveOutHz: 1e-3,
    });
    expectRelative(rms, band.rms, 1e-11);
  }
});

test("the ratio of tone to bin does not know the amplitude, and 1 Hz gives the relative density", () => {
  const [small, large] = [skirtInBin({ ...base, offsetHz: 5, amplitude: 0.02 }), skirtInBin({ ...base, offsetHz: 5 })];
  expectRelative(small.snrDb, large.snrDb, 1e-13);
  expectRelative(large.relativeDensityDb, -large.snrDb - 10 * Math.log10(2), 1e-15);
});

test("a bin that holds the tone or 0 Hz is refused", () => {
  expect(() => skirtInBin({ ...base, offsetHz: 0.5 })).toThrow(/neither the tone/);
  expect(() => skirtInBin({ ...base, offsetHz: -999.5 })).toThrow(/0 Hz/);
});

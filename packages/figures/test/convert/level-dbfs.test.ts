import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import {
  densityDbfsPerHz,
  fullScaleSineRms,
  levelDbFullScaleAmplitude,
  levelDbfs,
  rmsFromDbfs,
} from "../../src/convert/level-dbfs.js";

const fullScale = { rangePeakToPeak: 5 };

test("0 dBFS is the RMS of a full-scale sine; re its amplitude that is −3.01 dB, a different function", () => {
  const sine = 2.5 / Math.SQRT2;
  expectRelative(fullScaleSineRms(5), sine, 1e-15);
  expect(Math.abs(levelDbfs(sine, fullScale))).toBeLessThan(1e-14);
  expectRelative(levelDbFullScaleAmplitude(sine, fullScale), -10 * Math.log10(2), 1e-13);
  expectRelative(levelDbfs(sine / 1000, fullScale), -60, 1e-13);
});

test("there and back, and a density in dBFS/Hz is that of 1 Hz", () => {
  expectRelative(rmsFromDbfs(-20, fullScale), fullScaleSineRms(5) / 10, 1e-14);
  expectRelative(densityDbfsPerHz(1e-6, fullScale), levelDbfs(1e-6, fullScale), 1e-15);
});

test.each([
  () => levelDbfs(0, fullScale),
  () => levelDbfs(1, { rangePeakToPeak: -5 }),
  () => levelDbfs({ kind: "peak-to-peak", rms: 1 } as never, fullScale),
  () => levelDbfs(1, { range: 5 } as never),
  () => rmsFromDbfs(Number.NaN, fullScale),
])("%# is refused", (run) => {
  expect(run).toThrow(/must be|knows no option/);
});

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { functionSpectrum } from "../../src/spectrum/function-spectrum.js";
import { powerLaws } from "../../src/spectrum/power-laws.js";
import { scaleSpectrum } from "../../src/spectrum/scale-spectrum.js";
import { sumSpectra } from "../../src/spectrum/sum-spectra.js";

const flicker = powerLaws([{ coefficient: 3e-16, exponent: 1 }]);
const white = powerLaws([{ coefficient: 1e-16, exponent: 0 }]);
const trap = functionSpectrum((hz) => 1e-15 / (1 + (hz / 50) ** 2), { knots: [50], lowExponent: 0, highExponent: 2 });

test("power laws stay power laws: the sum integrates exactly", () => {
  const noise = bandNoise(sumSpectra(flicker, white), { fromHz: 1, toHz: 100 });
  expect(noise.status).toBe("exact");
  expectRelative(noise.power, 3e-16 * Math.log(100) + 99e-16, 1e-15);
});

test("with a part that is no power law each part keeps its own route, also nested and scaled", () => {
  const sum = scaleSpectrum(sumSpectra(sumSpectra(flicker, trap), white), 2);
  expect(sum.parts).toHaveLength(3);
  const noise = bandNoise(sum, { fromHz: 1, toHz: 100 });
  const lorentz = 1e-15 * 50 * (Math.atan(2) - Math.atan(0.02));
  expectRelative(noise.power, 4 * (3e-16 * Math.log(100) + 99e-16 + lorentz), 1e-13);
});

test("different units, none at all, or no shared frequencies are refused", () => {
  expect(() => sumSpectra()).toThrow(/at least one/);
  expect(() => sumSpectra(white, powerLaws([{ coefficient: 1, exponent: 0 }], { unit: "A" }))).toThrow(/one unit/);
  const low = functionSpectrum(() => 1, { support: [0, 1], lowExponent: 0, highExponent: 0 });
  const high = functionSpectrum(() => 1, { support: [2, 3], lowExponent: 0, highExponent: 0 });
  expect(() => sumSpectra(low, high)).toThrow(/share a range/);
});

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { uncertaintyParts } from "../../src/band/uncertainty.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { polyline } from "../../src/spectrum/polyline.js";
import type { Spectrum } from "../../src/spectrum/spectrum.js";
import { besselLowPass } from "../../src/weighting/bessel-low-pass.js";
import { butterworthLowPass } from "../../src/weighting/butterworth-low-pass.js";
import { firstOrderLowPass } from "../../src/weighting/first-order-low-pass.js";
import { resonator } from "../../src/weighting/resonator.js";
import { secondOrderLowPass } from "../../src/weighting/second-order-low-pass.js";
import type { Weighting } from "../../src/weighting/weighting.js";

const curve = curveFromPoints(
  [0.01, 0.1, 0.3, 2, 11, 300, 1e4].map((frequency, k) => ({
    frequency,
    density: 1e-8 * Math.sqrt(1 + 20 / frequency),
    uncertainty: 0.03 + 0.01 * (k % 2),
  })),
  { unit: "V", commonUncertainty: 0.02 },
);
const lines = polyline(curve);

/** The same spectrum without its pieces: the adapted rule is the only one left. */
function withoutPieces(spectrum: Spectrum): Spectrum {
  const { pieces, ...rest } = spectrum;
  expect(pieces).toBeDefined();
  return rest;
}

const weightings: readonly (Weighting | undefined)[] = [
  undefined,
  firstOrderLowPass({ cutoffHz: 3 }),
  butterworthLowPass({ order: 2, cutoffHz: 40 }),
  butterworthLowPass({ order: 6, cutoffHz: 1 }),
  besselLowPass({ order: 5, cutoffHz: 200 }),
  secondOrderLowPass({ naturalHz: 5, q: 2 }),
  resonator({ centreHz: 50, q: 30 }),
];

test.each(weightings.map((weighting) => [weighting?.name ?? "brick wall", weighting] as const))(
  "fixed nodes and the adapted rule give one uncertainty to 1e-6: %s",
  (_, weighting) => {
    for (const band of [
      [0.01, 1e4],
      [0.05, 7],
    ] as const) {
      const fixed = uncertaintyParts(lines, weighting, band);
      const adapted = uncertaintyParts(withoutPieces(lines), weighting, band);
      for (const [index, { relative }] of fixed.entries())
        expectRelative(relative, adapted[index]?.relative ?? 0, 1e-6);
    }
  },
);

test("an error of the axis comes out as it went in", () => {
  const parts = uncertaintyParts(lines, undefined, [0.1, 100]);
  expect(parts.map(({ name }) => name)).toEqual(["points", "axis"]);
  expectRelative(parts[1]?.relative ?? 0, 0.02, 1e-12);
  const { standardUncertainty } = bandNoise(lines, { fromHz: 0.1, toHz: 100 });
  expectRelative(standardUncertainty ?? 0, Math.hypot(parts[0]?.relative ?? 0, 0.02), 1e-12);
});

import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { edgeShares } from "../../src/band/edge-shares.js";
import { powerLaws } from "../../src/spectrum/power-laws.js";
import { firstOrderLowPass } from "../../src/weighting/first-order-low-pass.js";

/** ∫ S·t dx over x = ln f by a dense midpoint sum: slow and obvious. */
function upperShare(exponent: number, from: number, to: number): number {
  const steps = 400_000;
  const width = Math.log(to / from);
  let sum = 0;
  for (let k = 0; k < steps; k += 1) {
    const t = (k + 0.5) / steps;
    const hz = from * Math.exp(width * t);
    sum += hz ** (1 - exponent) * t;
  }
  return (sum * width) / steps;
}

describe("the power between two edges, dealt out to them", () => {
  test.each([0, 0.999, 1, 1.001, 1.06, 2, 3.5, -2])("for S = f^−%d", (exponent) => {
    const spectrum = powerLaws([{ coefficient: 1, exponent }]);
    const found = edgeShares(spectrum, undefined, [2, 90]);
    expectRelative(found?.shares[1] ?? Number.NaN, upperShare(exponent, 2, 90), 1e-9);
    expectRelative(found?.total ?? Number.NaN, bandNoise(spectrum, { fromHz: 2, toHz: 90 }).power, 1e-13);
  });

  test("a step of a hundred decades a decade leaves all of it at the loud end", () => {
    for (const exponent of [1000, -1000]) {
      const spectrum = powerLaws([{ coefficient: 1, exponent }]);
      const { shares, total } = edgeShares(spectrum, undefined, [1, 1.5]) ?? { shares: [], total: 0 };
      const loud = exponent > 0 ? shares[0] : shares[1];
      expect(Number(loud) / total).toBeGreaterThan(0.99);
    }
  });

  test("through a filter there is no closed form", () => {
    const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
    expect(edgeShares(white, firstOrderLowPass({ cutoffHz: 1 }), [1, 2])).toBeUndefined();
  });
});

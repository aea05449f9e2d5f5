import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { uncertaintyParts } from "../../src/band/uncertainty.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { polyline } from "../../src/spectrum/polyline.js";
import { besselLowPass } from "../../src/weighting/bessel-low-pass.js";
import { butterworthLowPass } from "../../src/weighting/butterworth-low-pass.js";
import { firstOrderLowPass } from "../../src/weighting/first-order-low-pass.js";
import { movingAverage } from "../../src/weighting/moving-average.js";
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

/** The same without the promise of straight gradients: no closed form is left. */
const bent = {
  ...lines,
  sensitivities: (lines.sensitivities ?? []).map((group) => ({ ...group, straight: false })),
};

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
      const { power } = bandNoise(lines, { fromHz: band[0], toHz: band[1], weighting });
      const fixed = uncertaintyParts(lines, weighting, band, power);
      // no power is known: the fixed rule cannot be checked, and the adapted one is the only one left
      const adapted = uncertaintyParts(bent, weighting, band, Number.NaN);
      for (const [index, { relative }] of fixed.entries())
        expectRelative(relative, adapted[index]?.relative ?? 0, 1e-6);
    }
  },
);

test("an error of the axis comes out as it went in", () => {
  const { power } = bandNoise(lines, { fromHz: 0.1, toHz: 100 });
  const parts = uncertaintyParts(lines, undefined, [0.1, 100], power);
  expect(parts.map(({ name }) => name)).toEqual(["points", "axis"]);
  expectRelative(parts[1]?.relative ?? 0, 0.02, 1e-12);
  const { standardUncertainty } = bandNoise(lines, { fromHz: 0.1, toHz: 100 });
  expectRelative(standardUncertainty ?? 0, Math.hypot(parts[0]?.relative ?? 0, 0.02), 1e-12);
});

const pair = curveFromPoints(
  [10, 1000].map((frequency) => ({ frequency, density: 1e-8, uncertainty: 0.1 })),
  { unit: "V" },
);

test("two points of white noise through a brick wall: each counts with its mean hat", () => {
  // shares of ∫ f·hat df/f over ln f from ln 10 to ln 1000: the upper one is 1 + 1/L·(…) in closed form
  const width = Math.log(100);
  const upper = (1000 - (1000 - 10) / width) / (1000 - 10);
  const expected = 0.1 * Math.hypot(upper, 1 - upper);
  const { standardUncertainty = 0 } = bandNoise(polyline(pair), { fromHz: 10, toHz: 1000 });
  expect(Math.abs(standardUncertainty / expected - 1)).toBeLessThan(1e-6);
});

test("a resonance far narrower than any panel is found: the hats count at its centre", () => {
  const weighting = resonator({ centreHz: 70, q: 1e5 });
  const { standardUncertainty = 0 } = bandNoise(polyline(pair), { fromHz: 10, toHz: 1000, weighting });
  const share = Math.log(7) / Math.log(100);
  expect(Math.abs(standardUncertainty / (0.1 * Math.hypot(share, 1 - share)) - 1)).toBeLessThan(1e-3);
});

test("many lobes between two points count with their power", () => {
  // 1/(π f T)² on average, half of it in sin²: nearly all power sits where the lobes begin
  const weighting = movingAverage({ seconds: 0.05 });
  const { standardUncertainty = 0 } = bandNoise(polyline(pair), { fromHz: 10, toHz: 1000, weighting });
  const steps = 200_000;
  let [power, lower] = [0, 0];
  for (let k = 0; k < steps; k += 1) {
    const hz = 10 + (990 * (k + 0.5)) / steps;
    const part = weighting.powerGainAt(hz);
    power += part;
    lower += part * (1 - Math.log(hz / 10) / Math.log(100));
  }
  const share = lower / power;
  expect(Math.abs(standardUncertainty / (0.1 * Math.hypot(share, 1 - share)) - 1)).toBeLessThan(1e-5);
});

import { expect, test } from "vitest";
import { bandNoise } from "../../src/band/band-noise.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { polyline } from "../../src/spectrum/polyline.js";
import { movingAverage } from "../../src/weighting/moving-average.js";
import { resonator } from "../../src/weighting/resonator.js";

const curve = curveFromPoints(
  [10, 1000].map((frequency) => ({ frequency, density: 1e-8, uncertainty: 0.1 })),
  { unit: "V" },
);

test("two points of white noise through a brick wall: each counts with its mean hat", () => {
  // shares of ∫ f·hat df/f over ln f from ln 10 to ln 1000: the upper one is 1 + 1/L·(…) in closed form
  const width = Math.log(100);
  const upper = (1000 - (1000 - 10) / width) / (1000 - 10);
  const expected = 0.1 * Math.hypot(upper, 1 - upper);
  const { standardUncertainty = 0 } = bandNoise(polyline(curve), { fromHz: 10, toHz: 1000 });
  expect(Math.abs(standardUncertainty / expected - 1)).toBeLessThan(1e-6);
});

test("a resonance far narrower than any panel is found: the hats count at its centre", () => {
  const weighting = resonator({ centreHz: 70, q: 1e5 });
  const { standardUncertainty = 0 } = bandNoise(polyline(curve), { fromHz: 10, toHz: 1000, weighting });
  const share = Math.log(7) / Math.log(100);
  expect(Math.abs(standardUncertainty / (0.1 * Math.hypot(share, 1 - share)) - 1)).toBeLessThan(1e-3);
});

test("many lobes between two points count with their power", () => {
  // 1/(π f T)² on average, half of it in sin²: nearly all power sits where the lobes begin
  const weighting = movingAverage({ seconds: 0.05 });
  const { standardUncertainty = 0 } = bandNoise(polyline(curve), { fromHz: 10, toHz: 1000, weighting });
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

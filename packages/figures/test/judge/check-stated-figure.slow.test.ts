import { bandNoise, curveFromPoints, whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { type BasisVerdict, compareWith } from "../../src/judge/basis-verdict.js";
import { checkStatedFigure } from "../../src/judge/check-stated-figure.js";
import type { StatedFigure } from "../../src/judge/read-stated-figure.js";
import { usualFilter } from "../../src/judge/usual-filter.js";
import { simulateRange } from "../convert/support/simulate-range.js";

// Simulations, seeded: 1000 curves of 16 points with 5 % of independent log-normal scatter each.

const uniform = uniformFrom(31);
const normal = normalFrom(uniform);
const truths = [
  { floor: 70e-9, cornerHz: 55, exponent: 1.06 },
  { floor: 7e-9, cornerHz: 0.3, exponent: 1 },
  { floor: 5e-9, cornerHz: 8, exponent: 0.9 },
  { floor: 300e-9, cornerHz: 30, exponent: 1.2 },
].map((truth) => whiteFlicker(truth));

function curveOf(truth: (typeof truths)[number]) {
  const points = Array.from({ length: 16 }, (_, k) => {
    const frequency = 0.1 * 10 ** ((4 * k) / 15);
    return { frequency, density: Math.sqrt(truth.powerDensityAt(frequency)) * Math.exp(0.05 * normal()) };
  });
  return curveFromPoints(points, { unit: "V", pointUncertainty: 0.05 });
}

const figureOf = (value: number, halfUnit: number): StatedFigure => ({
  text: "simulated",
  kind: "peak-to-peak",
  value,
  unit: "V",
  halfUnit,
  fromHz: 0.1,
  toHz: 10,
});

/** Verdicts on a figure, and on the same figure twice and half as large. */
function verdicts({ predicted, tolerance, basis }: BasisVerdict, stated: number): readonly string[] {
  return [1, 2, 0.5].map((factor) => compareWith(basis, factor * stated, predicted, tolerance).verdict);
}

test("(a) a figure of 6.6 times the truth and points that scatter: agrees in 93 to 97 %, a factor 2 is caught in 99 %", () => {
  let [agrees, caught] = [0, 0];
  for (let run = 0; run < 1000; run += 1) {
    const truth = truths[run % truths.length] as (typeof truths)[number];
    const stated = 6.6 * bandNoise(truth, { fromHz: 0.1, toHz: 10 }).rms;
    const check = checkStatedFigure(curveOf(truth), figureOf(stated, 1e-4 * stated), {
      basis: "convention",
      weighting: "brick wall",
    });
    const [plain, twice, half] = verdicts(check.bases[0], stated);
    expect(check.verdict).toBe(plain);
    agrees += plain === "agrees" ? 1 : 0;
    caught += (twice === "stated higher" ? 0.5 : 0) + (half === "stated lower" ? 0.5 : 0);
  }
  console.log(`(a) agrees ${agrees / 10} %, factor 2 caught ${caught / 10} %`);
  expect(agrees / 1000).toBeGreaterThanOrEqual(0.93);
  expect(agrees / 1000).toBeLessThanOrEqual(0.97);
  expect(caught / 1000).toBeGreaterThanOrEqual(0.99);
});

test("(b) a figure that one 10 s record through either filter showed, to two digits: agrees in 93 to 99 %, a factor 2 is caught in 99 %", () => {
  const pools = truths.map((truth, index) => {
    const filter = usualFilter(0.1, 10);
    const densities = [
      (hz: number) => (hz >= 0.1 && hz <= 10 ? truth.powerDensityAt(hz) : 0),
      (hz: number) => truth.powerDensityAt(hz) * filter.powerGainAt(hz),
    ];
    return densities.map(
      (densityAt, which) =>
        simulateRange({
          densityAt,
          recordSeconds: 10,
          sampleRateHz: 204.8,
          length: 2 ** 18,
          transforms: 1,
          seed: 10 * index + which,
        }).ranges,
    );
  });
  let [agrees, caught] = [0, 0];
  for (let run = 0; run < 1000; run += 1) {
    const which = run % truths.length;
    const ranges = pools[which]?.[uniform() < 0.5 ? 0 : 1] ?? [];
    const shown = ranges[Math.floor(ranges.length * uniform())] ?? 0;
    const unit = 10 ** (Math.floor(Math.log10(shown)) - 1);
    const stated = Math.round(shown / unit) * unit;
    const check = checkStatedFigure(curveOf(truths[which] as (typeof truths)[number]), figureOf(stated, unit / 2), {
      basis: "record",
    });
    const [plain, twice, half] = verdicts(check.bases[0], stated);
    expect(check.verdict).toBe(plain);
    agrees += plain === "agrees" ? 1 : 0;
    caught += (twice === "stated higher" ? 0.5 : 0) + (half === "stated lower" ? 0.5 : 0);
  }
  console.log(`(b) agrees ${agrees / 10} %, factor 2 caught ${caught / 10} %`);
  expect(agrees / 1000).toBeGreaterThanOrEqual(0.93);
  expect(agrees / 1000).toBeLessThanOrEqual(0.99);
  expect(caught / 1000).toBeGreaterThanOrEqual(0.99);
});

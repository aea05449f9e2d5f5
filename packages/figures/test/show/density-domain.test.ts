import { whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { densityRange, frequencyRange } from "../../src/show/density-domain.js";
import { curveOf, modelOf } from "./support/invented-curves.js";

const curve = curveOf([
  [0.1, 1e-6, 0],
  [1000, 1e-8, 0],
]);

function expectHolds(range: readonly [number, number], low: number, high: number): void {
  expect(range[0]).toBeLessThan(low);
  expect(range[1]).toBeGreaterThan(high);
}

test("holds points, band and a corner within a decade of them, with little air", () => {
  const range = frequencyRange({ curves: [curve], band: { fromHz: 0.01, toHz: 10 }, cornerHz: 5000 });
  expectHolds(range, 0.01, 5000);
  expect(range[0]).toBeGreaterThan(0.005);
  expect(range[1]).toBeLessThan(10_000);
});

test("a corner far from the points does not squeeze them", () => {
  expect(frequencyRange({ curves: [curve], cornerHz: 1e-4 })[0]).toBeGreaterThan(0.05);
});

test("band edges at 0 Hz and infinity do not stretch the axis", () => {
  expect(frequencyRange({ curves: [curve], band: { fromHz: 0, toHz: Number.POSITIVE_INFINITY } })).toEqual(
    frequencyRange({ curves: [curve] }),
  );
});

test("a model alone is shown well beyond the band and the corner", () => {
  const models = [{ spectrum: whiteFlicker({ floor: 1e-8, cornerHz: 60 }), label: "" }];
  const [low, high] = frequencyRange({ models, band: { fromHz: 0.1, toHz: 10 }, cornerHz: 60 });
  expect(low).toBeLessThan(0.05);
  expect(high).toBeGreaterThan(200);
});

test("the ends that are asked for are taken as they are", () => {
  expect(frequencyRange({ curves: [curve], fromHz: 1, toHz: 50 })).toEqual([1, 50]);
});

test("densities outside the frequencies shown do not stretch the density axis", () => {
  const [low, high] = densityRange({ curves: [curve] }, [1, 2000]);
  expect(high / low).toBeLessThan(4);
});

test("a model that falls for ever takes the axis down by three decades at most", () => {
  const steep = modelOf((hz) => 1e-12 * hz ** -40, [0.1, 1000]);
  const [low, high] = densityRange({ curves: [curve], models: [{ spectrum: steep, label: "" }] }, [0.1, 1000]);
  expect(low).toBeGreaterThan(1e-12);
  expect(high).toBeLessThan(1e-2);
});

test("holds the bars, the interval and a floor within a decade", () => {
  const barred = curveOf([
    [1, 1e-8, 0.5],
    [10, 1e-8, 0.5],
  ]);
  expectHolds(densityRange({ curves: [barred] }, [1, 10]), 1e-8 / Math.exp(0.5), 1e-8 * Math.exp(0.5));
  const interval = { frequencies: [1, 10], lower: [2e-9, 2e-9], upper: [9e-8, 9e-8], label: "" };
  expectHolds(densityRange({ curves: [barred], interval }, [1, 10]), 2e-9, 9e-8);
  expectHolds(densityRange({ curves: [barred], floor: 1e-9 }, [1, 10]), 1e-9, 1e-8);
  expect(densityRange({ curves: [barred], floor: 1e-12 }, [1, 10])[0]).toBeGreaterThan(1e-9);
});

import { assert as check, double, integer, property } from "fast-check";
import { describe, expect, test } from "vitest";
import type { Axis } from "../../src/show/axis.js";
import { logAxis } from "../../src/show/log-axis.js";

const label = (value: number): string => String(value);

/** An axis of 400 pixels, labels 24 pixels apart. */
function axisOf(low: number, high: number): Axis {
  return logAxis({ domain: [low, high], range: [0, 400], label, room: () => 24 });
}

function valuesOf(axis: Axis): readonly number[] {
  return axis.ticks.map(({ value }) => value);
}

describe("a logarithmic axis", () => {
  test("labels the decades of a wide range", () => {
    expect(valuesOf(axisOf(0.08, 30_000))).toEqual([0.1, 1, 10, 100, 1000, 10_000]);
  });

  test("labels 1-2-5 where decades are too few", () => {
    expect(valuesOf(axisOf(40e-9, 3e-6))).toEqual([50e-9, 100e-9, 200e-9, 500e-9, 1e-6, 2e-6]);
  });

  test("steps evenly below one decade", () => {
    expect(valuesOf(axisOf(1.21, 1.69))).toEqual([1.25, 1.3, 1.35, 1.4, 1.45, 1.5, 1.55, 1.6, 1.65]);
    expect(valuesOf(axisOf(3.3, 4.3)).length).toBeGreaterThanOrEqual(4);
  });

  test("takes every third decade over fifteen", () => {
    expect(valuesOf(axisOf(0.5e-12, 2e3))).toEqual([1e-12, 1e-9, 1e-6, 1e-3, 1, 1e3]);
  });

  test("every label is the double its decimal text stands for, also below 1e-9", () => {
    for (const value of valuesOf(axisOf(0.5e-18, 0.9e-11))) expect(String(value)).toMatch(/^1e-\d+$/);
    for (const value of valuesOf(axisOf(1.1e-13, 1.9e-13))) expect(String(value)).toMatch(/^1\.\de-13$/);
  });

  test("a decade is as long as any other and values go where they belong", () => {
    const axis = axisOf(1, 1e4);
    expect([1, 10, 100, 1000, 1e4].map((value) => Math.round(axis.at(value) * 1e9) / 1e9)).toEqual([
      0, 100, 200, 300, 400,
    ]);
  });

  test("unlabelled lines stand between the labelled ones, at 2 to 9 of each decade where there is room", () => {
    const axis = axisOf(1, 1e4);
    expect(axis.minor.length).toBe(4 * 8);
    expect(new Set([...axis.minor, ...axis.ticks.map(({ at }) => at)]).size).toBe(37);
  });

  test("any range has two or more labels with room between them, from twofold to twenty decades", () => {
    const ranges = property(
      double({ min: -18, max: 12, noNaN: true }),
      double({ min: Math.log10(1.2), max: 20, noNaN: true }),
      integer({ min: 120, max: 900 }),
      (low, decades, pixels) => {
        const axis = logAxis({
          domain: [10 ** low, 10 ** (low + decades)],
          range: [pixels, 0],
          label,
          room: () => 24,
        });
        expect(axis.ticks.length).toBeGreaterThanOrEqual(2);
        expect(axis.ticks.length).toBeLessThanOrEqual(9);
        for (const [index, tick] of axis.ticks.entries()) {
          expect(tick.value).toBeGreaterThanOrEqual(axis.domain[0]);
          expect(tick.value).toBeLessThanOrEqual(axis.domain[1]);
          const next = axis.ticks[index + 1];
          if (next !== undefined) expect(tick.at - next.at).toBeGreaterThanOrEqual(24);
        }
      },
    );
    check(ranges, { seed: 11, numRuns: 2000 });
  });
});

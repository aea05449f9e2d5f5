import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import type { Curve } from "../../src/curve/curve.js";
import { polyline } from "../../src/spectrum/polyline.js";

const curveOf = (points: readonly (readonly [number, number])[], commonUncertainty = 0): Curve => ({
  unit: "V",
  label: "",
  points: points.map(([frequency, density]) => ({ frequency, density, uncertainty: 0.05, inFit: true })),
  uncertaintyIs: "given",
  commonUncertainty,
  source: [],
});
const knee = curveOf([
  [1, 100e-9],
  [10, 30e-9],
  [1000, 20e-9],
]);

test("passes through its points and is straight in log-log between them", () => {
  const line = polyline(knee);
  for (const { frequency, density } of knee.points)
    expectRelative(line.powerDensityAt(frequency), density * density, 1e-15);
  expectRelative(line.powerDensityAt(100), 30e-9 * 20e-9, 1e-15);
});

describe("beyond its points", () => {
  test("it refuses unless told, and the sentence gives the option to type", () => {
    expect(() => polyline(knee).powerDensityAt(0.5)).toThrow(/option beyond/);
  });

  test("hold keeps the last density, segments goes on along the end segment, a number takes over from the last point", () => {
    expectRelative(polyline(knee, { beyond: "hold" }).powerDensityAt(1e4), 4e-16, 1e-15);
    expectRelative(polyline(knee, { beyond: "segments" }).powerDensityAt(0.1), (1e-7 / 0.3) ** 2, 4e-15);
    const mixed = polyline(knee, { beyond: { below: 1, above: "hold" } });
    expectRelative(mixed.powerDensityAt(0.25), 4e-14, 1e-15);
    expect(mixed.notes?.[0]).toMatch(/^Below 1 Hz there are no points; .* a = 1 ± 0.15/);
  });

  test("a misspelt side is refused", () => {
    expect(() => polyline(knee, { beyond: { bellow: 1 } as never })).toThrow(/no option "bellow"/);
    expect(() => polyline(knee, { beyond: { below: "flat" } as never })).toThrow(/beyond.below must be/);
  });
});

test("a step of hand-read points has an exponent of thousands and stays finite", () => {
  const step = polyline(
    curveOf([
      [1, 1e-9],
      [100, 1e-9],
      [100.01, 1e-6],
      [1e4, 1e-6],
    ]),
  );
  expectRelative(step.powerDensityAt(100.01), 1e-12, 1e-12);
  expect(Math.abs(step.pieces?.[1]?.terms[0]?.exponent ?? 0)).toBeGreaterThan(1e5);
});

test("the gradients of the points are hats that add up to 2 everywhere", () => {
  const line = polyline(knee, { beyond: "hold" });
  const slopesAt = (hz: number): number[] => {
    const slopes = [0, 0, 0];
    line.sensitivities?.[0]?.gradientAt(hz, (parameter, slope) => {
      slopes[parameter] = (slopes[parameter] ?? 0) + slope;
    });
    return slopes;
  };
  for (const hz of [0.1, 1, 3, 10, 77, 1000, 5e4])
    expectRelative(
      slopesAt(hz).reduce((sum, slope) => sum + slope),
      2,
      1e-15,
    );
  expect(slopesAt(10)).toEqual([0, 2, 0]);
});

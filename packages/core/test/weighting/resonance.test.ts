import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { detuning, flankKnots, resonanceKnots, resonancePoles } from "../../src/weighting/resonance.js";

test("a sharp resonance has knots at its centre, its half-power points and outwards in steps of three", () => {
  const knots = resonanceKnots(100, 1e6);
  for (const hz of [100, 100 * (1 - 0.5e-6), 100 * (1 + 0.5e-6)])
    expect(Math.min(...knots.map((knot) => Math.abs(knot - hz)))).toBeLessThan(1e-12);
  const away = knots.map((knot) => Math.abs(knot - 100)).filter((distance) => distance > 0);
  expect(Math.max(...away)).toBeGreaterThan(10);
  expect(knots.every((knot) => knot > 0)).toBe(true);
});

test("a damped one has its two corners", () => {
  const knots = resonanceKnots(100, 0.01).toSorted((one, other) => one - other);
  expect(knots).toHaveLength(2);
  expectRelative(knots[0] ?? 0, 1.0001000200050014, 1e-14);
  expectRelative((knots[0] ?? 0) * (knots[1] ?? 0), 1e4, 1e-14);
});

test("flanks stop before 0 Hz", () => {
  expect(flankKnots(10, 3)).toEqual([10, 7, 13]);
  expect(flankKnots(10, 5)).toEqual([10]);
});

test("its poles solve s² + s/q + 1 for any q, the equal ones included", () => {
  for (const q of [0.001, 0.3, 0.5, 0.5000001, 0.7, 40]) {
    const [first, second] = resonancePoles(1, q);
    expectRelative((first?.re ?? 0) + (second?.re ?? 0), -1 / q, 1e-15);
    const product = (first?.re ?? 0) * (second?.re ?? 0) - (first?.im ?? 0) * (second?.im ?? 0);
    expectRelative(product, 1, 1e-14);
  }
});

test("1 − u² keeps its digits beside the centre", () => {
  expectRelative(detuning(1 - 2 ** -50, 1), 2 ** -49 * (1 - 2 ** -51), 1e-15);
});

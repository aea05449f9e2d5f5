import { expect } from "vitest";

/** |actual/expected − 1|; exact zeros must meet exact zeros. Densities are 1e-9 and powers 1e-18: nothing absolute. */
export function relativeError(actual: number, expected: number): number {
  if (actual === expected) return 0;
  return Math.abs((actual - expected) / expected);
}

/** Fails unless `actual` is within a relative tolerance of `expected`. */
export function expectRelative(actual: number, expected: number, tolerance: number, what = "value"): void {
  const error = relativeError(actual, expected);
  expect(
    error <= tolerance,
    `${what}: got ${actual}, expected ${expected}, off by ${error}, allowed ${tolerance}`,
  ).toBe(true);
}

import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bracketedRoot } from "../../src/numerics/bracketed-root.js";

test("roots of smooth, steep and flat functions come back to the last digits with few evaluations", () => {
  for (const [valueAt, root] of [
    [(x: number) => x * x - 2, Math.SQRT2],
    [(x: number) => Math.exp(20 * x) - Math.exp(20), 1],
    [(x: number) => (x - 1.25) ** 3, 1.25],
    [(x: number) => 1 / (2 - x) - 1e6, 2 - 1e-6],
  ] as const) {
    const found = bracketedRoot(valueAt, [0, 1.9999999], 0);
    expectRelative(found?.x ?? 0, root, 1e-5);
    expect(Math.abs(valueAt(found?.x ?? 0))).toBeLessThanOrEqual(
      Math.max(Math.abs(valueAt(root * (1 + 1e-15))), 1e-15),
    );
    expect(found?.evaluations).toBeLessThan(130);
  }
  expect(bracketedRoot((x) => Math.cos(x) - x, [0, 1], 0)?.evaluations).toBeLessThan(12);
});

test("without a change of sign there is no root", () => {
  expect(bracketedRoot((x) => x * x + 1, [-1, 1], 0)).toBeUndefined();
});

import { describe, expect, test } from "vitest";
import { shortPanelRule } from "../../src/numerics/short-panel-rule.js";

const applied = (edges: readonly number[], valueAt: (x: number) => number): number => {
  const { nodes, weights } = shortPanelRule(edges);
  let sum = 0;
  for (const [k, x] of nodes.entries()) sum += (weights[k] ?? 0) * valueAt(x);
  return sum;
};

describe("a fixed rule on short panels in ln x", () => {
  test.each([
    [0, 999],
    [1, Math.log(1000)],
    [2, 1 - 1e-3],
    [4, (1 - 1e-9) / 3],
  ])("integrates x^−%d from 1 to 1000 to 2e-7", (exponent, expected) => {
    expect(Math.abs(applied([1, 1000], (x) => x ** -exponent) / expected - 1)).toBeLessThan(2e-7);
  });

  test("keeps to edges where the integrand bends, and passes over edges that coincide", () => {
    const bent = (x: number): number => (x < 7 ? 7 / x : x / 7);
    const expected = 7 * Math.log(7) + (100 ** 2 - 7 ** 2) / 14;
    expect(Math.abs(applied([1, 7, 7, 100], bent) / expected - 1)).toBeLessThan(1e-9);
  });

  test("places nodes between the edges, ascending, in panels of at most 1.2 in ln x", () => {
    const { nodes } = shortPanelRule([1e-3, 1e3]);
    expect(nodes.length).toBe(5 * Math.ceil(Math.log(1e6) / 1.2));
    expect([...nodes]).toEqual([...nodes].toSorted((one, other) => one - other));
    expect(nodes[0]).toBeGreaterThan(1e-3);
    expect(nodes.at(-1)).toBeLessThan(1e3);
  });
});

import { describe, expect, test } from "vitest";
import { crossingEdge } from "../../src/chain/crossing-edge.js";

describe("the place where a rising function crosses a target", () => {
  test.each([
    ["white noise", (x: number) => x, 64, 64],
    ["1/f noise", (x: number) => Math.log(x / 1e-3), Math.log(2e7), 2e4],
    ["noise that a filter ends", (x: number) => Math.atan(x / 50), Math.atan(3), 150],
    ["a step", (x: number) => (x < 7 ? 1 : 3), 2, 7],
  ])("%s", (_, valueAt, target, expected) => {
    const found = crossingEdge(valueAt, target, [2e-3, 1e18]) ?? Number.NaN;
    expect(Math.abs(found / expected - 1)).toBeLessThan(1e-13);
  });

  test("is missing where the function stays below, or begins above", () => {
    expect(crossingEdge(Math.atan, 2, [1, 1e18])).toBeUndefined();
    expect(crossingEdge((x) => x, 2, [3, 1e18])).toBeUndefined();
  });

  test("takes little more than a dozen looks", () => {
    let looks = 0;
    const power = (x: number): number => {
      looks += 1;
      return x - 0.1 + 10 * Math.log(x / 0.1);
    };
    crossingEdge(power, 500, [0.1 + 1e-9, 1e18]);
    expect(looks).toBeLessThan(20);
  });
});

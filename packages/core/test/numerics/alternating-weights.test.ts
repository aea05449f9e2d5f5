import { expect, test } from "vitest";
import { alternatingWeights } from "../../src/numerics/alternating-weights.js";

const sumAt = (weights: readonly number[], t: number): number =>
  weights.reduceRight((sum, weight, k) => sum + (k % 2 === 0 ? weight : -weight) * t ** k, 0);

test("the error relative to 1/(1+t) stays below 2·(3+√8)^−count all over [0, 1] and comes close to it", () => {
  for (const count of [3, 8, 12]) {
    const bound = 2 * (3 + Math.sqrt(8)) ** -count;
    const weights = alternatingWeights(count);
    let worst = 0;
    for (let t = 0; t <= 1; t += 1 / 512) worst = Math.max(worst, Math.abs(sumAt(weights, t) * (1 + t) - 1));
    expect(worst).toBeLessThanOrEqual(bound * (1 + 1e-6));
    expect(worst).toBeGreaterThan(0.9 * bound);
  }
});

test("22 weights sum ln 2, whose plain series would need 1e16 terms", () => {
  const sum = alternatingWeights(22).reduceRight(
    (total, weight, k) => total + ((k % 2 === 0 ? 1 : -1) * weight) / (k + 1),
    0,
  );
  expect(Math.abs(sum / Math.LN2 - 1)).toBeLessThan(4e-16);
});

import { expect, test } from "vitest";
import { uniformFrom } from "../../../../test/support/random.js";
import { autocorrelation } from "../../src/weighting/autocorrelation.js";

function slowly(taps: readonly number[], lag: number): number {
  let sum = 0;
  for (const [k, tap] of taps.entries()) sum += tap * (taps[k + lag] ?? 0);
  return sum;
}

test("it is the sum of products at every lag, to an ulp of its largest, by products and by transform", () => {
  const uniform = uniformFrom(1965);
  for (const count of [1, 2, 3, 127, 128, 129, 255, 256, 257, 1000]) {
    const taps = Array.from({ length: count }, () => uniform() - 0.5);
    const found = autocorrelation(taps);
    expect(found).toHaveLength(count);
    const scale = slowly(taps, 0);
    for (const [lag, value] of found.entries())
      expect(Math.abs(value - slowly(taps, lag)) / scale).toBeLessThanOrEqual(3e-16 * Math.log2(count + 2));
  }
});

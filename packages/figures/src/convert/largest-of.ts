/** A distribution in points: values ascending, and the chance of each. */
export interface WeightedValues {
  readonly values: Float64Array;
  readonly chances: Float64Array;
}

/** Mean and standard deviation. */
export interface Moments {
  readonly mean: number;
  readonly standardDeviation: number;
}

/**
 * Moments of the largest of `count` independent draws, P(largest ≤ x) = P(x)^count. The points stand for a distribution
 * whose own moments `one` are known better: only what changes from one draw to `count` is taken from the points.
 */
export function largestOf(points: WeightedValues, count: number, one: Moments): Moments {
  if (count === 1) return { mean: one.mean, standardDeviation: one.standardDeviation };
  const single = momentsOf(points, 1);
  const largest = momentsOf(points, count);
  return {
    mean: one.mean + (largest.mean - single.mean) * (one.standardDeviation / single.standardDeviation),
    standardDeviation: one.standardDeviation * (largest.standardDeviation / single.standardDeviation),
  };
}

function momentsOf({ values, chances }: WeightedValues, count: number): Moments {
  let above = 1;
  let first = 0;
  let second = 0;
  let reached = 1;
  // From the top down: there 1 − P keeps its digits.
  for (let index = values.length - 1, tail = 0; index >= 0; index -= 1) {
    tail += chances[index] as number;
    const below = tail >= 1 ? 0 : Math.exp(count * Math.log1p(-tail));
    const chance = above - below;
    const value = values[index] as number;
    first += chance * value;
    second += chance * value * value;
    reached -= chance;
    above = below;
  }
  const lowest = values[0] as number;
  first += Math.max(0, reached) * lowest;
  second += Math.max(0, reached) * lowest * lowest;
  return { mean: first, standardDeviation: Math.sqrt(Math.max(0, second - first * first)) };
}

/** Nodes on [−1, 1], ascending, and weights of a Gauss–Legendre rule. */
export interface LegendreRule {
  readonly nodes: readonly number[];
  readonly weights: readonly number[];
}

/** The rule of `count` points, exact to degree 2·count − 1: Newton on the Legendre recurrence (A&S 25.4.29). */
export function gaussLegendre(count: number): LegendreRule {
  const nodes: number[] = [];
  const weights: number[] = [];
  for (let index = 0; index < count; index += 1) {
    let x = -Math.cos((Math.PI * (index + 0.75)) / (count + 0.5));
    let slope = 1;
    for (let round = 0; round < 6; round += 1) {
      let before = 1;
      let value = x;
      for (let n = 2; n <= count; n += 1) [before, value] = [value, ((2 * n - 1) * x * value - (n - 1) * before) / n];
      slope = (count * (before - x * value)) / (1 - x * x);
      x -= value / slope;
    }
    nodes.push(x);
    weights.push(2 / ((1 - x * x) * slope * slope));
  }
  return Object.freeze({ nodes: Object.freeze(nodes), weights: Object.freeze(weights) });
}

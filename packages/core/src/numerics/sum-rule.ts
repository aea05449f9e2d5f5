import { gaussLegendre, legendreInto } from "./gauss-legendre.js";

const nodesPerStretch = 16;

/** Nodes and weights for a sum over whole numbers: Σ_{k=first}^{last} p(k) = Σ weights·p(nodes). */
export interface SumRule {
  readonly nodes: readonly number[];
  readonly weights: readonly number[];
}

/**
 * A rule for Σ_{k=first}^{last} p(k) that is exact for polynomials to degree 15, with 16 nodes however many terms there are:
 * w_j = γ_j Σ_n (2n+1)/2 P_n(x_j) Σ_k P_n(x_k), x over the stretch from first − ½ to last + ½. Use it on stretches whose ends are
 * at most a factor of two apart.
 */
export function sumRule(first: number, last: number): SumRule {
  const terms = last - first + 1;
  if (terms <= nodesPerStretch) {
    const nodes = Array.from({ length: terms }, (_, index) => first + index);
    return { nodes, weights: nodes.map(() => 1) };
  }
  const rule = gaussLegendre(nodesPerStretch);
  const sums = legendreSums(terms);
  const values = new Float64Array(nodesPerStretch);
  const weights = rule.nodes.map((node, index) => {
    legendreInto(values, node);
    let sum = 0;
    for (let n = 0; n < nodesPerStretch; n += 1) sum += (n + 0.5) * (sums[n] as number) * (values[n] as number);
    return sum * (rule.weights[index] as number);
  });
  const middle = 0.5 * (first + last);
  return { nodes: rule.nodes.map((node) => middle + 0.5 * terms * node), weights };
}

/**
 * Σ_k P_n at the centres of equal cells of [−1, 1]: term by term when there are few, else the mid-point form of Euler and
 * Maclaurin, which ends by itself for a polynomial. Odd sums vanish.
 */
function legendreSums(terms: number): Float64Array {
  const sums = new Float64Array(nodesPerStretch);
  if (terms <= 512) {
    const values = new Float64Array(nodesPerStretch);
    for (let k = 0; k < terms; k += 1) {
      legendreInto(values, (2 * k + 1) / terms - 1);
      for (let n = 0; n < nodesPerStretch; n += 2) sums[n] = (sums[n] as number) + (values[n] as number);
    }
    return sums;
  }
  const cell = 2 / terms;
  for (let n = 0; n < nodesPerStretch; n += 2) {
    let sum = n === 0 ? 2 : 0;
    // −h²/24·[P'] + 7h⁴/5760·[P'''] − 31h⁶/967680·[P⁽⁵⁾]: the next is below 1e-16 of the sum for more than 512 cells
    for (const [order, coefficient] of [
      [1, -1 / 24],
      [3, 7 / 5760],
      [5, -31 / 967680],
    ] as const)
      sum += coefficient * cell ** (order + 1) * 2 * derivativeAtOne(n, order);
    sums[n] = sum / cell;
  }
  return sums;
}

/** P_n^{(k)}(1) = (n + k)!/(2^k k! (n − k)!); even n have odd derivatives of opposite sign at −1. */
function derivativeAtOne(n: number, k: number): number {
  if (k > n) return 0;
  let value = 1;
  for (let factor = n - k + 1; factor <= n + k; factor += 1) value *= factor;
  for (let factor = 1; factor <= k; factor += 1) value /= 2 * factor;
  return value;
}

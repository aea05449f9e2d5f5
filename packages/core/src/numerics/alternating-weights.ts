/**
 * Weights w with 1/(1+t) = Σ (−1)^k w_k t^k (1 ± δ) on all of 0 ≤ t ≤ 1, δ = 2·(3+√8)^−count: 3e-17 for 22 terms where the
 * plain series has none at t = 1. With P the Chebyshev polynomial of [0, 1], (P(−1) − P(t)) / ((1+t)·P(−1)) is a polynomial
 * and P(t)/P(−1) the relative error (Cohen, Rodriguez Villegas, Zagier: Convergence acceleration of alternating series,
 * Experimental Mathematics 9, 2000). The coefficients of P have alternating signs, so the sums below cancel nothing.
 */
export function alternatingWeights(count: number): number[] {
  const sizes: number[] = [1];
  for (let j = 0; j < count; j += 1)
    sizes.push(((sizes[j] as number) * 2 * (count + j) * (count - j)) / ((2 * j + 1) * (j + 1)));
  const weights: number[] = [];
  let tail = 0;
  for (let k = count; k > 0; k -= 1) {
    tail += sizes[k] as number;
    weights.unshift(tail);
  }
  return weights.map((weight) => weight / (tail + 1));
}

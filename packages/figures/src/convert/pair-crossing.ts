import { gaussLegendre } from "./gauss-legendre.js";

const rule = gaussLegendre(20);

/**
 * P(X ≤ z < Y) of two standard normals with correlation 1 − `gap`, as a function of z: how often one of two samples has
 * crossed a level that the other has not. (1/π)·∫ exp(−z²/(2cos²φ)) dφ from 0 to asin √(gap/2), Owen's T function (Ann.
 * Math. Statist. 27, 1956) in its angle form; at z = 0 it is Rice's arccos(ρ)/2π.
 *
 * @param gap - 1 − correlation, 0 to 2: taken as such because near 1 the correlation has no digits left.
 */
export function pairCrossing(gap: number): (z: number) => number {
  const half = Math.asin(Math.sqrt(Math.min(gap, 2) / 2)) / 2;
  const decays = Float64Array.from(rule.nodes, (node) => -0.5 / Math.cos(half * (1 + node)) ** 2);
  const weights = Float64Array.from(rule.weights, (weight) => (weight * half) / Math.PI);
  return (z) => {
    let sum = 0;
    for (let index = 0; index < decays.length; index += 1)
      sum += (weights[index] as number) * Math.exp(z * z * (decays[index] as number));
    return sum;
  };
}

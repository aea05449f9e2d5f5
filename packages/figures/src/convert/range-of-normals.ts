import { requireWhole } from "./domain.js";
import { gaussLegendre } from "./gauss-legendre.js";
import { upperNormalQuantile } from "./normal-quantile.js";
import { normalDensity, normalTail } from "./normal-tail.js";

/** Mean and standard deviation of a range, in units of the standard deviation of one value. */
export interface RangeOfNormals {
  readonly mean: number;
  readonly standardDeviation: number;
}

/** On an interval that narrows as the range does, 112 nodes hold 1e-13 up to 1e12 values; 80 lose it at a million. */
const rangeNodes = 112;
/** Trapezoid on the whole line: 1/24 is at rounding up to 1e15 values; 1/16 is 2e-14 off at 1e6 and 1e-10 at 1e12. */
const step = 1 / 24;

/**
 * Range (largest minus smallest) of `count` independent standard normal values: mean d₂ and standard deviation d₃.
 *
 * P(range ≤ r) = count·∫ φ(x)·(Φ(x + r) − Φ(x))^(count − 1) dx; the moments follow from 1 − P by integration over r.
 *
 * @param count - whole number of values, 2 to 1e15.
 * @returns both in units of one value's standard deviation, relative error below 1e-12 (checked against 40 digits).
 * @throws OutOfDomainError for another count.
 * Source: L. H. C. Tippett, Biometrika 17 (1925) 364–387; H. O. Hartley, Biometrika 32 (1942) 334–348.
 *
 * @example
 * ```ts
 * import { rangeOfNormals } from "@quietband/figures";
 * rangeOfNormals(5).mean; // → 2.325929
 * rangeOfNormals(5).standardDeviation; // → 0.864082
 * ```
 */
export function rangeOfNormals(count: number): RangeOfNormals {
  requireWhole("count", count, [2, 1e15]);
  const middle = 2 * upperNormalQuantile(1 / (count + 1));
  const low = Math.max(0, middle - 1 - 20 / (2 + middle));
  const half = (middle + 3.4 + 28 / (2 + middle) - low) / 2;
  const rule = gaussLegendre(rangeNodes);
  let first = 0;
  let second = 0;
  for (const [index, node] of rule.nodes.entries()) {
    const past = half * (1 + node);
    const beyond = half * (rule.weights[index] as number) * (1 - chanceWithin(low + past, count));
    first += beyond;
    second += 2 * past * beyond;
  }
  return Object.freeze({ mean: low + first, standardDeviation: Math.sqrt(second - first * first) });
}

/** P(range ≤ r), by the trapezoid over the middle m of the interval [m − r/2, m + r/2], even in m. */
function chanceWithin(range: number, count: number): number {
  const half = range / 2;
  let sum = 0;
  for (let index = 0; index * step < half + 9; index += 1) {
    const middle = index * step;
    const outside = normalTail(half - middle) + normalTail(half + middle);
    const lnInside = outside < 1 ? (count - 1) * Math.log1p(-outside) : Number.NEGATIVE_INFINITY;
    if (lnInside < -90) break;
    const density = normalDensity(middle - half) + normalDensity(middle + half);
    sum += (index === 0 ? 0.5 : 1) * density * Math.exp(lnInside);
  }
  return count * step * sum;
}

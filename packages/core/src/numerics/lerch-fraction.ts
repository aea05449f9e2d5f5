import type { Complex } from "./complex.js";

/** Continued-fraction steps beyond which a point counts as too close to −1. */
const mostSteps = 400;

/**
 * Σ (−y)^k/(s+k) for s > 0 and complex |y| ≤ 1 off the negative axis: Lerch's Φ(−y, 1, s), so that
 * ∫₀^y t^(s−1)/(1+t) dt = y^s · Φ. Undefined where y is so close to −1 that the fraction needs too many steps.
 *
 * Gauss's fraction 1/(s + s²y/(s+1 + 1²y/(s+2 + (s+1)²y/(s+3 + 2²y/(s+4 + …))))), NIST DLMF 15.7, run backwards: each step
 * gains |(1−w)/(1+w)|, w = √(1+y), which is 0.17 at y = 1 and 0.22 at y = i where the series has 1. The start is the limit
 * of the tail, k(w−1)/2. `onePlus` is 1 + y, given apart because the caller knows it to full precision near −1.
 */
export function lerchFraction(s: number, y: Complex, onePlus: Complex): Complex | undefined {
  const rootSize = Math.sqrt(onePlus.re * onePlus.re + onePlus.im * onePlus.im);
  const rootRe = Math.sqrt(0.5 * (rootSize + Math.max(onePlus.re, -rootSize)));
  const rootIm = rootRe > 0 ? (0.5 * onePlus.im) / rootRe : 0;
  const reach = 1 + 2 * rootRe + rootSize;
  const gain = Math.sqrt(y.re * y.re + y.im * y.im) / reach;
  const steps = gain < 1e-18 ? 1 : Math.ceil(2 - 38 / Math.log(gain));
  if (!(steps <= mostSteps)) return undefined;
  // (w − 1)/2 = y/(2(1 + w)), without cancellation for small y
  const start = (0.5 * (steps + 1)) / reach;
  let tailRe = start * (y.re * (1 + rootRe) + y.im * rootIm);
  let tailIm = start * (y.im * (1 + rootRe) - y.re * rootIm);
  for (let k = steps; k > 0; k -= 1) {
    const half = k % 2 === 0 ? 0.5 * k : s + 0.5 * (k - 1);
    const re = s + k + tailRe;
    const scale = (half * half) / (re * re + tailIm * tailIm);
    const turned = y.im * re - y.re * tailIm;
    tailRe = scale * (y.re * re + y.im * tailIm);
    tailIm = scale * turned;
  }
  const re = s + tailRe;
  const scale = 1 / (re * re + tailIm * tailIm);
  return { re: re * scale, im: -tailIm * scale };
}

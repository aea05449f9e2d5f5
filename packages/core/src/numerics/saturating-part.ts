import { alternatingWeights } from "./alternating-weights.js";
import type { BoundedValue } from "./bounded-value.js";
import { gaussLegendre } from "./gauss-legendre.js";

const weights = Float64Array.from(alternatingWeights(22), (weight, k) => (k % 2 === 0 ? weight : -weight));
const gauss = gaussLegendre(10);

/** Widest part, in ln u^q and in e-folds of u^p, that ten Gauss nodes integrate to 1e-17. */
const narrow = 1;
const gentle = 4;
/** Below this |σ|·L, u2^σ − u1^σ would lose more than a factor of three. */
const close = 0.7;
/** Half an ulp: the error of one rounded operation. */
const rounding = 0.5 * Number.EPSILON;

/**
 * ∫ (u/e)^p / (1 + u^q) du/u over a part of 0..1 given by its upper end, as top = u^q ≤ 1, and its width L = ln of the
 * ratio of its ends; e is the end that holds most, the upper one for p ≥ 0, so that nothing overflows. L = ∞ needs p > 0.
 *
 * Wide parts: 1/(1+t) as a polynomial in t = u^q (see {@link alternatingWeights}), each power of which integrates to
 * (u2^σ − u1^σ)/σ, σ = p + kq, by expm1 where that would cancel. There is no branch where a σ vanishes and none at a
 * = 1. Narrow ones, where the moments are nearly equal and alternate: ten Gauss–Legendre nodes in ln u.
 * Both were measured below 1e-15; the bound counts the roundings. That of `top` is the caller's.
 */
export function saturatingPart(p: number, q: number, top: number, width: number): BoundedValue {
  if (q * width <= narrow && Math.abs(p) * width <= gentle) return byNodes(p, q, top, width);
  return byMoments(p, q, top, width);
}

function byNodes(p: number, q: number, top: number, width: number): BoundedValue {
  const half = 0.5 * width;
  const steep = Math.abs(p);
  let sum = 0;
  for (let k = 0; k < 10; k += 1) {
    const fall = half * (1 + (gauss.nodes[k] as number));
    const below = p >= 0 ? fall : width - fall;
    sum += ((gauss.weights[k] as number) * Math.exp(-steep * fall)) / (1 + top * Math.exp(-q * below));
  }
  const value = half * sum;
  return { value, error: 20 * rounding * value };
}

function byMoments(p: number, q: number, top: number, width: number): BoundedValue {
  const bottom = top * Math.exp(-q * width);
  const fade = Math.exp(-Math.abs(p) * width);
  let high = p >= 0 ? 1 : fade;
  let low = p >= 0 ? fade : 1;
  let value = 0;
  let roundings = 0;
  for (let k = 0; k < weights.length; k += 1) {
    const order = p + k * q;
    const weight = weights[k] as number;
    const reach = order * width;
    let part: number;
    if (reach > close || reach < -close) {
      const scale = weight / order;
      part = scale * (high - low);
      roundings += (k + 10) * Math.abs(scale) * (high + low);
    } else {
      part = weight * low * (Math.abs(reach) < 1e-30 ? width : Math.expm1(reach) / order);
      roundings += (k + 10) * Math.abs(part);
    }
    value += part;
    if (Math.abs(part) < 1e-18 * value) break;
    high *= top;
    low *= bottom;
  }
  return { value, error: rounding * (roundings + value) };
}

import { alternatingWeights } from "./alternating-weights.js";
import { type Complex, expMinusOne, over, size } from "./complex.js";
import { lerchFraction } from "./lerch-fraction.js";

/** A point t on a ray through 0, off the negative axis. */
export interface RayPoint {
  /** ln |t|. */
  readonly ln: number;
  readonly t: Complex;
  /** 1 + t, which the caller knows to full precision where t is near −1. */
  readonly onePlus: Complex;
}

/** A stretch of a ray at an angle within ±π: 0 where `low` is undefined, ∞ where `high` is. */
export interface RayStretch {
  readonly angle: number;
  readonly low: RayPoint | undefined;
  readonly high: RayPoint | undefined;
  /** ln |high/low|; Infinity where an end is missing. */
  readonly width: number;
}

/** A complex integral with a bound on its absolute error. */
export interface RayIntegral {
  readonly re: number;
  readonly im: number;
  readonly error: number;
}

/** Beyond this |s| the recursion costs more than it is worth. */
const mostReach = 8;
const rounding = 0.5 * Number.EPSILON;
const weights = Float64Array.from(alternatingWeights(22), (weight, k) => (k % 2 === 0 ? weight : -weight));

/**
 * ∫ t^(s−1)/(1+t) dt along a stretch of a ray, for real s; from 0 it needs s > 0, to ∞ s < 1. Undefined where an end is so
 * close to −1, or s so large, that the integrator is the better route.
 *
 * Everything is expressed by B(σ, y) = ∫₀^y t^(σ−1)/(1+t) dt = y^σ Φ with |y| ≤ 1 (see {@link lerchFraction}), σ ≥ ½:
 * - s > ½: the mirror image t → 1/t, s → 1 − s;
 * - both ends outside the unit circle: B(1−s, 1/t_low) − B(1−s, 1/t_high);
 * - one on each side: R(s) − expm1(s ln t_low)/s + B(1+s, t_low) − B(1−s, 1/t_high), R(s) = π/sin(πs) − 1/s, which has no
 *   branch at s = 0;
 * - both inside, and s below −½: 1/(1+t) = 1 − t/(1+t), that is ∫t^(s−1) dt − the integral for s + 1.
 * The error counts the roundings of all parts, so it shows what they cancel.
 */
export function rayIntegral(s: number, stretch: RayStretch): RayIntegral | undefined {
  if (!(Math.abs(s) <= mostReach)) return undefined;
  return s > 0.5 ? sumOf(1 - s, mirrored(stretch)) : sumOf(s, stretch);
}

function mirrored({ angle, low, high, width }: RayStretch): RayStretch {
  return { angle: -angle, low: high && inverse(high), high: low && inverse(low), width };
}

function inverse({ ln, t, onePlus }: RayPoint): RayPoint {
  return { ln: -ln, t: over({ re: 1, im: 0 }, t), onePlus: over(onePlus, t) };
}

function sumOf(s: number, stretch: RayStretch): RayIntegral | undefined {
  const { angle, low, high } = stretch;
  if (low !== undefined && low.ln >= 0) {
    const first = fromZero(1 - s, inverse(low), -angle);
    const second = high === undefined ? nothing : fromZero(1 - s, inverse(high), -angle);
    return first && second && { re: first.re - second.re, im: first.im - second.im, error: first.error + second.error };
  }
  const inside = high !== undefined && high.ln <= 0;
  if (inside && s > 0.5) {
    const first = fromZero(s, high, angle);
    const second = low === undefined ? nothing : fromZero(s, low, angle);
    return first && second && { re: first.re - second.re, im: first.im - second.im, error: first.error + second.error };
  }
  if (!inside && s >= -0.5) return across(s, stretch);
  const rest = sumOf(s + 1, stretch);
  if (rest === undefined) return undefined;
  const power = powerBetween(s, stretch);
  return { re: power.re - rest.re, im: power.im - rest.im, error: power.error + rest.error };
}

const nothing: RayIntegral = Object.freeze({ re: 0, im: 0, error: 0 });

/** B(s, y) for |y| ≤ 1. Near −1 the rounding of y counts 1/|1+y| times. */
function fromZero(s: number, { ln, t, onePlus }: RayPoint, angle: number): RayIntegral | undefined {
  const sum = lerchFraction(s, t, onePlus);
  if (sum === undefined) return undefined;
  const grown = Math.exp(s * ln);
  const re = grown * Math.cos(s * angle);
  const im = grown * Math.sin(s * angle);
  const value = { re: re * sum.re - im * sum.im, im: re * sum.im + im * sum.re };
  const roundings = (12 + 4 * s + 2 * s * Math.abs(ln)) * size(value) + (4 * grown) / size(onePlus);
  return { ...value, error: rounding * roundings };
}

/** From inside the unit circle to outside, −½ ≤ s ≤ ½. */
function across(s: number, { angle, low, high }: RayStretch): RayIntegral | undefined {
  const centre = reflection(s);
  let re = centre;
  let im = 0;
  let roundings = 6 * Math.abs(centre);
  let error = 0;
  if (low === undefined) {
    re += 1 / s;
    roundings += 2 / s;
  } else {
    const log = { re: s * low.ln, im: s * angle };
    const power = s === 0 ? { re: low.ln, im: angle } : expMinusOne(log);
    const scale = s === 0 ? 1 : 1 / s;
    const start = fromZero(1 + s, low, angle);
    if (start === undefined) return undefined;
    re += start.re - scale * power.re;
    im += start.im - scale * power.im;
    roundings += 8 * Math.abs(scale) * size(power) + 4 * Math.exp(log.re) * (Math.abs(low.ln) + Math.abs(angle));
    error += start.error;
  }
  if (high !== undefined) {
    const end = fromZero(1 - s, inverse(high), -angle);
    if (end === undefined) return undefined;
    re -= end.re;
    im -= end.im;
    error += end.error;
  }
  return { re, im, error: error + rounding * roundings };
}

/** R(s) = π/sin(πs) − 1/s = 2s Σ (−1)^(k−1)/(k² − s²), whose terms are moments, so that 22 of them suffice. */
function reflection(s: number): number {
  let sum = 0;
  for (let k = weights.length; k > 0; k -= 1) sum += (weights[k - 1] as number) / ((k - s) * (k + s));
  return 2 * s * sum;
}

/** ∫ t^(s−1) dt, relative to the end that holds most of it. */
function powerBetween(s: number, { angle, low, high, width }: RayStretch): RayIntegral {
  const edge = s > 0 ? high : low;
  const ln = edge?.ln ?? 0;
  const mean = s === 0 ? width : -Math.expm1(-Math.abs(s) * width) / Math.abs(s);
  const grown = Math.exp(s * ln) * mean;
  const roundings = (8 + 2 * Math.abs(s) * (Math.abs(ln) + Math.abs(angle))) * grown;
  return { re: grown * Math.cos(s * angle), im: grown * Math.sin(s * angle), error: rounding * roundings };
}

import type { BoundedValue } from "./bounded-value.js";
import { type Complex, over, size, times } from "./complex.js";
import type { FractionPole, PartialFractions } from "./partial-fractions.js";
import type { PowerLawTerm } from "./power-law.js";
import { logRatio, powerLawIntegral } from "./power-law-integral.js";
import { type RayPoint, type RayStretch, rayIntegral } from "./ray-integral.js";

/** Largest relative error that counts as well conditioned. */
const mostError = 1e-13;
/** How far, in units of its size, a pole or zero may be from what was meant: filter designs round it. */
const rootError = 1.5 * Number.EPSILON;
/** A zero so close to the band, relative to its size, that its rounding matters more than can be bounded here. */
const leastZeroDistance = 0.05;

/**
 * ∫ level · (x/at)^(−a) · |H|² dx over [from, to], 0 ≤ from < to ≤ ∞, for a rational power gain given by its
 * {@link PartialFractions}, with a bound on its absolute error; undefined where that would be above 1e-13 of the value
 * (clustered poles, an edge on a sharp resonance, narrow bands, steep exponents) and the adaptive integrator is the better route.
 *
 * With X = x², s = z − i + (1−a)/2 and c = b², ∫ x^(−a) X^(z−i)/(X + c) dx = ½ c^(s−1) ∫ t^(s−1)/(1+t) dt along the ray t = X/c:
 * {@link rayIntegral}. Any i with residues is exact. i = 0 is well conditioned below all poles, where the gain goes as X^z,
 * the largest i above them, and in between the one whose s is nearest ½.
 *
 * The error adds, absolutely, the roundings of every part and what they cancel, the rounding of the poles and zeros given
 * and that of the term.
 */
export function rationalIntegral(
  term: PowerLawTerm,
  fractions: PartialFractions,
  from: number,
  to: number,
): BoundedValue | undefined {
  if (term.level === 0) return { value: 0, error: 0 };
  const { unit, zerosAtOrigin, whole, poles } = fractions;
  const low = from / unit;
  const high = to / unit;
  const index = indexFor(fractions, term.exponent, low, high);
  if (index === undefined) return undefined;
  const s = 0.5 * (2 * (zerosAtOrigin - index) + 1 - term.exponent);
  const width = from === 0 || to === Number.POSITIVE_INFINITY ? Number.POSITIVE_INFINITY : 2 * logRatio(from, to);
  let value = 0;
  let error = 0;
  for (const pole of poles) {
    const part = rayIntegral(s, stretchOf(pole, low, high, width));
    if (part === undefined) return undefined;
    const factor = 0.5 * pole.count * Math.exp((2 * s - 2) * pole.ln);
    const turn = (2 * s - 2) * pole.angle;
    const residue = times(pole.residues[index] as Complex, { re: Math.cos(turn), im: Math.sin(turn) });
    const roundings = 4 * poles.length + 8 + 4 * Math.abs(s - 1) * (Math.abs(pole.ln) + pole.angle);
    value += factor * (residue.re * part.re - residue.im * part.im);
    error += factor * size(residue) * (part.error + 0.5 * Number.EPSILON * roundings * size(part));
  }
  const { at, level, exponent } = term;
  const levelAtUnit = exponent === 0 || unit === at ? level : level * (unit / at) ** -exponent;
  if (whole > 0) {
    const direct = powerLawIntegral({ at: 1, level: whole, exponent: exponent - 2 * zerosAtOrigin }, low, high);
    value += direct;
    error += 8 * Number.EPSILON * direct;
  }
  const relative = error / value + givenError(fractions, low, high) + termError(term, unit, low, high);
  if (!(relative <= mostError)) return undefined;
  const total = levelAtUnit * unit * value;
  return total > 1e-290 && total < 1e300 ? { value: total, error: total * relative } : undefined;
}

/** The residues to use; undefined where none has a finite integral over this band. */
function indexFor(fractions: PartialFractions, exponent: number, low: number, high: number): number | undefined {
  const last = (fractions.poles[0] as FractionPole).residues.length - 1;
  const sizes = fractions.poles.map(({ b }) => size(b));
  const rise = 0.5 * (2 * fractions.zerosAtOrigin + 1 - exponent);
  const most = low === 0 ? Math.ceil(rise) - 1 : last;
  const least = high === Number.POSITIVE_INFINITY ? Math.floor(rise - 1) + 1 : 0;
  let wanted = Math.round(rise - 0.5);
  if (high <= Math.min(...sizes)) wanted = 0;
  if (low >= Math.max(...sizes)) wanted = last;
  const index = Math.min(Math.max(wanted, least, 0), most, last);
  return index >= least && index >= 0 ? index : undefined;
}

function stretchOf(pole: FractionPole, low: number, high: number, width: number): RayStretch {
  return {
    angle: -2 * pole.angle,
    low: low === 0 ? undefined : pointAt(pole, low),
    high: high === Number.POSITIVE_INFINITY ? undefined : pointAt(pole, high),
    width,
  };
}

/** t = (x/b)² and 1 + t = (x + jb)(x − jb)/b², which keeps its digits beside a sharp resonance. */
function pointAt({ b, ln }: FractionPole, x: number): RayPoint {
  const ratio = over({ re: x, im: 0 }, b);
  const product = times({ re: x - b.im, im: b.re }, { re: x + b.im, im: -b.re });
  return { ln: 2 * (Math.log(x) - ln), t: times(ratio, ratio), onePlus: over(over(product, b), b) };
}

/** What the rounding of the poles and zeros given does to the gain, at most, over the band. */
function givenError({ poles, zeros }: PartialFractions, low: number, high: number): number {
  let sum = 0;
  for (const { b, count } of poles) sum += count * nearness(b, low, high);
  for (const { b, count } of zeros) {
    const near = nearness(b, low, high);
    if (near > 1 / leastZeroDistance) return Number.POSITIVE_INFINITY;
    sum += count * near;
  }
  return 2 * rootError * sum + 4 * Number.EPSILON;
}

/** |b| over the distance between b and the band on the imaginary axis. */
function nearness(b: Complex, low: number, high: number): number {
  const beside = Math.max(low - b.im, b.im - high, 0);
  return size(b) / size({ re: b.re, im: beside });
}

/** The rounding of the level at the unit and, for an exponent that is itself rounded, what that does over the band. */
function termError({ at, exponent }: PowerLawTerm, unit: number, low: number, high: number): number {
  if (exponent === 0) return 4 * Number.EPSILON;
  let reach = 4 * Math.abs(Math.log(unit / at));
  if (low > 0) reach += 2 * Math.abs(Math.log(low));
  if (high < Number.POSITIVE_INFINITY) reach += 2 * Math.abs(Math.log(high));
  return Number.EPSILON * (4 + Math.abs(exponent) * (1 + reach));
}

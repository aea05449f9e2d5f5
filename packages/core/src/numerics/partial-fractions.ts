import { type Complex, conjugate, minus, over, sizeOf, squareDifference, times } from "./complex.js";
import type { SquarePole } from "./pole-integral.js";

/** gain · x^(2·zerosAtOrigin) · Π|jx − zero|² / Π|jx − pole|²; complex ones are listed with their conjugates. */
export interface RationalShape {
  readonly gain: number;
  readonly zerosAtOrigin: number;
  readonly zeros: readonly Complex[];
  readonly poles: readonly Complex[];
}

/** Equal roots of |H|² at b = −p, moved to the upper right quarter: with its conjugate |jx − p|² is (x² + b²)(x² + b̄²). */
export interface Root {
  readonly b: Complex;
  readonly multiplicity: number;
  /** 2 where the conjugate is meant as well, 1 on the real axis. */
  readonly count: number;
}

export interface FractionPole extends Root, SquarePole {
  /** Entry [i][m − 1] belongs to x^(2(zerosAtOrigin − i)) / (x² + c)^m. */
  readonly residues: readonly (readonly Residue[])[];
}

export interface Residue extends Complex {
  /** What it would be if nothing had cancelled: its error is some roundings of this. */
  readonly size: number;
}

/**
 * For every i for which there are residues, with z = zerosAtOrigin and x in `unit`s, |H|² = whole · x^(2z)
 * + x^(2(z−i)) Σ_k Σ_m residue_kim/(x² + c_k)^m, the sum over poles and their conjugates.
 */
export interface PartialFractions {
  /** A power of two near the geometric mean of the poles: x is divided by it, exactly. */
  readonly unit: number;
  readonly zerosAtOrigin: number;
  readonly whole: number;
  readonly poles: readonly FractionPole[];
  readonly zeros: readonly Root[];
}

/** Roots closer than this, relative to their size, are equal: a design may round them apart. */
const equal = 1e-15;
/** Beyond this many, residues cancel more than partial fractions gain. */
const mostPoles = 32;
/** Poles closer than this and not equal are too clustered for partial fractions. */
const clustered = 1e-4;
const nothing: Residue = Object.freeze({ re: 0, im: 0, size: 0 });

/**
 * Partial fractions in x² of a rational power gain, made once and used for any term and band by `rationalIntegral`.
 * Residues are Taylor coefficients about a pole of the product of all other factors, whose differences,
 * b_j² − b_k² = (b_j − b_k)(b_j + b_k), do not cancel. Undefined where no such form exists or it is useless: no poles or very many, more
 * zeros than poles, a pole on the imaginary axis, poles that are nearly but not quite equal, or roots without their conjugates.
 */
export function preparePartialFractions(shape: RationalShape): PartialFractions | undefined {
  if (shape.poles.length === 0 || shape.poles.length > mostPoles || shape.zeros.length > shape.poles.length)
    return undefined;
  // Where the gain has left the normal doubles it has lost its digits.
  if (!(shape.gain > 1e-300 && shape.gain < 1e300)) return undefined;
  const unit = powerOfTwoNear(shape.poles);
  const poles = rootsOf(shape.poles, unit);
  const zeros = rootsOf(shape.zeros, unit);
  if (poles === undefined || zeros === undefined) return undefined;
  const everyPole = poles.flatMap(each);
  const everyZero = zeros.flatMap(each);
  if (!separate(everyPole)) return undefined;
  const excess = shape.poles.length - shape.zeros.length;
  const gain = timesPowerOfTwo(shape.gain, 2 * Math.log2(unit) * (shape.zerosAtOrigin - excess));
  if (!(gain > 1e-300 && gain < 1e300)) return undefined;
  return Object.freeze({
    unit,
    zerosAtOrigin: shape.zerosAtOrigin,
    whole: excess === 0 ? gain : 0,
    poles: Object.freeze(poles.map((root) => fractionPole(root, gain, everyPole, everyZero))),
    zeros: Object.freeze(zeros),
  });
}

function fractionPole(root: Root, gain: number, poles: readonly Complex[], zeros: readonly Complex[]): FractionPole {
  const { b, multiplicity, count } = root;
  let series: Residue[] = Array.from({ length: multiplicity }, (_, k) =>
    k === 0 ? { re: gain, im: 0, size: gain } : nothing,
  );
  // Poles and zeros in turn keep the product within range at high orders.
  for (const [k, pole] of poles.entries()) {
    if (pole !== b) series = dividedBy(series, squareDifference(pole, b));
    const at = zeros[k];
    if (at !== undefined) series = multipliedBy(series, squareDifference(at, b));
  }
  const c = times(b, b);
  const residues = [series];
  while (residues.length < poles.length - zeros.length) {
    series = multipliedBy(series, { re: -c.re, im: -c.im });
    residues.push(series);
  }
  return Object.freeze({
    b,
    multiplicity,
    count,
    c,
    ln: Math.log(sizeOf(b)),
    angle: Math.atan2(b.im, b.re),
    residues: Object.freeze(residues.map((taylor) => Object.freeze(taylor.toReversed()))),
  });
}

/** A power series in h = X + c times shift + h. */
function multipliedBy(series: readonly Residue[], shift: Complex): Residue[] {
  const scale = sizeOf(shift);
  let before = nothing;
  return series.map((term) => {
    const { re, im } = times(term, shift);
    const next = { re: re + before.re, im: im + before.im, size: term.size * scale + before.size };
    before = term;
    return next;
  });
}

/** A power series in h over shift + h. */
function dividedBy(series: readonly Residue[], shift: Complex): Residue[] {
  const scale = 1 / sizeOf(shift);
  let before = nothing;
  return series.map((term) => {
    const { re, im } = over({ re: term.re - before.re, im: term.im - before.im }, shift);
    before = { re, im, size: scale * (term.size + before.size) };
    return before;
  });
}

/** The upper half of each pair, in units, in the right half plane, equal ones counted; undefined where a conjugate is missing. */
function rootsOf(listed: readonly Complex[], unit: number): Root[] | undefined {
  const lower = listed.filter(({ im }) => im < 0);
  const roots: Root[] = [];
  for (const root of listed) {
    if (root.im < 0) continue;
    if (root.im > 0) {
      const mate = lower.findIndex((other) => near(conjugate(other), root));
      if (mate < 0) return undefined;
      lower.splice(mate, 1);
    }
    const b = Object.freeze({ re: Math.abs(root.re) / unit, im: root.im / unit });
    const same = roots.findIndex((other) => near(other.b, b));
    const multiplicity = 1 + (roots[same]?.multiplicity ?? 0);
    const counted = Object.freeze({ b: roots[same]?.b ?? b, multiplicity, count: root.im === 0 ? 1 : 2 });
    if (same < 0) roots.push(counted);
    else roots[same] = counted;
  }
  return lower.length === 0 ? roots : undefined;
}

function near(first: Complex, second: Complex): boolean {
  return sizeOf(minus(first, second)) <= equal * sizeOf(first);
}

/** A root and its conjugate, each as often as it occurs. */
function each({ b, count, multiplicity }: Root): Complex[] {
  const pair = count === 1 ? [b] : [b, conjugate(b)];
  return Array.from({ length: multiplicity }, () => pair).flat();
}

function separate(poles: readonly Complex[]): boolean {
  return poles.every(
    (pole, index) =>
      pole.re > 0 &&
      poles.slice(index + 1).every((other) => other === pole || sizeOf(minus(pole, other)) > clustered * sizeOf(pole)),
  );
}

function powerOfTwoNear(poles: readonly Complex[]): number {
  let sum = 0;
  for (const pole of poles) sum += Math.log2(sizeOf(pole));
  return 2 ** Math.round(sum / poles.length);
}

/** value · 2^power, also where 2^power alone is out of range. */
function timesPowerOfTwo(value: number, power: number): number {
  const half = Math.trunc(power / 2);
  return value * 2 ** half * 2 ** (power - half);
}

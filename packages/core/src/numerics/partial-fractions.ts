import { type Complex, over, size, times } from "./complex.js";

/** gain · x^(2·zerosAtOrigin) · Π|jx − zero|² / Π|jx − pole|²; complex ones are listed with their conjugates. */
export interface RationalShape {
  readonly gain: number;
  readonly zerosAtOrigin: number;
  readonly zeros: readonly Complex[];
  readonly poles: readonly Complex[];
}

/** A root b of |H|², in the right half plane and the upper half of it: |jx − p|² of it and its conjugate is (x²+b²)(x²+b̄²). */
interface Root {
  readonly b: Complex;
  /** 2 where the conjugate is meant as well, 1 on the real axis. */
  readonly count: number;
}

/** One root of the denominator. */
export interface FractionPole extends Root {
  readonly ln: number;
  readonly angle: number;
  /** Entry i belongs to x^(2(zerosAtOrigin − i)) / (x² + b²). */
  readonly residues: readonly Complex[];
}

/**
 * For every i for which there are residues, with z = zerosAtOrigin and x in `unit`s,
 * |H|² = x^(2(z−i)) Σ_k residue_ki/(x² + b_k²) + whole · x^(2z), the sum over roots and their conjugates.
 */
export interface PartialFractions {
  /** A power of two near the geometric mean of the poles: x is divided by it, exactly. */
  readonly unit: number;
  readonly zerosAtOrigin: number;
  readonly whole: number;
  readonly poles: readonly FractionPole[];
  readonly zeros: readonly Root[];
}

/** Poles closer than this, relative to their size, count as repeated. */
const leastSeparation = 1e-4;

/**
 * Partial fractions in x² of a rational power gain, made once and used for any term and band by `rationalIntegral`. Residues
 * come from differences of poles, b_j² − b_k² = (b_j − b_k)(b_j + b_k), which do not cancel. Undefined where no such
 * form exists: no poles, more zeros than poles, a pole on the imaginary axis, repeated ones, or roots without their conjugates.
 */
export function preparePartialFractions(shape: RationalShape): PartialFractions | undefined {
  if (shape.poles.length === 0 || shape.zeros.length > shape.poles.length) return undefined;
  const unit = powerOfTwoNear(shape.poles);
  const poles = rootsOf(shape.poles, unit);
  const zeros = rootsOf(shape.zeros, unit);
  if (poles === undefined || zeros === undefined || poles.some(({ b }) => !(b.re > 0))) return undefined;
  const everyPole = poles.flatMap(withConjugate);
  const everyZero = zeros.flatMap(withConjugate);
  if (!separate(everyPole)) return undefined;
  const excess = everyPole.length - everyZero.length;
  const gain = scaled(shape.gain, Math.log2(unit) * 2 * (shape.zerosAtOrigin - excess));
  if (!(gain > 0 && gain < Number.POSITIVE_INFINITY)) return undefined;
  return Object.freeze({
    unit,
    zerosAtOrigin: shape.zerosAtOrigin,
    whole: excess === 0 ? gain : 0,
    poles: Object.freeze(poles.map((root) => fractionPole(root, gain, everyPole, everyZero))),
    zeros: Object.freeze(zeros),
  });
}

function fractionPole(root: Root, gain: number, poles: readonly Complex[], zeros: readonly Complex[]): FractionPole {
  const { b, count } = root;
  let residue: Complex = { re: gain, im: 0 };
  // Alternating keeps the running product within range for filters of high order.
  let used = 0;
  for (const pole of poles) {
    if (pole === b) continue;
    residue = over(residue, squareDifference(pole, b));
    const zero = zeros[used];
    if (zero === undefined) continue;
    residue = times(residue, squareDifference(zero, b));
    used += 1;
  }
  for (const zero of zeros.slice(used)) residue = times(residue, squareDifference(zero, b));
  const turn = times(b, { re: -b.re, im: -b.im });
  const residues = [residue];
  while (residues.length < poles.length - zeros.length) residues.push((residue = times(residue, turn)));
  return Object.freeze({
    b,
    count,
    ln: Math.log(size(b)),
    angle: Math.atan2(b.im, b.re),
    residues: Object.freeze(residues),
  });
}

function squareDifference(one: Complex, other: Complex): Complex {
  return times(
    { re: one.re - other.re, im: one.im - other.im },
    { re: one.re + other.re, im: one.im + other.im },
  );
}

/** The upper half of each pair, moved to the right half plane, which leaves |jx − root| as it is; undefined without pairs. */
function rootsOf(listed: readonly Complex[], unit: number): Root[] | undefined {
  const lower = listed.filter(({ im }) => im < 0);
  const roots: Root[] = [];
  for (const root of listed) {
    if (root.im < 0) continue;
    const b = Object.freeze({ re: Math.abs(root.re) / unit, im: root.im / unit });
    roots.push(Object.freeze({ b, count: root.im === 0 ? 1 : 2 }));
    if (root.im === 0) continue;
    const mate = lower.findIndex(({ re, im }) => Math.abs(re - root.re) + Math.abs(im + root.im) <= 1e-15 * size(root));
    if (mate < 0) return undefined;
    lower.splice(mate, 1);
  }
  return lower.length === 0 ? roots : undefined;
}

function withConjugate({ b, count }: Root): Complex[] {
  return count === 1 ? [b] : [b, { re: b.re, im: -b.im }];
}

function separate(poles: readonly Complex[]): boolean {
  return poles.every((one, index) =>
    poles
      .slice(index + 1)
      .every((other) => size({ re: one.re - other.re, im: one.im - other.im }) > leastSeparation * size(one)),
  );
}

function powerOfTwoNear(poles: readonly Complex[]): number {
  let sum = 0;
  for (const pole of poles) sum += Math.log2(size(pole));
  return 2 ** Math.round(sum / poles.length);
}

/** value · 2^power, also where 2^power alone is out of range. */
function scaled(value: number, power: number): number {
  const half = Math.trunc(power / 2);
  return value * 2 ** half * 2 ** (power - half);
}

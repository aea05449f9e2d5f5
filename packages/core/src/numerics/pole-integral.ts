import { type Complex, expMinusOne, minus, over, plus, polar, scaledBy, sizeOf, times } from "./complex.js";
import { lerchFraction } from "./lerch-fraction.js";
import { type PoleStretch, type StretchEdge, smallLead } from "./pole-stretch.js";
import { wholePower } from "./whole-power.js";

/** A pole −c = −b² of a function of X = x², b in the right half plane. */
export interface SquarePole {
  readonly b: Complex;
  readonly c: Complex;
  /** ln |b|, small because x is measured in units near it. */
  readonly ln: number;
  /** Of b. */
  readonly angle: number;
}

/** ∫ X^(s−1)/(X + c)^m dX for m = 1, 2, … with bounds on their absolute errors. */
export interface PoleIntegrals {
  readonly values: readonly Complex[];
  readonly errors: readonly number[];
}

/** An edge seen from a pole: t = Y/γ, with γ = c or, mirrored, 1/c. */
interface Touch {
  readonly edge: StretchEdge;
  readonly inside: boolean;
  /** t where it is inside the unit circle, else 1/t. */
  readonly u: Complex;
  readonly onePlus: Complex;
  /** 1/(X + c) */
  readonly nearness: Complex;
}

interface Sum {
  re: number;
  im: number;
  error: number;
}

const rounding = 0.5 * Number.EPSILON;
const zero: Complex = Object.freeze({ re: 0, im: 0 });
const one: Complex = Object.freeze({ re: 1, im: 0 });
const minusOne: Complex = Object.freeze({ re: -1, im: 0 });

/**
 * ∫ X^(s−1)/(X + c)^m dX over a stretch of the real axis, c = b² off the negative axis, for m = 1 .. `count`. Undefined
 * where an edge is so close to a sharp resonance that the fraction needs too many steps.
 *
 * For m = 1, with Φ(σ, u) = Σ (−u)^k/(σ+k), |u| ≤ 1 (see {@link lerchFraction}), and t = X/c:
 * - the head ∫₀^X is X^s/c · Φ(s, t) where |t| ≤ 1 and s > 0, the rest ∫_X^∞ is X^(s−1) · Φ(1−s, 1/t) where |t| ≥ 1;
 * - from |t| ≤ 1 to |t| ≥ 1: c^(s−1) π/sin(πs) less a head and a rest; near s = 0, where 1/s would cancel,
 *   c^(s−1) (R(s) − expm1(s ln t)/s), R(s) = π/sin(πs) − 1/s, plus the head for s + 1 over c, less a rest;
 * - smaller s: 1/(X+c) = (1 − X/(X+c))/c, that is ∫ X^(s−1) dX less the integral for s + 1, over c.
 * By parts, m·c·∫ X^(s−1)/(X+c)^(m+1) = (m−s) ∫ X^(s−1)/(X+c)^m + [X^s/(X+c)^m].
 * The errors count the roundings of every part, so they show what is cancelled.
 */
export function poleIntegrals(pole: SquarePole, stretch: PoleStretch, count: number): PoleIntegrals | undefined {
  const inverse = over(one, pole.c);
  const low = stretch.low && touch(pole, inverse, stretch.low, stretch.mirrored);
  const high = stretch.high && touch(pole, inverse, stretch.high, stretch.mirrored);
  const sum: Sum = { re: 0, im: 0, error: 0 };
  // 1/γ
  const turn = stretch.mirrored ? pole.c : inverse;
  const found =
    low !== undefined && !low.inside
      ? addRest(sum, one, 0, stretch.s, low) && (high === undefined || addRest(sum, minusOne, 0, stretch.s, high))
      : addFromInside(sum, turn, pole, stretch, [low, high]);
  if (!found) return undefined;
  const first = stretch.mirrored ? times(sum, inverse) : sum;
  const error = stretch.mirrored ? sum.error * sizeOf(inverse) : sum.error;
  return higher(inverse, stretch, count, { low, high, first, error });
}

function higher(
  inverse: Complex,
  { lead, mirrored }: PoleStretch,
  count: number,
  { low, high, first, error }: { low: Touch | undefined; high: Touch | undefined; first: Complex; error: number },
): PoleIntegrals {
  const values = [first];
  const errors = [error];
  let atLow = low === undefined ? zero : scaledBy(low.edge.grown, low.nearness);
  let atHigh = high === undefined ? zero : scaledBy(high.edge.grown, high.nearness);
  for (let m = 1; m < count; m += 1) {
    const before = scaledBy(m - lead, values[m - 1] as Complex);
    const edges = mirrored ? minus(atLow, atHigh) : minus(atHigh, atLow);
    const lost =
      6 * rounding * (sizeOf(before) + sizeOf(atHigh) + sizeOf(atLow)) + Math.abs(m - lead) * (errors[m - 1] as number);
    values.push(times(scaledBy(1 / m, inverse), plus(before, edges)));
    errors.push((sizeOf(inverse) * lost) / m);
    if (low !== undefined) atLow = times(atLow, low.nearness);
    if (high !== undefined) atHigh = times(atHigh, high.nearness);
  }
  return { values, errors };
}

function touch({ b, c }: SquarePole, inverse: Complex, edge: StretchEdge, mirrored: boolean): Touch {
  const { x } = edge;
  const square = x * x;
  const t = scaledBy(square, inverse);
  // X + c = (x + jb)(x − jb) keeps its digits beside a sharp resonance
  const sum = times({ re: x - b.im, im: b.re }, { re: x + b.im, im: -b.re });
  const inUnit = t.re * t.re + t.im * t.im <= 1;
  const u = inUnit ? t : scaledBy(1 / square, c);
  const onePlus = inUnit ? times(sum, inverse) : scaledBy(1 / square, sum);
  return { edge, inside: inUnit !== mirrored, u, onePlus, nearness: over(one, sum) };
}

/** Adds what begins inside the unit circle; `turn` is 1/γ. */
function addFromInside(
  sum: Sum,
  turn: Complex,
  pole: SquarePole,
  stretch: PoleStretch,
  [low, high]: readonly [Touch | undefined, Touch | undefined],
): boolean {
  const across = high?.inside !== true;
  const against = { re: -turn.re, im: -turn.im };
  let weight = one;
  let index = 0;
  let order = stretch.s;
  for (; order < (across ? -smallLead : smallLead); order += 1) {
    const moment = stretch.moments[index] as number;
    addPart(sum, scaledBy(moment, times(weight, turn)), 5 + 2 * index);
    weight = times(weight, against);
    index += 1;
  }
  if (!across) {
    if (!addHead(sum, times(weight, turn), index, order, high)) return false;
    return low === undefined || addHead(sum, times(weight, against), index, order, low);
  }
  if (high !== undefined && !addRest(sum, { re: -weight.re, im: -weight.im }, index, order, high)) return false;
  const sign = stretch.mirrored ? -1 : 1;
  const phase = 2 * sign * (order - 1);
  const scale = times(weight, polar(Math.exp(phase * pole.ln), phase * pole.angle));
  const roundings = 6 + 1.5 * Math.abs(phase) * (Math.abs(pole.ln) + pole.angle);
  if (Math.abs(order) >= smallLead) {
    addPart(sum, scaledBy(stretch.centre, scale), roundings);
    return low === undefined || addHead(sum, times(weight, against), index, order, low);
  }
  if (low === undefined) {
    addPart(sum, scaledBy(stretch.centre + 1 / order, scale), roundings);
    return true;
  }
  const log = { re: 2 * sign * (low.edge.ln - pole.ln), im: -2 * sign * pole.angle };
  const growth = order === 0 ? log : scaledBy(1 / order, expMinusOne(scaledBy(order, log)));
  addPart(sum, scaledBy(stretch.centre, scale), roundings);
  addPart(sum, times(scale, { re: -growth.re, im: -growth.im }), roundings);
  sum.error +=
    rounding * 4 * sizeOf(scale) * Math.exp(order * log.re) * (Math.abs(low.edge.ln) + Math.abs(pole.ln) + pole.angle);
  return addHead(sum, times(times(weight, turn), turn), index + 1, order + 1, low);
}

/** weight · ∫₀^Y Y^(order−1) Φ, the head over 1/γ. */
function addHead(sum: Sum, weight: Complex, index: number, order: number, at: Touch): boolean {
  return addFraction(sum, scaledBy(at.edge.power * wholePower(at.edge.y, index), weight), order, at);
}

function addRest(sum: Sum, weight: Complex, index: number, order: number, at: Touch): boolean {
  const { power, y } = at.edge;
  return addFraction(sum, scaledBy((power * wholePower(y, index)) / y, weight), 1 - order, at);
}

/** weight · Φ(order, u). Near −1 the rounding of u counts 1/|1+u| times. */
function addFraction(sum: Sum, weight: Complex, order: number, { u, onePlus }: Touch): boolean {
  const fraction = lerchFraction(order, u, onePlus);
  if (fraction === undefined) return false;
  addPart(sum, times(weight, fraction), 6 + 3 * order);
  sum.error += (4 * rounding * sizeOf(weight)) / sizeOf(onePlus);
  return true;
}

function addPart(sum: Sum, part: Complex, roundings: number): void {
  sum.re += part.re;
  sum.im += part.im;
  sum.error += rounding * roundings * sizeOf(part);
}

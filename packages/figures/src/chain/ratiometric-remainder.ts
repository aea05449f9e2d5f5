import { OutOfDomainError, type Weighting } from "@quietband/core";
import { refuseUnknownKeys, requireNotNegative } from "../convert/domain.js";
import { atImaginary, fromRoots, multiply, type Polynomial, subtract } from "./real-polynomial.js";

/** What {@link ratiometricRemainder} takes. */
export interface RatiometricPaths {
  /** What the common source passes on its way to the input: excitation, bridge, amplifier; nothing unless given. */
  readonly signal?: Weighting | undefined;
  /** What it passes on its way to the converter's reference; nothing unless given. */
  readonly reference?: Weighting | undefined;
  /** By how much the signal comes later than the reference, s; 0 unless given. */
  readonly delaySeconds?: number | undefined;
}

/**
 * What is left of a reference's noise where one source makes both the excitation and the converter's reference: the division
 * cancels what both paths carry alike, and |H_signal·e^(−2πjfτ) − H_reference|² remains. Use it as `referenceWeighting` of
 * `referencePathNoise`. Equal paths leave nothing; a first-order filter at the reference alone leaves a first-order high-pass
 * at its cutoff.
 *
 * @param paths - filters made of poles and zeros, whose phase is known; their gains at 0 Hz count as 1, since a ratio does not
 *   see a constant factor.
 * @throws OutOfDomainError for a weighting that knows no phase (tables, averages, standard curves) or a negative delay.
 *
 * @example
 * ```ts
 * import { firstOrderLowPass } from "@quietband/core";
 * import { ratiometricRemainder } from "@quietband/figures";
 * const left = ratiometricRemainder({ reference: firstOrderLowPass({ cutoffHz: 10 }) });
 * left.powerGainAt(10); // → 0.5000
 * left.powerGainAt(0.1); // → 9.999e-5
 * ```
 */
export function ratiometricRemainder(paths: RatiometricPaths): Weighting {
  refuseUnknownKeys("ratiometricRemainder", ["signal", "reference", "delaySeconds"], paths);
  const { signal, reference, delaySeconds = 0 } = paths;
  requireNotNegative("delaySeconds", delaySeconds, "s");
  const scale = scaleOf([signal, reference]);
  const [one, other] = [transferOf(signal, scale), transferOf(reference, scale)];
  // Over one denominator what cancels is exactly zero, and the order of what is left at 0 Hz is known.
  const above = subtract(multiply(one.above, other.below), multiply(other.above, one.below));
  const late = multiply(one.above, other.below);
  const below = multiply(one.below, other.below);
  const [lowest, degree] = [above.findIndex((value) => value !== 0), above.findLastIndex((value) => value !== 0)];
  if (lowest < 0 && delaySeconds === 0) return nothingLeft;
  const falls = below.length - 1 - Math.max(degree, delaySeconds === 0 ? 0 : late.length - 1);
  const knots = [...(signal?.knots ?? []), ...(reference?.knots ?? []), ...delayKnots(delaySeconds)];
  return Object.freeze({
    name: "difference of the signal path and the reference path",
    support: Object.freeze([0, Number.POSITIVE_INFINITY] as const),
    knots: Object.freeze([...new Set(knots)].toSorted((a, b) => a - b)),
    lowExponent: -2 * (delaySeconds === 0 ? lowest : 1),
    highExponent: 2 * falls,
    powerGainAt(hz: number): number {
      const u = hz / scale;
      const denominator = atImaginary(below, u);
      const apart = atImaginary(above, u);
      // H₁(e^−jθ − 1) = −2j sin(θ/2) e^−jθ/2 · H₁: a short delay does not cancel.
      const half = Math.PI * hz * delaySeconds;
      const turn = delaySeconds === 0 ? { re: 0, im: 0 } : atImaginary(late, u);
      const swing = -2 * Math.sin(half);
      const re = apart.re + swing * (turn.re * Math.sin(half) - turn.im * Math.cos(half));
      const im = apart.im + swing * (turn.re * Math.cos(half) + turn.im * Math.sin(half));
      return (re * re + im * im) / (denominator.re * denominator.re + denominator.im * denominator.im);
    },
  });
}

/** Equal paths: a gain of nothing at all frequencies, which no integral has to be made for. */
const nothingLeft: Weighting = Object.freeze({
  name: "equal signal and reference paths",
  support: Object.freeze([0, Number.POSITIVE_INFINITY] as const),
  knots: Object.freeze([]),
  lowExponent: Number.NEGATIVE_INFINITY,
  highExponent: Number.POSITIVE_INFINITY,
  pieces: Object.freeze([Object.freeze({ from: 0, to: Number.POSITIVE_INFINITY, terms: Object.freeze([]) })]),
  powerGainAt: () => 0,
});

interface Transfer {
  readonly above: Polynomial;
  readonly below: Polynomial;
}

/** H(s)/H(0) as a ratio of polynomials. */
function transferOf(weighting: Weighting | undefined, scale: number): Transfer {
  if (weighting === undefined) return { above: [1], below: [1] };
  const { rational } = weighting;
  if (rational === undefined)
    throw new OutOfDomainError(
      `The difference of two paths needs their phase, so filters made of poles and zeros; ${weighting.name} is none.`,
    );
  if (rational.zerosAtOrigin > 0)
    throw new OutOfDomainError(`A ratio of two paths needs a gain at 0 Hz in both; ${weighting.name} has none.`);
  return { above: fromRoots(rational.zeros, scale), below: fromRoots(rational.poles, scale) };
}

/** Geometric mean of all poles, so that coefficients of high orders stay near 1. */
function scaleOf(weightings: readonly (Weighting | undefined)[]): number {
  const logs = weightings.flatMap((weighting) =>
    (weighting?.rational?.poles ?? []).map(({ re, im }) => Math.log(Math.hypot(re, im))),
  );
  return logs.length === 0 ? 1 : Math.exp(logs.reduce((sum, log) => sum + log, 0) / logs.length);
}

function delayKnots(seconds: number): number[] {
  return seconds === 0 ? [] : [0.25, 0.5, 1, 2, 4].map((turns) => turns / seconds);
}

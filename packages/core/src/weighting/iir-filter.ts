import { requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { polynomialRoots } from "../numerics/polynomial-roots.js";
import { requireCoefficients } from "./coefficients.js";
import { inName, makeLobed } from "./make-weighting.js";
import { tapGain } from "./tap-gain.js";
import { turnsAtRate } from "./turns-at-rate.js";
import { steady } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link iirFilter} takes: y[k] = (Σ numerator[i]·x[k−i] − Σ_{i≥1} denominator[i]·y[k−i]) / denominator[0]. */
export interface IirFilterOptions {
  /** Coefficients of the present and the past inputs b; at least one, finite, not all zero. */
  readonly numerator: readonly number[];
  /** Coefficients of the present and the past outputs a, the first not zero. */
  readonly denominator: readonly number[];
  /** Rate of the samples f_s, Hz; positive. */
  readonly sampleRateHz: number;
}

const needed: IirFilterOptions = Object.freeze({
  numerator: Object.freeze([]),
  denominator: Object.freeze([]),
  sampleRateHz: Number.NaN,
});

/**
 * A recursive digital filter: |H|² = |Σ b_k e^(−2πikf/f_s)|²/|Σ a_k e^(−2πikf/f_s)|², which repeats at f_s.
 *
 * @throws MalformedDataError for coefficients that are empty, all zero or not finite; OutOfDomainError for a rate that is not
 *   positive or an unstable filter: a pole on or outside the unit circle, by the step-down recursion of Schur and Cohn.
 * @see E. I. Jury, Theory and Application of the z-Transform Method, 1964.
 *
 * @example
 * ```ts
 * import { iirFilter, noiseBandwidth } from "@quietband/core";
 * // exponential average y += (x − y)/8
 * const average = iirFilter({ numerator: [0.125], denominator: [1, -0.875], sampleRateHz: 1000 });
 * noiseBandwidth(average).hz; // → 33.333
 * ```
 */
export function iirFilter(options: IirFilterOptions): Weighting {
  const given = completeOptions("iirFilter", needed, options);
  const numerator = requireCoefficients("numerator", given.numerator);
  const denominator = requireCoefficients("denominator", given.denominator);
  const rate = requirePositive("sampleRateHz", given.sampleRateHz, "Hz");
  requireStable(denominator);
  const above = tapGain(numerator);
  const below = tapGain(denominator);
  const gainAt = (hz: number): number => {
    const turns = turnsAtRate(hz, rate);
    return above.powerAt(turns) / below.powerAt(turns);
  };
  return makeLobed({
    name: `IIR filter, ${numerator.length} and ${denominator.length} coefficients, ${inName(rate)} Hz`,
    knots: polynomialRoots(denominator.toReversed()).flatMap(({ re, im }) => knotsOf(re, im, rate)),
    lowExponent: -2 * above.zerosAtDc,
    highExponent: 0,
    repeatsHz: rate,
    // Its response never ends, so its waves would not: the gain stands as an envelope that repeats.
    lobes: { lobeHz: rate, peaksEveryHz: [rate], parts: [{ envelopeAt: gainAt, waves: [steady(1)] }] },
    powerGainAt: gainAt,
  });
}

/** All poles inside the unit circle: every reflection coefficient of the step-down recursion is below 1 in size. */
function requireStable(denominator: readonly number[]): void {
  const lead = denominator[0] as number;
  if (lead === 0)
    throw new OutOfDomainError("denominator must begin with the coefficient of the present output, not zero; got 0.");
  let rest = denominator.map((value) => value / lead);
  while (rest.length > 1) {
    const reflection = rest.at(-1) as number;
    if (!(Math.abs(reflection) < 1))
      throw new OutOfDomainError(
        `denominator must have all its poles inside the unit circle; it has one on or outside (reflection coefficient ${reflection}), so its noise grows without end; check the signs of its coefficients.`,
      );
    const scale = 1 / (1 - reflection * reflection);
    const reversed = rest.toReversed();
    rest = rest.slice(0, -1).map((value, index) => scale * (value - reflection * (reversed[index] as number)));
  }
}

/** The resonance of a pole in the z plane and its flanks in steps of three, in the first half period and mirrored. */
function knotsOf(re: number, im: number, rate: number): number[] {
  const half = 0.5 * rate;
  const centre = (Math.abs(Math.atan2(im, re)) / Math.PI) * half;
  const halfWidth = (-Math.log(Math.hypot(re, im)) / Math.PI) * half;
  const knots = [centre];
  // A pole a rounding away from the circle, or one of a cluster, may be found on it.
  for (let away = Math.max(halfWidth, 1e-9 * half); away < half; away *= 3) knots.push(centre - away, centre + away);
  const inside = knots.filter((hz) => hz > 0 && hz < half);
  return [...inside, ...inside.map((hz) => rate - hz), half, rate];
}

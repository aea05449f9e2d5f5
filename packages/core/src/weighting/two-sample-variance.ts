import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { sinPi } from "../numerics/sin-pi.js";
import { sincSquared } from "../numerics/sinc-squared.js";
import { turnsOf } from "../numerics/turns.js";
import { inName, makeLobed } from "./make-weighting.js";
import { evenSinePower } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link twoSampleVariance} takes. */
export interface TwoSampleVarianceOptions {
  /** Averaging time τ, s; positive. */
  readonly seconds: number;
}

const needed: TwoSampleVarianceOptions = Object.freeze({ seconds: Number.NaN });

/**
 * Two-sample (Allan) variance at averaging time τ: |H|² = 2 sin⁴(πfτ)/(πfτ)².
 *
 * Half the mean square of the difference between neighbouring averages over τ; finite for exponents below 3 from 0 Hz on.
 *
 * @throws OutOfDomainError for a time that is not positive and finite.
 * @see D. W. Allan, Proc. IEEE 54 (1966) 221; NIST SP 1065, section 7.1.
 *
 * @example
 * ```ts
 * import { bandNoise, powerLaws, twoSampleVariance } from "@quietband/core";
 * const white = powerLaws([{ coefficient: 1e-12, exponent: 0 }]);
 * const weighting = twoSampleVariance({ seconds: 2 });
 * bandNoise(white, { fromHz: 0, toHz: Infinity, weighting }).power; // → 250.00e-15
 * ```
 */
export function twoSampleVariance(options: TwoSampleVarianceOptions): Weighting {
  const { seconds } = completeOptions("twoSampleVariance", needed, options);
  requirePositive("seconds", seconds, "s");
  return makeLobed({
    name: `two-sample variance, ${inName(seconds)} s`,
    knots: [0.5 / seconds, 1 / seconds],
    lowExponent: -2,
    highExponent: 2,
    lobes: {
      lobeHz: 1 / seconds,
      peaksEveryHz: [],
      parts: [{ envelopeAt: (hz: number) => 2 / (Math.PI * hz * seconds) ** 2, waves: evenSinePower(2, seconds) }],
    },
    powerGainAt(hz: number): number {
      const rest = turnsOf(hz, seconds);
      const sine = sinPi(rest);
      return 2 * sine * sine * sincSquared(hz * seconds, rest);
    },
  });
}

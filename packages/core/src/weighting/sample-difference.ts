import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { sinPi } from "../numerics/sin-pi.js";
import { turnsOf } from "../numerics/turns.js";
import { inName, makeLobed } from "./make-weighting.js";
import { steady, wave } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link sampleDifference} takes. */
export interface SampleDifferenceOptions {
  /** Time τ between the samples, s; positive. */
  readonly seconds: number;
}

const needed: SampleDifferenceOptions = Object.freeze({ seconds: Number.NaN });

/**
 * Difference of two samples τ apart (correlated double sampling): |H|² = 4 sin²(πfτ).
 *
 * White noise doubles in power; noise well below 1/(2πτ) cancels. The gain repeats without end, so a band needs an upper edge
 * or a filter besides.
 *
 * @throws OutOfDomainError for a time that is not positive and finite.
 *
 * @example
 * ```ts
 * import { sampleDifference } from "@quietband/core";
 * sampleDifference({ seconds: 1e-3 }).powerGainAt(500); // → 4.000
 * ```
 */
export function sampleDifference(options: SampleDifferenceOptions): Weighting {
  const { seconds } = completeOptions("sampleDifference", needed, options);
  requirePositive("seconds", seconds, "s");
  return makeLobed({
    name: `difference of samples ${inName(seconds)} s apart`,
    knots: [0.5 / seconds],
    lowExponent: -2,
    highExponent: 0,
    repeatsHz: 1 / seconds,
    lobes: {
      lobeHz: 1 / seconds,
      peaksEveryHz: [],
      parts: [{ envelopeAt: () => 1, waves: [steady(2), wave(seconds, -2)] }],
    },
    powerGainAt(hz: number): number {
      const sine = sinPi(turnsOf(hz, seconds));
      return 4 * sine * sine;
    },
  });
}

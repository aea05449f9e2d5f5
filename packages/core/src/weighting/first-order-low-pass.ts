import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link firstOrderLowPass} takes. */
export interface FirstOrderLowPassOptions {
  /** Half-power frequency, which is the pole; Hz, positive. */
  readonly cutoffHz: number;
}

const needed: FirstOrderLowPassOptions = Object.freeze({ cutoffHz: Number.NaN });

/**
 * One pole: |H|² = 1/(1 + (f/cutoffHz)²).
 *
 * @throws OutOfDomainError for a cutoff that is not positive and finite.
 * @see B. M. Oliver, J. M. Cage, Electronic Measurements and Instrumentation, 1971: its noise bandwidth is (π/2)·cutoffHz.
 *
 * @example
 * ```ts
 * import { firstOrderLowPass, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(firstOrderLowPass({ cutoffHz: 1000 })).hz; // → 1570.8
 * ```
 */
export function firstOrderLowPass(options: FirstOrderLowPassOptions): Weighting {
  const { cutoffHz } = completeOptions("firstOrderLowPass", needed, options);
  requirePositive("cutoffHz", cutoffHz, "Hz");
  return makeWeighting({
    name: `first-order low-pass, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz],
    lowExponent: 0,
    highExponent: 2,
    saturating: { cutoffHz, order: 1, numeratorOrder: 0 },
    rational: { gain: cutoffHz * cutoffHz, zerosAtOrigin: 0, zeros: [], poles: [{ re: -cutoffHz, im: 0 }] },
    powerGainAt(hz: number): number {
      const u = hz / cutoffHz;
      return 1 / (1 + u * u);
    },
  });
}

import { requirePositive } from "../ground/domain.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/**
 * One pole: |H|² = 1/(1 + (f/cutoffHz)²).
 *
 * @param options - `cutoffHz`, the half-power frequency, positive.
 * @throws OutOfDomainError for a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { firstOrderLowPass, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(firstOrderLowPass({ cutoffHz: 1000 })).hz; // → 1570.8
 * ```
 */
export function firstOrderLowPass({ cutoffHz }: { readonly cutoffHz: number }): Weighting {
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

import { requirePositive } from "../ground/domain.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/**
 * One pole and a zero at 0 Hz: |H|² = f²/(f² + cutoffHz²).
 *
 * @param options - `cutoffHz`, the half-power frequency, positive.
 * @throws OutOfDomainError for a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { firstOrderHighPass } from "@quietband/core";
 * firstOrderHighPass({ cutoffHz: 0.1 }).powerGainAt(0.3); // → 0.9000
 * ```
 */
export function firstOrderHighPass({ cutoffHz }: { readonly cutoffHz: number }): Weighting {
  requirePositive("cutoffHz", cutoffHz, "Hz");
  return makeWeighting({
    name: `first-order high-pass, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz],
    lowExponent: -2,
    highExponent: 0,
    saturating: { cutoffHz, order: 1, numeratorOrder: 1 },
    rational: { gain: 1, zerosAtOrigin: 1, zeros: [], poles: [{ re: -cutoffHz, im: 0 }] },
    powerGainAt(hz: number): number {
      if (hz === 0) return 0;
      const v = cutoffHz / hz;
      return 1 / (1 + v * v);
    },
  });
}

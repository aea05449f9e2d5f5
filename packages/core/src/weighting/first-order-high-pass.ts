import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link firstOrderHighPass} takes. */
export interface FirstOrderHighPassOptions {
  /** Half-power frequency, which is the pole; Hz, positive. */
  readonly cutoffHz: number;
}

const needed: FirstOrderHighPassOptions = Object.freeze({ cutoffHz: Number.NaN });

/**
 * One pole and a zero at 0 Hz: |H|² = f²/(f² + cutoffHz²).
 *
 * @throws OutOfDomainError for a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { firstOrderHighPass } from "@quietband/core";
 * firstOrderHighPass({ cutoffHz: 0.1 }).powerGainAt(0.3); // → 0.9000
 * ```
 */
export function firstOrderHighPass(options: FirstOrderHighPassOptions): Weighting {
  const { cutoffHz } = completeOptions("firstOrderHighPass", needed, options);
  requirePositive("cutoffHz", cutoffHz, "Hz");
  return makeWeighting({
    name: `first-order high-pass, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz],
    lowExponent: -2,
    highExponent: 0,
    saturating: { cutoffHz, order: 1, numeratorOrder: 1 },
    rational: { gain: 1, zerosAtOrigin: 1, zeros: [], poles: [{ re: -cutoffHz, im: 0 }] },
    powerGainAt(hz: number): number {
      const v = cutoffHz / hz;
      return 1 / (1 + v * v);
    },
  });
}

import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { detuning, resonanceKnots, resonancePoles } from "./resonance.js";
import type { Weighting } from "./weighting.js";

/** What {@link resonator} takes. */
export interface ResonatorOptions {
  /** Where the gain is 1, Hz; positive. */
  readonly centreHz: number;
  /** Quality factor, positive: centreHz over the half-power width. */
  readonly q: number;
}

const needed: ResonatorOptions = Object.freeze({ centreHz: Number.NaN, q: Number.NaN });

/**
 * Resonator (second-order band-pass) with peak gain 1: |H|² = 1/(1 + (q·(1 − u²)/u)²), u = f/centreHz.
 *
 * @throws OutOfDomainError for a frequency or q that is not positive and finite.
 *
 * @example
 * ```ts
 * import { noiseBandwidth, resonator } from "@quietband/core";
 * noiseBandwidth(resonator({ centreHz: 1000, q: 50 })).hz; // → 31.4159
 * ```
 */
export function resonator(options: ResonatorOptions): Weighting {
  const { centreHz, q } = completeOptions("resonator", needed, options);
  requirePositive("centreHz", centreHz, "Hz");
  requirePositive("q", q);
  return makeWeighting({
    name: `resonator, ${inName(centreHz)} Hz, q ${inName(q)}`,
    knots: resonanceKnots(centreHz, q),
    lowExponent: -2,
    highExponent: 2,
    rational: { gain: (centreHz / q) ** 2, zerosAtOrigin: 1, zeros: [], poles: resonancePoles(centreHz, q) },
    powerGainAt(hz: number): number {
      const off = (q * detuning(hz, centreHz)) / (hz / centreHz);
      return 1 / (1 + off * off);
    },
  });
}

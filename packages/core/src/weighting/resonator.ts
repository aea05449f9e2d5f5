import { requirePositive } from "../ground/domain.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { resonanceKnots, resonancePoles, resonanceTerms } from "./resonance.js";
import type { Weighting } from "./weighting.js";

/**
 * Resonator (second-order band-pass) with peak gain 1: |H|² = (u/q)²/((1 − u²)² + (u/q)²), u = f/centreHz.
 *
 * @param options - `centreHz`, where the gain is 1; `q`, the quality factor: half-power width centreHz/q.
 * @throws OutOfDomainError for a frequency or q that is not positive and finite.
 *
 * @example
 * ```ts
 * import { noiseBandwidth, resonator } from "@quietband/core";
 * noiseBandwidth(resonator({ centreHz: 1000, q: 50 })).hz; // → 31.4159
 * ```
 */
export function resonator({ centreHz, q }: { readonly centreHz: number; readonly q: number }): Weighting {
  requirePositive("centreHz", centreHz, "Hz");
  requirePositive("q", q);
  return makeWeighting({
    name: `resonator, ${inName(centreHz)} Hz, q ${inName(q)}`,
    knots: resonanceKnots(centreHz, q),
    lowExponent: -2,
    highExponent: 2,
    rational: { gain: (centreHz / q) ** 2, zerosAtOrigin: 1, zeros: [], poles: resonancePoles(centreHz, q) },
    powerGainAt(hz: number): number {
      const { detuning, damping } = resonanceTerms(hz, centreHz, q);
      return damping === 0 ? 0 : damping / (detuning + damping);
    },
  });
}

import { requirePositive } from "../ground/domain.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { resonanceKnots, resonancePoles, resonanceTerms } from "./resonance.js";
import type { Weighting } from "./weighting.js";

/**
 * Second-order low-pass by quality factor: |H|² = 1/((1 − u²)² + (u/q)²), u = f/naturalHz.
 *
 * @param options - `naturalHz`, the natural frequency; `q`, the quality factor (1/√2 is Butterworth).
 * @throws OutOfDomainError for a frequency or q that is not positive and finite.
 *
 * @example
 * ```ts
 * import { noiseBandwidth, secondOrderLowPass } from "@quietband/core";
 * noiseBandwidth(secondOrderLowPass({ naturalHz: 100, q: 5 })).hz; // → 785.398
 * ```
 */
export function secondOrderLowPass({ naturalHz, q }: { readonly naturalHz: number; readonly q: number }): Weighting {
  requirePositive("naturalHz", naturalHz, "Hz");
  requirePositive("q", q);
  return makeWeighting({
    name: `second-order low-pass, ${inName(naturalHz)} Hz, q ${inName(q)}`,
    knots: resonanceKnots(naturalHz, q),
    lowExponent: 0,
    highExponent: 4,
    rational: { gain: naturalHz ** 4, zerosAtOrigin: 0, zeros: [], poles: resonancePoles(naturalHz, q) },
    powerGainAt(hz: number): number {
      const { detuning, damping } = resonanceTerms(hz, naturalHz, q);
      return 1 / (detuning + damping);
    },
  });
}

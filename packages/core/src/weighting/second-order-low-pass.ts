import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { detuning, resonanceKnots, resonancePoles } from "./resonance.js";
import type { Weighting } from "./weighting.js";

/** What {@link secondOrderLowPass} takes. */
export interface SecondOrderLowPassOptions {
  /** Natural frequency f₀, Hz; positive. */
  readonly naturalHz: number;
  /** Quality factor, positive; 1/√2 is Butterworth, 1/2 two equal poles. */
  readonly q: number;
}

const needed: SecondOrderLowPassOptions = Object.freeze({ naturalHz: Number.NaN, q: Number.NaN });

/**
 * Second-order low-pass by quality factor: |H|² = 1/((1 − u²)² + (u/q)²), u = f/naturalHz; q² at the natural frequency.
 *
 * @throws OutOfDomainError for a frequency or q that is not positive and finite.
 *
 * @example
 * ```ts
 * import { noiseBandwidth, secondOrderLowPass } from "@quietband/core";
 * noiseBandwidth(secondOrderLowPass({ naturalHz: 100, q: 5 })).hz; // → 785.398
 * ```
 */
export function secondOrderLowPass(options: SecondOrderLowPassOptions): Weighting {
  const { naturalHz, q } = completeOptions("secondOrderLowPass", needed, options);
  requirePositive("naturalHz", naturalHz, "Hz");
  requirePositive("q", q);
  return makeWeighting({
    name: `second-order low-pass, ${inName(naturalHz)} Hz, q ${inName(q)}`,
    knots: resonanceKnots(naturalHz, q),
    lowExponent: 0,
    highExponent: 4,
    rational: { gain: naturalHz ** 4, zerosAtOrigin: 0, zeros: [], poles: resonancePoles(naturalHz, q) },
    powerGainAt(hz: number): number {
      const off = detuning(hz, naturalHz);
      const loss = hz / naturalHz / q;
      return 1 / (off * off + loss * loss);
    },
  });
}

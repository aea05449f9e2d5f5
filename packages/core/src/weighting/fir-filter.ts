import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { autocorrelation } from "./autocorrelation.js";
import { requireCoefficients } from "./coefficients.js";
import { inName, makeLobed } from "./make-weighting.js";
import { tapGain } from "./tap-gain.js";
import { turnsAtRate } from "./turns-at-rate.js";
import { steady, wave } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link firFilter} takes. */
export interface FirFilterOptions {
  /** Coefficients of the present and the past samples; at least one, finite, not all zero. */
  readonly taps: readonly number[];
  /** Rate of the samples f_s, Hz; positive. */
  readonly sampleRateHz: number;
}

const needed: FirFilterOptions = Object.freeze({ taps: Object.freeze([]), sampleRateHz: Number.NaN });

/**
 * A digital filter by its taps: |H|² = |Σ_k taps[k] · e^(−2πi k f/f_s)|², which repeats at f_s.
 *
 * @throws OutOfDomainError for a rate that is not positive; MalformedDataError for taps that are empty, all zero or not finite,
 *   with the index.
 *
 * @example
 * ```ts
 * import { firFilter, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(firFilter({ taps: [0.25, 0.5, 0.25], sampleRateHz: 1000 })).hz; // → 187.50
 * ```
 */
export function firFilter(options: FirFilterOptions): Weighting {
  const given = completeOptions("firFilter", needed, options);
  const taps = requireCoefficients("taps", given.taps);
  const rate = requirePositive("sampleRateHz", given.sampleRateHz, "Hz");
  const gain = tapGain(taps);
  const waves = autocorrelation(taps).map((value, lag) => (lag === 0 ? steady(value) : wave(lag / rate, 2 * value)));
  const lobeHz = rate / Math.max(taps.length, 2);
  return makeLobed({
    name: `FIR filter, ${taps.length} taps, ${inName(rate)} Hz`,
    knots: [0.5 * lobeHz, lobeHz],
    lowExponent: -2 * gain.zerosAtDc,
    highExponent: 0,
    repeatsHz: rate,
    lobes: { lobeHz, peaksEveryHz: [], parts: [{ envelopeAt: () => 1, waves }] },
    powerGainAt: (hz: number) => gain.powerAt(turnsAtRate(hz, rate)),
  });
}

import { requirePositive } from "../ground/domain.js";
import { autocorrelation } from "./autocorrelation.js";
import { requireCoefficients } from "./coefficients.js";
import { inName, makeLobed } from "./make-weighting.js";
import { tapGain } from "./tap-gain.js";
import { turnsAtRate } from "./turns-at-rate.js";
import { steady, wave } from "./waves.js";
import type { Weighting } from "./weighting.js";

/**
 * A digital filter by its taps: |H|² = |Σ_k taps[k] · e^(−2πi k f/f_s)|², which repeats at f_s.
 *
 * @param options - `taps`, at least one, finite, not all zero; `sampleRateHz` f_s.
 * @throws OutOfDomainError for a rate that is not positive; MalformedDataError for taps that are empty or not finite, with
 *   the index.
 *
 * @example
 * ```ts
 * import { firFilter, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(firFilter({ taps: [0.25, 0.5, 0.25], sampleRateHz: 1000 })).hz; // → 187.50
 * ```
 */
export function firFilter(options: { readonly taps: readonly number[]; readonly sampleRateHz: number }): Weighting {
  const taps = requireCoefficients("taps", options.taps);
  const rate = requirePositive("sampleRateHz", options.sampleRateHz, "Hz");
  const gain = tapGain(taps);
  const lags = autocorrelation(taps);
  const waves = lags.map((value, lag) => (lag === 0 ? steady(value) : wave(lag / rate, 2 * value)));
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
